#include "loqsmith/signal/time_index.hpp"

#include <algorithm>

namespace loqsmith {
namespace {

constexpr std::size_t kFew = 8;

// Where `at` lies if all steps are equal.
std::size_t place_if_even(std::span<const double> minutes, double at) {
  const double steps = static_cast<double>(minutes.size() - 1);
  const double share =
      (at - minutes.front()) / (minutes.back() - minutes.front());
  return static_cast<std::size_t>(std::clamp(share * steps, 0.0, steps));
}

// Index of the first time that does not come before.
template <class Before>
std::size_t first_not(std::span<const double> minutes, double at,
                      Before before) {
  const std::size_t n = minutes.size();
  if (n > kFew) {
    const std::size_t place = place_if_even(minutes, at);
    std::size_t i = place > 1 ? place - 1 : 0;
    const std::size_t end = std::min(place + 2, n - 1);
    if ((i == 0 || before(minutes[i - 1])) && !before(minutes[end])) {
      while (before(minutes[i])) ++i;
      return i;
    }
  }
  return static_cast<std::size_t>(
      std::partition_point(minutes.begin(), minutes.end(), before) -
      minutes.begin());
}

}  // namespace

std::size_t first_at_or_after(std::span<const double> minutes, double at) {
  return first_not(minutes, at, [at](double t) { return t < at; });
}

std::size_t first_after(std::span<const double> minutes, double at) {
  return first_not(minutes, at, [at](double t) { return t <= at; });
}

}  // namespace loqsmith
