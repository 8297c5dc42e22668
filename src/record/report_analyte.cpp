#include <algorithm>
#include <ostream>

#include "loqsmith/base/text.hpp"
#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

void figure(std::ostream& out, const std::string& caption, auto&& draw) {
  out << "<figure>\n";
  draw();
  out << "<figcaption>" << caption << "</figcaption>\n</figure>\n";
}

std::string equation(const Calibration& line) {
  std::string text = "response = " + html_number(line.intercept) + " + " +
                     html_number(line.slope) + " c";
  if (line.settings.model == CalibrationSettings::Model::Quadratic) {
    text += " + " + html_number(line.curvature) + " c\xC2\xB2";
  }
  return text;
}

void calibration_words(std::ostream& out, const AnalyteJudgement& analyte,
                       const CalibrationSet& set) {
  if (!set.calibration) {
    out << "<p class=\"trouble\">No calibration: "
        << html_text(set.calibration.reason())
        << ". Every result of this analyte is withheld.</p>\n";
    return;
  }
  const Calibration& line = *set.calibration;
  out << "<p>"
      << (calibration_accepted(analyte, set) ? "Accepted" : "Not accepted")
      << ": " << model_word(line.settings.model) << ", weight "
      << weight_word(line.settings.weight) << ", <span class=\"math\">"
      << equation(line) << "</span>; residual standard deviation "
      << html_number(line.residual_sd) << ", r\xC2\xB2 "
      << html_number(line.r2, 5) << ", relative standard error "
      << html_number(line.relative_standard_error, 3) << " %; "
      << std::to_string(line.accepted_levels()) << " of "
      << std::to_string(line.levels.size()) << " levels accepted, range "
      << html_number(line.accepted_lowest) << " to "
      << html_number(line.accepted_highest) << ' '
      << html_name(analyte.concentration_unit) << ".";
  if (!line.notes.empty())
    out << " Notes: " << html_text(join(line.notes, ", ")) << '.';
  out << "</p>\n";
}

void governing_words(std::ostream& out, const AnalyteJudgement& analyte,
                     const CalibrationSet& set) {
  if (!set.limits.governing) {
    out << "<p class=\"trouble\">No limits govern: "
        << html_text(set.limits.governing.reason()) << ".</p>\n";
    return;
  }
  const GoverningLimits& limits = *set.limits.governing;
  const std::string unit = ' ' + html_name(analyte.concentration_unit);
  out << "<p>Detection limit <strong>" << html_number(limits.detection, 3)
      << unit << "</strong> (" << html_text(limits.detection_procedure)
      << "), quantitation limit <strong>" << html_number(limits.quantitation, 3)
      << unit << "</strong> (" << html_text(limits.quantitation_procedure)
      << "), present from " << html_number(limits.decision_threshold, 3) << unit
      << " up; in the undiluted vial.";
  if (!limits.notes.empty()) {
    out << " Notes: " << html_text(join(limits.notes, ", ")) << '.';
  }
  out << "</p>\n";
}

void set_figures(std::ostream& out, const AnalyteJudgement& analyte,
                 const CalibrationSet& set) {
  out << "<div class=\"figures\">\n";
  if (!standards_of(set).empty()) {
    figure(out,
           "Standards: <span class=\"key\">\xE2\x97\x8F</span> used, "
           "<span class=\"key bad\">\xC3\x97</span> left out. Curve solid "
           "over the accepted range; strokes on the axis are the levels.",
           [&] { figure_calibration(out, analyte, set); });
  }
  if (set.calibration) {
    figure(out,
           "Each standard computed back through the curve, against its "
           "stated amount.",
           [&] { figure_deviation(out, analyte, set); });
  }
  out << "</div>\n";
}

