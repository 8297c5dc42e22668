#include "loqsmith/judgement/acceptance_names.hpp"

namespace loqsmith {
namespace {

using Settings = AcceptanceSettings;

}  // namespace

const std::vector<AcceptanceCheck>& acceptance_checks() {
  static const std::vector<AcceptanceCheck> checks{
      {"calibration",
       [](const Settings& s) { return s.calibration.has_value(); }},
      {"second-source",
       [](const Settings& s) { return s.second_source.has_value(); }},
      {"check-standard",
       [](const Settings& s) { return s.check_standard.has_value(); }},
      {"solvent-blank",
       [](const Settings& s) { return s.solvent_blank.has_value(); }},
      {"method-blank",
       [](const Settings& s) { return s.method_blank.has_value(); }},
      {"control", [](const Settings& s) { return s.control.has_value(); }},
      {"fortified", [](const Settings& s) { return s.fortified.has_value(); }},
      {"duplicate", [](const Settings& s) { return s.duplicate.has_value(); }},
      {"surrogate", [](const Settings& s) { return s.surrogate.has_value(); }},
      {"internal-standard",
       [](const Settings& s) { return s.internal_standard.has_value(); }},
      {"retention-time",
       [](const Settings& s) { return s.retention_time.has_value(); }},
      {"suitability",
       [](const Settings& s) { return s.suitability.has_value(); }},
      {"carry-over",
       [](const Settings& s) { return s.carry_over.has_value(); }},
      {"second-trace",
       [](const Settings& s) { return s.second_trace.has_value(); }},
      {"established-limit",
       [](const Settings& s) { return s.established_limit.has_value(); }},
      {"confirmation",
       [](const Settings& s) { return s.confirmation.has_value(); }},
      {"closeness", [](const Settings& s) { return s.closeness.has_value(); }},
  };
  return checks;
}

std::vector<CheckRow> unchecked_rows(const AcceptanceSettings& acceptance,
                                     const std::string& analyte) {
  std::vector<CheckRow> rows;
  for (const AcceptanceCheck& check : acceptance_checks()) {
    if (check.asked_for(acceptance)) continue;
    CheckRow row;
    row.check = check.name;
    row.analyte = analyte;
    row.note = "not checked: the method does not ask for it";
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace loqsmith
