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
        << html_text(set.calibration.reason()) << ". Every result "
        << (analyte.sets.size() > 1 ? "by it"
                                    : "of this "
                                      "analyte")
        << " is withheld.</p>\n";
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

std::string suggestion_words(const CalibrationSet& set) {
  if (!set.diagnostics || set.diagnostics->suggested_exclusions.empty()) {
    return {};
  }
  return " Ringed: standards to look at; dotted: the curve without each.";
}

// What a line of standard addition is there for.
void addition_words(std::ostream& out, const AnalyteJudgement& analyte,
                    const CalibrationSet& set) {
  if (!set.addition) return;
  const StandardAddition& found = *set.addition;
  out << "<p>Standard addition: the sample's vial holds <strong>"
      << html_number(found.amount) << ' '
      << html_name(analyte.concentration_unit) << "</strong>";
  if (found.interval) {
    out << " (95 % interval " << html_number(found.interval->lower) << " to "
        << html_number(found.interval->upper) << ')';
  }
  out << ", as far below zero as the line meets zero response (diamond); "
         "concentrations of the figure are those added.</p>\n";
}

// Why one standard deviation may or may not stand for the low end.
void residuals(std::ostream& out, const AnalyteJudgement& analyte,
               const CalibrationSet& set) {
  out << "<figure id=\"" << residuals_id(analyte.analyte, set.set) << "\">\n";
  figure_residuals(out, analyte, set);
  out << "<figcaption>What the curve leaves of each standard; shaded: one "
         "residual standard deviation as the weights have it. Where points at "
         "the low end stay well inside and those at the high end spread "
         "beyond, "
         "it is too large for the low end, and limits that rest on it are too "
         "high.</figcaption>\n</figure>\n";
}

void set_figures(std::ostream& out, const AnalyteJudgement& analyte,
                 const CalibrationSet& set) {
  out << "<div class=\"figures\">\n";
  if (!standards_of(set).empty()) {
    figure(out,
           std::string(
               "Standards: <span class=\"key\">\xE2\x97\x8F</span> used, "
               "<span class=\"key bad\">\xC3\x97</span> left out. Curve solid "
               "over the accepted range; strokes on the axis are the levels.") +
               suggestion_words(set),
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

}  // namespace

void report_calibration(std::ostream& out, const AnalyteJudgement& analyte,
                        const CalibrationSet& set) {
  calibration_words(out, analyte, set);
  addition_words(out, analyte, set);
  set_figures(out, analyte, set);
  if (!set.calibration) return;
  out << "<div class=\"figures\">\n";
  residuals(out, analyte, set);
  report_advice(out, analyte, set);
  out << "</div>\n";
  report_diagnostics(out, set);
}

}  // namespace loqsmith
