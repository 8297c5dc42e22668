#include "loqsmith/signal/fit_template.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/generalised_fit.hpp"

namespace loqsmith {
namespace {

constexpr double kPassingShare = 0.9999;
constexpr double kNoiseDoubt = 1.25;
constexpr double kShapeTolerance = 0.02;
constexpr double kScatterMultiple = 3.0;
constexpr double kRounding = 1e-10;
constexpr int kRefinements = 2;
constexpr double kClearMultiple = 10.0;
constexpr double kMostMove = 0.15;

using Values = std::vector<double>;

// Noise of zero has no covariance to weigh with: all points count alike.
MarkovCovariance covariance_of(const NoiseModel& noise) {
  if (!(noise.variance() > 0.0)) return {};
  return {noise.white_variance, noise.creeping_variance, noise.correlation};
}

// Columns of the fit over the points [first, last).
struct Columns {
  std::size_t first = 0;
  Values signal;
  Values shape;
  Values slope;
  Values level;
  Values tilt;
};

Columns columns_of(const SmoothedStretch& stretch, const PlacedWindow& window,
                   double apex, const TemplateShape& shape) {
  Columns columns;
  columns.first = window.left.first;
  const std::size_t last = window.right.last;
  const double reach = shape.left_minutes + shape.right_minutes();
  for (std::size_t i = columns.first; i < last; ++i) {
    const double offset = stretch.minutes[i] - apex;
    // A constant off first: large signals would drown small residuals.
    columns.signal.push_back(stretch.signal[i] - stretch.signal[columns.first]);
    columns.shape.push_back(shape_at(shape, offset));
    columns.slope.push_back(shape_slope_at(shape, offset));
    columns.level.push_back(1.0);
    columns.tilt.push_back(offset / reach);
  }
  return columns;
}

bool stands_alone(const Foot& foot) {
  return !foot.dropped && !foot.crowded && foot.points() > 0;
}

double largest(const Values& values) {
  double most = 0.0;
  for (const double value : values) most = std::max(most, std::abs(value));
  return most;
}

// What the residuals may amount to.
double allowed_misfit(const Columns& columns, const TemplateShape& shape,
                      const NoiseModel& noise, double response) {
  const auto n = static_cast<double>(columns.signal.size());
  const double square = response * response;
  const double tolerance =
      kShapeTolerance * kShapeTolerance +
      kScatterMultiple * kScatterMultiple * shape.scatter * shape.scatter;
  const double by_shape =
      tolerance * square * covariance_form(covariance_of(noise), columns.shape);
  if (!(noise.variance() > 0.0)) {
    const double step = kRounding * largest(columns.signal);
    return by_shape + square * n * shape.noise * shape.noise + n * step * step;
  }
  const double learned = square * shape.noise * shape.noise / noise.variance();
  return by_shape + chi_square_quantile(kPassingShare, n - 4.0) * kNoiseDoubt *
                        kNoiseDoubt * (1.0 + learned);
}

// The fit that also lets the apex move a little, under this trace's noise.
struct MovableFit {
  double misfit = 0.0;
  double later_minutes = 0.0;  // by how much the peak stands later
};

Outcome<MovableFit> fit_movable(const Columns& columns,
                                const NoiseModel& noise) {
  const std::vector<Values> x{columns.shape, columns.slope, columns.level,
                              columns.tilt};
  const Outcome<GeneralisedFit> fit = generalised_fit(x, covariance_of(noise));
  if (!fit) return NotApplicable{fit.reason()};
  Values residuals = columns.signal;
  const Values found = fit->coefficients(residuals);
  for (std::size_t i = 0; i < residuals.size(); ++i) {
    for (std::size_t j = 0; j < x.size(); ++j) {
      residuals[i] -= found[j] * x[j][i];
    }
  }
  MovableFit moved;
  moved.misfit = covariance_form(covariance_of(noise), residuals);
  if (found[0] != 0.0) moved.later_minutes = -found[1] / found[0];
  return moved;
}

Outcome<TemplateFit> fit_at(const SmoothedStretch& stretch,
                            const PlacedWindow& window, double apex,
                            const WindowTemplate& learned,
                            const NoiseModel& noise) {
  const Columns columns = columns_of(stretch, window, apex, learned.shape);
  const Outcome<GeneralisedFit> fit =
      generalised_fit({columns.shape, columns.level, columns.tilt},
                      covariance_of(learned.weights_noise));
  if (!fit) return NotApplicable{fit.reason()};
  const Outcome<MovableFit> movable = fit_movable(columns, noise);
  if (!movable) return NotApplicable{movable.reason()};
  TemplateFit scaled;
  const Values& weights = fit->weights.front();
  const Values found = fit->coefficients(columns.signal);
  scaled.response = found[0];
  scaled.level = found[1] + stretch.signal[columns.first];
  scaled.slope =
      found[2] / (learned.shape.left_minutes + learned.shape.right_minutes());
  scaled.weights.assign(stretch.minutes.size(), 0.0);
  std::copy(
      weights.begin(), weights.end(),
      scaled.weights.begin() + static_cast<std::ptrdiff_t>(columns.first));
  scaled.apex_minutes = apex;
  scaled.later_minutes = movable->later_minutes;
  scaled.misfit = movable->misfit;
  scaled.allowed =
      allowed_misfit(columns, learned.shape, noise, scaled.response);
  return scaled;
}

}  // namespace

Outcome<TemplateFit> fit_template(const SmoothedStretch& stretch,
                                  const PlacedWindow& window, double apex,
                                  const WindowTemplate& learned,
                                  const NoiseModel& noise) {
  if (learned.shape.empty()) {
    return NotApplicable{"no standard fit to teach the shape"};
  }
  if (!stands_alone(window.left) || !stands_alone(window.right)) {
    return NotApplicable{"a neighbour bounds the window"};
  }
  Outcome<TemplateFit> fit = fit_at(stretch, window, apex, learned, noise);
  for (int round = 0; round < kRefinements && fit; ++round) {
    const double most = kMostMove * learned.width_half_minutes;
    const bool clear =
        fit->response >= kClearMultiple * weighted_noise(fit->weights, noise);
    if (!clear || !(std::abs(fit->later_minutes) <= most)) break;
    fit = fit_at(stretch, window, fit->apex_minutes + fit->later_minutes,
                 learned, noise);
  }
  return fit;
}

}  // namespace loqsmith
