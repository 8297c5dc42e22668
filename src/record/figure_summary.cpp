#include <algorithm>

#include "loqsmith/record/summaries.hpp"
#include "loqsmith/record/svg.hpp"

namespace loqsmith {
namespace {

constexpr double kWidth = 440;
constexpr double kHeight = 240;
constexpr double kLeft = 48;
constexpr double kRight = kWidth - 14;
constexpr double kTop = 34;
constexpr double kBottom = kHeight - 46;
constexpr double kStroke = 9;
// Beyond this ratio of largest to smallest the low values would lie on the
// axis' end.
constexpr double kWideRange = 20.0;

Axis value_axis(const std::vector<CensoredValue>& values) {
  double low = values.front().value;
  double high = low;
  for (const CensoredValue& one : values) {
    low = std::min(low, one.value);
    high = std::max(high, one.value);
  }
  if (low > 0.0 && high > kWideRange * low) {
    return log_axis(low, high, kLeft, kRight);
  }
  return tight_axis(std::min(0.0, low),
                    high + 0.06 * (high - std::min(0.0, low)), kLeft, kRight);
}

// From the lowest limit where something lies below it: nothing is known
// further down.
void draw_steps(std::ostream& out, const ProductLimit& distribution,
                const Axis& x, const Axis& y) {
  std::vector<std::pair<double, double>> line;
  double height = y.place(100.0 * distribution.mass_below);
  line.emplace_back(distribution.mass_below > 0.0
                        ? x.place(distribution.lowest_limit)
                        : kLeft,
                    height);
  for (const DistributionStep& step : distribution.steps) {
    line.emplace_back(x.place(step.value), height);
    height = y.place(100.0 * step.at_or_below);
    line.emplace_back(x.place(step.value), height);
  }
  if (!(distribution.mass_above > 0.0)) line.emplace_back(kRight, height);
  svg_polyline(out, "curve", line);
  for (const DistributionStep& step : distribution.steps) {
    svg_circle(out, "point", x.place(step.value),
               y.place(100.0 * step.at_or_below), 3.5);
  }
}

void draw_censored(std::ostream& out, const std::vector<CensoredValue>& values,
                   const Axis& x) {
  for (const CensoredValue& one : values) {
    const double at = x.place(one.value);
    switch (one.censoring) {
      case Censoring::Measured:
        break;
      case Censoring::Below:
        svg_line(out, "bounds", at, kBottom, at, kBottom - kStroke);
        svg_line(out, "bounds", at, kBottom - kStroke, at - kStroke,
                 kBottom - kStroke);
        break;
      case Censoring::Above:
        svg_line(out, "bounds", at, kTop, at, kTop + kStroke);
        svg_line(out, "bounds", at, kTop + kStroke, at + kStroke,
                 kTop + kStroke);
        break;
    }
  }
}

std::vector<CensoredValue> each_limit_once(std::vector<CensoredValue> values) {
  std::sort(values.begin(), values.end(),
            [](const CensoredValue& a, const CensoredValue& b) {
              if (a.value != b.value) return a.value < b.value;
              return a.censoring < b.censoring;
            });
  const auto same = [](const CensoredValue& a, const CensoredValue& b) {
    return a.value == b.value && a.censoring == b.censoring;
  };
  values.erase(std::unique(values.begin(), values.end(), same), values.end());
  return values;
}

}  // namespace

bool has_summary_figure(const SummaryRow& row) {
  return row.summary.distribution.has_value() &&
         row.summary.distribution->steps.size() > 1;
}

void figure_summary(std::ostream& out, const SummaryRow& row) {
  if (!has_summary_figure(row)) return;
  const std::vector<CensoredValue> values = each_limit_once(row.values);
  const Axis x = value_axis(values);
  const Axis y = tight_axis(0.0, 100.0, kBottom, kTop);
  svg_begin(out, kWidth, kHeight,
            "Distribution of " + row.analyte + " in group " + row.group +
                ": percent of results at or below each value");
  svg_bottom_axis(out, x, kBottom, kTop, row.analyte + ", " + row.unit);
  svg_left_axis(out, y, kLeft, kRight, "at or below, %");
  draw_steps(out, *row.summary.distribution, x, y);
  draw_censored(out, values, x);
  svg_end(out);
}

}  // namespace loqsmith
