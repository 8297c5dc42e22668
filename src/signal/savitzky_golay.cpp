#include "loqsmith/signal/savitzky_golay.hpp"

#include <algorithm>
#include <cmath>

namespace loqsmith {
namespace {

// How even times must be for the classical weights.
constexpr double kEven = 0.01;

Jet times_shifted(const Jet& p, double u) {
  return {u * p[0], u * p[1] + p[0], u * p[2] + 2.0 * p[1]};
}

bool even_to(std::span<const double> minutes, double share) {
  const double mean_step = (minutes.back() - minutes.front()) /
                           static_cast<double>(minutes.size() - 1);
  const double most = share * mean_step;
  std::size_t even = 1;
  for (std::size_t i = 1; i < minutes.size(); ++i) {
    const double step = minutes[i] - minutes[i - 1];
    even += std::abs(step - mean_step) <= most ? 1 : 0;
  }
  return even == minutes.size();
}

double weighted(std::span<const double> weights,
                std::span<const double> signal) {
  double sum = 0.0;
  for (std::size_t i = 0; i < weights.size(); ++i) {
    sum += weights[i] * signal[i];
  }
  return sum;
}

struct Length {
  std::size_t points;
  int order;
};

// What is used where the data or the points asked for are too few.
Length usable_length(std::size_t available, int points, int order,
                     int derivative) {
  Length used{static_cast<std::size_t>(std::max(points, 1)), order};
  if (derivative > 0 && points <= order) used = {3, 2};
  used.points = std::min(used.points, available);
  used.order = std::min(used.order, static_cast<int>(used.points) - 1);
  return used;
}

}  // namespace

std::vector<double> local_polynomial_weights(std::span<const double> nodes,
                                             double at, int order,
                                             int derivative) {
  const std::size_t n = nodes.size();
  std::vector<double> before(n, 0.0);
  std::vector<double> now(n, 1.0);
  std::vector<double> weights(n, 0.0);
  Jet jet_before{0.0, 0.0, 0.0};
  Jet jet{1.0, 0.0, 0.0};
  double norm_before = 1.0;
  for (int k = 0;; ++k) {
    double norm = 0.0;
    double moment = 0.0;
    for (std::size_t i = 0; i < n; ++i) {
      norm += now[i] * now[i];
      moment += (nodes[i] - at) * now[i] * now[i];
    }
    const double share = jet[static_cast<std::size_t>(derivative)] / norm;
    for (std::size_t i = 0; i < n; ++i) weights[i] += share * now[i];
    if (k == order) return weights;
    const double shift = moment / norm;
    const double ratio = k == 0 ? 0.0 : norm / norm_before;
    for (std::size_t i = 0; i < n; ++i) {
      const double next = (nodes[i] - at - shift) * now[i] - ratio * before[i];
      before[i] = now[i];
      now[i] = next;
    }
    Jet next = times_shifted(jet, -shift);
    for (std::size_t d = 0; d < 3; ++d) next[d] -= ratio * jet_before[d];
    jet_before = jet;
    jet = next;
    norm_before = norm;
  }
}

std::vector<double> savitzky_golay_weights(int points, int order,
                                           int derivative) {
  std::vector<double> nodes;
  for (int i = 0; i < points; ++i) nodes.push_back(i - points / 2);
  return local_polynomial_weights(nodes, 0.0, order, derivative);
}

bool evenly_spaced(std::span<const double> minutes) {
  // Any part is then even to twice as much.
  return minutes.size() < 2 || even_to(minutes, 0.45 * kEven);
}

std::vector<double> savitzky_golay(std::span<const double> minutes,
                                   std::span<const double> signal, int points,
                                   int order, int derivative) {
  const std::size_t n = signal.size();
  std::vector<double> result(signal.begin(), signal.end());
  if (n < 2 || (derivative == 0 && points <= order)) {
    if (derivative > 0) std::fill(result.begin(), result.end(), 0.0);
    return result;
  }
  const Length used = usable_length(n, points, order, derivative);
  // Of too few points all are used, for all places alike.
  const std::size_t half = used.points % 2 == 1 ? used.points / 2 : n;
  const auto d = static_cast<std::size_t>(derivative);
  fit_ends(minutes, signal, half, used.order,
           [&](std::size_t i, const Jet& jet) { result[i] = jet[d]; });
  const std::vector<double> classical = savitzky_golay_weights(
      static_cast<int>(used.points), used.order, derivative);
  const bool all_even = evenly_spaced(minutes);
  for (std::size_t i = half; i + half < n; ++i) {
    const auto times = minutes.subspan(i - half, used.points);
    const auto values = signal.subspan(i - half, used.points);
    if (all_even || even_to(times, kEven)) {
      const double step =
          (times.back() - times.front()) / static_cast<double>(used.points - 1);
      result[i] = weighted(classical, values) / std::pow(step, derivative);
    } else {
      result[i] = weighted(
          local_polynomial_weights(times, minutes[i], used.order, derivative),
          values);
    }
  }
  return result;
}

double smoothing_noise_gain(int points, int order) {
  if (points <= order) return 1.0;
  return std::sqrt(savitzky_golay_weights(
      points, order, 0)[static_cast<std::size_t>(points / 2)]);
}

}  // namespace loqsmith
