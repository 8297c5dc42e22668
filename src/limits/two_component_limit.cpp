#include "loqsmith/limits/two_component_limit.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <string>
#include <vector>

#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/two_component_precision.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kFewestStandards = 8;
constexpr double kTwoDecades = 100.0 * (1.0 - 1e-9);

// Of the additive error: with 4, a factor of 2.9 up; with 1.5, of 10.
constexpr double kFewDegrees = 4.0;
constexpr double kTooFewDegrees = 1.5;

using Gradient = std::array<double, 4>;

struct Standards {
  std::vector<double> x, y;
  double lowest = 0.0;  // above zero
};

Standards used_standards(const Calibration& calibration) {
  std::vector<std::pair<double, double>> pairs;
  for (const StandardPoint& point : calibration.points)
    if (point.used) pairs.emplace_back(point.concentration, point.response);
  std::sort(pairs.begin(), pairs.end());
  Standards standards;
  for (const auto& [x, y] : pairs) {
    standards.x.push_back(x);
    standards.y.push_back(y);
    if (x > 0.0 && !(standards.lowest > 0.0)) standards.lowest = x;
  }
  return standards;
}

Outcome<Standards> suitable_standards(const LimitEvidence& evidence) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: a limit needs the slope"};
  const Calibration& calibration = *evidence.calibration;
  if (!(calibration.slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising curve"};
  if (calibration.settings.model == CalibrationSettings::Model::Quadratic)
    return NotApplicable{
        "curve-not-straight: the error model rests on a straight line"};
  Standards standards = used_standards(calibration);
  if (standards.x.size() < kFewestStandards)
    return NotApplicable{
        "few-standards: " + counted(standards.x.size(), "standard") +
        " for a line and two errors, at least " +
        std::to_string(kFewestStandards) + " are needed"};
  if (!(standards.lowest > 0.0))
    return NotApplicable{"range-too-short: no standard above zero"};
  if (!(standards.x.back() >= kTwoDecades * standards.lowest))
    return NotApplicable{
        "range-too-short: the highest standard is " +
        figure(standards.x.back() / standards.lowest) +
        " times the lowest, 100 times are needed to tell the two errors apart"};
  return standards;
}

// Variance of a quantity from its derivatives.
double variance_of(const TwoComponentModel& model, const Gradient& by) {
  double sum = 0.0;
  for (std::size_t i = 0; i < by.size(); ++i)
    for (std::size_t j = 0; j < by.size(); ++j)
      sum += by[i] * model.covariance[i][j] * by[j];
  return sum;
}

// Of V, by ln proportional_sd.
double relative_variance_slope(const TwoComponentModel& model) {
  const double variance = model.proportional_sd * model.proportional_sd;
  const double growth = std::exp(variance);
  return 2.0 * variance * growth * (2.0 * growth - 1.0);
}

// What the limits vary by, with the additive error and with V.
double log_variance(const TwoComponentModel& model, double by_v) {
  return variance_of(model, {0.0, -1.0 / model.slope, 1.0, by_v});
}

void set_bounds(LimitEstimate& estimate, const TwoComponentModel& model,
                const TwoComponentPrecision& precision,
                const ProcedureSettings& procedure) {
  const double z = normal_quantile(1.0 - procedure.alpha);
  const double v = model.relative_variance();
  const double v_slope = relative_variance_slope(model);
  if (estimate.detection) {
    const LimitFactors factors = limit_factors(
        precision, log_variance(model, z * z * v_slope / (1.0 - z * z * v)));
    estimate.detection_lower = factors.lower * *estimate.detection;
    estimate.detection_upper = factors.upper * *estimate.detection;
  }
  if (estimate.quantitation) {
    const double rho = procedure.relative_deviation;
    const LimitFactors factors = limit_factors(
        precision, log_variance(model, 0.5 * v_slope / (rho * rho - v)));
    estimate.quantitation_lower = factors.lower * *estimate.quantitation;
    estimate.quantitation_upper = factors.upper * *estimate.quantitation;
  }
}

void judge_additive_error(LimitEstimate& estimate,
                          const TwoComponentPrecision& precision) {
  if (!(precision.degrees_of_freedom < kFewDegrees)) return;
  const bool hardly = precision.degrees_of_freedom < kTooFewDegrees;
  estimate.findings.push_back(
      {hardly ? Grade::NotValid : Grade::Caution, "additive-error-uncertain",
       "the additive error is known with " +
           figure(precision.degrees_of_freedom) +
           " degrees of freedom: more replicates of low standards are "
           "needed"});
}

// The published critical value takes intercept and error as known.
void judge_critical_value(LimitEstimate& estimate,
                          const TwoComponentModel& model,
                          const TwoComponentPrecision& precision,
                          const ProcedureSettings& procedure) {
  const double nu = precision.degrees_of_freedom;
  const double sd = blank_reading_sd(model, precision, procedure.replicates);
  const double rate = student_t_upper_tail(*estimate.critical_value / sd, nu);
  const double keeping = sd * student_t_quantile(1.0 - procedure.alpha, nu);
  estimate.terms.push_back(
      {"predicted rate of false positives at the critical value", rate, ""});
  estimate.terms.push_back(
      {"critical value with the estimation error", keeping, kConcentration});
  if (!(rate > 1.1 * procedure.alpha)) return;
  estimate.findings.push_back(
      {rate > 2.0 * procedure.alpha ? Grade::Caution : Grade::Note,
       "critical-value-optimistic",
       "the formula takes the fitted errors as known: with these standards " +
           percent_figure(rate) +
           " of blank samples are to be expected at or above the critical "
           "value, not " +
           percent_figure(procedure.alpha) + "; " + figure(keeping) +
           " would keep to that"});
}

// Three or four digits, so that 10.4 % and 10 % differ.
std::string deviation_figure(double fraction) {
  return figure(100.0 * fraction) + " %";
}

void judge_model(LimitEstimate& estimate, const TwoComponentModel& model,
                 const ProcedureSettings& procedure) {
  const double floor = std::sqrt(model.relative_variance());
  if (!estimate.quantitation)
    estimate.findings.push_back(
        {Grade::Caution, "quantitation-absent",
         "the relative standard deviation falls to " + deviation_figure(floor) +
             " at high concentrations, never to the wanted " +
             deviation_figure(procedure.relative_deviation) +
             ": there is no quantitation limit"});
  if (model.additive_only)
    estimate.findings.push_back(
        {Grade::Note, "proportional-error-not-seen",
         "the standards show no error that grows with the concentration"});
  if (model.by_moments) {
    estimate.findings.push_back(
        {Grade::Caution, "moment-estimates",
         "the likelihood of the error model has no peak: estimated from "
         "replicates instead, without confidence bounds"});
  }
}

void add_terms(LimitEstimate& estimate, const TwoComponentModel& model,
               const ProcedureSettings& procedure) {
  const double v = model.relative_variance();
  estimate.terms = {
      {"number of standards", static_cast<double>(estimate.n), ""},
      {"intercept", model.intercept, kResponse},
      {"slope", model.slope, kResponsePerConcentration},
      {"additive standard deviation", model.additive_sd, kResponse},
      {"additive standard deviation over slope",
       model.additive_concentration_sd(), kConcentration},
      {"proportional standard deviation (logarithm)", model.proportional_sd,
       ""},
      {"variance V of the proportional part", v, ""},
      {"least relative standard deviation", std::sqrt(v), ""},
      {"wanted relative standard deviation", procedure.relative_deviation, ""},
      {"normal quantile", normal_quantile(1.0 - procedure.alpha), ""},
      {"replicates", static_cast<double>(procedure.replicates), ""}};
  if (!model.by_moments)
    estimate.terms.push_back(
        {"logarithm of the likelihood", model.log_likelihood, ""});
}

}  // namespace

