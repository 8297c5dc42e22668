#include "loqsmith/record/curve_strokes.hpp"

#include <algorithm>
#include <cstddef>
#include <utility>

#include "loqsmith/record/svg.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kColumns = 364;  ///< about one a pixel

}  // namespace

void draw_curve(std::ostream& out, std::string_view css,
                const std::vector<double>& minutes,
                const std::vector<double>& values, const Axis& x,
                const Axis& y) {
  const std::size_t n = values.size();
  if (n < 2 || minutes.size() != n) return;
  std::vector<std::pair<double, double>> points;
  const auto add = [&](std::size_t i) {
    points.emplace_back(x.place(minutes[i]), y.place(values[i]));
  };
  const std::size_t stride = n > 3 * kColumns ? n / kColumns : 1;
  for (std::size_t start = 0; start < n; start += stride) {
    const auto first = values.begin() + static_cast<std::ptrdiff_t>(start);
    const auto last =
        first + static_cast<std::ptrdiff_t>(std::min(stride, n - start));
    const auto [low, high] = std::minmax_element(first, last);
    auto a = static_cast<std::size_t>(low - values.begin());
    auto b = static_cast<std::size_t>(high - values.begin());
    if (a > b) std::swap(a, b);
    add(a);
    if (b != a) add(b);
  }
  svg_polyline(out, css, points);
}

}  // namespace loqsmith
