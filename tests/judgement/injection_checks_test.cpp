#include <gtest/gtest.h>

#include "judgement/checked_night.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::checked_night;
using test::line;
using test::marked;
using test::NightBuilder;
using test::NightRow;
using test::outcomes;
using test::peak_of;
using test::result_of;
using test::rows_of;
using test::sample;

// Lowest standard 2, highest 200. The blank right after it stands at 15.
NightBuilder with_carry_over(double blank) {
  NightBuilder night = checked_night();
  night.settings.acceptance.carry_over.emplace();
  night.add(Role::SolventBlank, blank);
  return night;
}

TEST(CarryOver, PassesUpToTwentyPercentOfTheLowestStandard) {
  NightBuilder night = with_carry_over(0.4);
  sample(night, 100.0);
  sample(night, 1.0);
  const AnalyteJudgement judgement = night.judge();
  const std::vector<CheckRow> rows = rows_of(judgement.checks, "carry-over");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].passed, true);
  EXPECT_EQ(rows[0].injection, 15);
  EXPECT_TRUE(agrees_to_digits(rows[0].value.value(), 20.0, 14));
  EXPECT_EQ(marked(judgement, "carry-over-failed"), "");
}

// 0.3 % of what stands before: of a sample at 100 that is 0.6 in response.
TEST(CarryOver, FlagsLowResultsRightAfterHighOnes) {
  NightBuilder night = with_carry_over(0.6);
  sample(night, 2.0);    // 16: after the blank
  sample(night, 100.0);  // 17
  sample(night, 2.9);    // 18: 5.8, of which 0.6 may be carried over
  sample(night, 100.0);  // 19
  sample(night, 3.1);    // 20: 6.2
  sample(night, 100.0);  // 21
  night.add(Role::Sample, 0.1, false);  // 22: nothing detected
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "carry-over"), "-");
  // The blank's own result, too, comes from the standard before it.
  EXPECT_EQ(marked(judgement, "carry-over-failed"), "15 18");
  EXPECT_EQ(result_of(judgement, 18).status, Status::Reportable);
}

TEST(CarryOver, NotCheckedWithoutABlankRightAfterTheHighestStandard) {
  NightBuilder night = checked_night();
  night.settings.acceptance.carry_over.emplace();
  sample(night, 1.0);
  night.add(Role::SolventBlank, 0.0);
  EXPECT_EQ(outcomes(night.judge(), "carry-over"), "?");
}

// Then what follows high injections is a blank like others.
TEST(CarryOver, APassLetsBlanksAfterHighInjectionsCount) {
  const auto passed = [](NightBuilder night) {
    return gather_limit_evidence(night.collect(), line(2.0, 1.0, 100.0))
        .carry_over_passed;
  };
  EXPECT_FALSE(passed(with_carry_over(0.6)));
  NightBuilder night = with_carry_over(0.2);
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(judgement.sets[0].limits.rows[0].estimate->n, 8U);
  night.settings.acceptance.carry_over.reset();
  EXPECT_EQ(night.judge().sets[0].limits.rows[0].estimate->n, 7U);
}

// The internal standard has an area of 50 in every standard.
NightBuilder with_internal_standard() {
  NightBuilder night = checked_night();
  night.settings.internal_standard = "is1";
  night.settings.acceptance.internal_standard.emplace();
  for (NightRow& row : night.rows) row.internal_standard = peak_of(50.0);
  return night;
}

// A sample whose internal standard has the given area.
void sample_beside(NightBuilder& night, double area) {
  sample(night, 5.0).internal_standard = peak_of(area);
}

TEST(InternalStandard, HalfAndTwiceTheMeanPass) {
  NightBuilder night = with_internal_standard();
  sample_beside(night, 25.0);
  sample_beside(night, 100.0);
  const AnalyteJudgement judgement = night.judge();
  const std::vector<CheckRow> rows =
      rows_of(judgement.checks, "internal-standard");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].passed, true);
  EXPECT_EQ(rows[0].note, "nearest to failing of 9 injections that pass");
  EXPECT_EQ(marked(judgement, "internal-standard-failed"), "");
}

TEST(InternalStandard, WithholdsTheResult) {
  NightBuilder night = with_internal_standard();
  sample_beside(night, 24.9);   // 15
  sample_beside(night, 100.1);  // 16
  sample_beside(night, 50.0);   // 17
  sample_beside(night, 20.0);   // 18: diluted with its vial
  night.rows.back().injection.internal_standard_dilution = 2.5;
  night.add(Role::MethodBlank, 0.0, false).internal_standard =
      peak_of(0.0, false);  // 19
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "internal-standard"), "+---");
  EXPECT_EQ(marked(judgement, "internal-standard-failed"), "15 16 19");
  EXPECT_EQ(result_of(judgement, 15).status, Status::Withheld);
  EXPECT_EQ(result_of(judgement, 17).status, Status::Reportable);
}

TEST(InternalStandard, ASolventBlankNeedNotContainIt) {
  NightBuilder night = with_internal_standard();
  night.rows[0].internal_standard = peak_of(0.0, false);
  night.rows[1].internal_standard = peak_of(2.0);  // carried over
  EXPECT_EQ(outcomes(night.judge(), "internal-standard"), "+");
}

