#include "loqsmith/limits/low_range_procedure.hpp"

#include <algorithm>
#include <cmath>
#include <string>

#include "loqsmith/limits/blank_offset.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/low_range_findings.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

void bound(LimitEstimate& estimate, const LimitPair& lower,
           const LimitPair& upper) {
  estimate.detection_lower = lower.detection;
  estimate.detection_upper = upper.detection;
  estimate.quantitation_lower = lower.quantitation;
  estimate.quantitation_upper = upper.quantitation;
  if (!estimate.quantitation) {
    estimate.quantitation_lower.reset();
    estimate.quantitation_upper.reset();
  }
  const bool open = (estimate.detection && !upper.detection) ||
                    (estimate.quantitation && !upper.quantitation);
  if (!open) return;
  estimate.findings.push_back(
      {Grade::Note, "no-upper-bound",
       "with the upper bound of the residual standard deviation (95 %) the "
       "limit does not exist"});
}

void judge_through_zero(LimitEstimate& estimate) {
  estimate.findings.push_back(
      {Grade::Note, "line-through-zero",
       "the line goes through zero as the calibration does: blanks must read "
       "zero, the limit leaves out the uncertainty of an intercept"});
}

struct Decision {
  double concentration = 0.0;
  double claimed = 0.0;  // rate of false positives
  std::string name;
};

std::optional<Decision> decision_of(const LimitEstimate& estimate,
                                    const LimitSettings& settings,
                                    const ProcedureSettings& procedure) {
  if (settings.decision == LimitSettings::Decision::CriticalValue &&
      estimate.critical_value)
    return Decision{*estimate.critical_value, procedure.alpha,
                    "critical value"};
  if (!estimate.detection) return std::nullopt;
  return Decision{*estimate.detection, 0.0, "detection limit"};
}

Grade grade_of_rate(double rate, double claimed) {
  if (rate > std::max(0.05, 5.0 * claimed)) return Grade::NotValid;
  if (rate > std::max(0.02, 2.0 * claimed)) return Grade::Caution;
  return Grade::Note;
}

// A sample is read off the calibration, not off the low line.
void judge_difference(LimitEstimate& estimate, const Calibration& calibration,
                      const Decision& decision, const ZeroReading& reading) {
  const double difference = reading.intercept - calibration.intercept;
  const double df = reading.degrees_of_freedom;
  const double chance = student_t_quantile(0.975, df) * reading.intercept_sd;
  if (!(std::abs(difference) > chance)) return;
  const double t = (calibration.slope * decision.concentration - difference) /
                   reading.blank_sd;
  const double rate = student_t_upper_tail(t, df);
  estimate.findings.push_back(
      {grade_of_rate(rate, decision.claimed), "low-line-differs",
       "the line through the low standards meets zero at a response of " +
           figure(reading.intercept) +
           ", the calibration, off which samples are read, at " +
           figure(calibration.intercept) + ": of blank samples " +
           percent_figure(rate) + " are to be expected at or above the " +
           decision.name});
}

void judge_range(LimitEstimate& estimate, double highest) {
  const std::optional<double>& limit =
      estimate.quantitation ? estimate.quantitation : estimate.detection;
  if (!limit || !(*limit > highest)) return;
  estimate.findings.push_back(
      {Grade::Caution, "above-low-range",
       "the limit lies above the standards it rests on, which end at " +
           figure(highest)});
}

// Between found feet the blanks' spread says nothing of the standards'.
Outcome<BlankSample> blanks_beside(const LimitEvidence& evidence,
                                   const LimitSettings& settings,
                                   const ProcedureSettings& procedure) {
  if (evidence.bounds_own) return NotApplicable{"own-bounds"};
  return usable_blanks(evidence, blank_kind_of(settings, procedure));
}

}  // namespace

double replicates_of(const ProcedureSettings& procedure) {
  return static_cast<double>(std::max(1, procedure.replicates));
}

