#include "loqsmith/ledger/verify.hpp"

#include <gtest/gtest.h>
#include <sys/stat.h>

#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/line.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

// Three runs of two sequences, two of them published.
class Verify : public ::testing::Test {
 protected:
  Verify() : out_(folder_ / "out") {
    const PublicationPlace place = place_at(out_);
    publish_run(place, "a");
    RunAtWork::begin(place, "b", "/in/b", {});
    publish_run(place, "b/c", "2");
  }

  std::string deviations() const { return deviations_of(verify_out(out_)); }
  std::string notes() const { return join(verify_out(out_).notes, "\n"); }

  void overwrite(const fs::path& name, const std::string& bytes) const {
    fs::remove(out_ / name);
    write_new_file(out_ / name, bytes);
  }

  // The whole chain written anew, as somebody with write access could.
  void forge(std::vector<LedgerLine> lines) const {
    std::string text;
    std::string previous(kNoLine);
    std::uint64_t number = 0;
    for (LedgerLine& line : lines) {
      line.number = ++number;
      line.previous = previous;
      const std::string bytes = ledger_line_text(line);
      previous = sha256_hex(bytes);
      text += bytes;
    }
    overwrite("ledger.jsonl", text);
    overwrite("ledger.head", head_text({number, previous}));
  }

  std::vector<LedgerLine> lines() const {
    return read_chain(read_file(out_ / "ledger.jsonl")).lines;
  }

  TempFolder folder_{TempFolder::kept_in_memory()};
  fs::path out_;
};

TEST_F(Verify, FindsNothingWhereNothingIs) {
  const VerifyReport report = verify_out(out_);
  EXPECT_EQ(deviations_of(report), "");
  EXPECT_TRUE(report.notes.empty());
  EXPECT_EQ(report.lines, 6U);
  EXPECT_EQ(report.runs, 2U);
  EXPECT_EQ(report.files, 6U);
  EXPECT_EQ(describe(report.head) + '\n', read_file(out_ / "ledger.head"));
}

TEST_F(Verify, WritesNothing) {
  fs::remove_all(out_ / ".work");
  const auto before = files_below(out_);
  verify_out(out_);
  EXPECT_EQ(files_below(out_), before);
  EXPECT_FALSE(fs::exists(out_ / ".work"));
}

TEST_F(Verify, NamesChangedMissingAndUnknownFiles) {
  overwrite("a/run-0001/results.csv", "injection\n9\n");
  fs::remove(out_ / "b/c/run-0001/inputs/method.xml");
  overwrite("b/c/run-0001/added.csv", "");
  overwrite("stray", "");
  EXPECT_EQ(deviations(),
            "a/run-0001/results.csv: it was changed: its SHA-256 is not the "
            "manifest's\n"
            "b/c/run-0001/inputs/method.xml: it is missing\n"
            "b/c/run-0001/added.csv: no manifest names this file\n"
            "stray: no manifest names this file\n");
}

TEST_F(Verify, NamesFilesOfAnotherSizeAndLinksInTheirPlace) {
  overwrite("a/run-0001/results.csv", "injection\n");
  fs::rename(out_ / "b/c/run-0001/results.csv", folder_ / "moved");
  fs::create_symlink(folder_ / "moved", out_ / "b/c/run-0001/results.csv");
  const std::string found = deviations();
  EXPECT_NE(found.find("a/run-0001/results.csv: it has 10 bytes, the manifest "
                       "says 12"),
            std::string::npos);
  EXPECT_NE(found.find("b/c/run-0001/results.csv: its path leads out"),
            std::string::npos);
}

TEST_F(Verify, BlamesAChangedManifestAlone) {
  const std::string name = "a/run-0001/manifest.json";
  overwrite(name, read_file(out_ / name) + ' ');
  EXPECT_EQ(deviations(),
            name +
                ": it was changed: its SHA-256 is not the ledger's, so the "
                "run's files cannot be held against it\n");
  fs::remove(out_ / name);
  EXPECT_EQ(deviations(), name + ": it is missing\n");
}

