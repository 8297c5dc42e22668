#include "loqsmith/record/limits_scale.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

constexpr double kFrom = 2.0;  ///< percent
constexpr double kTo = 98.0;
constexpr double kLinearSpan = 20.0;
constexpr double kBelowShare = 0.3;
constexpr double kCap = 4.0;  ///< half height of an interval's ends

void add(std::vector<double>& numbers, const std::optional<double>& number) {
  if (number && *number > 0.0 && std::isfinite(*number)) {
    numbers.push_back(*number);
  }
}

std::vector<double> limits_and_levels(const CalibrationSet& set) {
  std::vector<double> numbers;
  for (const LimitRow& row : set.limits.rows) {
    if (!row.estimate) continue;
    const LimitEstimate& limit = *row.estimate;
    for (const auto& number :
         {limit.critical_value, limit.detection, limit.quantitation,
          limit.detection_lower, limit.detection_upper,
          limit.quantitation_lower, limit.quantitation_upper}) {
      add(numbers, number);
    }
  }
  if (set.limits.governing) {
    add(numbers, set.limits.governing->detection);
    add(numbers, set.limits.governing->quantitation);
  }
  for (const StandardPoint& point : standards_of(set)) {
    add(numbers, point.concentration);
  }
  return numbers;
}

void find_samples(const AnalyteJudgement& analyte, const CalibrationSet& set,
                  double least, LimitsScale& scale) {
  for (const ResultRow& row : analyte.results) {
    if (!is_sample_like(row.role) || row.set != set.set) continue;
    if (!row.vial_concentration) continue;
    if (*row.vial_concentration > least) {
      scale.samples.push_back(&row);
    } else {
      ++scale.samples_below;
    }
  }
}

}  // namespace

std::optional<LimitsScale> limits_scale(const AnalyteJudgement& analyte,
                                        const CalibrationSet& set) {
  std::vector<double> numbers = limits_and_levels(set);
  if (numbers.empty()) return {};
  LimitsScale scale;
  const double lowest = *std::min_element(numbers.begin(), numbers.end());
  find_samples(analyte, set, kBelowShare * lowest, scale);
  for (const ResultRow* row : scale.samples) {
    add(numbers, row->vial_concentration);
  }
  const auto [least, most] =
      std::minmax_element(numbers.begin(), numbers.end());
  scale.axis = *most > kLinearSpan * *least
                   ? log_axis(*least, *most, kFrom, kTo)
                   : linear_axis(0.0, *most, kFrom, kTo);
  return scale;
}

std::string percent(double x) {
  std::string text = px(x);
  if (text.ends_with(".0")) text.resize(text.size() - 2);
  return text + '%';
}

std::string scale_mark(std::string_view shape, std::string_view css, double x,
                       double y, double size, std::string_view title) {
  const std::string half = px(-0.5 * size);
  std::string mark = "<use href=\"#" + std::string(shape) + "\" class=\"" +
                     std::string(css) + "\" x=\"" + percent(x) + "\" y=\"" +
                     px(y) + "\" width=\"" + px(size) + "\" height=\"" +
                     px(size) + "\" transform=\"translate(" + half + ' ' +
                     half + ")\"";
  if (title.empty()) return mark + "/>";
  return mark + "><title>" + html_text(title) + "</title></use>";
}

std::string scale_line(std::string_view css, double x1, double y1, double x2,
                       double y2) {
  return "<line class=\"" + std::string(css) + "\" x1=\"" + percent(x1) +
         "\" y1=\"" + px(y1) + "\" x2=\"" + percent(x2) + "\" y2=\"" + px(y2) +
         "\"/>";
}

std::string scale_interval(double from, double to, double y) {
  return scale_line("bounds", from, y, to, y) +
         scale_line("bounds", from, y - kCap, from, y + kCap) +
         scale_line("bounds", to, y - kCap, to, y + kCap);
}

}  // namespace loqsmith
