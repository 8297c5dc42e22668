#include "loqsmith/sheets/read_sheets.hpp"

#include <algorithm>
#include <utility>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/sheets/amendments_sheet.hpp"
#include "loqsmith/sheets/cross_check.hpp"
#include "loqsmith/sheets/levels_sheet.hpp"
#include "loqsmith/sheets/method_reading.hpp"
#include "loqsmith/sheets/sequence_sheet.hpp"

namespace loqsmith {
namespace {

void throw_if_any(const SheetProblems& problems) {
  if (!problems.empty()) throw InputError(problems.sorted());
}

std::vector<Injection> in_run_order(const SequenceSheet& sheet) {
  std::vector<Injection> injections;
  for (const SequenceRow& row : sheet.rows) injections.push_back(row.injection);
  std::sort(injections.begin(), injections.end(),
            [](const Injection& a, const Injection& b) {
              return a.number < b.number;
            });
  return injections;
}

// `whole`: the other sheets are right, so that rows can be held against them.
AmendmentsSheet read_amendments(std::string_view csv, const Sheets& sheets,
                                bool whole) {
  AmendmentsSheet sheet = read_amendments_sheet(csv, "amendments.csv");
  if (sheet.problems.empty()) settle_amendments(sheet);
  if (!whole) return sheet;
  if (!sheet.entries.empty() && !sheets.method.unsigned_amendments_accepted) {
    sheet.problems.add(
        1, 1, "unsigned amendments", "none, since the method refuses them",
        "give the method <amendments unsigned=\"accepted\"/>, or "
        "take the sheet out of the folder");
  }
  if (sheet.problems.empty()) {
    check_amendments(sheet, sheets.sequence, sheets.method);
  }
  return sheet;
}

}  // namespace

std::vector<Injection> read_sequence_csv(std::string_view csv,
                                         const std::string& file) {
  const SequenceSheet sheet = read_sequence_sheet(csv, file);
  throw_if_any(sheet.problems);
  return in_run_order(sheet);
}

std::vector<LevelEntry> read_levels_csv(std::string_view csv,
                                        const std::string& file) {
  LevelsSheet sheet = read_levels_sheet(csv, file);
  throw_if_any(sheet.problems);
  return std::move(sheet.entries);
}

Sheets read_sheets(const SheetTexts& texts, const std::string& name) {
  SequenceSheet sequence =
      read_sequence_sheet(texts.sequence_csv, "sequence.csv");
  LevelsSheet levels = read_levels_sheet(texts.levels_csv, "levels.csv");
  MethodReading method = read_method_sheet(texts.method_xml, "method.xml");
  cross_check(sequence, levels, method.document);

  std::vector<InputProblem> problems;
  for (const SheetProblems* sheet :
       {&sequence.problems, &levels.problems, &method.document.problems}) {
    const auto sorted = sheet->sorted();
    problems.insert(problems.end(), sorted.begin(), sorted.end());
  }
  Sheets sheets;
  if (problems.empty()) {
    sheets.sequence = {name, in_run_order(sequence), std::move(levels.entries)};
    sheets.method = std::move(*method.method);
  }
  if (texts.amendments_csv) {
    AmendmentsSheet amendments =
        read_amendments(*texts.amendments_csv, sheets, problems.empty());
    const auto sorted = amendments.problems.sorted();
    problems.insert(problems.end(), sorted.begin(), sorted.end());
    sheets.amendments = std::move(amendments.entries);
  }
  if (!problems.empty()) throw InputError(std::move(problems));
  return sheets;
}

}  // namespace loqsmith
