#include <algorithm>
#include <ostream>

#include "loqsmith/base/text.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

bool failed(const NamedDiagnostic& test) {
  return test.outcome && !test.outcome->passed;
}

// The names of the tests that speak against the curve, each once.
std::vector<std::string> objections(const CalibrationDiagnostics& all) {
  std::vector<std::string> names;
  for (const NamedDiagnostic& test : all.tests) {
    if (!failed(test)) continue;
    if (std::find(names.begin(), names.end(), test.name) == names.end()) {
      names.push_back(test.name);
    }
  }
  return names;
}

std::string summary(const CalibrationDiagnostics& all) {
  const auto done = std::count_if(
      all.tests.begin(), all.tests.end(),
      [](const NamedDiagnostic& test) { return test.outcome.has_value(); });
  const std::vector<std::string> names = objections(all);
  std::string text = "Diagnostics: ";
  if (names.empty()) {
    text +=
        "none of " + std::to_string(done) + " tests speaks against the curve";
  } else {
    text += "<b>" + html_text(join(names, ", ")) +
            (names.size() == 1 ? " speaks" : " speak") +
            " against the curve</b>";
  }
  if (all.weights.advises_change) text += "; another weight is advised";
  if (const std::size_t n = all.suggested_exclusions.size(); n > 0) {
    text += "; " + std::to_string(n) + (n == 1 ? " standard" : " standards") +
            " to look at";
  }
  return text;
}

std::string subject(const DiagnosticTest& test) {
  std::string text;
  if (test.injection) text += "injection " + std::to_string(*test.injection);
  if (test.concentration) {
    text += (text.empty() ? "at " : ", at ") + html_number(*test.concentration);
  }
  return text.empty() ? text : "<span class=\"under\">" + text + "</span>";
}

void test_row(std::ostream& out, const NamedDiagnostic& named) {
  out << "<tr><th scope=\"row\">" << html_text(named.name);
  if (!named.outcome) {
    out << "</th><td colspan=\"3\"></td><td class=\"unchecked\">\xE2\x80\x93 "
           "not "
           "done</td><td class=\"reason\">"
        << html_text(named.outcome.reason()) << "</td></tr>\n";
    return;
  }
  const DiagnosticTest& test = *named.outcome;
  out << subject(test) << "</th><td class=\"number\">"
      << html_number(test.statistic) << "</td><td class=\"number\">"
      << html_number(test.critical) << "</td><td class=\"number\">"
      << html_number(test.p, 2) << "</td>"
      << (test.passed ? "<td class=\"passed\">\xE2\x9C\x93 holds</td>"
                      : "<td class=\"failed\">\xE2\x9C\x97 does not</td>")
      << "<td>" << html_text(test.meaning) << "</td></tr>\n";
}

void tests_table(std::ostream& out, const CalibrationDiagnostics& all) {
  out << "<div class=\"wide\" role=\"region\" tabindex=\"0\" "
         "aria-label=\"Diagnostics\"><table class=\"diagnostics\">\n<thead><tr>"
         "<th scope=\"col\">Test</th><th class=\"number\" "
         "scope=\"col\">Statistic</th><th class=\"number\" "
         "scope=\"col\">Critical</th><th class=\"number\" "
         "scope=\"col\">p</th><th scope=\"col\">Outcome</th><th "
         "scope=\"col\">Meaning</th></tr></thead>\n<tbody>\n";
  for (const NamedDiagnostic& test : all.tests) test_row(out, test);
  out << "</tbody></table></div>\n";
}

void weights(std::ostream& out, const WeightAdvice& advice) {
  if (advice.candidates.empty()) return;
  out << "<p>Weights by the sum of relative errors of standards computed "
         "back:";
  for (const WeightCandidate& candidate : advice.candidates) {
    out << " <span class=\"weight\">" << weight_word(candidate.weight) << ' ';
    if (candidate.sum_relative_error_percent) {
      out << html_number(*candidate.sum_relative_error_percent, 3) << " %";
    } else {
      out << "<span class=\"reason\">"
          << html_text(candidate.sum_relative_error_percent.reason())
          << "</span>";
    }
    if (candidate.weight == advice.in_use) out << " <b>in use</b>";
    if (candidate.weight == advice.least) out << " \xE2\x97\x82 least";
    out << "</span>";
  }
  out << "</p>\n";
  if (!advice.advice.empty()) {
    out << "<p" << (advice.advises_change ? " class=\"trouble\"" : "") << '>'
        << html_text(advice.advice) << "</p>\n";
  }
}

