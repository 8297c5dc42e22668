// The ledger says when a method is new to OUT or has changed, and how.

#include "loqsmith/ledger/method_seen.hpp"

#include <gtest/gtest.h>

#include <fstream>

#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/ledger/chain.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

TEST(LineDifference, NamesTheLinesThatDifferWithTheirNumbers) {
  EXPECT_EQ(line_difference("a\nb\nc\n", "a\nb\nc\n"), "");
  EXPECT_EQ(line_difference("a\n  b\nc\n", "a\n  B\nc\n"), "-2 b\n+2 B");
  EXPECT_EQ(line_difference("a\nc\n", "a\nb\nc\n"), "+2 b");
  EXPECT_EQ(line_difference("a\nb\nc\n", "c\n"), "-1 a\n-2 b");
  EXPECT_EQ(line_difference("a\nb\n", "b\na\n"), "-1 a\n+2 a");
  EXPECT_EQ(line_difference("", "a"), "-1 \n+1 a");
}

TEST(LineDifference, IsShortenedWhereItIsLong) {
  std::string before;
  std::string after;
  for (int i = 0; i < 50; ++i) {
    before += "x" + std::to_string(i) + "\n";
    after += "y" + std::to_string(i) + "\n";
  }
  const std::string found = line_difference(before, after);
  EXPECT_TRUE(found.ends_with("\nand 60 lines more")) << found;
  const std::string many(5000, '\n');
  EXPECT_EQ(line_difference(many, many + "\n"),
            "too long to be compared: 5001 lines before, 5002 now");
  const std::string wide(300, 'w');
  EXPECT_EQ(line_difference("", wide).size(), 4 + 3 + std::size_t{200});
}

class MethodLines : public ::testing::Test {
 protected:
  // One run that keeps its method as a run of a night does.
  void run_with(const std::string& text, const std::string& revision,
                bool published = true) {
    const MethodSeen method{"zinol", revision, text};
    RunAtWork run = RunAtWork::begin(place_, "a", "/in/a", {}, &method);
    if (!published) return;
    make_folders(run.staging() / "inputs");
    write_new_file(run.staging() / "inputs/method.xml", text);
    run.publish({});
  }

  std::vector<LedgerLine> method_lines() const {
    std::vector<LedgerLine> found;
    for (const LedgerLine& line :
         read_chain(read_file(out_ / "ledger.jsonl")).lines) {
      if (line.action.starts_with("method-")) found.push_back(line);
    }
    return found;
  }

  TempFolder folder_{TempFolder::kept_in_memory()};
  fs::path out_ = folder_ / "out";
  PublicationPlace place_ = place_at(out_);
};

TEST_F(MethodLines, SayFirstSightAndEveryChange) {
  run_with("<method>\n<k>3</k>\n</method>\n", "1");
  run_with("<method>\n<k>3</k>\n</method>\n", "1");
  run_with("<method>\n<k>3.3</k>\n</method>\n", "2");
  const auto lines = method_lines();
  ASSERT_EQ(lines.size(), 2U);
  EXPECT_EQ(lines[0].action, "method-first-seen");
  EXPECT_EQ(lines[0].object, "zinol");
  EXPECT_EQ(detail_of(lines[0], "run"), "a/run-0001");
  EXPECT_EQ(detail_of(lines[0], "method_sha256"),
            sha256_hex("<method>\n<k>3</k>\n</method>\n"));
  EXPECT_EQ(lines[1].action, "method-changed");
  EXPECT_EQ(detail_of(lines[1], "run"), "a/run-0003");
  EXPECT_EQ(detail_of(lines[1], "revision_before"), "1");
  EXPECT_EQ(detail_of(lines[1], "revision"), "2");
  EXPECT_EQ(detail_of(lines[1], "kept_in"), "a/run-0002");
  EXPECT_EQ(detail_of(lines[1], "difference"), "-2 <k>3</k>\n+2 <k>3.3</k>");
  EXPECT_EQ(deviations_of(verify_out(out_)), "");
}

// A changed copy is no witness: its hash is not the one in the ledger.
TEST_F(MethodLines, TakeTheDifferenceFromAnUnchangedCopyOnly) {
  run_with("<a/>\n", "1", /*published=*/false);
  run_with("<b/>\n", "1");
  EXPECT_EQ(detail_of(method_lines().back(), "difference"),
            "no published run keeps the text before");
  std::ofstream(out_ / "a/run-0002/inputs/method.xml") << "<forged/>\n";
  run_with("<c/>\n", "1");
  EXPECT_EQ(detail_of(method_lines().back(), "kept_in"), "");
}

}  // namespace
}  // namespace loqsmith
