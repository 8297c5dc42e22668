#include "loqsmith/signal/saturation.hpp"

#include <algorithm>
#include <cmath>
#include <numbers>

#include "loqsmith/signal/trace_trouble.hpp"

namespace loqsmith {
bool is_saturated(std::span<const double> minutes,
                  std::span<const double> signal, double start_minutes,
                  double end_minutes, double height, double width_half) {
  const auto first = static_cast<std::size_t>(
      std::lower_bound(minutes.begin(), minutes.end(), start_minutes) -
      minutes.begin());
  const auto last = static_cast<std::size_t>(
      std::upper_bound(minutes.begin(), minutes.end(), end_minutes) -
      minutes.begin());
  if (last < first + 3 || !(width_half > 0.0)) return false;
  const auto values = signal.subspan(first, last - first);
  const auto times = minutes.subspan(first, last - first);
  const double top = *std::max_element(values.begin(), values.end());
  const double step = smallest_step(values);
  for (std::size_t i = 0; i < values.size();) {
    std::size_t end = i;
    while (end < values.size() && values[end] == top) ++end;
    if (end >= i + 3) {
      const double flat = (times[end - 1] - times[i]) / width_half;
      const double fall = height * std::numbers::ln2 * flat * flat;
      if (fall > 3.0 * step) return true;
    }
    i = std::max(end, i + 1);
  }
  return false;
}

}  // namespace loqsmith
