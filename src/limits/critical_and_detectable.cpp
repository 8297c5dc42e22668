#include "loqsmith/limits/critical_and_detectable.hpp"

#include "loqsmith/limits/detectability.hpp"
#include "loqsmith/limits/found_deviation.hpp"
#include "loqsmith/limits/linear_variance_limits.hpp"
#include "loqsmith/limits/low_range_procedure.hpp"
#include "loqsmith/limits/spread_limit.hpp"

namespace loqsmith {
namespace {

Outcome<LimitEstimate> with_constant_variance(
    const LowRangeLine& line, const LimitEvidence& evidence,
    const LimitSettings& settings, const ProcedureSettings& procedure) {
  const auto factors = detectability_of(procedure, line.degrees_of_freedom);
  if (!factors) return NotApplicable{factors.reason()};
  LimitEstimate estimate = estimate_of(line);
  add_detectability_terms(estimate, procedure, *factors);
  const double above =
      factors->t * line.blank_reading_sd(replicates_of(procedure));
  estimate.critical_value = above / line.slope;
  estimate.terms.push_back(
      {"critical response", line.intercept + above, kResponse});
  set_limits_with_bounds(estimate, line, [&](double residual_sd) {
    const FoundDeviation found{residual_sd,
                               0.0,
                               replicates_of(procedure),
                               residual_sd * residual_sd,
                               line.leverage,
                               line.slope};
    return LimitPair{factors->delta * found.at(0.0),
                     multiple_of_deviation(kQuantitationFactor, found)};
  });
  note_no_quantitation(estimate, kQuantitationFactor);
  judge_low_range(estimate, evidence, settings, procedure, line);
  return estimate;
}

}  // namespace

Outcome<LimitEstimate> critical_and_detectable(
    const LimitEvidence& evidence, const LimitSettings& settings,
    const ProcedureSettings& procedure) {
  const Outcome<LowRangeLine> line = low_range_of(evidence, procedure);
  if (!line) return NotApplicable{line.reason()};
  return procedure.variance_linear
             ? linear_variance_limits(*line, evidence, settings, procedure)
             : with_constant_variance(*line, evidence, settings, procedure);
}

}  // namespace loqsmith