Outcome<LowRangeLine> low_range_of(const LimitEvidence& evidence,
                                   const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: there are no residuals"};
  const Calibration& calibration = *evidence.calibration;
  if (calibration.settings.model == CalibrationSettings::Model::Quadratic)
    return NotApplicable{
        "quadratic-calibration: the residuals of a curved calibration do not "
        "give a limit"};
  if (!(calibration.slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising line"};
  return fit_low_range(calibration, procedure.up_to);
}

LimitEstimate estimate_of(const LowRangeLine& line) {
  LimitEstimate estimate;
  estimate.n = line.responses.size();
  estimate.degrees_of_freedom = line.degrees_of_freedom;
  estimate.terms = {
      {"residual standard deviation of the low line", line.residual_sd,
       kResponse},
      {"intercept of the low line", line.intercept, kResponse},
      {"slope of the low line", line.slope, kResponsePerConcentration},
      {"mean standard of the low line", line.leverage.centre, kConcentration},
      {"highest standard of the low line", line.highest, kConcentration},
      {"levels above zero of the low line", static_cast<double>(line.levels),
       ""},
      {"standards of the low line", static_cast<double>(line.responses.size()),
       ""}};
  return estimate;
}

void set_limits_with_bounds(LimitEstimate& estimate, const LowRangeLine& line,
                            const std::function<LimitPair(double)>& limits_at) {
  const SpreadBounds bounds =
      standard_deviation_bounds(line.degrees_of_freedom, 0.95);
  const LimitPair limits = limits_at(line.residual_sd);
  estimate.detection = limits.detection;
  estimate.quantitation = limits.quantitation;
  bound(estimate, limits_at(bounds.lower * line.residual_sd),
        limits_at(bounds.upper * line.residual_sd));
  estimate.terms.push_back(
      {"lower multiplier of the residual standard deviation (chi-square, "
       "without the slope's uncertainty)",
       bounds.lower, ""});
  estimate.terms.push_back(
      {"upper multiplier of the residual standard deviation (chi-square, "
       "without the slope's uncertainty)",
       bounds.upper, ""});
}

void judge_place(LimitEstimate& estimate, const LimitEvidence& evidence,
                 const LimitSettings& settings,
                 const ProcedureSettings& procedure,
                 const ZeroReading& reading) {
  const Calibration& calibration = *evidence.calibration;
  if (reading.through_zero) judge_through_zero(estimate);
  const auto blanks = blanks_beside(evidence, settings, procedure);
  if (blanks && estimate.detection)
    judge_blank_offset(estimate, *blanks, calibration);
  if (const auto decision = decision_of(estimate, settings, procedure))
    judge_difference(estimate, calibration, *decision, reading);
  judge_distance_from_standards(estimate, calibration.lowest);
  judge_range(estimate, reading.highest);
}

void judge_slope(LimitEstimate& estimate, double relative_sd) {
  if (!(relative_sd > 0.06)) return;
  estimate.findings.push_back(
      {Grade::Note, "bounds-approximate",
       "the slope is known to " + percent_figure(relative_sd) +
           " only: the confidence bounds, which leave that out, are "
           "approximate (at 8 % they hold 0.86 to 0.95 of true limits in "
           "simulations)"});
}

void judge_low_range(LimitEstimate& estimate, const LimitEvidence& evidence,
                     const LimitSettings& settings,
                     const ProcedureSettings& procedure,
                     const LowRangeLine& line) {
  const double df = line.degrees_of_freedom;
  judge_variance(estimate, line);
  judge_curvature(estimate, line);
  if (const auto blanks = blanks_beside(evidence, settings, procedure))
    judge_against_blanks(estimate, line.residual_sd, df, *blanks);
  judge_slope(estimate, line.residual_sd / line.slope *
                            std::sqrt(line.leverage.inverse_squares));
  judge_place(estimate, evidence, settings, procedure,
              {line.intercept, line.intercept_sd(),
               line.blank_reading_sd(replicates_of(procedure)), df,
               line.highest, line.through_zero});
}

void note_no_quantitation(LimitEstimate& estimate, double factor) {
  if (estimate.quantitation) return;
  estimate.findings.push_back(
      {Grade::Caution, "quantitation-absent",
       "no found concentration is " + figure(factor) +
           " times its own standard deviation: that of the slope, or the "
           "growth of the scatter, is too large"});
}

}  // namespace loqsmith
