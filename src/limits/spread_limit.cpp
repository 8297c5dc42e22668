#include "loqsmith/limits/spread_limit.hpp"

#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {

void set_spread_limits(LimitEstimate& estimate, const Spread& spread,
                       double slope, const ProcedureSettings& procedure) {
  const double detection = procedure.detection_factor * spread.sd / slope;
  const double quantitation = procedure.quantitation_factor * spread.sd / slope;
  const SpreadBounds bounds =
      standard_deviation_bounds(spread.degrees_of_freedom, 0.95);
  estimate.detection = detection;
  estimate.quantitation = quantitation;
  estimate.detection_lower = bounds.lower * detection;
  estimate.detection_upper = bounds.upper * detection;
  estimate.quantitation_lower = bounds.lower * quantitation;
  estimate.quantitation_upper = bounds.upper * quantitation;
  estimate.degrees_of_freedom = spread.degrees_of_freedom;
  estimate.terms.push_back(
      {"lower bound multiplier (chi-square, without the slope's uncertainty)",
       bounds.lower, ""});
  estimate.terms.push_back(
      {"upper bound multiplier (chi-square, without the slope's uncertainty)",
       bounds.upper, ""});
}

void judge_distance_from_standards(LimitEstimate& estimate, double lowest) {
  if (!estimate.quantitation) return;
  const double ratio = lowest / *estimate.quantitation;
  if (!(ratio > 10.0)) return;
  estimate.findings.push_back(
      {Grade::Caution, "far-below-standards",
       "the lowest standard lies " + figure(ratio) +
           " times above the quantitation limit: the curve is not tested "
           "there"});
}

}  // namespace loqsmith
