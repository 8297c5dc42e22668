#include <algorithm>
#include <cmath>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/html.hpp"
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

struct Frame {
  Axis x;
  Axis y;
};

// A line of standard addition is drawn from where it meets zero response.
double left_end(const CalibrationSet& set) {
  return set.addition && set.addition->amount > 0.0
             ? -1.1 * set.addition->amount
             : 0.0;
}

Frame frame_of(const std::vector<StandardPoint>& points, double left) {
  double most = 0.0;
  double low = 0.0;
  double high = 0.0;
  for (const StandardPoint& point : points) {
    most = std::max(most, point.concentration);
    low = std::min(low, point.response);
    high = std::max(high, point.response);
  }
  return {tight_axis(left, 1.04 * most, kLeft, kRight, 5),
          tight_axis(low - 0.02 * (high - low), 1.06 * high, kBottom, kTop, 5)};
}

void draw_curve(std::ostream& out, const Frame& frame, const Calibration& line,
                double from, double to, const char* css) {
  constexpr int kSteps = 60;
  std::vector<std::pair<double, double>> points;
  for (int i = 0; i <= kSteps; ++i) {
    const double x = from + (to - from) * i / kSteps;
    const double y = response_from_concentration(line, x);
    if (frame.y.covers(y)) {
      points.emplace_back(frame.x.place(x), frame.y.place(y));
    }
  }
  if (points.size() > 1) svg_polyline(out, css, points);
}

// The curve without each standard that the diagnostics point at, and a ring
// around it.
void draw_suggestions(std::ostream& out, const Frame& frame,
                      const CalibrationSet& set) {
  if (!set.diagnostics) return;
  for (const SuggestedExclusion& one : set.diagnostics->suggested_exclusions) {
    if (one.without) {
      draw_curve(out, frame, *one.without, frame.x.low, frame.x.high,
                 "curve without");
    }
    for (const StandardPoint& point : standards_of(set)) {
      if (point.injection != one.injection) continue;
      svg_circle(out, "ring", frame.x.place(point.concentration),
                 frame.y.place(point.response), 8);
    }
  }
}

void draw_levels(std::ostream& out, const Frame& frame,
                 const Calibration& line) {
  for (const CalibrationLevel& level : line.levels) {
    const double x = frame.x.place(level.concentration);
    svg_line(out, level.accepted ? "level" : "level refused", x, kBottom, x,
             kBottom - 9);
  }
}

void draw_points(std::ostream& out, const Frame& frame,
                 const std::vector<StandardPoint>& points, bool fitted) {
  for (const StandardPoint& point : points) {
    const double x = frame.x.place(point.concentration);
    const double y = frame.y.place(point.response);
    if (point.used && fitted) {
      svg_circle(out, "point", x, y, 4);
    } else {
      svg_cross(out, "left-out", x, y, 4.5);
    }
  }
}

}  // namespace

void figure_calibration(std::ostream& out, const AnalyteJudgement& analyte,
                        const CalibrationSet& set) {
  const std::vector<StandardPoint>& points = standards_of(set);
  if (points.empty()) return;
  const Frame frame = frame_of(points, left_end(set));
  svg_begin(out, kWidth, kHeight,
            "Calibration of " + analyte.analyte +
                ": response of each standard against its concentration");
  svg_bottom_axis(out, frame.x, kBottom, kTop,
                  "concentration, " + analyte.concentration_unit);
  svg_left_axis(out, frame.y, kLeft, kRight, "response");
  if (set.calibration) {
    const Calibration& line = *set.calibration;
    draw_levels(out, frame, line);
    draw_curve(out, frame, line, frame.x.low, frame.x.high, "curve beyond");
    draw_curve(out, frame, line, line.accepted_lowest.value_or(line.lowest),
               line.accepted_highest.value_or(line.highest), "curve");
    draw_suggestions(out, frame, set);
    if (set.addition && frame.x.covers(-set.addition->amount)) {
      svg_diamond(out, "found", frame.x.place(-set.addition->amount),
                  frame.y.place(0.0), 6);
    }
  }
  draw_points(out, frame, points, set.calibration.has_value());
  svg_end(out);
}

}  // namespace loqsmith
