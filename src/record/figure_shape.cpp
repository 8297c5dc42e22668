#include <algorithm>

#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/svg.hpp"

namespace loqsmith {
namespace {

constexpr double kWidth = 440;
constexpr double kHeight = 200;
constexpr double kLeft = 62;
constexpr double kRight = kWidth - 14;
constexpr double kTop = 34;
constexpr double kBottom = kHeight - 46;
constexpr std::size_t kPoints = 180;  ///< about one every two pixels

}  // namespace

void figure_shape(std::ostream& out, const std::string& analyte,
                  const TemplateShape& shape) {
  if (shape.empty()) return;
  const auto [low, high] =
      std::minmax_element(shape.values.begin(), shape.values.end());
  const Axis x =
      tight_axis(-shape.left_minutes, shape.right_minutes(), kLeft, kRight, 6);
  const Axis y =
      tight_axis(std::min(0.0, *low), 1.05 * *high, kBottom, kTop, 3);
  svg_begin(out, kWidth, kHeight, "Mean peak shape of " + analyte);
  svg_bottom_axis(out, x, kBottom, kTop, "minutes from the apex");
  svg_left_axis(out, y, kLeft, kRight, "shape of unit area, per minute");
  const std::size_t n = shape.values.size();
  const std::size_t stride = std::max<std::size_t>(1, n / kPoints);
  std::vector<std::pair<double, double>> points;
  for (std::size_t i = 0; i < n; i += stride) {
    const double offset =
        static_cast<double>(i) * shape.step_minutes - shape.left_minutes;
    points.emplace_back(x.place(offset), y.place(shape.values[i]));
  }
  svg_polyline(out, "trace", points);
  svg_line(out, "baseline", kLeft, y.place(0.0), kRight, y.place(0.0));
  svg_end(out);
}

}  // namespace loqsmith
