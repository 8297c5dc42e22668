#include "loqsmith/base/csv.hpp"

#include <random>
#include <sstream>

#include "loqsmith/base/input_error.hpp"

namespace loqsmith {
namespace {

std::vector<std::vector<std::string>> texts(const std::vector<CsvRow>& rows) {
  std::vector<std::vector<std::string>> all;
  for (const CsvRow& row : rows) {
    all.emplace_back();
    for (const CsvCell& cell : row.cells) all.back().push_back(cell.text);
  }
  return all;
}

using Table = std::vector<std::vector<std::string>>;

TEST(ReadCsv, TakesLineFeedsAndCarriageReturns) {
  const Table wanted{{"a", "b"}, {"1", ""}, {"", "2"}};
  EXPECT_EQ(texts(read_csv("a,b\n1,\n,2\n", "t.csv")), wanted);
  EXPECT_EQ(texts(read_csv("a,b\r\n1,\r\n,2\r\n", "t.csv")), wanted);
  EXPECT_EQ(texts(read_csv("a,b\n1,\n,2", "t.csv")), wanted);
}

TEST(ReadCsv, ToleratesByteOrderMarkAndBlankLinesAtTheEnd) {
  const Table wanted{{"a"}, {""}, {"1"}};
  const auto rows = read_csv(
      "\xEF\xBB\xBF"
      "a\n\n1\n\r\n\n",
      "t.csv");
  EXPECT_EQ(texts(rows), wanted);
  EXPECT_EQ(rows.front().cells.front().column, 1U);
}

TEST(ReadCsv, EmptyTextHasNoRows) {
  EXPECT_TRUE(read_csv("", "t.csv").empty());
  EXPECT_TRUE(read_csv("\n\n", "t.csv").empty());
}

TEST(ReadCsv, QuotedCellsKeepCommasQuotesAndLineEnds) {
  const auto rows =
      read_csv("\"x,y\",\"he \"\"is\"\"\"\n\"a\r\nb\",c\nd,e\n", "t.csv");
  EXPECT_EQ(texts(rows),
            (Table{{"x,y", "he \"is\""}, {"a\r\nb", "c"}, {"d", "e"}}));
  EXPECT_EQ(rows[0].cells[1].column, 7U);
  EXPECT_EQ(rows[1].line, 2U);
  EXPECT_EQ(rows[2].line, 4U);  // the quoted cell before it took two lines
}

struct BadCsv {
  std::string text;
  std::size_t line;
  std::size_t column;
  std::string words;
};

TEST(ReadCsv, SaysWhereAndWhatIsWrong) {
  const std::vector<BadCsv> table{
      {"a,b\n1,x\"y\n", 2, 4, "quote inside a cell"},
      {"a\n\"x\"y\n", 2, 4, "text after a closing quote"},
      {"a\n1,\"xy\n3\n", 2, 3, "never closed"},
      {"a\n1,\"", 2, 3, "never closed"},
      {std::string("a\nb\0c\n", 6), 2, 2, "\\x00"},
      {"a\nb\x1B\n", 2, 2, "\\x1B"},
      {"a\rb\n", 1, 2, "\\x0D"},
      {"a\n\xFF\n", 2, 1, "no UTF-8"},
      {"a\n\"\x7F\"\n", 2, 2, "\\x7F"},
  };
  for (const BadCsv& bad : table) {
    try {
      read_csv(bad.text, "t.csv");
      ADD_FAILURE() << "accepted: " << bad.text;
    } catch (const InputError& error) {
      ASSERT_EQ(error.problems().size(), 1U);
      const InputProblem& problem = error.problems().front();
      EXPECT_EQ(problem.file, "t.csv");
      EXPECT_EQ(problem.line, bad.line) << bad.text;
      EXPECT_NE(std::string(error.what()).find(bad.words), std::string::npos)
          << error.what();
      if (bad.words != "no UTF-8") {
        EXPECT_EQ(problem.column, bad.column) << bad.text;
      }
    }
  }
}

TEST(ReadCsv, RefusesAnEndlessCell) {
  const std::string most(std::size_t{1} << 20U, 'x');
  EXPECT_EQ(read_csv(most, "t.csv").front().cells.front().text.size(),
            most.size());
  EXPECT_THROW(read_csv(most + 'x', "t.csv"), InputError);
}

TEST(ReadCsv, RefusesEndlessRows) {
  std::string text;
  for (int i = 0; i < 1'000'000; ++i) text += "a\n";
  EXPECT_EQ(read_csv(text, "t.csv").size(), 1'000'000U);
  EXPECT_THROW(read_csv(text + "a\n", "t.csv"), InputError);
}

TEST(CsvTextCell, GuardsWhatASpreadsheetWouldRun) {
  EXPECT_EQ(csv_text_cell("plain"), "plain");
  EXPECT_EQ(csv_text_cell(""), "");
  EXPECT_EQ(csv_text_cell("=1+1"), "'=1+1");
  EXPECT_EQ(csv_text_cell("+x"), "'+x");
  EXPECT_EQ(csv_text_cell("-x"), "'-x");
  EXPECT_EQ(csv_text_cell("@x"), "'@x");
  EXPECT_EQ(csv_text_cell("\tx"), "'\tx");
  EXPECT_EQ(csv_text_cell("\rx"), "\"'\rx\"");
  EXPECT_EQ(csv_text_cell("'x"), "''x");
  EXPECT_EQ(csv_text_cell("a,b"), "\"a,b\"");
  EXPECT_EQ(csv_text_cell("=a,\"b\""), "\"'=a,\"\"b\"\"\"");
  EXPECT_EQ(csv_text_cell("a=b"), "a=b");
}

TEST(WriteCsvRow, JoinsAndEnds) {
  std::ostringstream out;
  write_csv_row(out, {"a", "", "c"});
  write_csv_row(out, {"1"});
  EXPECT_EQ(out.str(), "a,,c\n1\n");
}

// What is written is read back, but for the apostrophe in front of texts that
// a spreadsheet would run.
TEST(Csv, WrittenCellsReadBack) {
  const std::string letters = "a,\"\n\r=' -\t\xC3\xA9";
  std::mt19937_64 random(20260301);
  for (int round = 0; round < 2000; ++round) {
    std::string text = "x";
    for (std::size_t i = random() % 8; i > 0; --i) {
      const std::size_t letter = random() % (letters.size() - 1);
      const bool two_bytes = letter + 2 == letters.size();
      // A lone carriage return inside quotes is refused: leave it out.
      if (letters[letter] == '\r') {
        text += "\r\n";
      } else {
        text += letters.substr(letter, two_bytes ? 2 : 1);
      }
    }
    std::ostringstream out;
    write_csv_row(out, {csv_text_cell(text), csv_text_cell("end")});
    const auto rows = read_csv(out.str(), "t.csv");
    ASSERT_EQ(rows.size(), 1U) << text;
    ASSERT_EQ(rows.front().cells.size(), 2U) << text;
    EXPECT_EQ(rows.front().cells.front().text, text);
  }
}

}  // namespace
}  // namespace loqsmith
