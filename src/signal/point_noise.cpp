#include "loqsmith/signal/point_noise.hpp"

#include <algorithm>
#include <cmath>
#include <vector>

#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr double kCut = 3.5;
constexpr int kMostRounds = 20;

LineNoise line_through(double x1, double y1, double x2, double y2) {
  const double slope = x2 > x1 ? (y2 - y1) / (x2 - x1) : 0.0;
  return {y1 - slope * x1, slope, 0.0};
}

double residual(const LineNoise& line, double x, double y) {
  return y - line.intercept - line.slope * x;
}

// The resistant line: medians of the outer thirds.
LineNoise first_line(std::span<const double> x, std::span<const double> y) {
  const std::size_t third = std::max<std::size_t>(1, x.size() / 3);
  LineNoise line = line_through(median(x.first(third)), median(y.first(third)),
                                median(x.last(third)), median(y.last(third)));
  std::vector<double> distances(x.size());
  for (std::size_t i = 0; i < x.size(); ++i) {
    distances[i] = std::abs(residual(line, x[i], y[i]));
  }
  line.standard_deviation =
      kDeviationPerMedianDeviation * median_in_place(distances);
  return line;
}

LineNoise least_squares_line(const std::vector<double>& x,
                             const std::vector<double>& y) {
  const double middle = mean(x);
  const double level = mean(y);
  double sxx = 0.0;
  double sxy = 0.0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    sxx += (x[i] - middle) * (x[i] - middle);
    sxy += (x[i] - middle) * (y[i] - level);
  }
  LineNoise line{0.0, sxx > 0.0 ? sxy / sxx : 0.0, 0.0};
  line.intercept = level - line.slope * middle;
  double squares = 0.0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    const double r = (y[i] - level) - line.slope * (x[i] - middle);
    squares += r * r;
  }
  line.standard_deviation =
      std::sqrt(squares / (static_cast<double>(x.size()) - 2.0));
  return line;
}

// Its size.
double third_difference(std::span<const double> y, std::size_t i) {
  return std::abs((y[i + 3] - y[i]) - 3.0 * (y[i + 2] - y[i + 1]));
}

}  // namespace

double point_to_point_noise(std::span<const double> signal) {
  if (signal.size() < 4) return 0.0;
  std::vector<double> sizes(signal.size() - 3);
  for (std::size_t i = 0; i < sizes.size(); ++i) {
    sizes[i] = third_difference(signal, i);
  }
  return kDeviationPerMedianDeviation * median_in_place(sizes) /
         std::sqrt(20.0);
}

bool is_surely_quieter(std::span<const double> signal, double noise) {
  if (signal.size() < 4) return true;
  constexpr double kRounding = 1.0 - 1e-12;
  const double most =
      kRounding * noise * std::sqrt(20.0) / kDeviationPerMedianDeviation;
  const std::size_t n = signal.size() - 3;
  std::size_t within = 0;
  for (std::size_t i = 0; i < n; ++i) {
    within += third_difference(signal, i) <= most ? 1 : 0;
  }
  return within > n / 2;
}

LineNoise noise_about_line(std::span<const double> minutes,
                           std::span<const double> signal) {
  LineNoise line = first_line(minutes, signal);
  std::size_t kept_before = 0;
  std::vector<double> x;
  std::vector<double> y;
  x.reserve(minutes.size());
  y.reserve(minutes.size());
  for (int round = 0; round < kMostRounds; ++round) {
    const double cut = kCut * line.standard_deviation;
    x.clear();
    y.clear();
    for (std::size_t i = 0; i < minutes.size(); ++i) {
      if (std::abs(residual(line, minutes[i], signal[i])) <= cut) {
        x.push_back(minutes[i]);
        y.push_back(signal[i]);
      }
    }
    // More than half on one line: no noise to be seen.
    if (x.size() < 3 || x.size() == kept_before) return line;
    kept_before = x.size();
    line = least_squares_line(x, y);
  }
  return line;
}

}  // namespace loqsmith