void fit_row(std::ostream& out, const std::string& name,
             const Calibration& line, bool quadratic) {
  out << "<tr><th scope=\"row\">" << name << "</th><td class=\"number\">"
      << html_number(line.intercept) << "</td><td class=\"number\">"
      << html_number(line.slope) << "</td>";
  if (quadratic) {
    out << "<td class=\"number\">" << html_number(line.curvature) << "</td>";
  }
  out << "<td class=\"number\">" << html_number(line.residual_sd)
      << "</td><td class=\"number\">" << html_number(line.r2, 5)
      << "</td><td class=\"number\">"
      << html_number(line.relative_standard_error, 3) << "</td></tr>\n";
}

std::string standard_words(const SuggestedExclusion& suggested,
                           const std::string& unit) {
  std::string words = "injection " + std::to_string(suggested.injection);
  if (!suggested.level.empty()) words += ", " + html_name(suggested.level);
  return words + " (" + html_number(suggested.concentration) + ' ' +
         html_name(unit) + ')';
}

// The standards that the tests point at.
void to_look_at(std::ostream& out, const AnalyteJudgement& analyte,
                const CalibrationDiagnostics& all) {
  if (all.suggested_exclusions.empty()) return;
  out << "<p>Standards to look at; only the method or an amendment leaves one "
         "out.</p>\n<ul>\n";
  for (const SuggestedExclusion& suggested : all.suggested_exclusions) {
    out << "<li>" << standard_words(suggested, analyte.concentration_unit)
        << ": " << html_text(suggested.why) << "</li>\n";
  }
  out << "</ul>\n";
}

// The curve with and without each of them.
void both_fits(std::ostream& out, const Calibration& line,
               const CalibrationDiagnostics& all) {
  if (all.suggested_exclusions.empty()) return;
  const bool quadratic =
      line.settings.model == CalibrationSettings::Model::Quadratic;
  out << "<div class=\"wide\" role=\"region\" tabindex=\"0\" "
         "aria-label=\"Curves with and without\"><table>\n<thead><tr><th "
         "scope=\"col\">Curve</th>";
  for (const char* name : {"Intercept", "Slope"}) {
    out << "<th class=\"number\" scope=\"col\">" << name << "</th>";
  }
  if (quadratic) out << "<th class=\"number\" scope=\"col\">Curvature</th>";
  out << "<th class=\"number\" scope=\"col\">Residual sd</th><th "
         "class=\"number\" scope=\"col\">r\xC2\xB2</th><th class=\"number\" "
         "scope=\"col\">RSE, %</th></tr></thead>\n<tbody>\n";
  fit_row(out, "as used", line, quadratic);
  for (const SuggestedExclusion& suggested : all.suggested_exclusions) {
    const std::string name =
        "without injection " + std::to_string(suggested.injection);
    if (suggested.without) {
      fit_row(out, name, *suggested.without, quadratic);
    } else {
      out << "<tr><th scope=\"row\">" << name << "</th><td colspan=\""
          << (quadratic ? 6 : 5) << "\" class=\"reason\">"
          << html_text(suggested.without.reason()) << "</td></tr>\n";
    }
  }
  out << "</tbody></table></div>\n";
}

}  // namespace

void report_advice(std::ostream& out, const AnalyteJudgement& analyte,
                   const CalibrationSet& set) {
  if (!set.calibration || !set.diagnostics) return;
  out << "<div>\n";
  weights(out, set.diagnostics->weights);
  to_look_at(out, analyte, *set.diagnostics);
  out << "</div>\n";
}

void report_diagnostics(std::ostream& out, const CalibrationSet& set) {
  if (!set.calibration || !set.diagnostics) return;
  const CalibrationDiagnostics& all = *set.diagnostics;
  const bool open = !objections(all).empty() || all.weights.advises_change ||
                    !all.suggested_exclusions.empty();
  out << "<details class=\"panel\"" << (open ? " open" : "") << "><summary>"
      << summary(all) << "</summary>\n";
  both_fits(out, *set.calibration, all);
  tests_table(out, all);
  out << "</details>\n";
}

}  // namespace loqsmith
