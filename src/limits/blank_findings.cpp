#include <cmath>
#include <string>

#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/least_squares.hpp"
#include "loqsmith/numerics/shapiro_wilk.hpp"

namespace loqsmith {
namespace {

// One false alarm in a hundred clean nights.
constexpr double kAlarmRate = 0.01;
constexpr std::size_t kLeastForDrift = 5;
constexpr std::size_t kLeastForNormality = 5;
// Spread of low peaks over that of blanks which a limit may leave out.
constexpr double kSpreadRatio = 1.2;

void judge_number(LimitEstimate& estimate, const BlankSample& sample,
                  const LimitSettings& settings) {
  const auto minimum = static_cast<std::size_t>(settings.minimum_blanks);
  if (sample.n() >= minimum) return;
  std::string text = counted(sample.n(), "usable blank") +
                     ", the method asks for at least " +
                     std::to_string(minimum);
  if (sample.left_out > 0)
    text += "; " + std::to_string(sample.left_out) + " left out: after-high";
  estimate.findings.push_back({Grade::NotValid, "few-blanks", text});
}

void judge_left_out(LimitEstimate& estimate, const BlankSample& sample,
                    const LimitSettings& settings) {
  const auto minimum = static_cast<std::size_t>(settings.minimum_blanks);
  if (sample.left_out == 0 || sample.n() < minimum) return;
  estimate.findings.push_back(
      {Grade::Note, "after-high",
       counted(sample.left_out, "blank") +
           " right after an injection above half the range left out"});
}

void judge_bounds(LimitEstimate& estimate, const LimitEvidence& evidence) {
  if (!evidence.bounds_own) return;
  estimate.findings.push_back(
      {Grade::NotValid, "own-bounds",
       "peaks are integrated between their found feet, blanks are not: the "
       "blanks' spread says nothing of the samples'"});
}

// Critical value (n-1)/sqrt(n) sqrt(t^2/(n-2+t^2)), t at alpha/(2n) with n-2
// degrees of freedom: Grubbs, Technometrics 11 (1969) 1; ISO 5725-2 (1994)
// 7.3.4, from memory.
double grubbs_critical_value(double n) {
  const double t = student_t_quantile(1.0 - kAlarmRate / (2.0 * n), n - 2.0);
  return (n - 1.0) / std::sqrt(n) * std::sqrt(t * t / (n - 2.0 + t * t));
}

std::string bias_figures(const PredictedBias& bias, const BlankSample& sample) {
  return "by " + figure(bias.blank) + " (simulated with the blanks' noise, " +
         "standard error " + figure(bias.blank_error) + "), that is " +
         figure(bias.blank / sample.sd) +
         " of their standard deviations; their mean is " + figure(sample.mean);
}

// Where nothing stands, an estimated baseline follows the noise; below a peak
// it cannot.
void judge_estimated_baseline(LimitEstimate& estimate,
                              const BlankSample& sample,
                              const LimitEvidence& evidence) {
  if (!evidence.baseline_biased || !evidence.predicted_bias) return;
  const PredictedBias& bias = *evidence.predicted_bias;
  const double less = bias.blank - bias.low_peak;
  estimate.findings.push_back({Grade::Note, "baseline-shifts-blanks",
                               "this baseline lifts the responses of blanks " +
                                   bias_figures(bias, sample)});
  estimate.terms.push_back({"mean response of blanks predicted of the baseline",
                            bias.blank, kResponse});
  estimate.findings.push_back(
      {bias.spread_ratio > kSpreadRatio ? Grade::Caution : Grade::Note,
       "baseline-favours-blanks",
       "peaks 10 times as high as the noise scatter " +
           figure(bias.spread_ratio) +
           " times as much as blanks over this baseline, and are lifted " +
           figure(std::abs(less)) + (less < 0.0 ? " more" : " less") +
           ": a limit from blanks is too low by about that factor"});
}

void judge_outlier(LimitEstimate& estimate, const BlankSample& sample) {
  const BlankResponse* farthest = &sample.blanks.front();
  for (const BlankResponse& blank : sample.blanks)
    if (std::abs(blank.response - sample.mean) >
        std::abs(farthest->response - sample.mean))
      farthest = &blank;
  const double distance =
      std::abs(farthest->response - sample.mean) / sample.sd;
  const double critical =
      grubbs_critical_value(static_cast<double>(sample.n()));
  if (!(distance > critical)) return;
  estimate.findings.push_back(
      {Grade::Caution, "blank-outlier",
       "the blank of injection " + std::to_string(farthest->injection) +
           " lies " + figure(distance) +
           " standard deviations from the mean (Grubbs, 1 %: " +
           figure(critical) + "); it stays in"});
}

// One blank alone that lies far off is said already.
void judge_normality(LimitEstimate& estimate, const BlankSample& sample) {
  if (sample.n() < kLeastForNormality) return;
  std::vector<double> response;
  for (const BlankResponse& blank : sample.blanks)
    response.push_back(blank.response);
  const Outcome<ShapiroWilk> test = shapiro_wilk(response);
  if (!test || !(test->p < kAlarmRate)) return;
  estimate.findings.push_back(
      {Grade::Caution, "blanks-not-normal",
       "the blanks do not scatter like normal values (Shapiro and Wilk, W " +
           figure(test->w) + ", p " + figure(test->p) +
           "): multiples of their standard deviation do not promise the usual "
           "rates"});
}

void judge_drift(LimitEstimate& estimate, const BlankSample& sample) {
  if (sample.n() < kLeastForDrift) return;
  std::vector<double> order, response;
  for (const BlankResponse& blank : sample.blanks) {
    order.push_back(static_cast<double>(order.size()));
    response.push_back(blank.response);
  }
  const auto line = fit_polynomial(order, response, 0, 1);
  if (!line || !(line->standard_errors[1] > 0.0)) return;
  const double t = std::abs(line->coefficients[1]) / line->standard_errors[1];
  const double critical =
      student_t_quantile(1.0 - 0.5 * kAlarmRate, line->degrees_of_freedom);
  if (!(t > critical)) return;
  const double change = line->coefficients[1] * order.back();
  estimate.findings.push_back(
      {Grade::Caution, "blanks-drift",
       "the blanks change over the run by " + figure(change / sample.sd) +
           " of their standard deviations (t " + figure(t) +
           ", 1 %: " + figure(critical) + ")"});
}

}  // namespace

void judge_blanks(LimitEstimate& estimate, const BlankSample& sample,
                  const LimitEvidence& evidence,
                  const LimitSettings& settings) {
  judge_number(estimate, sample, settings);
  judge_left_out(estimate, sample, settings);
  judge_bounds(estimate, evidence);
  judge_estimated_baseline(estimate, sample, evidence);
  const std::size_t before = estimate.findings.size();
  judge_outlier(estimate, sample);
  if (estimate.findings.size() == before) judge_normality(estimate, sample);
  judge_drift(estimate, sample);
}

}  // namespace loqsmith
