#include "loqsmith/night/earlier_runs.hpp"

#include <algorithm>
#include <map>
#include <optional>
#include <string>
#include <system_error>
#include <utility>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/numbers.hpp"
#include "loqsmith/sheets/amendments_sheet.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

std::vector<Amendment> amendments_of(const fs::path& out,
                                     const RunEvents& run) {
  if (run.amendments_sha256.empty()) return {};
  const fs::path sheet = out / run.object / "inputs" / "amendments.csv";
  std::string text;
  try {
    text = read_file(sheet);
  } catch (const std::system_error& error) {
    throw Halt(ExitStatus::IoFailed, error.what());
  }
  if (sha256_hex(text) != run.amendments_sha256) {
    throw Halt(
        ExitStatus::IoFailed,
        sheet.string() + " was changed: its SHA-256 is not the ledger's");
  }
  return read_amendments_sheet(text, sheet.string()).entries;
}

InputProblem missing(const Amendment& row, const RunEvents& run) {
  return {.file = "amendments.csv",
          .found = "no row " + describe(row) + ", decided by " + row.who +
                   " at " + row.when,
          .expected = "every row that " + run.object + " had",
          .mend =
              "put the row back as it was; what holds no longer is taken "
              "back by a row withdraw"};
}

// Result cells by injection and analyte, as the table writes them.
using Cells = std::map<std::pair<std::string, std::string>, std::string>;

// The tables put an apostrophe before a text that a spreadsheet would run, and
// before one that begins with an apostrophe itself.
std::string unguarded(const std::string& text) {
  return text.starts_with('\'') ? text.substr(1) : text;
}

std::size_t column_of(const CsvRow& head, const std::string& name) {
  for (std::size_t i = 0; i < head.cells.size(); ++i) {
    if (head.cells[i].text == name) return i;
  }
  throw InputError({.file = "results.csv",
                    .found = "no column " + name,
                    .expected = "a results table of ours",
                    .mend = ""});
}

Cells reported_cells(const fs::path& table) {
  const std::vector<CsvRow> rows = read_csv(read_file(table), "results.csv");
  Cells cells;
  if (rows.empty()) return cells;
  const std::size_t injection = column_of(rows.front(), "injection");
  const std::size_t analyte = column_of(rows.front(), "analyte");
  const std::size_t reported = column_of(rows.front(), "reported");
  for (std::size_t i = 1; i < rows.size(); ++i) {
    const std::vector<CsvCell>& row = rows[i].cells;
    if (row.size() != rows.front().cells.size()) continue;
    cells[{row[injection].text, unguarded(row[analyte].text)}] =
        unguarded(row[reported].text);
  }
  return cells;
}

// Results of both runs; those that are gone are named as well.
std::vector<ReportedChange> changes(Cells before, const PublishedRun& run) {
  std::vector<ReportedChange> found;
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const ResultRow& row : analyte.results) {
      const auto was =
          before.find({std::to_string(row.injection), analyte.analyte});
      const std::string text = was == before.end() ? "" : was->second;
      if (was != before.end()) before.erase(was);
      if (text == row.reported) continue;
      found.push_back({row.injection, analyte.analyte, text, row.reported});
    }
  }
  for (const auto& [key, text] : before) {
    const auto number = parse_whole(key.first);
    found.push_back(
        {static_cast<int>(number.value_or(0)), key.second, text, ""});
  }
  std::stable_sort(found.begin(), found.end(),
                   [](const ReportedChange& a, const ReportedChange& b) {
                     return a.injection < b.injection;
                   });
  return found;
}

}  // namespace

void require_earlier_amendments(const fs::path& out,
                                const std::vector<RunEvents>& earlier,
                                const std::vector<Amendment>& amendments) {
  std::vector<InputProblem> problems;
  for (const RunEvents& run : earlier) {
    for (const Amendment& row : amendments_of(out, run)) {
      const bool kept = std::any_of(
          amendments.begin(), amendments.end(),
          [&](const Amendment& own) { return is_same_row(own, row); });
      if (!kept) problems.push_back(missing(row, run));
    }
  }
  if (!problems.empty()) throw InputError(std::move(problems));
}

void compare_with_earlier(const fs::path& out,
                          const std::vector<RunEvents>& earlier,
                          PublishedRun& run) {
  for (const RunEvents& one : earlier) {
    run.earlier_runs.push_back(
        {one.object, one.begun_time, !one.amendments_sha256.empty()});
  }
  if (earlier.empty()) return;
  const std::string& last = earlier.back().object;
  try {
    run.reported_changes =
        changes(reported_cells(out / last / "results.csv"), run);
  } catch (const InputError& error) {
    run.not_compared = last + ": " + describe(error.problems().front());
  } catch (const std::system_error& error) {
    run.not_compared = last + ": " + error.what();
  }
}

}  // namespace loqsmith
