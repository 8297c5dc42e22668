#include "loqsmith/limits/din_32645.hpp"

#include <cmath>

#include "loqsmith/limits/blank_offset.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/found_deviation.hpp"
#include "loqsmith/limits/low_range_procedure.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

// The three quantiles of t.
struct Quantiles {
  double alpha = 0.0;
  double beta = 0.0;
  double half_alpha = 0.0;
};

Quantiles quantiles_of(const ProcedureSettings& procedure, double df) {
  return {student_t_quantile(1.0 - procedure.alpha, df),
          student_t_quantile(1.0 - procedure.beta, df),
          student_t_quantile(1.0 - 0.5 * procedure.alpha, df)};
}

void add_terms(LimitEstimate& estimate, const ProcedureSettings& procedure,
               const Quantiles& t) {
  estimate.terms.push_back({"alpha", procedure.alpha, ""});
  estimate.terms.push_back({"beta", procedure.beta, ""});
  estimate.terms.push_back(
      {"measurements averaged", replicates_of(procedure), ""});
  estimate.terms.push_back({"quantile of t for alpha", t.alpha, ""});
  estimate.terms.push_back({"quantile of t for beta", t.beta, ""});
  estimate.terms.push_back(
      {"quantile of t for half of alpha", t.half_alpha, ""});
  estimate.terms.push_back(
      {"k, result over half its confidence interval", procedure.k, ""});
}

void judge_levels(LimitEstimate& estimate, const LowRangeLine& line) {
  const double ratio = line.highest / *estimate.critical_value;
  if (!(ratio > 10.0)) return;
  estimate.findings.push_back(
      {Grade::Note, "range-above-ten-limits",
       "the highest standard of the line is " + figure(ratio) +
           " times the decision limit, the standard asks for 10 at the most"});
}

LimitPair limits_at(const LowRangeLine& line, double residual_sd,
                    const ProcedureSettings& procedure, const Quantiles& t) {
  const FoundDeviation found{residual_sd,
                             0.0,
                             replicates_of(procedure),
                             residual_sd * residual_sd,
                             line.leverage,
                             line.slope};
  return {(t.alpha + t.beta) * found.at(0.0),
          multiple_of_deviation(procedure.k * t.half_alpha, found)};
}

Outcome<LimitEstimate> from_calibration(const LimitEvidence& evidence,
                                        const LimitSettings& settings,
                                        const ProcedureSettings& procedure) {
  const Outcome<LowRangeLine> line = low_range_of(evidence, procedure);
  if (!line) return NotApplicable{line.reason()};
  const Quantiles t = quantiles_of(procedure, line->degrees_of_freedom);
  LimitEstimate estimate = estimate_of(*line);
  add_terms(estimate, procedure, t);
  estimate.terms.push_back({"procedure standard deviation",
                            line->residual_sd / line->slope, kConcentration});
  estimate.critical_value =
      t.alpha * line->blank_reading_sd(replicates_of(procedure)) / line->slope;
  set_limits_with_bounds(estimate, *line, [&](double residual_sd) {
    return limits_at(*line, residual_sd, procedure, t);
  });
  note_no_quantitation(estimate, procedure.k * t.half_alpha);
  judge_levels(estimate, *line);
  judge_low_range(estimate, evidence, settings, procedure, *line);
  return estimate;
}

void set_blank_limits(LimitEstimate& estimate, const BlankSample& sample,
                      double slope, const ProcedureSettings& procedure,
                      const Quantiles& t) {
  const double n = static_cast<double>(sample.n());
  const double sd =
      sample.sd / slope * std::sqrt(1.0 / replicates_of(procedure) + 1.0 / n);
  ProcedureSettings factors = procedure;
  factors.detection_factor = t.alpha + t.beta;
  factors.quantitation_factor = procedure.k * t.half_alpha;
  estimate.critical_value = t.alpha * sd;
  set_spread_limits(estimate, {sd * slope, sample.degrees_of_freedom()}, slope,
                    factors);
}

Outcome<LimitEstimate> from_blanks(const LimitEvidence& evidence,
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
  const Quantiles t = quantiles_of(procedure, sample->degrees_of_freedom());
  LimitEstimate estimate;
  estimate.n = sample->n();
  estimate.terms = {
      {"number of blanks", static_cast<double>(sample->n()), ""},
      {"mean of the blanks", sample->mean, kResponse},
      {"standard deviation of the blanks", sample->sd, kResponse},
      {"slope at zero", calibration.slope, kResponsePerConcentration}};
  add_terms(estimate, procedure, t);
  set_blank_limits(estimate, *sample, calibration.slope, procedure, t);
  judge_blanks(estimate, *sample, evidence, settings);
  judge_blank_offset(estimate, *sample, calibration);
  judge_baseline_without_offset(estimate, evidence);
  judge_distance_from_standards(estimate, calibration.lowest);
  return estimate;
}

}  // namespace

Outcome<LimitEstimate> din_32645(const LimitEvidence& evidence,
                                 const LimitSettings& settings,
                                 const ProcedureSettings& procedure) {
  return procedure.way_blank ? from_blanks(evidence, settings, procedure)
                             : from_calibration(evidence, settings, procedure);
}

}  // namespace loqsmith
