#include "loqsmith/limits/prediction_band.hpp"

#include <cmath>

#include "loqsmith/limits/low_range_procedure.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

constexpr double kQuantitationFactor = 10.0;

NotApplicable never_reached(const LowRangeLine& line, double beta) {
  const double slope_sd =
      line.residual_sd * std::sqrt(line.leverage.inverse_squares);
  const double t = student_t_quantile(1.0 - beta, line.degrees_of_freedom);
  return {"no-detection-limit: the slope, " + figure(line.slope) +
          ", does not exceed " + figure(t) + " times its standard deviation, " +
          figure(slope_sd) +
          ": the lower prediction line never rises to the critical response"};
}

}  // namespace

// With h = y_C - a and tau = t_{1-beta} s the squared equation is
//
//     (b x - h)^2 = tau^2 (1/m + h(x)),   p x^2 - 2 q x + r = 0,
//
// whose larger root is the one with b x > h.
std::optional<double> band_detection_limit(const LowRangeLine& line,
                                           double residual_sd,
                                           const BandLimit& band) {
  const double df = line.degrees_of_freedom;
  const double at_zero = 1.0 / band.replicates + line.leverage.at(0.0);
  const double tau = student_t_quantile(1.0 - band.beta, df) * residual_sd;
  const double critical = student_t_quantile(1.0 - band.alpha, df) *
                          residual_sd * std::sqrt(at_zero);
  const double slope_part = tau * tau * line.leverage.inverse_squares;
  const double p = line.slope * line.slope - slope_part;
  if (!(p > 1e-9 * line.slope * line.slope)) return std::nullopt;
  const double q = line.slope * critical - slope_part * line.leverage.centre;
  const double r = critical * critical - tau * tau * at_zero;
  const double root = std::sqrt(std::fmax(0.0, q * q - p * r));
  const double found = q > 0.0 ? (q + root) / p : -r / (root - q);
  if (!(found > 0.0) || !std::isfinite(found)) return std::nullopt;
  return found;
}

Outcome<LimitEstimate> prediction_band(const LimitEvidence& evidence,
                                       const LimitSettings& settings,
                                       const ProcedureSettings& procedure) {
  const Outcome<LowRangeLine> line = low_range_of(evidence, procedure);
  if (!line) return NotApplicable{line.reason()};
  const BandLimit band{procedure.alpha, procedure.beta,
                       replicates_of(procedure)};
  if (!band_detection_limit(*line, line->residual_sd, band))
    return never_reached(*line, procedure.beta);

  LimitEstimate estimate = estimate_of(*line);
  const double t =
      student_t_quantile(1.0 - band.alpha, line->degrees_of_freedom);
  const double above = t * line->blank_reading_sd(band.replicates);
  estimate.critical_value = above / line->slope;
  estimate.terms.push_back({"alpha", band.alpha, ""});
  estimate.terms.push_back({"beta", band.beta, ""});
  estimate.terms.push_back({"measurements averaged", band.replicates, ""});
  estimate.terms.push_back({"quantile of t for alpha", t, ""});
  estimate.terms.push_back(
      {"quantile of t for beta",
       student_t_quantile(1.0 - band.beta, line->degrees_of_freedom), ""});
  estimate.terms.push_back(
      {"critical response", line->intercept + above, kResponse});
  estimate.terms.push_back({"quantitation factor", kQuantitationFactor, ""});
  set_limits_with_bounds(estimate, *line, [&](double residual_sd) {
    return LimitPair{band_detection_limit(*line, residual_sd, band),
                     kQuantitationFactor * residual_sd / line->slope};
  });
  judge_low_range(estimate, evidence, settings, procedure, *line);
  return estimate;
}

}  // namespace loqsmith
