#include "judgement/quality_night.hpp"
#include "loqsmith/judgement/relative_difference.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::add_found;
using test::agrees_to_digits;
using test::NightBuilder;
using test::NightRow;
using test::quality_night;
using test::rows_of;
using test::same_bits;
using test::with_word;
using test::within_condition;

using Numbers = std::vector<int>;

NightRow& add_duplicate(NightBuilder& night, double found,
                        double dilution = 1.0) {
  NightRow& row =
      add_found(night, Role::Duplicate, found, "W1-again", dilution);
  row.injection.parent = "W1";
  return row;
}

// Sample W1 is injection 14; the quantitation limit is 1.
NightBuilder with_sample(double found) {
  NightBuilder night = quality_night();
  night.settings.acceptance.duplicate = {CheckAction::Flag, 10.0};
  add_found(night, Role::Sample, found, "W1");
  return night;
}

CheckRow only_row(NightBuilder& night) {
  return rows_of(night.judge().checks, "duplicate").at(0);
}

TEST(RelativeDifference, OfTheMean) {
  // 200 x 0.9 / 19.3
  EXPECT_TRUE(
      agrees_to_digits(relative_difference_percent(9.2, 10.1), 9.326425, 7));
  EXPECT_TRUE(same_bits(relative_difference_percent(10.1, 9.2),
                        relative_difference_percent(9.2, 10.1)));
}

TEST(Duplicate, RelativeDifferenceFromTheQuantitationLimitUp) {
  NightBuilder night = with_sample(10.1);
  add_duplicate(night, 9.2);
  CheckRow row = only_row(night);
  EXPECT_TRUE(agrees_to_digits(*row.value, 9.326425, 7));
  EXPECT_TRUE(same_bits(*row.high, 10.0));
  EXPECT_FALSE(row.low);
  EXPECT_EQ(row.unit, "%");
  EXPECT_EQ(row.passed, true);
  EXPECT_EQ(row.injection, 15);
  EXPECT_EQ(row.action, "flag");
  EXPECT_EQ(row.affects, "sample W1");
  EXPECT_EQ(row.note, "relative difference");

  // At the limit counts as within.
  night.settings.acceptance.duplicate->relative_difference = *row.value;
  EXPECT_EQ(only_row(night).passed, true);
  night.settings.acceptance.duplicate->relative_difference = 9.3;
  EXPECT_EQ(only_row(night).passed, false);
}

TEST(Duplicate, AFailedOneMarksAllInjectionsOfItsParent) {
  NightBuilder night = with_sample(10.0);
  add_duplicate(night, 8.0);
  add_found(night, Role::Sample, 10.0, "W2");
  add_found(night, Role::Sample, 10.0, "W1");
  AnalyteJudgement judged = night.judge();
  EXPECT_EQ(with_word(judged, "duplicate-failed"), (Numbers{14, 17}));
  EXPECT_EQ(judged.results.back().status, Status::Reportable);

  night.settings.acceptance.duplicate->action = CheckAction::Withhold;
  judged = night.judge();
  EXPECT_EQ(judged.results.back().status, Status::Withheld);
}

TEST(Duplicate, AbsoluteDifferenceBelowTheQuantitationLimit) {
  NightBuilder night = with_sample(0.5);
  NightRow& duplicate = add_duplicate(night, 1.4);
  CheckRow row = only_row(night);
  EXPECT_TRUE(within_condition(*row.value, 0.9, 1e3));
  EXPECT_TRUE(same_bits(*row.high, 1.0));
  EXPECT_EQ(row.unit, "ug/L");
  EXPECT_EQ(row.passed, true);
  EXPECT_EQ(row.note, "absolute difference, at most the quantitation limit");

  duplicate.peak = test::peak_of(3.2);
  EXPECT_EQ(only_row(night).passed, false);
  // Signed: a result below zero is as far off as it is.
  duplicate.peak = test::peak_of(-1.2, false);
  row = only_row(night);
  EXPECT_TRUE(within_condition(*row.value, 1.1, 1e3));
  EXPECT_EQ(row.passed, false);
}

// A result at the limit is not below it.
TEST(Duplicate, AtTheQuantitationLimitTheRelativeOneDecides) {
  NightBuilder night = with_sample(1.0);
  add_duplicate(night, 1.0);
  const AnalyteJudgement judged = night.judge();
  // The lowest standard is the limit, and these gave the same response.
  EXPECT_GE(*judged.results.back().result,
            *judged.results.back().quantitation_limit);
  EXPECT_EQ(rows_of(judged.checks, "duplicate").at(0).unit, "%");
}

TEST(Duplicate, TheLeastDilutedInRangeStandForTheSample) {
  NightBuilder night = with_sample(80.0);  // above the range, to 50
  add_found(night, Role::Sample, 70.0, "W1", 2.0);
  add_found(night, Role::Sample, 72.0, "W1", 2.0);
  add_found(night, Role::Sample, 99.0, "W1", 10.0);
  add_duplicate(night, 80.0);
  add_duplicate(night, 71.0, 2.0);
  const auto rows = rows_of(night.judge().checks, "duplicate");
  ASSERT_EQ(rows.size(), 2U);
  EXPECT_FALSE(rows[0].passed);
  EXPECT_EQ(rows[0].note, "not checked: above-range");
  EXPECT_LT(*rows[1].value, 1e-9);
  EXPECT_EQ(rows[1].passed, true);
}

TEST(Duplicate, WithoutANumberNothingShowsThatItHeld) {
  NightBuilder night = with_sample(10.0);
  add_duplicate(night, 10.0).peak = NotApplicable{"file-refused: cut off"};
  AnalyteJudgement judged = night.judge();
  CheckRow row = rows_of(judged.checks, "duplicate").at(0);
  EXPECT_EQ(row.passed, false);
  EXPECT_EQ(row.note, "file-refused: cut off");
  EXPECT_EQ(with_word(judged, "duplicate-failed"), Numbers{14});

  night.rows[14].peak = test::peak_of(20.0);
  night.rows[13].peak = NotApplicable{"file-refused: cut off"};
  row = only_row(night);
  EXPECT_EQ(row.passed, false);
  EXPECT_EQ(row.note, "file-refused: cut off (sample W1)");
}

TEST(Duplicate, AbsentOrWithoutLimitIsUnchecked) {
  NightBuilder night = with_sample(10.0);
  EXPECT_EQ(only_row(night).note, "not checked: no sample was repeated");
  add_duplicate(night, 10.0);
  EXPECT_EQ(rows_of(night.judge("no peak").checks, "duplicate").at(0).note,
            "not checked: no calibration");
  night.settings.limits.procedures[0].name = "no such procedure";
  EXPECT_EQ(only_row(night).note, "not checked: no-valid-limit");
  night.settings.acceptance.duplicate.reset();
  EXPECT_EQ(only_row(night).note,
            "not checked: the method does not ask for it");
}

}  // namespace
}  // namespace loqsmith
