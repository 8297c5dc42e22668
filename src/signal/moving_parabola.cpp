#include "loqsmith/signal/moving_parabola.hpp"

#include <algorithm>
#include <cstddef>

#include "loqsmith/signal/savitzky_golay.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastRun = 16;

// Two runs side by side: each waits for its own last sum, not for the other's.
using Pair [[gnu::vector_size(2 * sizeof(double))]] = double;

// Sums over 2h + 1 points about a place, of the signal above a reference: a
// plateau then has a slope of exactly zero. Of one place, or of a pair.
template <class Number>
struct Sums {
  Number s0{};
  Number s1{};
  Number s2{};
};

// The closed form's factors.
struct Factors {
  explicit Factors(std::size_t half) : h(static_cast<double>(half)) {
    const double whole = (2.0 * h - 1.0) * (2.0 * h + 1.0) * (2.0 * h + 3.0);
    of_s0 = 3.0 * (3.0 * h * h + 3.0 * h - 1.0) / whole;
    of_s2 = 15.0 / whole;
    of_s1 = 3.0 / (h * (h + 1.0) * (2.0 * h + 1.0)) * 2.0 * h;
  }
  double h;
  double of_s0;
  double of_s1;
  double of_s2;
};

// @param signal  of the point with this number, from the first one of the first
//                place's on
template <class Number, class Signal>
Sums<Number> sum_afresh(Signal signal, std::size_t half, Number reference) {
  Sums<Number> sums;
  double m = -static_cast<double>(half);
  for (std::size_t i = 0; i < 2 * half + 1; ++i, m += 1.0) {
    const Number y = signal(i) - reference;
    sums.s0 += y;
    sums.s1 += m * y;
    sums.s2 += m * m * y;
  }
  return sums;
}

// Moves on by one point: `out` leaves on the left, `in` enters on the right.
template <class Number>
Sums<Number> moved(const Sums<Number>& sums, double h, Number out, Number in) {
  return {sums.s0 + (in - out), sums.s1 - sums.s0 + (h * in + (h + 1.0) * out),
          sums.s2 + (sums.s0 - 2.0 * sums.s1) +
              (h * h * in - (h + 1.0) * (h + 1.0) * out)};
}

// @param store  takes the number of a place, value there and slope times the
//               span of its points
template <class Number, class Signal, class Store>
void smooth_run(const Factors& by, std::size_t half, std::size_t places,
                Signal signal, Store store) {
  const Number reference = signal(half);
  Sums<Number> sums = sum_afresh<Number>(signal, half, reference);
  for (std::size_t i = 0;; ++i) {
    store(i, reference + (by.of_s0 * sums.s0 - by.of_s2 * sums.s2),
          by.of_s1 * sums.s1);
    if (i + 1 == places) return;
    sums = moved<Number>(sums, by.h, signal(i) - reference,
                         signal(i + 2 * half + 1) - reference);
  }
}

void smooth_middle(std::span<const double> minutes,
                   std::span<const double> signal, std::size_t half,
                   ValueAndSlope& smoothed) {
  const Factors by(half);
  const std::size_t end = signal.size() - half;
  const std::size_t run = std::max(kLeastRun, 2 * half + 1);
  std::size_t from = half;
  for (; from + 2 * run <= end; from += 2 * run) {
    const double* const y = signal.data() + (from - half);
    const double* const t = minutes.data() + (from - half);
    double* const value = smoothed.value.data() + from;
    double* const slope = smoothed.slope.data() + from;
    smooth_run<Pair>(
        by, half, run,
        [&](std::size_t i) {
          return Pair{y[i], y[i + run]};
        },
        [&](std::size_t i, Pair found, Pair rise) {
          const Pair first{t[i], t[i + run]};
          const Pair last{t[i + 2 * half], t[i + run + 2 * half]};
          rise /= last - first;
          value[i] = found[0];
          value[i + run] = found[1];
          slope[i] = rise[0];
          slope[i + run] = rise[1];
        });
  }
  for (; from < end; from += run) {
    smooth_run<double>(
        by, half, std::min(run, end - from),
        [&](std::size_t i) { return signal[from - half + i]; },
        [&](std::size_t i, double found, double rise) {
          const std::size_t place = from + i;
          smoothed.value[place] = found;
          smoothed.slope[place] =
              rise / (minutes[place + half] - minutes[place - half]);
        });
  }
}

}  // namespace

ValueAndSlope smooth_value_and_slope(std::span<const double> minutes,
                                     std::span<const double> signal, int points,
                                     int order, bool even) {
  const bool moving = even && order == 2 && points >= 3 && points % 2 == 1 &&
                      signal.size() >= static_cast<std::size_t>(points);
  if (!moving) {
    return {savitzky_golay(minutes, signal, points, order, 0),
            savitzky_golay(minutes, signal, points, order, 1)};
  }
  ValueAndSlope smoothed;
  smoothed.value.resize(signal.size());
  smoothed.slope.resize(signal.size());
  const std::size_t half = static_cast<std::size_t>(points) / 2;
  smooth_middle(minutes, signal, half, smoothed);
  fit_ends(minutes, signal, half, order, [&](std::size_t i, const Jet& jet) {
    smoothed.value[i] = jet[0];
    smoothed.slope[i] = jet[1];
  });
  return smoothed;
}

}  // namespace loqsmith
