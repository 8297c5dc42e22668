// What `verify` proves beside the promise itself: that the ledger extends a
// place written down elsewhere, that inputs are what they were, and its note.

#include <gtest/gtest.h>

#include <fstream>

#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/verification_note.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

class VerifyRequested : public ::testing::Test {
 protected:
  void SetUp() override {
    make_folders(in_ / "data");
    write(in_ / "method.xml", "<method/>");
    write(in_ / "data/inj01.mzML", "<mzML/>");
    run_ = RunAtWork::begin(place_, "a", in_.string(), {});
    begun_ = run_->begun();
    write_run(*run_, "1");
    write_new_file(run_->staging() / "record.json", record());
    run_->publish({});
  }

  static void write(const fs::path& path, const std::string& bytes) {
    std::ofstream(path, std::ios::binary | std::ios::trunc) << bytes;
  }

  static std::string input(const std::string& path, const std::string& hash) {
    return "{\"path\":\"" + path + "\",\"sha256\":" + hash + "}";
  }

  static std::string record() {
    return "{\"inputs\":[" +
           input("method.xml", '"' + sha256_hex("<method/>") + '"') + "," +
           input("data/inj01.mzML", '"' + sha256_hex("<mzML/>") + '"') + "," +
           input("data/inj02.mzML", "null") + "]}\n";
  }

  VerifyReport with_inputs() const {
    VerifyRequest request;
    request.inputs = true;
    return verify_out(out_, request);
  }

  std::string since(const LedgerPlace& place) const {
    VerifyRequest request;
    request.since = place;
    return deviations_of(verify_out(out_, request));
  }

  TempFolder folder_{TempFolder::kept_in_memory()};
  fs::path out_ = folder_ / "out";
  fs::path in_ = folder_ / "in";
  PublicationPlace place_ = place_at(out_);
  std::optional<RunAtWork> run_;
  LedgerPlace begun_;
};

TEST_F(VerifyRequested, TheLedgerExtendsWhatItHeldBefore) {
  EXPECT_EQ(since(begun_), "");
  publish_run(place_, "b");
  EXPECT_EQ(since(begun_), "");
  EXPECT_EQ(since(verify_out(out_).head), "");
}

// Chain and head written anew, a later operator in every line: right in
// itself, and found by nothing but the place kept elsewhere.
TEST_F(VerifyRequested, ALedgerWrittenAnewShowsAgainstAPlaceKeptElsewhere) {
  std::string text;
  LedgerPlace last{0, std::string(kNoLine)};
  for (LedgerLine line : read_chain(read_file(out_ / "ledger.jsonl")).lines) {
    line.operator_ = "Somebody Else";
    line.previous = last.sha256;
    const std::string bytes = ledger_line_text(line);
    last = {line.number, sha256_hex(bytes)};
    text += bytes;
  }
  write(out_ / "ledger.jsonl", text);
  write(out_ / "ledger.head", head_text(last));
  EXPECT_EQ(deviations_of(verify_out(out_)), "");
  EXPECT_EQ(since(begun_),
            "ledger.jsonl line 1: its SHA-256 is not the one written down "
            "elsewhere: the ledger was written anew up to here, or it is "
            "another one\n");
}

TEST_F(VerifyRequested, ALedgerCutWithItsHeadShowsToo) {
  const LedgerPlace last = verify_out(out_).head;
  EXPECT_EQ(since({last.number + 1, last.sha256}),
            "ledger.jsonl: it ends with line 2, but line 3 was written down "
            "elsewhere: lines were cut off\n");
}

TEST_F(VerifyRequested, PlacesAreReadStrictly) {
  const std::string hash(64, 'a');
  ASSERT_TRUE(read_ledger_place("12:" + hash));
  EXPECT_EQ(read_ledger_place("12:" + hash)->number, 12U);
  for (const std::string& wrong :
       {std::string(), hash, "0:" + hash, "-1:" + hash, "012:" + hash,
        "12:" + std::string(64, 'A'), "12:" + hash + "\n", "12: " + hash,
        "12:" + hash.substr(1), "x:" + hash}) {
    EXPECT_FALSE(read_ledger_place(wrong)) << wrong;
  }
}

