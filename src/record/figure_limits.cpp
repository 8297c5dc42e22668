#include <algorithm>
#include <cmath>

#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/svg.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

constexpr double kWidth = 440;
constexpr double kLeft = 14;
constexpr double kRight = kWidth - 14;
constexpr double kTop = 26;
constexpr double kRowHeight = 34;

struct Amounts {
  std::vector<double> samples;  ///< vial concentrations above zero
  std::size_t not_drawn = 0;    ///< at or below zero
  std::vector<double> all;      ///< everything that the scale must hold
};

void add(std::vector<double>& numbers, const std::optional<double>& number) {
  if (number && *number > 0.0 && std::isfinite(*number)) {
    numbers.push_back(*number);
  }
}

void add_limits(std::vector<double>& numbers, const CalibrationSet& set) {
  for (const LimitRow& row : set.limits.rows) {
    if (!row.estimate) continue;
    for (const auto& number :
         {row.estimate->detection, row.estimate->quantitation,
          row.estimate->detection_lower, row.estimate->detection_upper,
          row.estimate->quantitation_lower, row.estimate->quantitation_upper}) {
      add(numbers, number);
    }
  }
  if (set.limits.governing) {
    add(numbers, set.limits.governing->detection);
    add(numbers, set.limits.governing->quantitation);
  }
}

Amounts amounts_of(const AnalyteJudgement& analyte, const CalibrationSet& set) {
  Amounts amounts;
  add_limits(amounts.all, set);
  for (const StandardPoint& point : standards_of(set)) {
    add(amounts.all, point.concentration);
  }
  if (amounts.all.empty()) return amounts;
  const double least =
      0.3 * *std::min_element(amounts.all.begin(), amounts.all.end());
  for (const ResultRow& row : analyte.results) {
    if (!is_sample_like(row.role) || row.set != set.set) continue;
    if (!row.vial_concentration) continue;
    // Far below every limit a logarithmic scale has no room: counted only.
    if (*row.vial_concentration > least) {
      amounts.samples.push_back(*row.vial_concentration);
    } else {
      ++amounts.not_drawn;
    }
  }
  amounts.all.insert(amounts.all.end(), amounts.samples.begin(),
                     amounts.samples.end());
  return amounts;
}

void draw_bounds(std::ostream& out, const Axis& axis, double y,
                 const std::optional<double>& lower,
                 const std::optional<double>& upper) {
  if (!lower || !upper || !(*lower > 0.0)) return;
  const double from = axis.place(*lower);
  const double to = axis.place(*upper);
  svg_line(out, "bounds", from, y, to, y);
  svg_line(out, "bounds", from, y - 4, from, y + 4);
  svg_line(out, "bounds", to, y - 4, to, y + 4);
}

std::string row_label(const LimitRow& row) {
  std::string label = row.procedure;
  if (!row.estimate) return label + ": not applicable";
  if (row.governs_detection || row.governs_quantitation) {
    label += ", governs " + (governing_word(row) == "both"
                                 ? std::string("both limits")
                                 : governing_word(row));
  }
  const Grade grade = row.estimate->grade();
  if (grade == Grade::NotValid) label += ", not valid";
  if (grade == Grade::Caution) label += ", caution";
  return label;
}

void draw_row(std::ostream& out, const Axis& axis, double y,
              const LimitRow& row) {
  const bool governs = row.governs_detection || row.governs_quantitation;
  svg_text(out, governs ? "label governs" : "label", kLeft, y - 9, "start",
           row_label(row));
  svg_line(out, "row", kLeft, y, kRight, y);
  if (!row.estimate) return;
  const LimitEstimate& estimate = *row.estimate;
  // The quantitation bounds a little lower, so that overlapping ones stay two.
  draw_bounds(out, axis, y - 2, estimate.detection_lower,
              estimate.detection_upper);
  draw_bounds(out, axis, y + 3, estimate.quantitation_lower,
              estimate.quantitation_upper);
  const bool invalid = estimate.grade() == Grade::NotValid;
  if (estimate.detection) {
    svg_circle(out, invalid ? "detection invalid" : "detection",
               axis.place(*estimate.detection), y, 5);
  }
  if (estimate.quantitation) {
    svg_diamond(out, invalid ? "quantitation invalid" : "quantitation",
                axis.place(*estimate.quantitation), y, 6.5);
  }
}

