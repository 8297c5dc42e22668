#include "loqsmith/sheets/cross_check.hpp"

#include <algorithm>
#include <map>
#include <set>
#include <string>
#include <vector>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

std::string mend_name(std::string_view name,
                      const std::vector<std::string>& known,
                      const std::string& otherwise) {
  const std::string near = nearest_name(name, known);
  return near.empty() ? otherwise : "did you mean \"" + near + "\"?";
}

void check_level_names(SequenceSheet& sequence, const LevelsSheet& levels) {
  std::set<std::string> known;
  for (const LevelEntry& entry : levels.entries) known.insert(entry.level);
  const std::vector<std::string> names(known.begin(), known.end());
  for (const SequenceRow& row : sequence.rows) {
    const std::string& level = row.injection.level;
    if (level.empty() || known.contains(level)) continue;
    sequence.add(row.row, "level", in_quotes(level), "a level of levels.csv",
                 mend_name(level, names, "add it to levels.csv"));
  }
}

void check_analyte_names(LevelsSheet& levels, const MethodDocument& method) {
  std::vector<std::string> known;
  for (const MethodElement* analyte : method.root.at_path("analytes/analyte")) {
    if (const auto* id = analyte->attribute("id")) known.push_back(id->text);
  }
  for (std::size_t row = 0; row < levels.entries.size(); ++row) {
    const std::string& analyte = levels.entries[row].analyte;
    if (analyte.empty() ||
        std::find(known.begin(), known.end(), analyte) != known.end()) {
      continue;
    }
    levels.add(row, "analyte", in_quotes(analyte),
               "the id of an analyte of the method",
               mend_name(analyte, known, "add it to the method or remove it"));
  }
}

// A line needs two points; the calibration blank is none of them.
void check_standards(SequenceSheet& sequence, const LevelsSheet& levels) {
  std::set<std::string> used;
  const SequenceRow* first = nullptr;
  for (const SequenceRow& row : sequence.rows) {
    if (!row.role_known || row.injection.role != Role::Standard) continue;
    used.insert(row.injection.level);
    if (first == nullptr) first = &row;
  }
  std::map<std::string, std::set<double>> concentrations;
  for (const LevelEntry& entry : levels.entries) {
    if (used.contains(entry.level) && entry.concentration > 0.0) {
      concentrations[entry.analyte].insert(entry.concentration);
    }
  }
  for (const auto& [analyte, values] : concentrations) {
    if (values.size() > 1) continue;
    sequence.add(first->row, "level",
                 "standards of " + in_quotes(analyte) + " at " +
                     shortest(*values.begin()) + " alone",
                 "at least two concentrations above 0",
                 "add standards of another level");
  }
}

void check_preparation(const SequenceSheet& sequence, MethodDocument& method) {
  const bool used = std::any_of(
      sequence.rows.begin(), sequence.rows.end(), [](const SequenceRow& row) {
        return row.injection.sample_amount || row.injection.final_volume;
      });
  const MethodElement* units = method.root.child("units");
  if (!used || units == nullptr) return;
  std::vector<std::string> missing;
  for (const char* name : {"factor", "sample-amount", "final-volume"}) {
    if (units->attribute(name) == nullptr) missing.emplace_back(name);
  }
  if (missing.empty()) return;
  method.add(units->offset, "<units> without " + join(missing, ", "),
             "the factor and both units, since the sequence uses "
             "sample_amount and final_volume",
             "add them: result = vial x dilution x final volume / sample "
             "amount x factor");
}

}  // namespace

void cross_check(SequenceSheet& sequence, LevelsSheet& levels,
                 MethodDocument& method) {
  const bool sheets_are_right =
      sequence.problems.empty() && levels.problems.empty();
  if (levels.table.rows() > 0 || levels.problems.empty()) {
    check_level_names(sequence, levels);
  }
  if (method.has_root) {
    check_analyte_names(levels, method);
    check_preparation(sequence, method);
  }
  if (sheets_are_right) check_standards(sequence, levels);
}

}  // namespace loqsmith