TEST_F(VerifyRequested, InputsAreHashedAgain) {
  const VerifyReport report = with_inputs();
  EXPECT_EQ(deviations_of(report), "");
  EXPECT_EQ(report.inputs, 2U);
  EXPECT_EQ(join(report.notes, "\n"),
            (in_ / "data/inj02.mzML").string() +
                ", an input of a/run-0001, could not be read when the run "
                "was made");
  EXPECT_EQ(verify_out(out_).inputs, 0U);
}

TEST_F(VerifyRequested, AChangedInputIsADeviation) {
  write(in_ / "data/inj01.mzML", "<mzML />");
  EXPECT_EQ(deviations_of(verify_out(out_)), "");
  EXPECT_EQ(deviations_of(with_inputs()),
            (in_ / "data/inj01.mzML").string() +
                ": it was changed: a/run-0001 was computed from other bytes, "
                "of SHA-256 " +
                sha256_hex("<mzML/>") + '\n');
}

TEST_F(VerifyRequested, AnInputThatIsGoneOrLeadsElsewhereIsSaid) {
  fs::remove(in_ / "data/inj01.mzML");
  fs::rename(in_ / "method.xml", folder_ / "elsewhere.xml");
  fs::create_symlink(folder_ / "elsewhere.xml", in_ / "method.xml");
  const VerifyReport report = with_inputs();
  EXPECT_EQ(deviations_of(report), "");
  EXPECT_EQ(report.inputs, 0U);
  const std::string notes = join(report.notes, "\n");
  EXPECT_NE(notes.find("inj01.mzML, an input of a/run-0001: it is not there"),
            std::string::npos)
      << notes;
  EXPECT_NE(notes.find("method.xml, an input of a/run-0001: its path leads "
                       "out of the folder"),
            std::string::npos)
      << notes;
}

TEST_F(VerifyRequested, AChangedRecordIsNotAskedForInputs) {
  write(out_ / "a/run-0001/record.json", "{\"inputs\":[]}");
  const VerifyReport report = with_inputs();
  ASSERT_EQ(report.deviations.size(), 1U);
  EXPECT_EQ(report.deviations.front().place, "a/run-0001/record.json");
  EXPECT_TRUE(report.notes.empty());
}

TEST_F(VerifyRequested, ARunWithoutARecordSaysSo) {
  publish_run(place_, "b");
  EXPECT_EQ(with_inputs().notes.back(),
            "b/run-0001 has no record.json that names its inputs");
}

TEST_F(VerifyRequested, TheOutcomeIsNoted) {
  VerifyRequest request;
  request.since = begun_;
  write(out_ / "stray", "");
  const VerifyReport report = verify_out(out_, request);
  note_verification(place_, request, report);
  const LedgerLine line =
      read_chain(read_file(out_ / "ledger.jsonl")).lines.back();
  EXPECT_EQ(line.action, "verification");
  EXPECT_EQ(line.reason, "something is not as the ledger says");
  EXPECT_EQ(detail_of(line, "head"), describe(report.head));
  EXPECT_EQ(detail_of(line, "since"), describe(begun_));
  EXPECT_EQ(detail_of(line, "inputs"), "not asked for");
  EXPECT_EQ(detail_of(line, "deviations"), "1");
  EXPECT_EQ(detail_of(line, "first"), "stray: no manifest names this file");
  fs::remove(out_ / "stray");
  EXPECT_EQ(since(begun_), "");
}

TEST_F(VerifyRequested, NothingIsNotedInADamagedLedgerOrWhereThereIsNone) {
  write(out_ / "ledger.head", "1:" + std::string(64, '0') + "\n");
  const std::string before = read_file(out_ / "ledger.jsonl");
  const VerifyReport report = verify_out(out_);
  EXPECT_THROW(note_verification(place_, {}, report), Halt);
  EXPECT_EQ(read_file(out_ / "ledger.jsonl"), before);
  PublicationPlace nowhere = place_at(folder_ / "empty");
  EXPECT_THROW(note_verification(nowhere, {}, report), Halt);
  EXPECT_FALSE(fs::exists(folder_ / "empty"));
}

}  // namespace
}  // namespace loqsmith
