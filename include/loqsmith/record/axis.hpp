#pragma once

#include <string>
#include <vector>

namespace loqsmith {

/// One axis of a figure: a stretch of numbers laid along a stretch of pixels.
struct Axis {
  double low = 0.0;  ///< low < high; both above zero where logarithmic
  double high = 1.0;
  double from = 0.0;  ///< pixel of `low`
  double to = 1.0;    ///< pixel of `high`
  bool logarithmic = false;
  std::vector<double> ticks;        ///< labelled, within [low, high]
  std::vector<double> minor_ticks;  ///< only strokes
  std::vector<std::string> labels;  ///< one a tick

  /// Pixel of the number; those beyond the ends are held at them.
  double place(double number) const;
  bool covers(double number) const { return number >= low && number <= high; }
};

/// A linear axis from a round number at or below `low` to one at or above
/// `high`, ticks at 1, 2 or 5 times a power of ten, about `wanted` of them.
Axis linear_axis(double low, double high, double from, double to,
                 int wanted = 5);

/// The same over exactly [low, high], ticks only where they fall.
Axis tight_axis(double low, double high, double from, double to,
                int wanted = 5);

/// A logarithmic axis over [low, high] (both above zero), widened to the next
/// 1, 2 or 5 times a power of ten.
Axis log_axis(double low, double high, double from, double to);

/// A pixel coordinate with one decimal.
std::string px(double pixels);

}  // namespace loqsmith
