#include "loqsmith/signal/moving_parabola.hpp"

#include <algorithm>
#include <cstddef>

#include "loqsmith/signal/savitzky_golay.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastRun = 16;

// Sums over 2h + 1 points about a place, of the signal above a reference: a
// plateau then has a slope of exactly zero.
struct Sums {
  double s0 = 0.0;
  double s1 = 0.0;
  double s2 = 0.0;
};

Sums sum_afresh(const double* first, std::size_t half, double reference) {
  Sums sums;
  double m = -static_cast<double>(half);
  for (std::size_t i = 0; i < 2 * half + 1; ++i, m += 1.0) {
    const double y = first[i] - reference;
    sums.s0 += y;
    sums.s1 += m * y;
    sums.s2 += m * m * y;
  }
  return sums;
}

// Moves on by one point: `out` leaves on the left, `in` enters on the right.
Sums moved(const Sums& sums, double h, double out, double in) {
  return {sums.s0 + (in - out), sums.s1 - sums.s0 + (h * in + (h + 1.0) * out),
          sums.s2 + (sums.s0 - 2.0 * sums.s1) +
              (h * h * in - (h + 1.0) * (h + 1.0) * out)};
}

void smooth_middle(std::span<const double> minutes,
                   std::span<const double> signal, std::size_t half,
                   ValueAndSlope& smoothed) {
  const double h = static_cast<double>(half);
  const double whole = (2.0 * h - 1.0) * (2.0 * h + 1.0) * (2.0 * h + 3.0);
  const double a = 3.0 * (3.0 * h * h + 3.0 * h - 1.0) / whole;
  const double b = 15.0 / whole;
  const double c = 3.0 / (h * (h + 1.0) * (2.0 * h + 1.0)) * 2.0 * h;
  const std::size_t end = signal.size() - half;
  const std::size_t run = std::max(kLeastRun, 2 * half + 1);
  for (std::size_t from = half; from < end; from += run) {
    const double reference = signal[from];
    Sums sums = sum_afresh(signal.data() + (from - half), half, reference);
    const std::size_t to = std::min(end, from + run);
    for (std::size_t i = from; i < to; ++i) {
      const double span = minutes[i + half] - minutes[i - half];
      smoothed.value[i] = reference + (a * sums.s0 - b * sums.s2);
      smoothed.slope[i] = c * sums.s1 / span;
      if (i + 1 == to) break;
      sums = moved(sums, h, signal[i - half] - reference,
                   signal[i + half + 1] - reference);
    }
  }
}

}  // namespace

ValueAndSlope smooth_value_and_slope(std::span<const double> minutes,
                                     std::span<const double> signal, int points,
                                     int order) {
  const bool moving = order == 2 && points >= 3 && points % 2 == 1 &&
                      signal.size() >= static_cast<std::size_t>(points) &&
                      evenly_spaced(minutes);
  if (!moving) {
    return {savitzky_golay(minutes, signal, points, order, 0),
            savitzky_golay(minutes, signal, points, order, 1)};
  }
  ValueAndSlope smoothed;
  smoothed.value.resize(signal.size());
  smoothed.slope.resize(signal.size());
  const std::size_t half = static_cast<std::size_t>(points) / 2;
  smooth_middle(minutes, signal, half, smoothed);
  smooth_ends(minutes, signal, half, order, 0, smoothed.value);
  smooth_ends(minutes, signal, half, order, 1, smoothed.slope);
  return smoothed;
}

}  // namespace loqsmith
