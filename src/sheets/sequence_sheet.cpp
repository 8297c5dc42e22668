#include "loqsmith/sheets/sequence_sheet.hpp"

#include <limits>
#include <optional>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/time.hpp"
#include "loqsmith/sheets/read_sheets.hpp"

namespace loqsmith {
namespace {

const std::vector<SheetColumn>& columns() {
  static const std::vector<SheetColumn> all{
      {"injection", true},
      {"file", true},
      {"run"},
      {"sample", true},
      {"role", true},
      {"level"},
      {"dilution"},
      {"internal_standard_dilution"},
      {"sample_amount"},
      {"final_volume"},
      {"parent"},
      {"prep"},
      {"group"},
      {"acquired"},
  };
  return all;
}

std::string decimal_mend(std::string_view text) {
  return text.find(',') != std::string_view::npos
             ? "write a decimal point, not a comma"
             : "write a plain decimal number";
}

class RowReader {
 public:
  RowReader(SequenceSheet& sheet, std::size_t row) : sheet_(sheet), row_(row) {}

  SequenceRow read() {
    Injection& injection = read_.injection;
    read_.row = row_;
    injection.line = cell("sample").line;
    read_number();
    injection.file = path();
    injection.run = text("run");
    injection.sample = text("sample");
    read_role();
    injection.level = text("level");
    injection.dilution = positive("dilution").value_or(1.0);
    injection.internal_standard_dilution =
        positive("internal_standard_dilution").value_or(1.0);
    injection.sample_amount = positive("sample_amount");
    injection.final_volume = positive("final_volume");
    injection.parent = text("parent");
    injection.prep = text("prep");
    injection.group = text("group");
    injection.acquired = time("acquired");
    return std::move(read_);
  }

 private:
  SheetCell cell(std::string_view column) const {
    return sheet_.table.cell(row_, column);
  }

  std::string text(std::string_view column) const { return cell(column).text; }

  void add(std::string_view column, std::string found, std::string expected,
           std::string mend) {
    sheet_.add(row_, column, std::move(found), std::move(expected),
               std::move(mend));
  }

  void read_number() {
    const std::string written = text("injection");
    if (written.empty()) return;
    const auto number = parse_whole(written);
    if (!number || *number < 1 || *number > std::numeric_limits<int>::max()) {
      add("injection", in_quotes(written), "a whole number from 1",
          "number the injections in run order");
      return;
    }
    read_.injection.number = static_cast<int>(*number);
    read_.number_known = true;
  }

  void read_role() {
    const std::string written = text("role");
    if (written.empty()) return;
    if (const auto role = role_from_name(written)) {
      read_.injection.role = *role;
      read_.role_known = true;
      return;
    }
    const std::string near = nearest_name(written, role_names());
    add("role", in_quotes(written), "one of " + join(role_names(), ", "),
        near.empty() ? "" : "did you mean \"" + near + "\"?");
  }

  std::optional<double> positive(std::string_view column) {
    const std::string written = text(column);
    if (written.empty()) return std::nullopt;
    const auto value = parse_number(written);
    if (value && *value > 0.0) return value;
    add(column, in_quotes(written), "a number above 0", decimal_mend(written));
    return std::nullopt;
  }

  std::string time(std::string_view column) {
    const std::string written = text(column);
    if (written.empty()) return {};
    const auto moment = parse_moment(written);
    if (!moment || !moment->has_zone) {
      add(column, in_quotes(written), "a time with its zone (RFC 3339)",
          "write it like 2026-03-01T08:15:00Z or 2026-03-01T09:15:00+01:00");
    }
    return written;
  }

  // The parts that only repeat where one is ("./a", "a//b") are left out; a
  // symbolic link out of the folder is seen to where files are opened.
  std::string path() {
    const std::string written = text("file");
    const std::string mend = "give the path below the sequence folder";
    if (written.starts_with('/') || (written.size() > 1 && written[1] == ':')) {
      add("file", in_quotes(written), "a relative path", mend);
      return written;
    }
    if (written.find('\\') != std::string::npos) {
      add("file", in_quotes(written), "a path with / between its parts",
          "write / in place of \\");
      return written;
    }
    std::vector<std::string> parts;
    for (std::string& part : split(written, '/')) {
      if (part == "..") {
        add("file", in_quotes(written), "a path that stays in the folder",
            mend);
        return written;
      }
      if (!part.empty() && part != ".") parts.push_back(std::move(part));
    }
    if (!written.empty() && (parts.empty() || written.ends_with('/'))) {
      add("file", in_quotes(written), "a file", mend);
    }
    return join(parts, "/");
  }

  SequenceSheet& sheet_;
  std::size_t row_;
  SequenceRow read_;
};

SequenceSheet open_sheet(std::string_view csv, const std::string& file) {
  SheetProblems problems(file);
  SheetTable table(csv, columns(), problems);
  return {{std::move(problems), std::move(table)}, {}};
}

}  // namespace

SequenceSheet read_sequence_sheet(std::string_view csv,
                                  const std::string& file) {
  SequenceSheet sheet = open_sheet(csv, file);
  for (std::size_t row = 0; row < sheet.table.rows(); ++row) {
    sheet.rows.push_back(RowReader(sheet, row).read());
  }
  if (sheet.rows.empty() && sheet.problems.empty()) {
    sheet.problems.add(1, 1, "no injections", "at least one",
                       "add a row for each injection");
  }
  check_sequence_rows(sheet);
  return sheet;
}

}  // namespace loqsmith