TEST_F(Verify, NamesMissingAndSwappedRunFolders) {
  fs::remove_all(out_ / "a/run-0001");
  EXPECT_EQ(deviations(),
            "a/run-0001: the folder of this published run is missing\n");
  fs::rename(out_ / "b/c/run-0001", out_ / "a/run-0001");
  const std::string found = deviations();
  EXPECT_NE(found.find("a/run-0001/manifest.json: it was changed"),
            std::string::npos);
  EXPECT_NE(found.find("b/c/run-0001: the folder"), std::string::npos);
}

TEST_F(Verify, NamesMissingLedgerAndHead) {
  const std::string ledger = read_file(out_ / "ledger.jsonl");
  fs::remove(out_ / "ledger.head");
  EXPECT_EQ(deviations(), "ledger.head: it is missing\n");
  fs::remove(out_ / "ledger.jsonl");
  EXPECT_NE(deviations().find("ledger.jsonl: it is missing"),
            std::string::npos);
}

TEST_F(Verify, SaysTimeThatGoesBack) {
  auto forged = lines();
  forged[3].time = "2020-01-01T00:00:00Z";
  forge(forged);
  EXPECT_EQ(deviations(),
            "ledger.jsonl line 4: its time lies before the line above\n");
}

TEST_F(Verify, SaysRunsInTheWrongOrder) {
  const auto true_lines = lines();
  const auto expect = [&](std::vector<LedgerLine> forged, const char* wanted) {
    forge(std::move(forged));
    EXPECT_NE(deviations().find(wanted), std::string::npos) << deviations();
  };
  auto without_begin = true_lines;
  without_begin.erase(without_begin.begin());
  expect(without_begin, "a/run-0001 ends without having begun");
  auto twice = true_lines;
  twice.push_back(twice[5]);
  expect(twice, "b/c/run-0001 ends a second time");
  auto again = true_lines;
  again.push_back(again[4]);
  expect(again, "has a number that was used before");
  auto outside = true_lines;
  outside[4].object = "../c/run-0001";
  expect(outside, "line 5: its object is no run");
  auto bare = true_lines;
  bare[5].manifest.clear();
  expect(bare, "is published without a manifest");
}

TEST_F(Verify, NotesARunAtWork) {
  const RunAtWork run = RunAtWork::begin(place_at(out_), "w", "/in/w", {});
  write_run(run, "1");
  EXPECT_EQ(deviations(), "");
  EXPECT_NE(notes().find("w/run-0001 began at"), std::string::npos);
}

TEST_F(Verify, NotesLeftoversInWork) {
  fs::create_directory(out_ / ".work/staging-99");
  fs::create_directory(out_ / ".work/staging-3");
  EXPECT_EQ(deviations(), "");
  EXPECT_EQ(notes(),
            "b/run-0001 was abandoned and left OUT/.work/staging-3\n"
            "OUT/.work/staging-99 belongs to no run");
}

TEST_F(Verify, ReportsWhatCannotBeReadAndGoesOn) {
  fs::remove(out_ / "a/run-0001/results.csv");
  ASSERT_EQ(::mkfifo((out_ / "a/run-0001/results.csv").c_str(), 0600), 0);
  overwrite("stray", "");
  const std::string found = deviations();
  EXPECT_NE(found.find("a/run-0001/results.csv: it cannot be read"),
            std::string::npos);
  EXPECT_NE(found.find("stray"), std::string::npos);
}

TEST(VerifyOut, HaltsWhereThereIsNoFolder) {
  const TempFolder folder;
  try {
    verify_out(folder / "nowhere");
    FAIL();
  } catch (const Halt& halt) {
    EXPECT_EQ(halt.status(), ExitStatus::IoFailed);
  }
  EXPECT_EQ(deviations_of(verify_out(folder.path())),
            "ledger.jsonl: it is missing\n");
}

}  // namespace
}  // namespace loqsmith
