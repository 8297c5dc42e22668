#include "loqsmith/numerics/maximise_likelihood.hpp"

#include <Eigen/Cholesky>
#include <Eigen/Core>
#include <algorithm>
#include <cmath>
#include <cstddef>
#include <string>

namespace loqsmith {
namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

constexpr double kSmallestDamping = 1e-8;
constexpr double kLargestDamping = 1e12;
// Of log-likelihood, left by rounding where no step climbs any more.
constexpr double kRoundingGain = 1e-7;

MatrixXd matrix_of(const LikelihoodAt& here) {
  const Index p = static_cast<Index>(here.gradient.size());
  MatrixXd matrix(p, p);
  for (Index i = 0; i < p; ++i)
    for (Index j = 0; j < p; ++j)
      matrix(i, j) = here.information[static_cast<std::size_t>(i * p + j)];
  return matrix;
}

// The damped step, or nothing where the damped information is not positive.
std::optional<VectorXd> step_from(const LikelihoodAt& here, double damping) {
  const Index p = static_cast<Index>(here.gradient.size());
  MatrixXd matrix = matrix_of(here);
  for (Index i = 0; i < p; ++i)
    matrix(i, i) += damping * here.scale[static_cast<std::size_t>(i)];
  const Eigen::LLT<MatrixXd> factor(matrix);
  if (factor.info() != Eigen::Success) return std::nullopt;
  const VectorXd gradient = Eigen::Map<const VectorXd>(here.gradient.data(), p);
  const VectorXd step = factor.solve(gradient);
  if (!step.allFinite()) return std::nullopt;
  return step;
}

std::vector<double> moved(const std::vector<double>& from,
                          const VectorXd& step) {
  std::vector<double> to = from;
  for (std::size_t i = 0; i < to.size(); ++i)
    to[i] += step(static_cast<Index>(i));
  return to;
}

void shorten(VectorXd& step, const std::vector<double>& longest) {
  double factor = 1.0;
  for (std::size_t i = 0; i < longest.size(); ++i) {
    const double length = std::abs(step(static_cast<Index>(i)));
    if (length > longest[i]) factor = std::min(factor, longest[i] / length);
  }
  step *= factor;
}

double promised_gain(const LikelihoodAt& here, const VectorXd& step) {
  double gain = 0.0;
  for (std::size_t i = 0; i < here.gradient.size(); ++i)
    gain += here.gradient[i] * step(static_cast<Index>(i));
  return gain;
}

Outcome<MaximumLikelihood> at_the_top(const LikelihoodAt& here,
                                      const std::vector<double>& parameters,
                                      int evaluations) {
  const Eigen::LLT<MatrixXd> factor(matrix_of(here));
  const Index p = static_cast<Index>(parameters.size());
  if (factor.info() != Eigen::Success)
    return NotApplicable{"no-maximum: the likelihood has no peak"};
  const MatrixXd inverse = factor.solve(MatrixXd::Identity(p, p));
  if (!inverse.allFinite())
    return NotApplicable{"no-maximum: the likelihood has no peak"};
  const std::optional<VectorXd> step = step_from(here, 0.0);
  if (!step || !(promised_gain(here, *step) < kRoundingGain))
    return NotApplicable{"not-converged: no step climbs any further"};
  MaximumLikelihood top{parameters, here.value, {}, evaluations};
  for (Index i = 0; i < p; ++i)
    for (Index j = 0; j < p; ++j) top.covariance.push_back(inverse(i, j));
  return top;
}

}  // namespace

Outcome<MaximumLikelihood> maximise_likelihood(
    const Likelihood& likelihood, const std::vector<double>& start,
    const std::vector<double>& longest, int most_evaluations,
    double tolerance) {
  std::vector<double> parameters = start;
  std::optional<LikelihoodAt> here = likelihood(parameters);
  if (!here) return NotApplicable{"bad-start: parameters out of range"};
  double damping = 0.0;
  int evaluations = 1;
  const auto damp_more = [&damping] {
    damping = damping > 0.0 ? 8.0 * damping : kSmallestDamping;
  };
  while (evaluations < most_evaluations && damping < kLargestDamping) {
    std::optional<VectorXd> step = step_from(*here, damping);
    if (!step) {
      damp_more();
      continue;
    }
    if (promised_gain(*here, *step) < tolerance)
      return at_the_top(*here, parameters, evaluations);
    shorten(*step, longest);
    const std::vector<double> there = moved(parameters, *step);
    const std::optional<LikelihoodAt> next = likelihood(there);
    ++evaluations;
    if (!next || !(next->value >= here->value)) {
      damp_more();
      continue;
    }
    parameters = there;
    here = next;
    damping = damping > 10.0 * kSmallestDamping ? 0.125 * damping : 0.0;
  }
  // Rounding can keep the last step from climbing any further.
  if (damping >= kLargestDamping)
    return at_the_top(*here, parameters, evaluations);
  return NotApplicable{"not-converged: " + std::to_string(evaluations) +
                       " evaluations did not reach a peak"};
}

}  // namespace loqsmith
