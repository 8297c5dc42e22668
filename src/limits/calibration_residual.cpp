#include "loqsmith/limits/calibration_residual.hpp"

#include "loqsmith/calibration/weight.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/low_range_findings.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/limits/spread_limit.hpp"

namespace loqsmith {
namespace {

using Model = CalibrationSettings::Model;

void add_factors(LimitEstimate& estimate, const ProcedureSettings& procedure) {
  estimate.terms.push_back(
      {"detection factor", procedure.detection_factor, ""});
  estimate.terms.push_back(
      {"quantitation factor", procedure.quantitation_factor, ""});
}

Outcome<LimitEstimate> from_low_range(const Calibration& calibration,
                                      const Outcome<BlankSample>& blanks,
                                      const ProcedureSettings& procedure) {
  const Outcome<LowRangeLine> line =
      fit_low_range(calibration, procedure.up_to);
  if (!line) return NotApplicable{line.reason()};
  LimitEstimate estimate;
  estimate.n = line->responses.size();
  estimate.terms = {
      {"residual standard deviation of the low line", line->residual_sd,
       kResponse},
      {"slope of the low line", line->slope, kResponsePerConcentration},
      {"highest standard of the low line", line->highest, kConcentration},
      {"levels above zero of the low line", static_cast<double>(line->levels),
       ""},
      {"standards of the low line", static_cast<double>(line->responses.size()),
       ""}};
  add_factors(estimate, procedure);
  const double df = line->degrees_of_freedom;
  set_spread_limits(estimate, {line->residual_sd, df}, line->slope, procedure);
  judge_variance(estimate, *line);
  judge_curvature(estimate, *line);
  if (blanks) judge_against_blanks(estimate, line->residual_sd, df, *blanks);
  judge_distance_from_standards(estimate, calibration.lowest);
  return estimate;
}

// The weight has no value at zero and additive noise remains there: the
// variance is that of the lowest level, but not below the blanks'.
Outcome<LimitEstimate> from_weighted_fit(const Calibration& calibration,
                                         const Outcome<BlankSample>& blanks,
                                         const ProcedureSettings& procedure) {
  const double fitted_sd = response_sd_at(calibration, calibration.lowest);
  Spread spread{fitted_sd, static_cast<double>(calibration.degrees_of_freedom)};
  if (blanks && blanks->sd > fitted_sd)
    spread = {blanks->sd, blanks->degrees_of_freedom()};
  if (!(spread.sd > 1e-12 * calibration.slope * calibration.lowest))
    return NotApplicable{"no-scatter: the standards lie exactly on the curve"};

  LimitEstimate estimate;
  estimate.n = calibration.used_points();
  estimate.terms = {
      {"weighted residual standard deviation", calibration.residual_sd, ""},
      {"lowest standard", calibration.lowest, kConcentration},
      {"standard deviation of a response at the lowest standard", fitted_sd,
       kResponse}};
  if (blanks)
    estimate.terms.push_back(
        {"standard deviation of the blanks", blanks->sd, kResponse});
  estimate.terms.push_back(
      {"standard deviation used (the larger)", spread.sd, kResponse});
  estimate.terms.push_back(
      {"slope", calibration.slope, kResponsePerConcentration});
  add_factors(estimate, procedure);
  set_spread_limits(estimate, spread, calibration.slope, procedure);
  judge_distance_from_standards(estimate, calibration.lowest);
  return estimate;
}

}  // namespace

Outcome<LimitEstimate> calibration_residual(
    const LimitEvidence& evidence, const LimitSettings& settings,
    const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: there are no residuals"};
  const Calibration& calibration = *evidence.calibration;
  if (calibration.settings.model == Model::Quadratic)
    return NotApplicable{
        "quadratic-calibration: the residuals of a curved calibration do not "
        "give a limit"};
  if (!(calibration.slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising line"};
  // Between found feet the blanks' spread says nothing of the standards'.
  const Outcome<BlankSample> blanks =
      evidence.bounds_own
          ? NotApplicable{"own-bounds"}
          : usable_blanks(evidence, blank_kind_of(settings, procedure));
  if (is_weighted(calibration.settings))
    return from_weighted_fit(calibration, blanks, procedure);
  return from_low_range(calibration, blanks, procedure);
}

}  // namespace loqsmith
