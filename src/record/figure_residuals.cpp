#include <algorithm>
#include <cmath>
#include <ostream>

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

struct Residual {
  double concentration = 0.0;
  double value = 0.0;
  double expected = 0.0;  ///< one standard deviation, as the weights have it
  bool used = true;
};

bool is_response_factor(const Calibration& line) {
  return line.settings.model == CalibrationSettings::Model::ResponseFactor;
}

// The residual standard deviation is that of a point of weight one; that of a
// response factor belongs to response over concentration.
double expected_deviation(const Calibration& line, const StandardPoint& point) {
  if (is_response_factor(line)) return line.residual_sd * point.concentration;
  return point.weight > 0.0 ? line.residual_sd / std::sqrt(point.weight) : 0.0;
}

std::vector<Residual> residuals_of(const Calibration& line) {
  std::vector<Residual> all;
  for (const StandardPoint& point : line.points) {
    if (!(point.concentration > 0.0)) continue;
    all.push_back({point.concentration,
                   point.response -
                       response_from_concentration(line, point.concentration),
                   point.used ? expected_deviation(line, point) : 0.0,
                   point.used});
  }
  std::stable_sort(all.begin(), all.end(),
                   [](const Residual& a, const Residual& b) {
                     return a.concentration < b.concentration;
                   });
  return all;
}

// One standard deviation to either side, from level to level.
void draw_band(std::ostream& out, const Axis& x, const Axis& y,
               const std::vector<Residual>& all) {
  std::vector<std::pair<double, double>> edge;
  for (const Residual& one : all) {
    if (one.used) {
      edge.emplace_back(x.place(one.concentration), y.place(one.expected));
    }
  }
  for (auto one = all.rbegin(); one != all.rend(); ++one) {
    if (one->used) {
      edge.emplace_back(x.place(one->concentration), y.place(-one->expected));
    }
  }
  if (edge.size() > 3) svg_polygon(out, "spread", edge);
}

}  // namespace

void figure_residuals(std::ostream& out, const AnalyteJudgement& analyte,
                      const CalibrationSet& set) {
  if (!set.calibration) return;
  const std::vector<Residual> all = residuals_of(*set.calibration);
  if (all.empty()) return;
  double most = 0.0;
  for (const Residual& one : all) {
    // A standard that was left out may lie far off; it is held at the edge.
    if (one.used) most = std::max({most, std::abs(one.value), one.expected});
  }
  const Axis x = log_axis(0.9 * all.front().concentration,
                          1.1 * all.back().concentration, kLeft, kRight);
  const Axis y = linear_axis(-1.1 * most, 1.1 * most, kBottom, kTop, 6);
  svg_begin(out, kWidth, kHeight,
            "Residual of each standard of " + analyte.analyte +
                " from the curve, in units of the response");
  svg_bottom_axis(out, x, kBottom, kTop,
                  "concentration, " + analyte.concentration_unit);
  draw_band(out, x, y, all);
  svg_left_axis(out, y, kLeft, kRight, "response minus curve");
  svg_line(out, "zero", kLeft, y.place(0.0), kRight, y.place(0.0));
  for (const Residual& one : all) {
    const double px_x = x.place(one.concentration);
    const double px_y = y.place(one.value);
    if (one.used) {
      svg_circle(out, "point", px_x, px_y, 4);
    } else {
      svg_cross(out, "left-out", px_x, px_y, 4.5);
    }
  }
  svg_end(out);
}

}  // namespace loqsmith
