#include "loqsmith/record/read_published_tables.hpp"

#include <string_view>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

using Row = PublishedPeak;

// Texts that a spreadsheet would run were published behind an apostrophe.
std::string as_written(std::string cell) {
  constexpr std::string_view kRuns = "=+-@\t\r'";
  if (cell.size() > 1 && cell[0] == '\'' &&
      kRuns.find(cell[1]) != std::string_view::npos) {
    cell.erase(0, 1);
  }
  return cell;
}

[[noreturn]] void refuse(const std::filesystem::path& path, std::size_t line,
                         const std::string& found) {
  throw InputError(InputProblem{.file = path.string(),
                                .line = line,
                                .found = found,
                                .expected = "a table that this program wrote",
                                .mend = {}});
}

std::vector<Row> read_rows(const std::filesystem::path& path) {
  const std::vector<CsvRow> rows = read_csv(read_file(path), path.string());
  if (rows.empty()) refuse(path, 0, "nothing");
  std::vector<Row> table;
  for (std::size_t i = 1; i < rows.size(); ++i) {
    if (rows[i].cells.size() != rows[0].cells.size()) {
      refuse(path, rows[i].line, "another number of cells than columns");
    }
    Row row;
    for (std::size_t k = 0; k < rows[0].cells.size(); ++k) {
      row[rows[0].cells[k].text] = as_written(rows[i].cells[k].text);
    }
    table.push_back(std::move(row));
  }
  return table;
}

// Cells of one table, by column; a column that is not there is refused.
class Cells {
 public:
  Cells(const std::filesystem::path& path, const Row& row)
      : path_(path), row_(row) {}

  const std::string& text(const std::string& column) const {
    const auto found = row_.find(column);
    if (found == row_.end()) refuse(path_, 0, "no column " + column);
    return found->second;
  }
  std::optional<double> number(const std::string& column) const {
    const std::string& cell = text(column);
    if (cell.empty()) return std::nullopt;
    const auto value = parse_number(cell);
    if (!value) refuse(path_, 0, in_quotes(cell) + " as " + column);
    return value;
  }
  std::optional<int> injection() const {
    const std::string& cell = text("injection");
    if (cell.empty()) return std::nullopt;
    const auto value = parse_whole(cell);
    if (!value) refuse(path_, 0, in_quotes(cell) + " as injection");
    return static_cast<int>(*value);
  }

 private:
  const std::filesystem::path& path_;
  const Row& row_;
};

Status status_from(const std::filesystem::path& path, const std::string& name) {
  for (const Status status :
       {Status::NotDetected, Status::Estimated, Status::Reportable,
        Status::AboveRange, Status::Withheld}) {
    if (status_name(status) == name) return status;
  }
  refuse(path, 0, in_quotes(name) + " as status");
}

ResultRow result_row(const std::filesystem::path& path, const Cells& cells) {
  ResultRow row;
  row.injection = cells.injection().value_or(0);
  row.sample = cells.text("sample");
  const auto role = role_from_name(cells.text("role"));
  if (!role) refuse(path, 0, in_quotes(cells.text("role")) + " as role");
  row.role = *role;
  row.analyte = cells.text("analyte");
  row.set = cells.text("set");
  row.found = cells.text("found") == "yes";
  row.retention_minutes = cells.number("retention_time");
  row.response = cells.number("response");
  row.signal_to_noise = cells.number("signal_to_noise");
  row.vial_concentration = cells.number("vial_concentration");
  row.dilution = cells.number("dilution").value_or(1.0);
  row.result = cells.number("result");
  row.unit = cells.text("unit");
  row.calibration_uncertainty = cells.number("calibration_uncertainty");
  row.detection_limit = cells.number("detection_limit");
  row.quantitation_limit = cells.number("quantitation_limit");
  row.detection_procedure = cells.text("detection_procedure");
  row.quantitation_procedure = cells.text("quantitation_procedure");
  row.status = status_from(path, cells.text("status"));
  row.reported = cells.text("reported");
  row.qualifier = cells.text("qualifier");
  if (!cells.text("reasons").empty()) {
    row.reasons = split(cells.text("reasons"), ';');
  }
  return row;
}

CheckRow check_row(const Cells& cells) {
  CheckRow check;
  check.check = cells.text("check");
  check.analyte = cells.text("analyte");
  check.injection = cells.injection();
  check.value = cells.number("value");
  check.low = cells.number("low");
  check.high = cells.number("high");
  check.unit = cells.text("unit");
  const std::string& passed = cells.text("passed");
  if (!passed.empty()) check.passed = passed == "yes";
  check.action = cells.text("action");
  check.affects = cells.text("affects");
  check.note = cells.text("note");
  return check;
}

}  // namespace

ResultTable read_result_table(const std::filesystem::path& path) {
  ResultTable table;
  for (const Row& row : read_rows(path)) {
    const Cells cells(path, row);
    PublishedResult result;
    result.row = result_row(path, cells);
    result.automatic_result = cells.text("automatic_result");
    result.automatic_status = cells.text("automatic_status");
    const std::pair key(result.row.injection, result.row.analyte);
    table.emplace(key, std::move(result));
  }
  return table;
}

std::vector<PublishedPeak> read_peaks_table(const std::filesystem::path& path) {
  std::vector<PublishedPeak> peaks = read_rows(path);
  for (const PublishedPeak& peak : peaks) {
    const Cells cells(path, peak);
    for (const char* column :
         {"injection", "analyte", "found", "retention_time", "start", "end",
          "area", "height", "template_response", "baseline", "overlap",
          "manual", "note", "signal_to_noise", "noise", "noise_source"}) {
      cells.text(column);
    }
  }
  return peaks;
}

std::vector<CheckRow> read_checks_table(const std::filesystem::path& path) {
  std::vector<CheckRow> checks;
  for (const Row& row : read_rows(path)) {
    checks.push_back(check_row(Cells(path, row)));
  }
  return checks;
}

}  // namespace loqsmith