void set_limits(std::ostream& out, const AnalyteJudgement& analyte,
                const CalibrationSet& set) {
  out << "<h3>Limits</h3>\n<div class=\"figures\">\n";
  const bool drawn = has_limits_figure(analyte, set);
  if (drawn) {
    out << "<figure>\n";
    figure_limits(out, analyte, set);
    out << "</figure>\n";
  }
  out << "<div>\n";
  governing_words(out, analyte, set);
  if (drawn) {
    out << "<p class=\"reading\">Each row is a procedure: <span "
           "class=\"key\">\xE2\x97\x8B</span> its detection limit, <span "
           "class=\"key\">\xE2\x97\x86</span> its quantitation limit, with "
           "95 % bounds where they are known; dashed ones are not valid. The "
           "upright lines are the limits that govern. Between them a result "
           "is an estimate. Strokes are the standards' levels, dots the "
           "samples.</p>\n";
  }
  out << "</div>\n</div>\n";
  report_limits_table(out, analyte, set);
}

std::vector<const FigureCurve*> curves_of(const PublishedRun& run,
                                          const std::string& analyte) {
  std::vector<const FigureCurve*> curves;
  for (const FigureCurve& curve : run.curves) {
    if (curve.analyte == analyte && curve.curve.minutes.size() > 1) {
      curves.push_back(&curve);
    }
  }
  return curves;
}

// One height of the signal axis for all, so that a blank's noise is seen at
// the size it has beside a low peak; given up where that would flatten one.
double shared_span(const std::vector<const FigureCurve*>& curves) {
  double least = signal_span(curves.front()->curve);
  double most = least;
  for (const FigureCurve* curve : curves) {
    least = std::min(least, signal_span(curve->curve));
    most = std::max(most, signal_span(curve->curve));
  }
  return most > 25.0 * least ? 0.0 : most;
}

void traces(std::ostream& out, const PublishedRun& run,
            const std::string& analyte) {
  const auto curves = curves_of(run, analyte);
  if (curves.empty()) return;
  const double span = shared_span(curves);
  out << "<h3>Traces</h3>\n<div class=\"figures\">\n";
  for (const FigureCurve* curve : curves) {
    figure(out,
           "Injection " + std::to_string(curve->injection) + ", " +
               html_text(curve->caption) + ": area " +
               html_number(curve->peak.area) + ", height " +
               html_number(curve->peak.height) +
               (curve->peak.signal_to_noise
                    ? ", S/N " + html_number(*curve->peak.signal_to_noise, 3)
                    : std::string{}) +
               ". Shaded: the window; straight: the baseline" +
               (curve->curve.fitted.empty() ? "." : "; curved: the template."),
           [&] { figure_trace(out, *curve, "", span); });
  }
  out << "</div>\n";
}

// What the template response scales; nothing where no shape was learned.
void template_shape(std::ostream& out, const PublishedRun& run,
                    const std::string& analyte) {
  for (const TargetRecord& record : run.targets) {
    if (record.target != analyte || !record.window) continue;
    const TemplateShape& shape = record.window->shape;
    if (shape.empty()) continue;
    out << "<h3>Template</h3>\n<div class=\"figures\">\n";
    figure(out,
           "Mean shape of " + std::to_string(shape.lessons) +
               (shape.lessons == 1 ? " peak" : " peaks") +
               " of standards, brought to one apex and to unit area; they "
               "differ from it by " +
               html_number(100.0 * shape.scatter, 2) +
               " % of it beyond their noise.",
           [&] { figure_shape(out, analyte, shape); });
    out << "</div>\n";
  }
}

}  // namespace

void report_analyte(std::ostream& out, const PublishedRun& run,
                    const AnalyteJudgement& analyte) {
  out << "<section id=\"" << analyte_id(analyte.analyte) << "\">\n<h2>"
      << html_name(analyte.analyte) << "</h2>\n";
  for (const CalibrationSet& set : analyte.sets) {
    if (analyte.sets.size() > 1) {
      out << "<h3>Calibration set " << html_text(set.set) << "</h3>\n";
    }
    calibration_words(out, analyte, set);
    set_figures(out, analyte, set);
    set_limits(out, analyte, set);
  }
  template_shape(out, run, analyte.analyte);
  traces(out, run, analyte.analyte);
  if (!analyte.checks.empty()) {
    out << "<h3>Checks</h3>\n";
    report_checks_table(out, analyte.checks);
  }
  out << "</section>\n";
}

}  // namespace loqsmith
