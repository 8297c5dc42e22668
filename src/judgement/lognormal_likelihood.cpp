#include "loqsmith/judgement/lognormal_likelihood.hpp"

#include <cmath>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/maximise_likelihood.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastMeasured = 3;
// From here on over a third of the mean comes from the uppermost 1 %.
constexpr double kVerySkew = 2.0;

/// Centred logarithms.
struct Logarithms {
  std::vector<CensoredValue> values;
  double centre = 0.0;
};

Logarithms logarithms_of(std::span<const CensoredValue> values) {
  Logarithms logs;
  std::vector<double> measured;
  for (const CensoredValue& one : values) {
    const double log = std::log(one.value);
    logs.values.push_back({log, one.censoring});
    if (one.censoring == Censoring::Measured) measured.push_back(log);
  }
  logs.centre = mean(measured);
  for (CensoredValue& one : logs.values) one.value -= logs.centre;
  return logs;
}

/// One result's share in the likelihood as a function of its standardised
/// residual r: the logarithm, its slope and minus its curvature.
struct Share {
  double value = 0.0;
  double slope = 0.0;
  double curvature = 0.0;
};

std::optional<Share> share_of(double r, Censoring censoring) {
  if (censoring == Censoring::Measured) {
    constexpr double kHalfLogTwoPi = 0.918938533204672741780;
    return Share{-0.5 * r * r - kHalfLogTwoPi, -r, 1.0};
  }
  const double side = censoring == Censoring::Below ? 1.0 : -1.0;
  const double probability = normal_cdf(side * r);
  if (!(probability > 0.0)) return std::nullopt;  // beyond 38 deviations
  const double hazard = normal_density(r) / probability;
  return Share{std::log(probability), side * hazard,
               hazard * (hazard + side * r)};
}

// In gamma = 1/sigma and delta = mu/sigma: r = gamma y - delta.
std::optional<LikelihoodAt> likelihood_at(const Logarithms& logs,
                                          std::span<const double> at) {
  const double gamma = at[0];
  if (!(gamma > 0.0)) return std::nullopt;
  LikelihoodAt sum;
  sum.gradient.assign(2, 0.0);
  sum.information.assign(4, 0.0);
  for (const CensoredValue& one : logs.values) {
    const double y = one.value;
    const auto share = share_of(gamma * y - at[1], one.censoring);
    if (!share) return std::nullopt;
    sum.value += share->value;
    sum.gradient[0] += share->slope * y;
    sum.gradient[1] -= share->slope;
    sum.information[0] += share->curvature * y * y;
    sum.information[1] -= share->curvature * y;
    sum.information[3] += share->curvature;
    if (one.censoring != Censoring::Measured) continue;
    sum.value += std::log(gamma);
    sum.gradient[0] += 1.0 / gamma;
    sum.information[0] += 1.0 / (gamma * gamma);
  }
  sum.information[2] = sum.information[1];
  sum.scale = {sum.information[0], sum.information[3]};
  return sum;
}

std::vector<double> start_of(const Logarithms& logs) {
  std::vector<double> all;
  for (const CensoredValue& one : logs.values) all.push_back(one.value);
  const double spread = standard_deviation(all);
  return {1.0 / spread, mean(all) / spread};
}

// Back to mu and sigma, of the values themselves.
LognormalFit fit_from(const MaximumLikelihood& top, const Logarithms& logs) {
  const double sigma = 1.0 / top.parameters[0];
  const double centred_mean = top.parameters[1] * sigma;
  const double by_gamma = -centred_mean * sigma;  // d mu / d gamma
  const double spread_by_gamma = -sigma * sigma;  // d sigma / d gamma
  const double v_gamma = top.covariance[0];
  const double v_both = top.covariance[1];
  const double v_delta = top.covariance[3];
  LognormalFit fit;
  fit.log_mean = centred_mean + logs.centre;
  fit.log_deviation = sigma;
  fit.variance_mean = by_gamma * by_gamma * v_gamma +
                      2.0 * by_gamma * sigma * v_both + sigma * sigma * v_delta;
  fit.variance_deviation = spread_by_gamma * spread_by_gamma * v_gamma;
  fit.covariance = spread_by_gamma * (by_gamma * v_gamma + sigma * v_both);
  fit.log_likelihood = top.value;
  // The density of x, not of ln x.
  for (const CensoredValue& one : logs.values) {
    if (one.censoring == Censoring::Measured) {
      fit.log_likelihood -= one.value + logs.centre;
    }
  }
  return fit;
}

std::string trouble_with(std::span<const CensoredValue> values) {
  for (const CensoredValue& one : values) {
    if (!(one.value > 0.0)) {
      return "not-positive: a value or limit has no logarithm";
    }
  }
  const std::vector<double> measured = measured_values(values);
  if (measured.size() < kLeastMeasured) {
    return "too-few-measured: at least 3 values must be measured";
  }
  if (measured.front() == measured.back()) {
    return "all-equal: the measured values have no spread";
  }
  return {};
}

}  // namespace

Outcome<LognormalFit> fit_lognormal(std::span<const CensoredValue> values) {
  if (std::string trouble = trouble_with(values); !trouble.empty()) {
    return NotApplicable{std::move(trouble)};
  }
  const Logarithms logs = logarithms_of(values);
  const Outcome<MaximumLikelihood> top = maximise_likelihood(
      [&logs](std::span<const double> at) { return likelihood_at(logs, at); },
      start_of(logs));
  if (!top) return NotApplicable{top.reason()};
  return fit_from(*top, logs);
}

CensoredEstimate lognormal_estimate(const LognormalFit& fit, std::size_t n) {
  const double sigma = fit.log_deviation;
  const double theta = fit.log_mean + 0.5 * sigma * sigma;
  const double variance = fit.variance_mean +
                          sigma * sigma * fit.variance_deviation +
                          2.0 * sigma * fit.covariance;
  CensoredEstimate estimate;
  const double mean = std::exp(theta);
  if (!std::isfinite(mean * std::sqrt(std::expm1(sigma * sigma)))) {
    estimate.notes.emplace_back("spread-beyond-numbers");
    return estimate;
  }
  estimate.mean = mean;
  if (sigma > kVerySkew) estimate.notes.emplace_back("mean-rests-on-shape");
  estimate.standard_deviation = mean * std::sqrt(std::expm1(sigma * sigma));
  for (std::size_t i = 0; i < kSummaryPercentiles.size(); ++i) {
    estimate.percentiles[i] = std::exp(
        fit.log_mean + sigma * normal_quantile(kSummaryPercentiles[i]));
  }
  if (n < 2 || !(variance > 0.0)) return estimate;
  const double error = std::sqrt(variance);
  estimate.standard_error = mean * error;
  estimate.upper_mean =
      std::exp(theta + student_t_quantile(kUpperMeanConfidence,
                                          static_cast<double>(n) - 1.0) *
                           error);
  return estimate;
}

}  // namespace loqsmith