TwoComponentLimits two_component_limits(const TwoComponentModel& model,
                                        const ProcedureSettings& procedure) {
  const double z = normal_quantile(1.0 - procedure.alpha);
  const double s0 = model.additive_concentration_sd();
  const double v = model.relative_variance();
  TwoComponentLimits limits;
  limits.critical_value =
      z * s0 / std::sqrt(static_cast<double>(procedure.replicates));
  // x (1 - z^2 V) = 2 z s0 has the same root.
  const double left = 1.0 - z * z * v;
  if (left > 0.0) limits.detection = 2.0 * z * s0 / left;
  const double rho = procedure.relative_deviation;
  const double room = rho * rho - v;
  if (room > 0.0) limits.quantitation = s0 / std::sqrt(room);
  return limits;
}

Outcome<LimitEstimate> two_component_limit(const LimitEvidence& evidence,
                                           const LimitSettings&,
                                           const ProcedureSettings& procedure) {
  const Outcome<Standards> standards = suitable_standards(evidence);
  if (!standards) return NotApplicable{standards.reason()};
  Outcome<TwoComponentModel> model =
      fit_two_component(standards->x, standards->y);
  if (!model) model = two_component_by_moments(standards->x, standards->y);
  if (!model) return NotApplicable{model.reason()};

  const TwoComponentLimits limits = two_component_limits(*model, procedure);
  if (!limits.detection)
    return NotApplicable{"detection-absent: a relative standard deviation of " +
                         percent_figure(std::sqrt(model->relative_variance())) +
                         " however high the concentration: no detection limit"};
  LimitEstimate estimate;
  estimate.critical_value = limits.critical_value;
  estimate.detection = limits.detection;
  estimate.quantitation = limits.quantitation;
  estimate.n = standards->x.size();
  add_terms(estimate, *model, procedure);
  judge_model(estimate, *model, procedure);
  if (!model->by_moments) {
    const TwoComponentPrecision precision = precision_of(*model, standards->x);
    estimate.degrees_of_freedom = precision.degrees_of_freedom;
    set_bounds(estimate, *model, precision, procedure);
    judge_additive_error(estimate, precision);
    judge_critical_value(estimate, *model, precision, procedure);
  }
  judge_distance_from_standards(estimate, standards->lowest);
  return estimate;
}

}  // namespace loqsmith
