#include "loqsmith/limits/error_propagation.hpp"

#include <cmath>

#include "loqsmith/limits/blank_offset.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/low_range_findings.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/limits/low_range_procedure.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"

namespace loqsmith {
namespace {

// Standard deviations in response units.
struct Parts {
  double blanks = 0.0;
  double intercept = 0.0;
  double slope = 0.0;  // |i / m| s_m

  double line() const { return std::hypot(intercept, slope); }
  double sum() const { return std::hypot(blanks, line()); }
};

Parts parts_of(const BlankSample& sample, const Calibration& calibration) {
  Parts parts;
  parts.blanks = sample.sd;
  parts.intercept = std::sqrt(std::fmax(0.0, calibration.covariance[0][0]));
  parts.slope = std::abs(calibration.intercept / calibration.slope) *
                std::sqrt(std::fmax(0.0, calibration.covariance[1][1]));
  return parts;
}

// Shares first: fourth powers of responses may leave the range of a double.
double degrees_of_freedom(const Parts& parts, double blanks_df,
                          double line_df) {
  const double blanks = std::pow(parts.blanks / parts.sum(), 4) / blanks_df;
  const double line =
      line_df >= 1.0 ? std::pow(parts.line() / parts.sum(), 4) / line_df : 0.0;
  return 1.0 / (blanks + line);
}

void add_terms(LimitEstimate& estimate, const BlankSample& sample,
               const Calibration& calibration, const Parts& parts,
               const ProcedureSettings& procedure) {
  estimate.n = sample.n();
  estimate.terms = {
      {"number of blanks", static_cast<double>(sample.n()), ""},
      {"mean of the blanks", sample.mean, kResponse},
      {"standard deviation of the blanks", parts.blanks, kResponse},
      {"intercept", calibration.intercept, kResponse},
      {"standard deviation of the intercept", parts.intercept, kResponse},
      {"slope", calibration.slope, kResponsePerConcentration},
      {"standard deviation of the slope",
       std::sqrt(std::fmax(0.0, calibration.covariance[1][1])),
       kResponsePerConcentration},
      {"slope's part of the standard deviation", parts.slope, kResponse},
      {"standard deviation with all errors", parts.sum(), kResponse},
      {"detection factor", procedure.detection_factor, ""},
      {"quantitation factor", procedure.quantitation_factor, ""}};
}

void judge_calibration(LimitEstimate& estimate,
                       const Calibration& calibration) {
  using Settings = CalibrationSettings;
  if (calibration.settings.weight != Settings::Weight::None ||
      calibration.settings.model != Settings::Model::Linear)
    return;
  const auto line = fit_low_range(calibration, std::nullopt);
  if (line) judge_variance(estimate, *line);
}

}  // namespace

Outcome<LimitEstimate> error_propagation(const LimitEvidence& evidence,
                                         const LimitSettings& settings,
                                         const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: a limit needs the slope"};
  const Calibration& calibration = *evidence.calibration;
  if (calibration.settings.model == CalibrationSettings::Model::Quadratic)
    return NotApplicable{
        "quadratic-calibration: the errors of a straight line are propagated"};
  if (!(calibration.slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising line"};
  const Outcome<BlankSample> sample =
      usable_blanks(evidence, blank_kind_of(settings, procedure));
  if (!sample) return NotApplicable{sample.reason()};

  const Parts parts = parts_of(*sample, calibration);
  LimitEstimate estimate;
  add_terms(estimate, *sample, calibration, parts, procedure);
  const double df = degrees_of_freedom(parts, sample->degrees_of_freedom(),
                                       calibration.degrees_of_freedom);
  set_spread_limits(estimate, {parts.sum(), df}, calibration.slope, procedure);
  estimate.terms.push_back(
      {"degrees of freedom of the sum (Welch and Satterthwaite)", df, ""});
  judge_blanks(estimate, *sample, evidence, settings);
  judge_blank_offset(estimate, *sample, calibration);
  judge_baseline_without_offset(estimate, evidence);
  judge_calibration(estimate, calibration);
  judge_slope(estimate,
              std::sqrt(std::fmax(0.0, calibration.covariance[1][1])) /
                  calibration.slope);
  judge_distance_from_standards(estimate, calibration.lowest);
  return estimate;
}

}  // namespace loqsmith
