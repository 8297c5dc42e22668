#include "loqsmith/record/explanation.hpp"

#include <cmath>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

const std::string& cell(const PublishedPeak& peak, const std::string& column) {
  return peak.at(column);
}

double value_of(const PublishedPeak& peak, const std::string& column) {
  return parse_number(peak.at(column)).value_or(0.0);
}

// The column that the response is taken from: where the template gives none
// the area stands in for it.
std::string measure_column(const ResultDerivation& told,
                           const PublishedPeak& peak) {
  if (told.measure == "height") return "height";
  const bool by_template = told.measure == "template" &&
                           !cell(peak, "template_response").empty();
  return by_template ? "template_response" : "area";
}

std::string measure_words(const std::string& column) {
  return column == "template_response" ? "template response" : column;
}

// A foot as apex less or plus the window's side; where a neighbour or a hand
// moved it, its place alone.
void tell_foot(ExplanationSection& section, const PublishedPeak& peak,
               const std::string& column, double side) {
  const std::string label = column == "start" ? "left foot" : "right foot";
  const double apex = value_of(peak, "retention_time");
  const double foot = value_of(peak, column);
  constexpr double kArithmetic = 1e-15;
  if (side == 0.0 || std::abs(apex + side - foot) > kArithmetic * foot) {
    section.lines.push_back({label + " at " + cell(peak, column) + " min"});
    return;
  }
  section.lines.push_back(
      {label,
       in_expression(apex) + (side < 0.0 ? " - " : " + ") +
           in_expression(std::abs(side)),
       cell(peak, column), "min"});
}

void tell_place(ExplanationSection& section, const PublishedPeak& peak,
                const PublishedWindow& window) {
  const bool found = cell(peak, "found") == "yes";
  section.lines.push_back(
      {(found ? "peak found, apex at " : "no peak seen; the window stands at ") +
       cell(peak, "retention_time") + " min"});
  tell_foot(section, peak, "start", -window.left);
  tell_foot(section, peak, "end", window.right);
  if (cell(peak, "manual") == "yes") {
    section.lines.push_back({"the feet were set by hand"});
  }
  section.lines.push_back({"baseline " + cell(peak, "baseline")});
  if (!cell(peak, "overlap").empty()) {
    section.lines.push_back(
        {"parted from its neighbour by " + cell(peak, "overlap")});
  }
}

void tell_size(ExplanationSection& section, const PublishedPeak& peak) {
  section.lines.push_back({"area " + cell(peak, "area") + ", height " +
                           cell(peak, "height")});
  if (!cell(peak, "signal_to_noise").empty()) {
    section.lines.push_back({"signal-to-noise " +
                             cell(peak, "signal_to_noise") + ", noise " +
                             cell(peak, "noise") + " from " +
                             cell(peak, "noise_source")});
  }
  if (!cell(peak, "note").empty()) {
    section.lines.push_back({"to know: " + cell(peak, "note")});
  }
}

// A_is d, what the response is divided by.
void tell_internal_standard(ExplanationSection& section,
                            const PublishedRecord& record,
                            const PublishedResult& result) {
  const ResultDerivation& told = result.derivation;
  if (told.divisor_is_mean) {
    section.lines.push_back(
        {"this blank shows no internal standard " + told.internal_standard +
         ": the mean of the standards' own stands in, " +
         shortest(told.divisor)});
    return;
  }
  const PublishedPeak* standard =
      record.peak(result.row.injection, told.internal_standard);
  if (standard == nullptr) return;
  const std::string column = measure_column(told, *standard);
  section.lines.push_back({"internal standard " + told.internal_standard +
                           ", apex at " + cell(*standard, "retention_time") +
                           " min, feet at " + cell(*standard, "start") +
                           " and " + cell(*standard, "end") + " min"});
  section.lines.push_back(
      {"its " + measure_words(column) + ", undiluted",
       in_expression(value_of(*standard, column)) + " x " +
           in_expression(told.internal_standard_dilution),
       shortest(told.divisor)});
}

}  // namespace

std::string in_expression(double value) {
  const std::string text = shortest(value);
  return text.front() == '-' ? '(' + text + ')' : text;
}

ExplanationSection explain_file(const PublishedRecord& record,
                                const PublishedResult& result) {
  const ResultDerivation& told = result.derivation;
  ExplanationSection section{"file", {}};
  const auto hash = record.hashes.find(told.file);
  section.lines.push_back({told.file});
  section.lines.push_back({hash == record.hashes.end()
                               ? "it could not be read"
                               : "SHA-256 " + hash->second});
  if (!told.file_run.empty()) {
    section.lines.push_back({"run " + told.file_run + " of the document"});
  }
  section.lines.push_back({"trace " + told.trace});
  return section;
}

ExplanationSection explain_peak(const PublishedRecord& record,
                                const PublishedResult& result) {
  const ResultDerivation& told = result.derivation;
  ExplanationSection section{"peak", {}};
  section.lines.push_back({"looked for within " +
                           shortest(told.tolerance_minutes) + " min of " +
                           shortest(told.expected_minutes) + " min"});
  const auto window = record.windows.find(result.row.analyte);
  const PublishedWindow learned =
      window == record.windows.end() ? PublishedWindow{} : window->second;
  section.lines.push_back(
      {learned.not_applicable.empty()
           ? "window from the standards: " + shortest(learned.left) +
                 " min before to " + shortest(learned.right) +
                 " min after the apex"
           : "no window: " + learned.not_applicable});
  const PublishedPeak* peak =
      record.peak(result.row.injection, result.row.analyte);
  if (peak == nullptr) return section;
  if (cell(*peak, "area").empty()) {
    section.lines.push_back({"not measured: " + cell(*peak, "note")});
    return section;
  }
  tell_place(section, *peak, learned);
  tell_size(section, *peak);
  return section;
}

ExplanationSection explain_response(const PublishedRecord& record,
                                    const PublishedResult& result) {
  const ResultDerivation& told = result.derivation;
  ExplanationSection section{"response", {}};
  const PublishedPeak* peak =
      record.peak(result.row.injection, result.row.analyte);
  if (!result.row.response || peak == nullptr) {
    section.lines.push_back({"none: see the reasons"});
    return section;
  }
  const std::string column = measure_column(told, *peak);
  if (told.internal_standard.empty()) {
    section.lines.push_back({"the peak's " + measure_words(column) + ", " +
                             shortest(*result.row.response)});
    return section;
  }
  tell_internal_standard(section, record, result);
  section.lines.push_back(
      {"ratio of the peak's " + measure_words(column) + " to it",
       in_expression(value_of(*peak, column)) + " / " +
           in_expression(told.divisor),
       shortest(*result.row.response)});
  return section;
}

std::vector<ExplanationSection> explain_result(const PublishedRecord& record,
                                               const PublishedAnalyte& analyte,
                                               const PublishedResult& result) {
  return {explain_file(record, result),    explain_peak(record, result),
          explain_response(record, result), explain_curve(analyte, result),
          explain_sample(result),  explain_limits(analyte, result),
          explain_checks(record, result),   explain_verdict(result)};
}

}  // namespace loqsmith
