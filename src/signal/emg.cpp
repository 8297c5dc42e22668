#include "loqsmith/signal/emg.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "loqsmith/numerics/erfcx.hpp"
#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {
namespace {

constexpr double kLargeZ = 6.7e7;
constexpr double kSmallTau = 0.05;
constexpr int kSeriesTerms = 12;

double gaussian(double u, double sigma) {
  return normal_density(u / sigma) / sigma;
}

// tau > 0, u = t - mu.
double tailing(double u, double sigma, double tau) {
  const double z = (sigma / tau - u / sigma) / std::numbers::sqrt2;
  const double v = u / sigma;
  if (z < 0.0) {
    const double s = sigma / tau;
    return std::exp(s * (0.5 * s - v)) * std::erfc(z) / (2.0 * tau);
  }
  if (z <= kLargeZ) return std::exp(-0.5 * v * v) * erfcx(z) / (2.0 * tau);
  return gaussian(u, sigma) / (1.0 - v * (tau / sigma));
}

// With f the peak and g its Gaussian: tau f' + f = g, df/dsigma = sigma f''.
EmgDerivatives closed_derivatives(double u, double sigma, double tau) {
  const double f = tailing(u, sigma, tau);
  const double g = gaussian(u, sigma);
  const double slope = (g - f) / tau;
  const double bend = (-g * u / (sigma * sigma) - slope) / tau;
  EmgDerivatives result;
  result.value = f;
  result.by_mu = -slope;
  result.by_sigma = sigma * bend;
  result.by_tau =
      ((f * ((u - tau) * tau - sigma * sigma) + g * sigma * sigma) / tau) /
      (tau * tau);
  // Of the peak with the same decay once more, h: tau h' + h = f, h' = -by_tau.
  const double second = (slope + result.by_tau) / tau;
  result.by_tau_cubed = -(bend - second) / (3.0 * tau);
  return result;
}

// f = g sum over k of (tau/sigma)^k He_k(u/sigma), term by term; either sign
// of tau.
EmgDerivatives series_derivatives(double u, double sigma, double tau) {
  EmgDerivatives result;
  const double g = gaussian(u, sigma);
  if (!(g > 0.0)) return result;
  const double v = u / sigma;
  const double ratio = tau / sigma;
  double power = 1.0;    // ratio^k
  double lower = 0.0;    // ratio^(k-1)
  double hermite = 1.0;  // He_k
  double next = v;       // He_(k+1)
  for (int k = 0; k < kSeriesTerms; ++k) {
    const double after = v * next - (k + 1) * hermite;  // He_(k+2)
    result.value += power * hermite;
    result.by_mu += power * next;
    result.by_sigma += power * after;
    result.by_tau += k * lower * hermite;
    const double third = v * after - (k + 2) * next;  // He_(k+3)
    result.by_tau_cubed += (k + 1) * power * third;
    lower = power;
    power *= ratio;
    hermite = next;
    next = after;
  }
  result.value *= g;
  result.by_mu *= g / sigma;
  result.by_sigma *= g / sigma;
  result.by_tau *= g / sigma;
  result.by_tau_cubed *= g / (3.0 * sigma * sigma * sigma);
  return result;
}

}  // namespace

double emg(const EmgShape& shape, double minutes) {
  const double u = minutes - shape.mu;
  if (shape.tau > 0.0) return tailing(u, shape.sigma, shape.tau);
  if (shape.tau < 0.0) return tailing(-u, shape.sigma, -shape.tau);
  return gaussian(u, shape.sigma);
}

EmgDerivatives emg_derivatives(const EmgShape& shape, double minutes) {
  const double u = minutes - shape.mu;
  if (std::abs(shape.tau) < kSmallTau * shape.sigma) {
    EmgDerivatives result = series_derivatives(u, shape.sigma, shape.tau);
    result.value = emg(shape, minutes);
    return result;
  }
  if (shape.tau > 0.0) return closed_derivatives(u, shape.sigma, shape.tau);
  EmgDerivatives result = closed_derivatives(-u, shape.sigma, -shape.tau);
  result.by_mu = -result.by_mu;
  result.by_tau = -result.by_tau;
  result.by_tau_cubed = -result.by_tau_cubed;
  return result;
}

double emg_area_until(const EmgShape& shape, double minutes) {
  const double z = (minutes - shape.mu) / shape.sigma;
  return normal_cdf(z) - shape.tau * emg(shape, minutes);
}

double emg_apex(const EmgShape& shape) {
  // The slope (g - f) / tau passes zero between mu and the mean.
  double low = std::min(shape.mu, shape.mu + shape.tau);
  double high = std::max(shape.mu, shape.mu + shape.tau);
  while (high - low > 1e-10 * shape.sigma) {
    const double middle = 0.5 * (low + high);
    if (!(middle > low && middle < high)) break;
    const bool rising = emg_derivatives(shape, middle).by_mu < 0.0;
    (rising ? low : high) = middle;
  }
  return 0.5 * (low + high);
}

double emg_fallen_to(const EmgShape& shape, double fraction, bool before_apex) {
  double near = emg_apex(shape);
  const double level = fraction * emg(shape, near);
  double step = (before_apex ? -1.0 : 1.0) * shape.sigma;
  double far = near + step;
  while (emg(shape, far) > level) {
    near = far;
    step *= 2.0;
    far += step;
  }
  for (int k = 0; k < 60; ++k) {
    const double middle = 0.5 * (near + far);
    (emg(shape, middle) > level ? near : far) = middle;
  }
  return 0.5 * (near + far);
}

}  // namespace loqsmith
