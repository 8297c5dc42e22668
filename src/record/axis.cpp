#include "loqsmith/record/axis.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/rounding.hpp"
#include "loqsmith/record/html.hpp"

namespace loqsmith {
namespace {

constexpr int kMostTicks = 40;

// Beyond these an axis would run out of numbers.
constexpr double kLeast = 1e-290;
constexpr double kMost = 1e290;

// The step of 1, 2 or 5 times a power of ten at or above `rough`.
double round_step(double rough) {
  const double power = std::pow(10.0, std::floor(std::log10(rough)));
  for (const double factor : {1.0, 2.0, 5.0}) {
    if (factor * power >= rough * (1.0 - 1e-9)) return factor * power;
  }
  return 10.0 * power;
}

// Numbers that an axis can be laid over, whatever a file held.
void make_drawable(double& low, double& high) {
  low = std::clamp(low, -kMost, kMost);
  high = std::clamp(high, -kMost, kMost);
  if (high - low > kLeast) return;
  const double room = std::max(std::abs(low) * 0.1, 1e-12);
  low -= room;
  high += room;
}

std::string linear_label(double tick, double step) {
  const double size = std::max(std::abs(tick), step);
  if (size >= 1e6 || step < 0.9e-4) {
    // As many digits as tell one tick from the next.
    const double digits = std::floor(std::log10(size / step) + 1e-9) + 1.0;
    return power_number(tick, static_cast<int>(std::clamp(digits, 1.0, 17.0)));
  }
  const int decimals =
      std::max(0, static_cast<int>(-std::floor(std::log10(step) + 1e-9)));
  return round_to_decimals(tick, decimals, RoundingRule::HalfEven);
}

std::string log_label(double tick) { return short_number(tick, 1); }

struct Mantissa {
  double factor;
  int power;
};

// All of 1..9 times a power of ten that lie in [low, high].
std::vector<Mantissa> log_marks(double low, double high) {
  std::vector<Mantissa> marks;
  const int first = static_cast<int>(std::floor(std::log10(low)));
  const int last = static_cast<int>(std::ceil(std::log10(high)));
  for (int power = first; power <= last; ++power) {
    for (int factor = 1; factor <= 9; ++factor) {
      const double value = factor * std::pow(10.0, power);
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9)) {
        marks.push_back({static_cast<double>(factor), power});
      }
    }
  }
  return marks;
}

double round_down(double value) {
  const double power = std::pow(10.0, std::floor(std::log10(value)));
  double best = power;
  for (const double factor : {2.0, 5.0}) {
    if (factor * power <= value * (1 + 1e-9)) best = factor * power;
  }
  return best;
}

}  // namespace

double Axis::place(double number) const {
  const double held = std::clamp(number, low, high);
  const double part = logarithmic ? std::log(held / low) / std::log(high / low)
                                  : (held - low) / (high - low);
  return from + part * (to - from);
}

Axis tight_axis(double low, double high, double from, double to, int wanted) {
  make_drawable(low, high);
  const double step = round_step((high - low) / std::max(wanted, 1));
  Axis axis{low, high, from, to, false, {}, {}, {}};
  const double first = std::ceil(low / step - 1e-9);
  const double last = std::floor(high / step + 1e-9);
  // Counted, for adding one to a very large number may leave it as it is.
  for (int i = 0; i < kMostTicks && first + i <= last + 0.5; ++i) {
    axis.ticks.push_back((first + i) * step);
    axis.labels.push_back(linear_label((first + i) * step, step));
  }
  return axis;
}

Axis linear_axis(double low, double high, double from, double to, int wanted) {
  make_drawable(low, high);
  const double step = round_step((high - low) / std::max(wanted, 1));
  const double first = std::floor(low / step + 1e-9);
  const double last = std::ceil(high / step - 1e-9);
  return tight_axis(first * step, last * step, from, to,
                    static_cast<int>(last - first));
}

Axis log_axis(double low, double high, double from, double to) {
  low = std::clamp(low, kLeast, kMost);
  high = std::clamp(high, kLeast, kMost);
  Axis axis{round_down(low), round_step(high), from, to, true, {}, {}, {}};
  if (!(axis.high > axis.low)) axis.high = 10.0 * axis.low;
  const bool wide = axis.high / axis.low > 2000.0;
  for (const Mantissa& mark : log_marks(axis.low, axis.high)) {
    const double value = mark.factor * std::pow(10.0, mark.power);
    const bool between = mark.factor == 2.0 || mark.factor == 5.0;
    if (mark.factor == 1.0 || (between && !wide)) {
      axis.ticks.push_back(value);
      axis.labels.push_back(log_label(value));
    } else {
      axis.minor_ticks.push_back(value);
    }
  }
  return axis;
}

std::string px(double pixels) {
  if (!std::isfinite(pixels)) return "0.0";
  return round_to_decimals(pixels, 1, RoundingRule::HalfEven);
}

}  // namespace loqsmith
