#include <algorithm>
#include <cmath>

#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/svg.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

constexpr double kWidth = 440;
constexpr double kHeight = 300;
constexpr double kLeft = 62;
constexpr double kRight = kWidth - 14;
constexpr double kTop = 34;
constexpr double kBottom = kHeight - 46;

bool is_drawn(const StandardPoint& point) {
  return point.concentration > 0.0 && point.deviation_percent.has_value();
}

}  // namespace

void figure_deviation(std::ostream& out, const AnalyteJudgement& analyte,
                      const CalibrationSet& set) {
  double low = 0.0;
  double high = 0.0;
  double most = 5.0;  // Percent; a smaller frame would only magnify noise.
  for (const StandardPoint& point : standards_of(set)) {
    if (!is_drawn(point)) continue;
    low = low > 0.0 ? std::min(low, point.concentration) : point.concentration;
    high = std::max(high, point.concentration);
    most = std::max(most, std::abs(*point.deviation_percent));
  }
  if (!(low > 0.0)) return;
  const Axis x = log_axis(0.9 * low, 1.1 * high, kLeft, kRight);
  const Axis y = linear_axis(-most, most, kBottom, kTop, 6);
  svg_begin(out, kWidth, kHeight,
            "Deviation of each standard of " + analyte.analyte +
                ", computed back through the curve, from its stated amount");
  svg_bottom_axis(out, x, kBottom, kTop,
                  "concentration, " + analyte.concentration_unit);
  svg_left_axis(out, y, kLeft, kRight, "deviation, percent of stated");
  svg_line(out, "zero", kLeft, y.place(0.0), kRight, y.place(0.0));
  for (const StandardPoint& point : standards_of(set)) {
    if (!is_drawn(point)) continue;
    const double px_x = x.place(point.concentration);
    const double px_y = y.place(*point.deviation_percent);
    svg_line(out, "stem", px_x, y.place(0.0), px_x, px_y);
    if (point.used) {
      svg_circle(out, "point", px_x, px_y, 4);
    } else {
      svg_cross(out, "left-out", px_x, px_y, 4.5);
    }
  }
  svg_end(out);
}

}  // namespace loqsmith
