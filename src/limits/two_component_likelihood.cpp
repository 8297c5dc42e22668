#include "loqsmith/limits/two_component_likelihood.hpp"

#include <array>
#include <cmath>
#include <cstddef>
#include <numbers>

#include "loqsmith/numerics/peaked_integral.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kParameters = 4;
using Vector4 = std::array<double, kParameters>;
using Matrix4 = std::array<Vector4, kParameters>;

enum Parameter : std::size_t { kIntercept, kSlope, kAdditive, kProportional };

struct Parameters {
  double intercept, slope, additive_variance, proportional_variance;
};

// ln of the two normal densities' common factor left out of the exponents.
double log_scale(const Parameters& at, bool with_eta) {
  const double one = -0.5 * std::log(2.0 * std::numbers::pi);
  const double additive = one - 0.5 * std::log(at.additive_variance);
  return with_eta ? additive + one - 0.5 * std::log(at.proportional_variance)
                  : additive;
}

// First derivatives for known eta, and minus the second ones.
void known_eta(const Parameters& at, double x, double y, double eta,
               Vector4& score, Matrix4& information) {
  const double amount = x * std::exp(eta);
  const double r = y - at.intercept - at.slope * amount;
  const double u = 1.0 / at.additive_variance;
  const double squared = eta * eta / at.proportional_variance;
  score = {u * r, u * r * amount, u * r * r - 1.0, squared - 1.0};
  information = {};
  information[kIntercept][kIntercept] = u;
  information[kIntercept][kSlope] = u * amount;
  information[kSlope][kSlope] = u * amount * amount;
  information[kIntercept][kAdditive] = 2.0 * u * r;
  information[kSlope][kAdditive] = 2.0 * u * r * amount;
  information[kAdditive][kAdditive] = 2.0 * u * r * r;
  information[kProportional][kProportional] = 2.0 * squared;
}

struct Sums {
  double value = 0.0;
  Vector4 gradient{};
  Matrix4 information{};  // upper triangle
  Vector4 scale{};
};

// A response at zero concentration knows nothing of eta.
void add_zero(const Parameters& at, double y, Sums& sums) {
  Vector4 score;
  Matrix4 known;
  known_eta(at, 0.0, y, 0.0, score, known);
  const double r = y - at.intercept;
  sums.value += log_scale(at, false) - 0.5 * r * r / at.additive_variance;
  score[kProportional] = 0.0;
  for (std::size_t i = 0; i < kParameters; ++i) {
    sums.gradient[i] += score[i];
    sums.scale[i] += known[i][i];
    for (std::size_t j = i; j < kParameters; ++j)
      sums.information[i][j] += known[i][j];
  }
}

// Louis: information is that for known eta, less the score's variance.
void add_integral(const Parameters& at, double x, double y,
                  const PeakedIntegral& integral, Sums& sums) {
  Vector4 mean{};
  Matrix4 inner{};
  for (std::size_t k = 0; k < integral.points.size(); ++k) {
    Vector4 score;
    Matrix4 known;
    known_eta(at, x, y, integral.points[k], score, known);
    const double share = integral.shares[k];
    for (std::size_t i = 0; i < kParameters; ++i) {
      mean[i] += share * score[i];
      sums.scale[i] += share * known[i][i];
      for (std::size_t j = i; j < kParameters; ++j)
        inner[i][j] += share * (known[i][j] - score[i] * score[j]);
    }
  }
  sums.value += log_scale(at, true) + integral.log_integral;
  for (std::size_t i = 0; i < kParameters; ++i) {
    sums.gradient[i] += mean[i];
    for (std::size_t j = i; j < kParameters; ++j)
      sums.information[i][j] += inner[i][j] + mean[i] * mean[j];
  }
}

bool add_response(const Parameters& at, double x, double y,
                  PeakedIntegral& integral, Sums& sums) {
  if (!(x > 0.0)) {
    add_zero(at, y, sums);
    return true;
  }
  const double expected = at.slope * x;
  const LogDensityAt density = [&](double eta) {
    const double amount = expected * std::exp(eta);
    const double r = y - at.intercept - amount;
    return LogDensity{
        -0.5 * r * r / at.additive_variance -
            0.5 * eta * eta / at.proportional_variance,
        r * amount / at.additive_variance - eta / at.proportional_variance,
        -amount * amount / at.additive_variance -
            1.0 / at.proportional_variance};
  };
  // Where the peak stands unless the additive error hides it.
  const double above = (y - at.intercept) / expected;
  const double start = above > 0.1 && above < 10.0 ? std::log(above) : 0.0;
  if (!integrate_about_mode(density, start, integral)) return false;
  add_integral(at, x, y, integral, sums);
  return true;
}

std::optional<LikelihoodAt> finished(const Sums& sums) {
  LikelihoodAt there;
  there.value = sums.value;
  bool finite = std::isfinite(sums.value);
  for (std::size_t i = 0; i < kParameters; ++i) {
    there.gradient.push_back(sums.gradient[i]);
    there.scale.push_back(sums.scale[i]);
    finite = finite && std::isfinite(sums.gradient[i]) && sums.scale[i] > 0.0;
    for (std::size_t j = 0; j < kParameters; ++j) {
      const double one =
          i < j ? sums.information[i][j] : sums.information[j][i];
      there.information.push_back(one);
      finite = finite && std::isfinite(one);
    }
  }
  if (!finite) return std::nullopt;
  return there;
}

}  // namespace

std::optional<LikelihoodAt> two_component_likelihood(
    std::span<const double> x, std::span<const double> y,
    std::span<const double> parameters) {
  const Parameters at{parameters[kIntercept], parameters[kSlope],
                      std::exp(2.0 * parameters[kAdditive]),
                      std::exp(2.0 * parameters[kProportional])};
  if (!(at.slope > 0.0) || !(at.additive_variance > 0.0) ||
      !(at.proportional_variance > 0.0))
    return std::nullopt;
  Sums sums;
  PeakedIntegral integral;
  for (std::size_t i = 0; i < x.size(); ++i)
    if (!add_response(at, x[i], y[i], integral, sums)) return std::nullopt;
  return finished(sums);
}

}  // namespace loqsmith