TEST(InternalStandard, NotCheckedWithoutOne) {
  NightBuilder night = checked_night();
  night.settings.acceptance.internal_standard.emplace();
  EXPECT_EQ(outcomes(night.judge(), "internal-standard"), "?");
}

// The second trace shows half of the first, 20 % more or less allowed.
NightBuilder with_second_trace() {
  NightBuilder night = checked_night();
  night.settings.second_trace = SecondTraceRule{0.5, 20.0};
  night.settings.acceptance.second_trace.emplace();
  for (NightRow& row : night.rows) {
    const Peak& first = row.peak.value();
    row.second_trace = peak_of(0.5 * first.area, first.found);
  }
  return night;
}

// A sample with an area of 10 in its first trace.
void sample_with_second(NightBuilder& night, double area, bool found = true) {
  sample(night, 5.0).second_trace = peak_of(area, found);
}

TEST(SecondTrace, WithholdsWhereTheRatioDiffers) {
  NightBuilder night = with_second_trace();
  sample_with_second(night, 5.0);         // 15
  sample_with_second(night, 4.0);         // 16: at the tolerance
  sample_with_second(night, 6.0);         // 17: at the tolerance
  sample_with_second(night, 3.9);         // 18
  sample_with_second(night, 6.1);         // 19
  sample_with_second(night, 0.1, false);  // 20: no peak
  sample(night, 5.0).second_trace = NotApplicable{"trace-missing: none"};  // 21
  night.add(Role::Sample, 0.0, false).second_trace = peak_of(9.0);  // no peak
  const AnalyteJudgement judgement = night.judge();
  const std::vector<CheckRow> rows = rows_of(judgement.checks, "second-trace");
  EXPECT_EQ(outcomes(judgement, "second-trace"), "+----");
  EXPECT_TRUE(agrees_to_digits(rows[1].value.value(), 78.0, 12));
  EXPECT_EQ(rows[1].low, 80.0);
  EXPECT_EQ(rows[1].high, 120.0);
  EXPECT_EQ(rows[3].note, "no peak in the second trace");
  EXPECT_EQ(rows[4].note, "second trace: trace-missing: none");
  EXPECT_EQ(marked(judgement, "second-trace-failed"), "18 19 20 21");
  EXPECT_EQ(result_of(judgement, 17).status, Status::Reportable);
  EXPECT_EQ(result_of(judgement, 18).status, Status::Withheld);
}

TEST(SecondTrace, GoesByHeightWhereTheResponseDoes) {
  NightBuilder night = with_second_trace();
  night.settings.response = ResponseKind::Height;
  Peak second = peak_of(5.0);
  second.height = 30.0;
  sample(night, 5.0).second_trace = second;
  EXPECT_EQ(outcomes(night.judge(), "second-trace"), "-");
  night.settings.response = ResponseKind::Area;
  EXPECT_EQ(outcomes(night.judge(), "second-trace"), "+");
}

TEST(SecondTrace, NotCheckedWithoutOne) {
  NightBuilder night = checked_night();
  night.settings.acceptance.second_trace.emplace();
  EXPECT_EQ(outcomes(night.judge(), "second-trace"), "?");
}

// A sample found at 4.2 min.
void sample_expected_at(NightBuilder& night, std::optional<double> minutes) {
  sample(night, 5.0).expected_minutes = minutes;
}

TEST(RetentionTime, FlagsWhatStandsTooFar) {
  NightBuilder night = checked_night();
  night.settings.acceptance.retention_time.emplace();
  night.settings.acceptance.retention_time->shift_minutes = 0.25;
  sample_expected_at(night, 4.0);                              // 15
  sample_expected_at(night, 4.5);                              // 16: too early
  sample_expected_at(night, 3.9);                              // 17: too late
  sample_expected_at(night, std::nullopt);                     // 18
  night.add(Role::Sample, 0.0, false).expected_minutes = 9.0;  // no peak
  const AnalyteJudgement judgement = night.judge();
  const std::vector<CheckRow> rows =
      rows_of(judgement.checks, "retention-time");
  ASSERT_EQ(rows.size(), 3U);
  EXPECT_EQ(outcomes(judgement, "retention-time"), "+--");
  EXPECT_TRUE(agrees_to_digits(rows[0].value.value(), 0.2, 12));
  EXPECT_TRUE(agrees_to_digits(rows[1].value.value(), -0.3, 12));
  EXPECT_EQ(rows[1].unit, "min");
  EXPECT_EQ(marked(judgement, "retention-time-failed"), "16 17");
  EXPECT_EQ(result_of(judgement, 16).status, Status::Reportable);
}

TEST(RetentionTime, TheShiftItselfPasses) {
  NightBuilder night = checked_night();
  night.settings.acceptance.retention_time.emplace();
  night.settings.acceptance.retention_time->shift_minutes = 0.25;
  sample(night, 5.0).expected_minutes = 4.0;
  night.rows.back().peak.value().retention_minutes = 4.25;
  EXPECT_EQ(outcomes(night.judge(), "retention-time"), "+");
  night.rows.back().peak.value().retention_minutes = 3.75;
  EXPECT_EQ(outcomes(night.judge(), "retention-time"), "+");
  night.rows.back().expected_minutes.reset();
  EXPECT_EQ(outcomes(night.judge(), "retention-time"), "?");
}

}  // namespace
}  // namespace loqsmith
