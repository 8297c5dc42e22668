#include <ostream>

#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/limit_text.hpp"
#include "loqsmith/record/limits_scale.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

constexpr double kStrip = 34;  ///< height of a procedure's strip
// Apart by a little, so that limits that nearly agree stay two.
constexpr double kUpper = 0.5 * kStrip - 4;
constexpr double kLower = 0.5 * kStrip + 4;
constexpr double kMark = 14;
constexpr std::size_t kManyTicks = 7;

struct Scale {
  const AnalyteJudgement& analyte;
  const CalibrationSet& set;
  const LimitsScale& laid;
  const ReportingSettings& reporting;

  double at(double concentration) const {
    return laid.axis.place(concentration);
  }
};

void open_strip(std::ostream& out, double height) {
  out << "<svg class=\"figure scale-strip\" height=\"" << px(height)
      << "\" aria-hidden=\"true\">";
}

void open_row(std::ostream& out, const std::string& css,
              const std::string& name) {
  out << "<div class=\"scale-row" << css
      << "\"><div class=\"scale-name\"><span>" << name << "</span></div>";
}

// Behind all rows: grid, the stretch between the limits that govern, and these.
void ground(std::ostream& out, const Scale& scale) {
  out << "<div class=\"scale-ground\"><svg class=\"figure\" "
         "aria-hidden=\"true\">";
  const auto upright = [&](const char* css, double x) {
    out << "<line class=\"" << css << "\" x1=\"" << percent(x)
        << "\" y1=\"0\" x2=\"" << percent(x) << "\" y2=\"100%\"/>";
  };
  if (scale.set.limits.governing) {
    const double from = scale.at(scale.set.limits.governing->detection);
    const double to = scale.at(scale.set.limits.governing->quantitation);
    out << "<rect class=\"between\" x=\"" << percent(from)
        << "\" y=\"0\" width=\"" << percent(to - from)
        << "\" height=\"100%\"/>";
  }
  for (const double tick : scale.laid.axis.ticks) {
    upright("grid", scale.at(tick));
  }
  if (scale.set.limits.governing) {
    upright("rule-detection", scale.at(scale.set.limits.governing->detection));
    upright("rule-quantitation",
            scale.at(scale.set.limits.governing->quantitation));
  }
  out << "</svg></div>\n";
}

// A text beside an upright line.
void rule_name(std::ostream& out, double x, double y, bool left,
               const std::string& text) {
  out << "<text class=\"rule-name\" x=\"" << percent(x) << "\" y=\"" << px(y)
      << "\" dx=\"" << (left ? "-5" : "5") << "\" text-anchor=\""
      << (left ? "end" : "start") << "\">" << html_text(text) << "</text>";
}

void head(std::ostream& out, const Scale& scale) {
  open_row(out, " scale-head", "Procedure");
  open_strip(out, 38);
  if (scale.set.limits.governing) {
    const GoverningLimits& limits = *scale.set.limits.governing;
    // Away from each other, where there is room.
    const double detection = scale.at(limits.detection);
    const double quantitation = scale.at(limits.quantitation);
    rule_name(out, detection, 14, detection > 30.0,
              "detection " + limit_text(limits.detection, scale.reporting));
    rule_name(
        out, quantitation, 31, quantitation > 70.0,
        "quantitation " + limit_text(limits.quantitation, scale.reporting));
  }
  out << "</svg><div class=\"scale-numbers\"><span>detection</span>"
         "<span>quantitation</span></div></div>\n";
}

std::string row_name(const Scale& scale, const LimitRow& row,
                     std::size_t index) {
  const Grade grade = row.grade();
  std::string name = "<a href=\"#" +
                     limit_row_id(scale.analyte.analyte, scale.set.set, index) +
                     "\">" + html_text(row.procedure) +
                     "</a> <span class=\"tag " + grade_name(grade) + "\">" +
                     grade_mark(grade) + grade_words(grade) + "</span>";
  if (row.governs_detection || row.governs_quantitation) {
    const std::string word = governing_word(row);
    name += " <span class=\"tag rules\">governs " +
            (word == "both" ? std::string("both limits") : word) + "</span>";
  }
  return name;
}

void interval(std::ostream& out, const Scale& scale, double y,
              const std::optional<double>& lower,
              const std::optional<double>& upper) {
  if (!lower || !upper || !(*lower > 0.0)) return;
  out << scale_interval(scale.at(*lower), scale.at(*upper), y);
}

