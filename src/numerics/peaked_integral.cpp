#include "loqsmith/numerics/peaked_integral.hpp"

#include <cmath>
#include <optional>

namespace loqsmith {
namespace {

constexpr int kMostNewtonSteps = 100;
constexpr int kMostHalvings = 40;
constexpr double kModeTolerance = 1e-6;  // of the width
constexpr double kNegligible = -39.2;    // ln 1e-17
constexpr int kMostPoints = 2000;        // on each side

struct Mode {
  double at = 0.0;
  LogDensity density;
};

std::optional<Mode> locate_mode(const LogDensityAt& density, double start) {
  Mode mode{start, density(start)};
  if (!std::isfinite(mode.density.value)) return std::nullopt;
  for (int i = 0; i < kMostNewtonSteps; ++i) {
    if (!(mode.density.curvature < 0.0)) return std::nullopt;
    double step = -mode.density.slope / mode.density.curvature;
    const double width = 1.0 / std::sqrt(-mode.density.curvature);
    if (!(std::abs(step) > kModeTolerance * width)) break;
    bool climbed = false;
    for (int k = 0; k < kMostHalvings && !climbed; ++k, step *= 0.5) {
      const LogDensity there = density(mode.at + step);
      if (!(there.value >= mode.density.value)) continue;
      mode = {mode.at + step, there};
      climbed = true;
    }
    if (!climbed) break;  // as near as rounding allows
  }
  return mode;
}

// Adds points from the mode outward, heights relative to the peak's.
bool walk(const LogDensityAt& density, const Mode& mode, double step,
          PeakedIntegral& into) {
  for (int i = 1; i <= kMostPoints; ++i) {
    const double at = mode.at + step * i;
    const double below = density(at).value - mode.density.value;
    if (!(below > kNegligible)) return true;
    into.points.push_back(at);
    into.shares.push_back(std::exp(below));
  }
  return false;
}

}  // namespace

bool integrate_about_mode(const LogDensityAt& density, double start,
                          PeakedIntegral& into) {
  into.points.clear();
  into.shares.clear();
  const std::optional<Mode> mode = locate_mode(density, start);
  if (!mode) return false;
  const double step = 0.5 / std::sqrt(-mode->density.curvature);
  if (!std::isfinite(step)) return false;
  into.points.push_back(mode->at);
  into.shares.push_back(1.0);
  if (!walk(density, *mode, -step, into)) return false;
  if (!walk(density, *mode, step, into)) return false;

  double sum = 0.0;
  for (const double share : into.shares) sum += share;
  for (double& share : into.shares) share /= sum;
  into.log_integral = mode->density.value + std::log(sum * step);
  return std::isfinite(into.log_integral);
}

}  // namespace loqsmith
