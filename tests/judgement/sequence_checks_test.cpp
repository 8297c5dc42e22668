#include "loqsmith/judgement/sequence_checks.hpp"

#include "judgement/night_builder.hpp"

namespace loqsmith {
namespace {

using test::rows_of;

/// Three injections that contradict nothing.
struct SequenceChecks : testing::Test {
  SequenceChecks() {
    for (int i = 1; i <= 3; ++i) {
      Injection injection;
      injection.number = i;
      injection.sample = "S" + std::to_string(i);
      const std::string start = "2026-03-01T0" + std::to_string(i) + ":00:00Z";
      injection.acquired = start;
      sequence.injections.push_back(injection);
      facts.files.push_back(
          {i, "", "hash" + std::to_string(i), start, injection.sample, {}});
    }
  }

  std::vector<CheckRow> failed(const std::string& check) {
    std::vector<CheckRow> found;
    for (const CheckRow& row : rows_of(always_checked(sequence, facts), check))
      if (row.passed == false) found.push_back(row);
    return found;
  }

  std::vector<CheckRow> unchecked(const std::string& check) {
    std::vector<CheckRow> found;
    for (const CheckRow& row : rows_of(always_checked(sequence, facts), check))
      if (!row.passed) found.push_back(row);
    return found;
  }

  Sequence sequence;
  SequenceFacts facts;
};

TEST_F(SequenceChecks, OnePassingRowEachWhereNothingIsFound) {
  const std::vector<CheckRow> rows = always_checked(sequence, facts);
  EXPECT_EQ(rows.size(), 8U);
  for (const CheckRow& row : rows) {
    EXPECT_EQ(row.passed, true) << row.check;
    EXPECT_FALSE(row.injection.has_value());
    EXPECT_EQ(row.analyte, "");
  }
  for (const char* check :
       {"unlisted-file", "same-data-twice", "order-differs", "name-differs",
        "time-differs", "expired-lot", "file-refused", "file-warning"}) {
    EXPECT_EQ(rows_of(rows, check).size(), 1U) << check;
  }
}

TEST_F(SequenceChecks, UnlistedFilesAreNamed) {
  facts.unlisted_files = {"data/a.mzML", "data/b.mzML"};
  const auto rows = failed("unlisted-file");
  ASSERT_EQ(rows.size(), 2U);
  EXPECT_EQ(rows[1].note, "data/b.mzML: no row of the sequence names it");
}

TEST_F(SequenceChecks, SameDataNamesTheLaterInjection) {
  facts.files[2].data_hash = "hash1";
  const auto rows = failed("same-data-twice");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].injection, 3);
  EXPECT_EQ(rows[0].affects, "injections 1 and 3");
  // Without data there is nothing that is the same.
  facts.files[0].data_hash.clear();
  facts.files[2].data_hash.clear();
  EXPECT_TRUE(failed("same-data-twice").empty());
}

TEST_F(SequenceChecks, OrderIsThatOfTheLatestStartBefore) {
  facts.files[1].start_time = "2026-03-01T00:30:00Z";
  auto rows = failed("order-differs");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].injection, 2);
  EXPECT_EQ(rows[0].note, "started 2026-03-01T00:30:00Z, before injection 1");
  facts.files[1].start_time = facts.files[0].start_time;  // equal is no order
  EXPECT_TRUE(failed("order-differs").empty());
  facts.files[1].start_time = "2026-03-01T03:30:00+02:00";  // 01:30 UTC
  EXPECT_TRUE(failed("order-differs").empty());
}

TEST_F(SequenceChecks, TimesWithAndWithoutZoneAreNotCompared) {
  facts.files[1].start_time = "2026-02-01T00:00:00";
  EXPECT_TRUE(failed("order-differs").empty());
  EXPECT_EQ(unchecked("order-differs").size(), 1U);
  EXPECT_TRUE(failed("time-differs").empty());
  EXPECT_EQ(unchecked("time-differs").size(), 1U);
}

TEST_F(SequenceChecks, NoStartTimesAtAllIsSaid) {
  for (auto& file : facts.files) file.start_time.clear();
  EXPECT_EQ(unchecked("order-differs").size(), 1U);
  EXPECT_TRUE(unchecked("time-differs").empty());
}

TEST_F(SequenceChecks, NamesAreComparedWithoutBlanksAtTheEnds) {
  facts.files[0].sample_name = " S1 ";
  EXPECT_TRUE(failed("name-differs").empty());
  facts.files[1].sample_name = "s2";
  const auto rows = failed("name-differs");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].note, "the file says \"s2\", the sheet \"S2\"");
}

TEST_F(SequenceChecks, TimesMayDifferByASecond) {
  facts.files[0].start_time = "2026-03-01T01:00:01Z";
  facts.files[1].start_time = "2026-03-01T01:59:58.9Z";
  const auto rows = failed("time-differs");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].injection, 2);
  sequence.injections[1].acquired.clear();
  EXPECT_TRUE(failed("time-differs").empty());
}

TEST_F(SequenceChecks, LotsAreGoodToTheEndOfTheirLastDay) {
  for (Injection& injection : sequence.injections) injection.level = "low";
  sequence.levels = {{"low", "zinol", 1.0, "L7", "2026-03-01", 2},
                     {"low", "other", 1.0, "L7", "2026-03-01", 3}};
  EXPECT_TRUE(failed("expired-lot").empty());
  for (LevelEntry& entry : sequence.levels) entry.expires = "2026-02-28";
  auto rows = failed("expired-lot");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].injection, 1);
  EXPECT_EQ(rows[0].note,
            "level low, lot L7, expired 2026-02-28, used in 3 injections");
  for (LevelEntry& entry : sequence.levels)
    entry.expires = "2026-03-01T02:00:00Z";
  rows = failed("expired-lot");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].injection, 2);
}

TEST_F(SequenceChecks, ExpiryWithoutAnyTimeIsNotChecked) {
  sequence.injections[0].level = "low";
  sequence.injections[0].acquired.clear();
  facts.files[0].start_time.clear();
  sequence.levels = {{"low", "zinol", 1.0, "L7", "2026-02-01", 2}};
  EXPECT_TRUE(failed("expired-lot").empty());
  EXPECT_EQ(unchecked("expired-lot").size(), 1U);
}

TEST_F(SequenceChecks, RefusedFiles) {
  facts.files[1].problem = "data/b.mzML:3: cut off; copy it again";
  auto rows = failed("file-refused");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].injection, 2);
  EXPECT_EQ(rows[0].note, "data/b.mzML:3: cut off; copy it again");
}

TEST_F(SequenceChecks, WarningsOfFilesAreKeptButNeedNobody) {
  facts.files[2].warnings = {"one", "two"};
  EXPECT_TRUE(failed("file-warning").empty());
  std::vector<std::string> notes;
  for (const CheckRow& row : always_checked(sequence, facts)) {
    if (row.check != "file-warning") continue;
    EXPECT_EQ(row.injection, 3);
    notes.push_back(row.note);
  }
  EXPECT_EQ(notes, (std::vector<std::string>{"one", "two"}));
}

}  // namespace
}  // namespace loqsmith
