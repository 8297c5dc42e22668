#include "judgement/quality_night.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::add_found;
using test::add_known;
using test::agrees_to_digits;
using test::NightBuilder;
using test::NightRow;
using test::quality_night;
using test::rows_of;
using test::same_bits;
using test::with_word;
using test::within_condition;

using Numbers = std::vector<int>;

// Sample W1 is injection 14.
NightBuilder with_sample(double native) {
  NightBuilder night = quality_night();
  FortifiedAcceptance accept;
  accept.recovery = {70.0, 130.0};
  night.settings.acceptance.fortified = accept;
  night.add(Role::Sample, night.sensitivity * native, native > 0.0)
      .injection.sample = "W1";
  return night;
}

NightRow& fortify(NightBuilder& night, double added, double found,
                  Role role = Role::Fortified,
                  const std::string& parent = "W1") {
  NightRow& row = add_known(night, role, added, found);
  row.injection.sample = role == Role::Fortified ? "W1+" : "W1++";
  row.injection.parent = parent;
  return row;
}

std::vector<CheckRow> rows(NightBuilder& night) {
  return rows_of(night.judge().checks, "fortified");
}

TEST(Fortified, RecoveryOfWhatWasAdded) {
  NightBuilder night = with_sample(5.0);
  fortify(night, 10.0, 14.0);
  const CheckRow row = rows(night).at(0);
  EXPECT_TRUE(within_condition(*row.value, 90.0, 1e3));
  EXPECT_TRUE(same_bits(*row.low, 70.0));
  EXPECT_TRUE(same_bits(*row.high, 130.0));
  EXPECT_EQ(row.passed, true);
  EXPECT_EQ(row.injection, 15);
  EXPECT_EQ(row.affects, "sample W1");
  EXPECT_EQ(row.note, "recovery");
}

// A native result below zero is subtracted as it is.
TEST(Fortified, TheSignedNativeResultIsSubtracted) {
  NightBuilder night = with_sample(-1.0);
  fortify(night, 10.0, 9.0);
  EXPECT_TRUE(within_condition(*rows(night).at(0).value, 100.0, 1e3));
}

TEST(Fortified, AFailedOneMarksTheSample) {
  NightBuilder night = with_sample(5.0);
  fortify(night, 10.0, 11.0);
  add_found(night, Role::Sample, 5.0, "W1");
  add_found(night, Role::Sample, 5.0, "W2");
  const AnalyteJudgement judged = night.judge();
  EXPECT_EQ(rows_of(judged.checks, "fortified").at(0).passed, false);
  EXPECT_EQ(with_word(judged, "fortified-failed"), (Numbers{14, 16}));
  EXPECT_EQ(judged.results.back().status, Status::Reportable);
}

TEST(Fortified, NotJudgedWhereTheSampleHoldsFarMore) {
  NightBuilder night = with_sample(40.0);
  fortify(night, 8.0, 42.0);
  night.settings.acceptance.fortified->native_ratio = 4.0;
  CheckRow row = rows(night).at(0);
  EXPECT_FALSE(row.passed);
  EXPECT_EQ(row.note,
            "not checked: the native amount 40 exceeds 4 times the "
            "added one (recovery)");
  // Exactly that many times does not exceed it.
  night.settings.acceptance.fortified->native_ratio =
      *night.judge().results.at(7).result / 8.0;
  row = rows(night).at(0);
  EXPECT_TRUE(within_condition(*row.value, 25.0, 1e4));
  EXPECT_EQ(row.passed, false);
}

// Whether the duplicate names the sample or the fortified one as its parent.
TEST(Fortified, RelativeDifferenceOfTheDuplicates) {
  for (const char* parent : {"W1", "W1+"}) {
    NightBuilder night = with_sample(1.0);
    night.settings.acceptance.fortified->relative_difference = 5.0;
    fortify(night, 10.0, 9.2);
    fortify(night, 10.0, 10.1, Role::FortifiedDuplicate, parent);
    const AnalyteJudgement judged = night.judge();
    const auto all = rows_of(judged.checks, "fortified");
    ASSERT_EQ(all.size(), 3U);
    EXPECT_TRUE(within_condition(*all[1].value, 91.0, 1e3)) << parent;
    EXPECT_EQ(all[2].injection, 16);
    EXPECT_TRUE(agrees_to_digits(*all[2].value, 9.326425, 7));
    EXPECT_TRUE(same_bits(*all[2].high, 5.0));
    EXPECT_EQ(all[2].passed, false);
    EXPECT_EQ(all[2].affects, "sample W1");
    EXPECT_EQ(all[2].note, "relative difference");
    EXPECT_EQ(with_word(judged, "fortified-failed"), Numbers{14}) << parent;
  }
}

TEST(Fortified, OnlyEqualAmountsAreCompared) {
  NightBuilder night = with_sample(1.0);
  night.settings.acceptance.fortified->relative_difference = 5.0;
  fortify(night, 10.0, 11.0);
  fortify(night, 20.0, 21.0, Role::FortifiedDuplicate);
  const auto all = rows(night);
  ASSERT_EQ(all.size(), 3U);
  EXPECT_FALSE(all[2].passed);
  EXPECT_EQ(all[2].note,
            "not checked: no fortified sample of the same parent and amount "
            "(relative difference)");
}

TEST(Fortified, WithoutANumberNothingShowsThatItHeld) {
  NightBuilder night = with_sample(5.0);
  fortify(night, 10.0, 15.0).peak = NotApplicable{"file-refused: cut off"};
  CheckRow row = rows(night).at(0);
  EXPECT_EQ(row.passed, false);
  EXPECT_EQ(row.note, "recovery: file-refused: cut off");

  night.rows[14].peak = test::peak_of(30.0);
  night.rows[13].peak = NotApplicable{"trace-missing"};
  row = rows(night).at(0);
  EXPECT_EQ(row.passed, false);
  EXPECT_EQ(row.note, "recovery: trace-missing (native sample)");
}

TEST(Fortified, AbsentIsUnchecked) {
  NightBuilder night = with_sample(5.0);
  night.settings.acceptance.fortified->relative_difference = 5.0;
  auto all = rows(night);
  ASSERT_EQ(all.size(), 2U);
  EXPECT_EQ(all[0].note,
            "not checked: no fortified sample contains the analyte");
  EXPECT_EQ(all[1].note,
            "not checked: no fortified duplicate contains the analyte");
  night.settings.acceptance.fortified = FortifiedAcceptance{};
  all = rows(night);
  ASSERT_EQ(all.size(), 1U);
  EXPECT_FALSE(all[0].passed);
}

}  // namespace
}  // namespace loqsmith
