#include <algorithm>
#include <cmath>
#include <utility>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/signal/peak_free.hpp"
#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/summits.hpp"
#include "loqsmith/signal/trace_noise.hpp"

namespace loqsmith {
namespace {

constexpr double kStretchWidths = 20.0;
constexpr double kCut = 3.5;
constexpr std::size_t kFewestPoints = 20;

double dot(const std::vector<double>& a, const std::vector<double>& b) {
  double sum = 0.0;
  for (std::size_t i = 0; i < a.size(); ++i) sum += a[i] * b[i];
  return sum;
}

// Takes off what of the values lies along a direction of unit length.
void take_off(std::vector<double>& values, const std::vector<double>& along) {
  const double part = dot(values, along);
  for (std::size_t i = 0; i < values.size(); ++i) values[i] -= part * along[i];
}

void append(std::vector<double>& to, const std::vector<double>& more) {
  to.insert(to.end(), more.begin(), more.end());
}

struct Stretch {
  Trace points;
  std::vector<bool> free;
};

double above(const LineNoise& line, const Trace& points, std::size_t i) {
  return points.signal[i] - line.intercept - line.slope * points.minutes[i];
}

bool line_of_free(const Stretch& stretch, LineNoise& line) {
  std::vector<double> minutes;
  std::vector<double> signal;
  for (std::size_t i = 0; i < stretch.free.size(); ++i) {
    if (!stretch.free[i]) continue;
    minutes.push_back(stretch.points.minutes[i]);
    signal.push_back(stretch.points.signal[i]);
  }
  if (minutes.size() < kFewestPoints) return false;
  line = noise_about_line(minutes, signal);
  return true;
}

// A tail is left out as far as it stands a standard deviation above the line.
void leave_out_tails(Stretch& stretch, const LineNoise& line) {
  const std::size_t n = stretch.free.size();
  const auto high = [&](std::size_t i) {
    return above(line, stretch.points, i) > line.standard_deviation;
  };
  for (std::size_t i = 1; i < n; ++i) {
    if (!stretch.free[i - 1] && high(i)) stretch.free[i] = false;
  }
  for (std::size_t i = n; i-- > 1;) {
    if (!stretch.free[i] && high(i - 1)) stretch.free[i - 1] = false;
  }
}

// Residuals of the points about the least-squares parabola through them, by
// polynomials made orthogonal over these very points one after another.
std::vector<double> residuals_about_parabola(const std::vector<double>& minutes,
                                             std::vector<double> left) {
  std::vector<std::vector<double>> basis;
  const double middle = mean(minutes);
  for (int degree = 0; degree <= 2; ++degree) {
    std::vector<double> next(minutes.size(), 1.0);
    for (std::size_t i = 0; degree > 0 && i < next.size(); ++i) {
      next[i] = (minutes[i] - middle) * basis.back()[i];
    }
    for (const std::vector<double>& before : basis) take_off(next, before);
    const double length = std::sqrt(dot(next, next));
    if (!(length > 0.0)) break;
    for (double& value : next) value /= length;
    take_off(left, next);
    basis.push_back(std::move(next));
  }
  return left;
}

// Adds the residuals of one stretch; all of them unused where too few points
// are free. Says how many are used.
std::size_t add_residuals(Stretch stretch, PeakFreeTrace& whole) {
  LineNoise line;
  bool usable = line_of_free(stretch, line);
  if (usable) {
    leave_out_tails(stretch, line);
    usable = line_of_free(stretch, line);
  }
  const double cut = kCut * line.standard_deviation;
  std::vector<double> minutes;
  std::vector<double> signal;
  for (std::size_t i = 0; i < stretch.free.size(); ++i) {
    const bool use = usable && stretch.free[i] &&
                     std::abs(above(line, stretch.points, i)) <= cut;
    whole.residuals.used.push_back(use);
    if (!use) continue;
    minutes.push_back(stretch.points.minutes[i]);
    signal.push_back(stretch.points.signal[i]);
  }
  const std::vector<double> left = residuals_about_parabola(minutes, signal);
  std::size_t next = 0;
  for (std::size_t i = 0; i < stretch.free.size(); ++i) {
    const bool use = whole.residuals.used[whole.residuals.values.size()] != 0;
    whole.residuals.values.push_back(use ? left[next++] : 0.0);
  }
  append(whole.used_minutes, minutes);
  append(whole.used_signal, signal);
  return minutes.size();
}

Trace part_of(const Trace& trace, std::size_t first, std::size_t last) {
  Trace part;
  const auto a = static_cast<std::ptrdiff_t>(first);
  const auto b = static_cast<std::ptrdiff_t>(last);
  part.minutes.assign(trace.minutes.begin() + a, trace.minutes.begin() + b);
  part.signal.assign(trace.signal.begin() + a, trace.signal.begin() + b);
  return part;
}

std::size_t stretches_of(const Trace& trace, double width) {
  const double span = trace.minutes.back() - trace.minutes.front();
  return static_cast<std::size_t>(
      std::clamp(span / (kStretchWidths * width), 1.0, 1000.0));
}

}  // namespace

PeakFreeTrace peak_free_trace(const Trace& trace, double start_minutes,
                              double end_minutes, double width_half_minutes) {
  PeakFreeTrace whole;
  const std::size_t n = trace.minutes.size();
  if (n < kFewestPoints || !(width_half_minutes > 0.0)) return whole;
  const std::size_t stretches = stretches_of(trace, width_half_minutes);
  std::size_t used_stretches = 0;
  for (std::size_t k = 0; k < stretches; ++k) {
    Stretch stretch;
    stretch.points = part_of(trace, n * k / stretches, n * (k + 1) / stretches);
    stretch.free = peak_free_points(stretch.points, start_minutes, end_minutes,
                                    width_half_minutes);
    const std::size_t count = add_residuals(std::move(stretch), whole);
    whole.residuals.count += count;
    if (count > 0) ++used_stretches;
  }
  const double count = static_cast<double>(whole.residuals.count);
  whole.minutes = count * typical_step(trace.minutes);
  if (used_stretches > 0) {
    whole.stretch_points = count / static_cast<double>(used_stretches);
  }
  return whole;
}

}  // namespace loqsmith
