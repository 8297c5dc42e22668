#include "loqsmith/ledger/recovery.hpp"

#include <gtest/gtest.h>

#include "child_process.hpp"
#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/chain.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

class Recovery : public ::testing::Test {
 protected:
  Recovery() : out_(folder_ / "out") { publish_run(place_at(out_), "a"); }

  std::string ledger() const { return read_file(out_ / "ledger.jsonl"); }
  LedgerLine last_line() const { return read_chain(ledger()).lines.back(); }

  std::string found() const { return join(recover(place_at(out_)), "\n"); }

  void overwrite(const fs::path& name, const std::string& bytes) const {
    fs::remove(out_ / name);
    write_new_file(out_ / name, bytes);
  }

  // As it stands when the line is written and the rename is not done.
  void take_out_of_place() const {
    fs::rename(out_ / "a/run-0001", out_ / ".work/staging-1");
  }

  // Damage is said, with status 74, and neither mended nor written to; nor does
  // a run begin.
  void expect_damage(const std::string& word) const {
    const std::string before = ledger();
    const auto files = files_below(out_);
    for (const bool begin : {false, true}) {
      try {
        if (begin) {
          publish_run(place_at(out_), "new");
        } else {
          recover(place_at(out_));
        }
        ADD_FAILURE() << "not seen: " << word;
      } catch (const Halt& halt) {
        EXPECT_EQ(halt.status(), ExitStatus::IoFailed);
        EXPECT_NE(std::string(halt.what()).find(word), std::string::npos)
            << halt.what();
      }
    }
    EXPECT_EQ(ledger(), before);
    EXPECT_EQ(files_below(out_), files);
  }

  TempFolder folder_{TempFolder::kept_in_memory()};
  fs::path out_;
};

TEST_F(Recovery, HasNothingToSayWhereNothingHappened) {
  const std::string before = ledger();
  EXPECT_EQ(found(), "");
  EXPECT_EQ(ledger(), before);
}

TEST_F(Recovery, CutsOffATornLineAndGivesItsHash) {
  const std::string before = ledger();
  const std::string torn = "{\"number\":3,\"ti";
  append_to_file(out_ / "ledger.jsonl", torn);
  EXPECT_NE(found().find(sha256_hex(torn)), std::string::npos);
  EXPECT_EQ(ledger().substr(0, before.size()), before);
  EXPECT_EQ(last_line().action, "recovery");
  EXPECT_EQ(last_line().number, 3U);
  EXPECT_EQ(detail_of(last_line(), "torn"), sha256_hex(torn));
  EXPECT_EQ(deviations_of(verify_out(out_)), "");
}

TEST_F(Recovery, RenewsAHeadThatIsOneLineBehind) {
  const std::string before = read_file(out_ / "ledger.head");
  overwrite("ledger.head", "1:" + read_chain(ledger()).hashes[0] + "\n");
  EXPECT_EQ(found(), "ledger.head was one line behind: renewed");
  EXPECT_EQ(read_file(out_ / "ledger.head"), before);
}

TEST_F(Recovery, MovesAPublishedRunIntoPlace) {
  take_out_of_place();
  EXPECT_EQ(found(),
            "a/run-0001 was published but not in place yet: moved there");
  EXPECT_EQ(last_line().action, "recovery");
  EXPECT_EQ(last_line().object, "a/run-0001");
  EXPECT_EQ(deviations_of(verify_out(out_)), "");
}

TEST_F(Recovery, RecordsARunThatNobodyHoldsAsAbandoned) {
  const auto end = run_and_kill({1 << 20, false}, [&] {
    const RunAtWork run = RunAtWork::begin(place_at(out_), "a", "/in/a", {});
    write_run(run, "half");
    ::raise(SIGKILL);
  });
  ASSERT_TRUE(end.killed);
  EXPECT_TRUE(fs::exists(out_ / ".work/staging-3/results.csv"));
  EXPECT_NE(found().find("a/run-0002 was begun and not finished"),
            std::string::npos);
  EXPECT_EQ(last_line().action, "run-abandoned");
  EXPECT_FALSE(fs::exists(out_ / ".work/staging-3"));
  EXPECT_EQ(publish_run(place_at(out_), "a").filename(), "run-0003");
}

TEST_F(Recovery, LeavesARunAtWorkAlone) {
  const RunAtWork run = RunAtWork::begin(place_at(out_), "a", "/in/a", {});
  const std::string before = ledger();
  EXPECT_EQ(found(), "");
  EXPECT_EQ(ledger(), before);
  EXPECT_TRUE(fs::exists(run.staging() / "owner"));
}

TEST_F(Recovery, RemovesStagingThatBelongsToNoRunAtWork) {
  make_folders(out_ / ".work/staging-77/inputs");
  write_new_file(out_ / ".work/staging-77/inputs/a", "");
  EXPECT_EQ(found(), "what was left of staging-77 in OUT/.work was removed");
  EXPECT_EQ(files_below(out_ / ".work"), std::vector<std::string>{"lock"});
}

TEST_F(Recovery, DoesWithoutAWorkFolderThatWasDeleted) {
  fs::remove_all(out_ / ".work");
  EXPECT_EQ(found(), "");
  EXPECT_EQ(publish_run(place_at(out_), "a").filename(), "run-0002");
}

TEST_F(Recovery, HaltsWhereTheHeadNamesALineThatIsNotThere) {
  const auto chain = read_chain(ledger());
  cut_file(out_ / "ledger.jsonl", ledger_line_text(chain.lines[0]).size());
  expect_damage("its head names line 2");
}

TEST_F(Recovery, HaltsWhereOnlyTheLastLineFeedWasCutOff) {
  cut_file(out_ / "ledger.jsonl", ledger().size() - 1);
  expect_damage("its head names line 2");
}

TEST_F(Recovery, HaltsWhereALineWasChanged) {
  std::string changed = ledger();
  changed.replace(changed.find("Ada"), 3, "Ida");
  overwrite("ledger.jsonl", changed);
  expect_damage("ledger.jsonl line 2");
}

TEST_F(Recovery, HaltsWhereTheHeadIsMissingOrOld) {
  fs::remove(out_ / "ledger.head");
  expect_damage("ledger.head");
  publish_run(place_at(folder_ / "other"), "a");
  overwrite("ledger.head", "not a head");
  expect_damage("ledger.head");
}

TEST_F(Recovery, HaltsWhereTheLedgerIsMissing) {
  fs::rename(out_ / "ledger.jsonl", folder_ / "kept");
  EXPECT_THROW(recover(place_at(out_)), Halt);
  EXPECT_FALSE(fs::exists(out_ / "ledger.jsonl"));
}

TEST_F(Recovery, HaltsWhereAPublishedRunIsGone) {
  fs::remove_all(out_ / "a");
  expect_damage("neither its folder nor its staging");
  append_to_file(out_ / "ledger.jsonl", "{");
  expect_damage("neither its folder nor its staging");
}

TEST_F(Recovery, HaltsWhereStagingIsNotWhatWasPublished) {
  take_out_of_place();
  overwrite(".work/staging-1/results.csv", "injection\n9\n");
  expect_damage("a/run-0001/results.csv: in OUT/.work");
  overwrite(".work/staging-1/results.csv", "injection\n1\n");
  overwrite(".work/staging-1/added.csv", "");
  expect_damage("its manifest does not name");
  fs::remove(out_ / ".work/staging-1/added.csv");
  EXPECT_NE(found(), "");
}

}  // namespace
}  // namespace loqsmith