void limit_mark(std::ostream& out, const Scale& scale, const char* kind,
                const std::string& words, double y, bool invalid,
                const std::optional<double>& limit) {
  if (!limit || !(*limit > 0.0)) return;
  const double x = scale.at(*limit);
  const std::string css = invalid ? std::string(kind) + " invalid" : kind;
  out << scale_mark(std::string("limit-") + kind, css, x, y, kMark,
                    words + ' ' + limit_text(*limit, scale.reporting) + ' ' +
                        scale.analyte.concentration_unit);
  if (invalid) out << scale_mark("limit-struck", "struck", x, y, 17, "");
}

void strip(std::ostream& out, const Scale& scale,
           const LimitEstimate& estimate) {
  const bool invalid = estimate.grade() == Grade::NotValid;
  open_strip(out, kStrip);
  interval(out, scale, kUpper, estimate.detection_lower,
           estimate.detection_upper);
  interval(out, scale, kLower, estimate.quantitation_lower,
           estimate.quantitation_upper);
  limit_mark(out, scale, "critical", "critical value", kUpper, invalid,
             estimate.critical_value);
  limit_mark(out, scale, "detection", "detection limit", kUpper, invalid,
             estimate.detection);
  limit_mark(out, scale, "quantitation", "quantitation limit", kLower, invalid,
             estimate.quantitation);
  out << "</svg>";
}

void procedure_row(std::ostream& out, const Scale& scale, const LimitRow& row,
                   std::size_t index) {
  const bool governs = row.governs_detection || row.governs_quantitation;
  open_row(out, governs ? " governs" : "", row_name(scale, row, index));
  if (!row.estimate) {
    out << "<div class=\"scale-why\"><span>" << html_text(row.estimate.reason())
        << "</span></div></div>\n";
    return;
  }
  strip(out, scale, *row.estimate);
  out << "<div class=\"scale-numbers\"><span>"
      << html_limit(row.estimate->detection, scale.reporting) << "</span><span>"
      << html_limit(row.estimate->quantitation, scale.reporting)
      << "</span></div></div>\n";
}

void standards_row(std::ostream& out, const Scale& scale) {
  open_row(out, " scale-others",
           scale.set.over_additions ? "amounts added" : "standards");
  open_strip(out, 28);
  for (const StandardPoint& point : standards_of(scale.set)) {
    if (!(point.concentration > 0.0)) continue;
    const double x = scale.at(point.concentration);
    out << scale_line(point.used ? "level" : "level refused", x, 6, x, 22);
    if (!point.used) {
      out << scale_mark("limit-struck", "struck", x, 14, 12, "left out");
    }
  }
  out << "</svg></div>\n";
}

void axis_row(std::ostream& out, const Scale& scale) {
  open_row(out, " scale-axis",
           "concentration in the vial, " +
               html_name(scale.analyte.concentration_unit));
  open_strip(out, 22);
  const Axis& axis = scale.laid.axis;
  const bool many = axis.logarithmic && axis.ticks.size() > kManyTicks;
  for (std::size_t i = 0; i < axis.ticks.size(); ++i) {
    // Between the powers of ten a narrow page has no room for words.
    const bool fine = many && axis.labels[i].find('1') == std::string::npos;
    out << "<text class=\"tick" << (fine ? " fine" : "") << "\" x=\""
        << percent(scale.at(axis.ticks[i]))
        << "\" y=\"15\" text-anchor=\"middle\">" << html_text(axis.labels[i])
        << "</text>";
  }
  out << "</svg></div>\n";
}

}  // namespace

bool has_limits_figure(const AnalyteJudgement& analyte,
                       const CalibrationSet& set) {
  return limits_scale(analyte, set).has_value();
}

void figure_limits(std::ostream& out, const AnalyteJudgement& analyte,
                   const CalibrationSet& set,
                   const ReportingSettings& reporting) {
  const auto laid = limits_scale(analyte, set);
  if (!laid) return;
  const Scale scale{analyte, set, *laid, reporting};
  out << "<figure class=\"scale\" aria-label=\"Limits of "
      << html_text(analyte.analyte)
      << " by each procedure, with standards and samples, on one "
      << (laid->axis.logarithmic ? "logarithmic" : "linear")
      << " scale of concentration\">\n<div class=\"scale-body\">\n";
  ground(out, scale);
  head(out, scale);
  for (std::size_t i = 0; i < set.limits.rows.size(); ++i) {
    procedure_row(out, scale, set.limits.rows[i], i);
  }
  standards_row(out, scale);
  scale_samples(out, *laid);
  axis_row(out, scale);
  out << "</div>\n";
  out << "</figure>\n";
}

}  // namespace loqsmith
