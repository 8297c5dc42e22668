#include "loqsmith/limits/linear_variance_limits.hpp"

#include <cmath>
#include <cstddef>

#include "loqsmith/limits/detectability.hpp"
#include "loqsmith/limits/found_deviation.hpp"
#include "loqsmith/limits/linear_deviation.hpp"
#include "loqsmith/limits/low_range_procedure.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kFewReplicates = 4;

// The line with weights 1 / sigma(x)^2 through the same standards.
struct WeightedLine {
  LinearDeviation deviation;
  double intercept = 0.0;
  double slope = 0.0;
  double residual_variance = 0.0;
  int degrees_of_freedom = 0;
  Leverage leverage;

  FoundDeviation found(double replicates) const {
    return {deviation.constant, deviation.growth, replicates,
            residual_variance,  leverage,         slope};
  }
};

Outcome<WeightedLine> fit_weighted(const LowRangeLine& low) {
  const auto deviation =
      fit_linear_deviation(low.concentrations, low.responses);
  if (!deviation) return NotApplicable{deviation.reason()};
  std::vector<double> weights;
  for (double concentration : low.concentrations) {
    const double sd = deviation->at(concentration);
    weights.push_back(1.0 / (sd * sd));
  }
  const auto fit = fit_polynomial(low.concentrations, low.responses,
                                  low.through_zero ? 1 : 0, 1, weights);
  if (!fit) return NotApplicable{"no-line: " + fit.reason()};
  WeightedLine line;
  line.deviation = *deviation;
  line.intercept = low.through_zero ? 0.0 : fit->coefficients.front();
  line.slope = fit->coefficients.back();
  line.residual_variance = fit->residual_sd * fit->residual_sd;
  line.degrees_of_freedom = fit->degrees_of_freedom;
  line.leverage = leverage_of(low.concentrations, weights, low.through_zero);
  if (!(line.slope > 0.0))
    return NotApplicable{
        "slope-not-positive: the weighted line through the standards does not "
        "rise"};
  return line;
}

// The source keeps the line's part as it is at zero.
std::optional<double> detectable(const WeightedLine& line, double delta,
                                 double replicates) {
  FoundDeviation found = line.found(replicates);
  found.leverage = {line.leverage.at(0.0), 0.0, 0.0};
  return multiple_of_deviation(delta, found);
}

void add_line_terms(LimitEstimate& estimate, const LowRangeLine& low,
                    const WeightedLine& line) {
  estimate.n = low.responses.size();
  estimate.degrees_of_freedom = line.degrees_of_freedom;
  estimate.terms = {
      {"standard deviation of a response at zero", line.deviation.constant,
       kResponse},
      {"growth of that standard deviation", line.deviation.growth,
       kResponsePerConcentration},
      {"intercept of the weighted line", line.intercept, kResponse},
      {"slope of the weighted line", line.slope, kResponsePerConcentration},
      {"weighted mean of the standards", line.leverage.centre, kConcentration},
      {"weighted residual variance", line.residual_variance, ""},
      {"highest standard of the line", low.highest, kConcentration},
      {"levels above zero of the line", static_cast<double>(low.levels), ""},
      {"standards of the line", static_cast<double>(low.responses.size()), ""}};
}

// t has the degrees of freedom of the line, but the standard deviation at zero
// is known less well: what t promises, by Welch and Satterthwaite.
double predicted_rate(const WeightedLine& line, const Detectability& factors,
                      double replicates) {
  const double one =
      line.deviation.constant * line.deviation.constant / replicates;
  const double of_line = line.residual_variance * line.leverage.at(0.0);
  const double share = one / (one + of_line);
  const double df =
      1.0 / (share * share / line.deviation.degrees_of_freedom +
             (1.0 - share) * (1.0 - share) / line.degrees_of_freedom);
  return student_t_upper_tail(factors.t, df);
}

// Simulated for six levels, alpha 0.05: 0.16 with 2 replicates, 0.10 with 3,
// 0.08 with 4, 0.06 with 10. The prediction falls short below 4.
void judge_promise(LimitEstimate& estimate, const WeightedLine& line,
                   double alpha, double rate) {
  estimate.terms.push_back(
      {"degrees of freedom of the standard deviation at zero",
       line.deviation.degrees_of_freedom, ""});
  estimate.terms.push_back(
      {"rate of blanks at or above the critical value by the replicates", rate,
       ""});
  const std::size_t fewest = line.deviation.fewest_replicates;
  if (fewest >= kFewReplicates && !(rate > 1.2 * alpha)) return;
  estimate.findings.push_back(
      {Grade::Caution, "few-replicates-at-zero",
       "the standard deviation at zero rests on levels of " +
           counted(fewest, "replicate") +
           " or more: of blank samples at least " +
           percent_figure(std::fmax(rate, alpha)) +
           " are to be expected at or above the critical value, where " +
           percent_figure(alpha) + " is claimed" +
           (fewest < kFewReplicates ? "; up to three times as many in "
                                      "simulations of so few replicates"
                                    : "")});
}

void judge_scatter(LimitEstimate& estimate, const WeightedLine& line) {
  const double df = line.degrees_of_freedom;
  const double critical = chi_square_quantile(0.99, df) / df;
  if (!(line.residual_variance > critical)) return;
  estimate.findings.push_back(
      {Grade::Caution, "scatter-exceeds-model",
       "about the line the standards' variance is " +
           figure(line.residual_variance) +
           " times that of their replicates (chi-square, 1 %: " +
           figure(critical) + "): the line, or the growth, is not straight"});
}

}  // namespace

Outcome<LimitEstimate> linear_variance_limits(
    const LowRangeLine& low, const LimitEvidence& evidence,
    const LimitSettings& settings, const ProcedureSettings& procedure) {
  const auto line = fit_weighted(low);
  if (!line) return NotApplicable{line.reason()};
  const auto factors = detectability_of(procedure, line->degrees_of_freedom);
  if (!factors) return NotApplicable{factors.reason()};
  const double replicates = replicates_of(procedure);
  const FoundDeviation found = line->found(replicates);

  LimitEstimate estimate;
  add_line_terms(estimate, low, *line);
  add_detectability_terms(estimate, procedure, *factors);
  estimate.detection = detectable(*line, factors->delta, replicates);
  if (!estimate.detection)
    return NotApplicable{
        "no-minimum-detectable-value: the standard deviation grows by " +
        figure(line->deviation.growth / line->slope / std::sqrt(replicates)) +
        " of the concentration, times the non-centrality " +
        figure(factors->delta) + " that is 1 or more"};
  estimate.critical_value = factors->t * found.at(0.0);
  estimate.quantitation = multiple_of_deviation(kQuantitationFactor, found);
  estimate.terms.push_back(
      {"critical response",
       line->intercept + *estimate.critical_value * line->slope, kResponse});
  judge_promise(estimate, *line, procedure.alpha,
                predicted_rate(*line, *factors, replicates));
  estimate.findings.push_back(
      {Grade::Note, "bounds-absent",
       "the limits rest on two estimated coefficients of the standard "
       "deviation: chi-square bounds do not hold for them"});
  note_no_quantitation(estimate, kQuantitationFactor);
  judge_scatter(estimate, *line);
  const double intercept_sd =
      std::sqrt(line->residual_variance * line->leverage.at(0.0));
  judge_place(estimate, evidence, settings, procedure,
              {line->intercept, intercept_sd, found.at(0.0) * line->slope,
               static_cast<double>(line->degrees_of_freedom), low.highest,
               low.through_zero});
  return estimate;
}

}  // namespace loqsmith
