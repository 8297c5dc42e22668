#include <algorithm>
#include <cmath>

#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/svg.hpp"

namespace loqsmith {
namespace {

constexpr double kWidth = 440;
constexpr double kHeight = 240;
constexpr double kLeft = 62;
constexpr double kRight = kWidth - 14;
constexpr double kTop = 34;
constexpr double kBottom = kHeight - 46;
constexpr std::size_t kColumns = 364;  ///< about one a pixel

using Points = std::vector<std::pair<double, double>>;

// The lowest and highest point of each column in their order, so that no
// extreme is lost.
Points thinned(const PeakCurve& curve, const Axis& x, const Axis& y) {
  const std::size_t n = std::min(curve.minutes.size(), curve.signal.size());
  Points points;
  const std::size_t stride = n > 3 * kColumns ? n / kColumns : 1;
  for (std::size_t start = 0; start < n; start += stride) {
    const auto first =
        curve.signal.begin() + static_cast<std::ptrdiff_t>(start);
    const auto last =
        first + static_cast<std::ptrdiff_t>(std::min(stride, n - start));
    const auto [low, high] = std::minmax_element(first, last);
    auto a = static_cast<std::size_t>(low - curve.signal.begin());
    auto b = static_cast<std::size_t>(high - curve.signal.begin());
    if (a > b) std::swap(a, b);
    points.emplace_back(x.place(curve.minutes[a]), y.place(curve.signal[a]));
    if (b != a) {
      points.emplace_back(x.place(curve.minutes[b]), y.place(curve.signal[b]));
    }
  }
  return points;
}

Axis signal_axis(const PeakCurve& curve, double span) {
  const auto [low, high] =
      std::minmax_element(curve.signal.begin(), curve.signal.end());
  // A little above the highest point for the apex's stroke.
  const double room =
      std::max(span - (*high - *low), 0.0) + 0.08 * (*high - *low);
  // Room goes above: a trace stands on its baseline.
  return tight_axis(*low - 0.1 * room, *high + 0.9 * room, kBottom, kTop, 4);
}

}  // namespace

double signal_span(const PeakCurve& curve) {
  if (curve.signal.empty()) return 0.0;
  const auto [low, high] =
      std::minmax_element(curve.signal.begin(), curve.signal.end());
  return *high - *low;
}

void figure_trace(std::ostream& out, const FigureCurve& figure,
                  const std::string& signal_unit, double span) {
  const PeakCurve& curve = figure.curve;
  if (curve.minutes.size() < 2 || curve.signal.size() < 2) return;
  const Axis x =
      tight_axis(curve.minutes.front(), curve.minutes.back(), kLeft, kRight, 6);
  const Axis y = signal_axis(curve, span);
  svg_begin(out, kWidth, kHeight,
            "Trace of " + figure.analyte + " in injection " +
                std::to_string(figure.injection) + ", " + figure.caption);
  const double start = x.place(figure.peak.start_minutes);
  const double end = x.place(figure.peak.end_minutes);
  svg_rect(out, "window", start, kTop, end - start, kBottom - kTop);
  svg_bottom_axis(out, x, kBottom, kTop, "minutes");
  svg_left_axis(out, y, kLeft, kRight,
                signal_unit.empty() ? "signal" : "signal, " + signal_unit);
  svg_polyline(out, "trace", thinned(curve, x, y));
  if (curve.baseline.size() == curve.minutes.size()) {
    PeakCurve below;
    below.minutes = curve.minutes;
    below.signal = curve.baseline;
    svg_polyline(out, "baseline", thinned(below, x, y));
  } else {
    svg_line(out, "baseline", start, y.place(curve.baseline_start), end,
             y.place(curve.baseline_end));
  }
  if (!curve.fitted.empty()) {
    PeakCurve scaled;
    scaled.minutes = curve.fitted_minutes;
    scaled.signal = curve.fitted;
    svg_polyline(out, "baseline", thinned(scaled, x, y));
  }
  if (figure.peak.found) {
    const double apex = x.place(figure.peak.retention_minutes);
    svg_line(out, "apex", apex, kTop, apex, kTop + 8);
  }
  svg_end(out);
}

}  // namespace loqsmith
