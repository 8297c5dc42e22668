#include "loqsmith/base/csv.hpp"

#include <ostream>
#include <utility>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kMostRows = 1'000'000;
constexpr std::size_t kMostCellBytes = std::size_t{1} << 20U;

// A tab stays: spreadsheets put it into texts. Line ends are seen to before.
bool is_forbidden(char c) {
  const auto byte = static_cast<unsigned char>(c);
  return (byte < 0x20U && c != '\t') || byte == 0x7FU;
}

class CsvScanner {
 public:
  CsvScanner(std::string_view text, const std::string& file)
      : text_(text), file_(file) {
    if (text_.starts_with("\xEF\xBB\xBF")) text_.remove_prefix(3);
  }

  std::vector<CsvRow> rows() {
    check_utf8();
    std::vector<CsvRow> rows;
    while (at_ < text_.size()) {
      if (rows.size() == kMostRows) {
        fail("more rows", "at most 1000000 rows", "split the sheet");
      }
      rows.push_back(row());
    }
    while (!rows.empty() && is_blank(rows.back())) rows.pop_back();
    return rows;
  }

 private:
  static bool is_blank(const CsvRow& row) {
    return row.cells.size() == 1 && row.cells.front().text.empty();
  }

  CsvRow row() {
    CsvRow row;
    row.line = line_;
    row.cells.push_back(cell());
    while (at_ < text_.size() && text_[at_] == ',') {
      ++at_;
      row.cells.push_back(cell());
    }
    take_line_end();
    return row;
  }

  CsvCell cell() {
    CsvCell cell{{}, column()};
    if (at_ < text_.size() && text_[at_] == '"') {
      cell.text = quoted_text();
    } else {
      cell.text = plain_text();
    }
    return cell;
  }

  std::string plain_text() {
    std::string cell;
    while (at_ < text_.size() && text_[at_] != ',' && !at_line_end()) {
      if (text_[at_] == '"') {
        fail("a quote inside a cell that does not begin with one",
             "the whole cell in quotes",
             "put quotes around the cell and double those inside it");
      }
      append_byte(cell);
    }
    return cell;
  }

  std::string quoted_text() {
    const std::size_t opened_line = line_;
    const std::size_t opened_column = column();
    std::string cell;
    ++at_;
    while (at_ < text_.size()) {
      if (text_[at_] == '"') {
        ++at_;
        if (at_ == text_.size() || text_[at_] != '"') {
          expect_cell_end();
          return cell;
        }
      }
      append_quoted_byte(cell);
    }
    throw InputError({file_, opened_line, opened_column,
                      "a quote that is never closed", "a closing quote",
                      "close the quote or remove it"});
  }

  void append_quoted_byte(std::string& cell) {
    if (at_line_end()) {
      cell += text_.substr(at_, line_end_length());
      take_line_end();
      return;
    }
    append_byte(cell);
  }

  void append_byte(std::string& cell) {
    if (is_forbidden(text_[at_])) {
      fail("control character " + in_quotes(text_.substr(at_, 1)), "plain text",
           "remove it, or save the sheet as CSV in UTF-8");
    }
    if (cell.size() == kMostCellBytes) {
      fail("a longer cell", "at most 1 MiB in a cell", "shorten it");
    }
    cell += text_[at_++];
  }

  void expect_cell_end() {
    if (at_ < text_.size() && text_[at_] != ',' && !at_line_end()) {
      fail("text after a closing quote", "a comma or the end of the line",
           "double the quotes inside the cell");
    }
  }

  // A carriage return alone ends no line; it is a forbidden character then.
  std::size_t line_end_length() const {
    if (text_.substr(at_).starts_with("\r\n")) return 2;
    return at_ < text_.size() && text_[at_] == '\n' ? 1 : 0;
  }

  bool at_line_end() const { return line_end_length() > 0; }

  void take_line_end() {
    const std::size_t length = line_end_length();
    if (length == 0) return;
    at_ += length;
    ++line_;
    line_start_ = at_;
  }

  void check_utf8() {
    if (is_utf8(text_)) return;
    std::size_t start = 0;
    while (start < text_.size()) {
      const std::size_t end = text_.find('\n', start);
      const std::string_view line = text_.substr(start, end - start);
      if (!is_utf8(line)) {
        fail("bytes that are no UTF-8 in " + in_quotes(line), "UTF-8 text",
             "save the sheet as CSV in UTF-8");
      }
      start += line.size() + 1;
      ++line_;
    }
  }

  std::size_t column() const { return at_ - line_start_ + 1; }

  [[noreturn]] void fail(std::string found, std::string expected,
                         std::string mend) const {
    throw InputError({file_, line_, column(), std::move(found),
                      std::move(expected), std::move(mend)});
  }

  std::string_view text_;
  const std::string& file_;
  std::size_t at_ = 0;
  std::size_t line_ = 1;
  std::size_t line_start_ = 0;
};

}  // namespace

std::vector<CsvRow> read_csv(std::string_view text, const std::string& file) {
  return CsvScanner(text, file).rows();
}

std::string csv_text_cell(std::string_view text) {
  constexpr std::string_view kRunBySpreadsheets = "=+-@\t\r'";
  std::string guarded;
  if (!text.empty() &&
      kRunBySpreadsheets.find(text.front()) != std::string_view::npos) {
    guarded = "'";
  }
  guarded += text;
  if (guarded.find_first_of(",\"\r\n") == std::string::npos) return guarded;
  std::string cell = "\"";
  for (const char c : guarded) {
    if (c == '"') cell += '"';
    cell += c;
  }
  return cell + '"';
}

void write_csv_row(std::ostream& out, const std::vector<std::string>& cells) {
  for (std::size_t i = 0; i < cells.size(); ++i) {
    if (i > 0) out << ',';
    out << cells[i];
  }
  out << '\n';
}

}  // namespace loqsmith
