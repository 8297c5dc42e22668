#include <algorithm>
#include <cstddef>
#include <memory>

#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kFew = 32;
constexpr int kMostRounds = 60;

// Of so many values with equal distances, the middle one: near the middle of
// all of them, however they are ordered.
double pivot_of(const double* values, std::size_t n) {
  constexpr std::size_t kAsked = 9;
  double asked[kAsked];
  for (std::size_t i = 0; i < kAsked; ++i) {
    asked[i] = values[(2 * i + 1) * n / (2 * kAsked)];
  }
  std::nth_element(asked, asked + kAsked / 2, asked + kAsked);
  return asked[kAsked / 2];
}

struct Middle {
  double upper;  // the value that has n / 2 others at or below it
  double lower;  // the largest of those
};

// Parts the values at a pivot, and goes on with the part that holds the place
// looked for. Every value is written to both parts and only the ends move by
// what it is: a branch would be foretold wrongly every other time.
//
// @param values  n of them, which lose their order
// @param room    for n more
Middle middle_of(double* values, double* room, std::size_t n) {
  std::size_t place = n / 2;
  double lower = 0.0;
  for (int round = 0; n > kFew && round < kMostRounds; ++round) {
    const double pivot = pivot_of(values, n);
    std::size_t below = 0;
    std::size_t above = 0;
    for (std::size_t i = 0; i < n; ++i) {
      const double value = values[i];
      room[above] = value;
      above += value > pivot ? 1 : 0;
      values[below] = value;
      below += value < pivot ? 1 : 0;
    }
    if (place < below) {
      n = below;
    } else if (place >= n - above) {
      place -= n - above;
      n = above;
      lower = pivot;
      std::swap(values, room);
    } else {
      if (place > below) return {pivot, pivot};
      return {pivot,
              below > 0 ? *std::max_element(values, values + below) : lower};
    }
  }
  std::nth_element(values, values + place, values + n);
  if (place > 0) lower = *std::max_element(values, values + place);
  return {values[place], lower};
}

}  // namespace

double median_in_place(std::span<double> values) {
  const std::size_t n = values.size();
  std::unique_ptr<double[]> room;
  if (n > kFew) room = std::make_unique_for_overwrite<double[]>(n);
  const Middle middle = middle_of(values.data(), room.get(), n);
  if (n % 2 == 1) return middle.upper;
  return middle.lower + 0.5 * (middle.upper - middle.lower);
}

double median(std::span<const double> values) {
  const std::size_t n = values.size();
  double few[kFew];
  std::unique_ptr<double[]> many;
  if (n > kFew) many = std::make_unique_for_overwrite<double[]>(n);
  double* const copy = n > kFew ? many.get() : few;
  std::copy(values.begin(), values.end(), copy);
  return median_in_place({copy, n});
}

}  // namespace loqsmith
