#include "loqsmith/limits/blank_deviation.hpp"

#include "loqsmith/limits/blank_mean_bounds.hpp"
#include "loqsmith/limits/blank_offset.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/spread_limit.hpp"

namespace loqsmith {
namespace {

void add_terms(LimitEstimate& estimate, const BlankSample& sample,
               const Calibration& calibration,
               const ProcedureSettings& procedure) {
  estimate.n = sample.n();
  estimate.terms = {
      {"number of blanks", static_cast<double>(sample.n()), ""},
      {"mean of the blanks", sample.mean, kResponse},
      {"standard deviation of the blanks", sample.sd, kResponse},
      {"intercept", calibration.intercept, kResponse},
      {"slope at zero", calibration.slope, kResponsePerConcentration},
      {"detection factor", procedure.detection_factor, ""},
      {"quantitation factor", procedure.quantitation_factor, ""}};
}

void set_offset_limits(LimitEstimate& estimate, const BlankSample& sample,
                       const Calibration& calibration,
                       const ProcedureSettings& procedure) {
  const double above = sample.mean - calibration.intercept;
  estimate.detection =
      (above + procedure.detection_factor * sample.sd) / calibration.slope;
  estimate.quantitation =
      (above + procedure.quantitation_factor * sample.sd) / calibration.slope;
  estimate.degrees_of_freedom = sample.degrees_of_freedom();
  set_blank_mean_bounds(estimate, sample, calibration, procedure);
}

bool is_positive(const std::optional<double>& limit) {
  return limit && *limit > 0.0;
}

}  // namespace

Outcome<LimitEstimate> blank_deviation(const LimitEvidence& evidence,
                                       const LimitSettings& settings,
                                       const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: a limit needs the slope"};
  const Calibration& calibration = *evidence.calibration;
  if (!(calibration.slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising curve"};
  const Outcome<BlankSample> sample =
      usable_blanks(evidence, blank_kind_of(settings, procedure));
  if (!sample) return NotApplicable{sample.reason()};

  LimitEstimate estimate;
  add_terms(estimate, *sample, calibration, procedure);
  if (procedure.offset_blank_mean) {
    set_offset_limits(estimate, *sample, calibration, procedure);
  } else {
    set_spread_limits(estimate, {sample->sd, sample->degrees_of_freedom()},
                      calibration.slope, procedure);
  }
  if (!is_positive(estimate.detection) || !is_positive(estimate.quantitation))
    return NotApplicable{
        "limit-not-positive: the blanks' mean lies so far below the intercept "
        "that the limit would be at or below zero"};

  judge_blanks(estimate, *sample, evidence, settings);
  if (!procedure.offset_blank_mean) {
    judge_blank_offset(estimate, *sample, calibration);
    judge_baseline_without_offset(estimate, evidence);
  }
  judge_distance_from_standards(estimate, calibration.lowest);
  return estimate;
}

}  // namespace loqsmith
