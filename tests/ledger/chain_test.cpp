#include "loqsmith/ledger/chain.hpp"

#include <gtest/gtest.h>

#include <cstdlib>

#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"

namespace loqsmith {
namespace {

using namespace test;

LedgerLine example_line() {
  LedgerLine line;
  line.number = 1;
  line.time = "2026-03-01T08:15:00.000Z";
  line.action = "run-begun";
  line.object = "a/run-0001";
  line.detail = {{"folder", "/in/a"}, {"note", "\"\\\n\xC3\xA4"}};
  line.previous = std::string(kNoLine);
  return line;
}

// The example's text without its line feed, with one part replaced.
std::string example_text(const std::string& part = {},
                         const std::string& by = {}) {
  std::string text = ledger_line_text(example_line());
  text.pop_back();
  if (part.empty()) return text;
  const std::size_t at = text.find(part);
  EXPECT_NE(at, std::string::npos) << part;
  return text.replace(at, part.size(), by);
}

TEST(LedgerLine, ReadsBackWhatWasWritten) {
  const auto read = read_ledger_line(example_text());
  ASSERT_TRUE(read);
  EXPECT_EQ(ledger_line_text(*read), example_text() + '\n');
  EXPECT_EQ(read->detail, example_line().detail);
}

TEST(LedgerLine, KeepsMembersOfDetailThatAreNoText) {
  const auto read = read_ledger_line(
      example_text("\"/in/a\"", "{\"n\":[1,true,null],\"m\":{}}"));
  ASSERT_TRUE(read);
  EXPECT_EQ(detail_of(*read, "folder"), "{\"n\":[1,true,null],\"m\":{}}");
}

TEST(LedgerLine, RefusesWhatIsNoLine) {
  const std::string deep(1000, '[');
  const std::vector<std::pair<std::string, std::string>> changes = {
      {"\"number\":1,", ""},
      {"\"number\":1,", "\"number\":1,\"number\":1,"},
      {"\"number\":1,", "\"number\":-1,"},
      {"\"number\":1,", "\"number\":1.0,"},
      {"\"number\":1,", "\"number\":\"1\","},
      {"\"number\":1,", "\"more\":1,\"number\":1,"},
      {"\"host\":\"\",\"program\":\"\"", "\"program\":\"\",\"host\":\"\""},
      {"\"operator\":\"\"", "\"operator\":null"},
      {"\"operator\":", "\"Operator\":"},
      {"\"folder\":", "\"note\":1,\"folder\":"},
      {"\"/in/a\"", "{\"x\":1,\"x\":2}"},
      {"\"/in/a\"", deep},
      {"\"/in/a\"", deep + std::string(1000, ']')},
      {"{\"folder\":", "[{\"folder\":"},
      {"08:15", "25:15"},
      {"000Z", "000"},
      {"\"manifest\":\"\"", "\"manifest\":\"abc\""},
      {"0000\"}", "000\"}"},
      {"0000\"}", "000A\"}"},
      {"0000\"}", "0000\"}}"},
      {"0000\"}", "0000\"} x"},
      {"/in/a", "/in/\xFF"},
      {"/in/a", "/in/\t"},
      {"/in/a", "/in/\\q"}};
  for (const auto& [part, by] : changes) {
    EXPECT_FALSE(read_ledger_line(example_text(part, by))) << part << by;
  }
  for (const char* text : {"", "[]", "1", "null", "{}", "{", "\"x\""}) {
    EXPECT_FALSE(read_ledger_line(text)) << text;
  }
}

TEST(LedgerLine, RefusesATextCutAnywhere) {
  const std::string text = example_text();
  for (std::size_t length = 0; length < text.size(); ++length) {
    EXPECT_FALSE(read_ledger_line(text.substr(0, length))) << length;
  }
}

TEST(Chain, LinksEachLineToTheBytesAbove) {
  LedgerLine second = example_line();
  const std::string first_text = ledger_line_text(example_line());
  second.number = 2;
  second.previous = sha256_hex(first_text);
  const Chain chain = read_chain(first_text + ledger_line_text(second) + "{\"");
  EXPECT_TRUE(chain.deviations.empty());
  EXPECT_EQ(chain.lines.size(), 2U);
  EXPECT_EQ(chain.torn, "{\"");
  EXPECT_EQ(chain.last().sha256, sha256_hex(ledger_line_text(second)));
  EXPECT_EQ(read_chain("").last().sha256, kNoLine);
}

TEST(Chain, RefusesALineThatIsTooLong) {
  LedgerLine line = example_line();
  line.reason = std::string(2U << 20U, 'x');
  const Chain chain = read_chain(ledger_line_text(line));
  ASSERT_EQ(chain.deviations.size(), 1U);
  EXPECT_EQ(chain.deviations[0].what, "it is too long");
}

TEST(Head, NamesTheLastLine) {
  const std::string text = ledger_line_text(example_line());
  const Chain one = read_chain(text);
  const std::string right = "1:" + sha256_hex(text) + "\n";
  EXPECT_EQ(head_text(one.last()), right);
  EXPECT_FALSE(check_head(one, right).damage);
  EXPECT_FALSE(check_head(one, right).behind);
  EXPECT_TRUE(check_head(one, std::nullopt).one_behind);
  EXPECT_FALSE(check_head(read_chain(""), std::nullopt).behind);
  EXPECT_TRUE(check_head(read_chain(""), right).damage);
  for (const std::string& wrong :
       {std::string(), std::string("\n"), '0' + right, ' ' + right,
        right + '\n', right.substr(0, 66), "-" + right,
        "0:" + std::string(kNoLine) + "\n", "1:" + std::string(64, 'G') + "\n",
        "99999999999999999999" + right}) {
    EXPECT_TRUE(check_head(one, wrong).damage) << wrong;
  }
}

// What anybody can do with nothing but a shell: line n's hash stands in line
// n + 1, and the last one's in the head.
TEST(Chain, IsCheckedWithSedAndSha256sumAlone) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  publish_run(place, "a");
  publish_run(place, "b\xC3\xA4 'c'");
  const std::string script =
      "cd '" + (folder / "out").string() +
      "' || exit 9; n=1; previous=" + std::string(64, '0') +
      "; while line=$(sed -n ${n}p ledger.jsonl); [ -n \"$line\" ]; do "
      "stated=$(sed -n \"${n}s/.*\\\"previous\\\":\\\"\\([0-9a-f]*\\)\\\"}\\$/"
      "\\1/p\" ledger.jsonl); "
      "[ \"$stated\" = \"$previous\" ] || exit 1; "
      "previous=$(sed -n ${n}p ledger.jsonl | sha256sum | sed 's/ .*//'); "
      "n=$((n+1)); done; "
      "[ $n -eq 5 ] || exit 2; "
      "[ \"$((n-1)):$previous\" = \"$(sed -n 1p ledger.head)\" ] || exit 3";
  EXPECT_EQ(std::system(script.c_str()), 0);
  ASSERT_EQ(std::system(("sed -i '2s/Ada/Ida/' '" +
                         (folder / "out/ledger.jsonl").string() + "'")
                            .c_str()),
            0);
  EXPECT_EQ(WEXITSTATUS(std::system(script.c_str())), 1);
}

}  // namespace
}  // namespace loqsmith