void draw_standards(std::ostream& out, const Axis& axis, double y,
                    const CalibrationSet& set) {
  svg_text(out, "label", kLeft, y - 9, "start", "standards");
  svg_line(out, "row", kLeft, y, kRight, y);
  for (const StandardPoint& point : standards_of(set)) {
    if (!(point.concentration > 0.0)) continue;
    const double x = axis.place(point.concentration);
    svg_line(out, point.used ? "level" : "level refused", x, y - 5, x, y + 5);
  }
}

void draw_samples(std::ostream& out, const Axis& axis, double y,
                  const Amounts& amounts) {
  std::string label = "samples, in the vial";
  if (amounts.not_drawn > 0) {
    label +=
        " (" + std::to_string(amounts.not_drawn) + " more near or below zero)";
  }
  svg_text(out, "label", kLeft, y - 9, "start", label);
  svg_line(out, "row", kLeft, y, kRight, y);
  for (const double sample : amounts.samples) {
    svg_circle(out, "sample", axis.place(sample), y, 4);
  }
}

void draw_governing(std::ostream& out, const Axis& axis, double bottom,
                    const GoverningLimits& governing) {
  const double detection = axis.place(governing.detection);
  const double quantitation = axis.place(governing.quantitation);
  svg_rect(out, "between", detection, kTop, quantitation - detection,
           bottom - kTop);
  svg_line(out, "rule-detection", detection, bottom, detection, kTop);
  svg_line(out, "rule-quantitation", quantitation, bottom, quantitation, kTop);
  // Apart by at least a word's width where the limits stand close together.
  const bool close = quantitation - detection < 110;
  svg_text(out, "rule-name", detection - (close ? 3 : 0), kTop - 8,
           close && detection > 70 ? "end" : "middle", "detection");
  svg_text(out, "rule-name", quantitation + (close ? 3 : 0), kTop - 8,
           close ? "start" : "middle", "quantitation");
}

}  // namespace

bool has_limits_figure(const AnalyteJudgement& analyte,
                       const CalibrationSet& set) {
  return !amounts_of(analyte, set).all.empty();
}

void figure_limits(std::ostream& out, const AnalyteJudgement& analyte,
                   const CalibrationSet& set) {
  const Amounts amounts = amounts_of(analyte, set);
  if (amounts.all.empty()) return;
  const auto [least, most] =
      std::minmax_element(amounts.all.begin(), amounts.all.end());
  const Axis axis = log_axis(*least, *most, kLeft + 6, kRight - 6);
  const auto rows = static_cast<double>(set.limits.rows.size() + 2);
  const double bottom = kTop + rows * kRowHeight + 8;
  svg_begin(out, kWidth, bottom + 44,
            "Limits of " + analyte.analyte +
                " by each procedure, with standards and samples, on one "
                "logarithmic scale of concentration");
  svg_bottom_axis(out, axis, bottom, kTop,
                  "concentration in the vial, " + analyte.concentration_unit);
  if (set.limits.governing) {
    draw_governing(out, axis, bottom, *set.limits.governing);
  }
  double y = kTop + kRowHeight - 8;
  for (const LimitRow& row : set.limits.rows) {
    draw_row(out, axis, y, row);
    y += kRowHeight;
  }
  draw_standards(out, axis, y, set);
  draw_samples(out, axis, y + kRowHeight, amounts);
  svg_end(out);
}

}  // namespace loqsmith
