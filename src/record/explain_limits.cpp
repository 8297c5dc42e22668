#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/record/explanation.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

const LimitRow* row_of(const PublishedSet& set, const std::string& procedure) {
  for (const LimitRow& row : set.limits.rows) {
    if (row.procedure == procedure) return &row;
  }
  return nullptr;
}

void tell_terms(ExplanationSection& section, const LimitRow& row) {
  if (!row.estimate) return;
  section.lines.push_back({"what went into " + row.procedure + ":"});
  for (const LimitTerm& term : row.estimate->terms) {
    section.lines.push_back({"  " + term.name + ' ' + shortest(term.value) +
                             (term.unit.empty() ? "" : ' ' + term.unit)});
  }
  const std::string findings = findings_text(*row.estimate);
  if (!findings.empty()) section.lines.push_back({"  " + findings});
}

std::optional<double> limit_of(const LimitRow* row, bool quantitation) {
  if (row == nullptr || !row->estimate) return std::nullopt;
  return quantitation ? row->estimate->quantitation : row->estimate->detection;
}

// A procedure's limit by its own equation, where it has a simple one.
ExplanationLine limit_line(std::string label, const LimitRow* row,
                           bool quantitation, double value,
                           const std::string& unit) {
  const std::string expression =
      limit_of(row, quantitation) == value
          ? limit_expression(*row->estimate, quantitation)
          : std::string{};
  if (expression.empty()) {
    return {label + ": " + shortest(value) + ' ' + unit};
  }
  return {std::move(label), expression, shortest(value), unit};
}

void tell_floor(ExplanationSection& section, const PublishedSet& set,
                const std::string& unit) {
  const GoverningLimits& governing = *set.limits.governing;
  const LimitRow* row = row_of(set, governing.detection_procedure);
  if (const std::optional<double> own = limit_of(row, true)) {
    section.lines.push_back(
        limit_line("quantitation limit by " + row->procedure + " alone", row,
                   true, *own, unit));
  }
  section.lines.push_back(
      {"quantitation limit in the vial: the lowest accepted standard, " +
       shortest(governing.quantitation) + ' ' + unit + ", which lies above"});
}

void tell_limits(ExplanationSection& section, const PublishedSet& set,
                 const std::string& unit) {
  const GoverningLimits& governing = *set.limits.governing;
  section.lines.push_back(limit_line(
      "detection limit in the vial, " + governing.detection_procedure,
      row_of(set, governing.detection_procedure), false, governing.detection,
      unit));
  if (governing.quantitation_procedure == "lowest-standard") {
    tell_floor(section, set, unit);
    return;
  }
  section.lines.push_back(limit_line(
      "quantitation limit in the vial, " + governing.quantitation_procedure,
      row_of(set, governing.quantitation_procedure), true,
      governing.quantitation, unit));
}

void tell_in_sample(ExplanationSection& section, const std::string& name,
                    double vial, const std::optional<double>& in_sample,
                    const PublishedResult& result) {
  if (!in_sample) return;
  section.lines.push_back({name + " in the sample",
                           in_expression(vial) + " x " +
                               in_expression(result.derivation.sample_factor),
                           shortest(*in_sample), result.row.unit});
}

void tell_governing(ExplanationSection& section, const PublishedSet& set,
                    const std::string& unit) {
  const GoverningLimits& governing = *set.limits.governing;
  section.lines.push_back(
      {governing.detection_procedure + " governs detection, " +
       governing.quantitation_procedure + " governs quantitation"});
  const LimitRow* first = row_of(set, governing.detection_procedure);
  const LimitRow* second = row_of(set, governing.quantitation_procedure);
  if (first != nullptr) tell_terms(section, *first);
  if (second != nullptr && second != first) tell_terms(section, *second);
  tell_limits(section, set, unit);
  if (!governing.notes.empty()) {
    section.lines.push_back({"to know: " + join(governing.notes, ", ")});
  }
}

}  // namespace

ExplanationSection explain_limits(const PublishedAnalyte& analyte,
                                  const PublishedResult& result) {
  ExplanationSection section{"limits", {}};
  const PublishedSet* set = analyte.set_named(result.row.set);
  if (set == nullptr || !set->limits.governing) {
    section.lines.push_back(
        {"none: " + (set == nullptr ? std::string("no set")
                                    : set->limits.governing.reason())});
    return section;
  }
  const GoverningLimits& governing = *set->limits.governing;
  tell_governing(section, *set, analyte.concentration_unit);
  tell_in_sample(section, "detection limit", governing.detection,
                 result.row.detection_limit, result);
  tell_in_sample(section, "quantitation limit", governing.quantitation,
                 result.row.quantitation_limit, result);
  if (result.derivation.decides_at_critical_value) {
    tell_in_sample(section, "critical value, where the method decides,",
                   governing.decision_threshold,
                   result.derivation.decision_threshold, result);
  }
  if (set->highest && !set->addition) {
    tell_in_sample(section, "end of the range", *set->highest,
                   result.derivation.range_end, result);
  }
  return section;
}

}  // namespace loqsmith
