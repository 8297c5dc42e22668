#include <gtest/gtest.h>

#include <vector>

#include "loqsmith/signal/learn.hpp"
#include "signal_support.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::begins_with;
using test::gaussian_of_height;
using test::simulate_trace;
using test::SimulatedTrace;
using test::target_at;
using test::within_condition;

SimulatedTrace standard(double height) {
  SimulatedTrace wanted;
  wanted.white_noise = 1.0;
  wanted.peaks = {gaussian_of_height(5.0, 0.05, height)};
  return wanted;
}

Outcome<TeacherPeak> seen_in(const SimulatedTrace& wanted,
                             const std::string& name, double expected = 5.0) {
  return observe_teacher(simulate_trace(wanted, name), target_at(expected), 3,
                         Role::Standard);
}

TEST(ObserveTeacher, FeetOfACleanGaussianLieWhereATHousandthIsLeft) {
  SimulatedTrace wanted = standard(400.0);
  wanted.white_noise = 0.0;
  const auto peak = seen_in(wanted, "clean");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(agrees_to_digits(peak->retention_minutes, 5.0, 9));
  EXPECT_TRUE(agrees_to_digits(peak->width_half_minutes, 0.1177, 3));
  // sigma sqrt(2 ln 1000) = 0.1858, less what the baseline just outside, which
  // still stands on the last of the flank, takes off.
  EXPECT_GT(peak->left_minutes, 0.165);
  EXPECT_LT(peak->left_minutes, 0.186);
  EXPECT_TRUE(within_condition(peak->left_minutes, peak->right_minutes, 1e6));
  EXPECT_FALSE(peak->saturated);
  EXPECT_FALSE(peak->left_overlapped);
  EXPECT_EQ(peak->injection, 3);
}

TEST(ObserveTeacher, NoiseDoesNotLeadTheFeetAway) {
  for (int i = 0; i < 50; ++i) {
    const auto peak = seen_in(standard(200.0), "teacher " + std::to_string(i));
    ASSERT_TRUE(peak);
    EXPECT_GT(peak->left_minutes, 0.10);
    EXPECT_LT(peak->left_minutes, 0.25);
    EXPECT_GT(peak->right_minutes, 0.10);
    EXPECT_LT(peak->right_minutes, 0.25);
    EXPECT_GT(peak->height_over_noise, 120.0);
    EXPECT_LT(peak->height_over_noise, 350.0);
  }
}

TEST(ObserveTeacher, FeetDoNotCreepAlongDriftOrABentBaseline) {
  SimulatedTrace wanted = standard(300.0);
  wanted.drift_per_minute = 60.0;
  wanted.bend_per_minute2 = 15.0;
  const auto peak = seen_in(wanted, "gradient");
  ASSERT_TRUE(peak);
  EXPECT_GT(peak->left_minutes, 0.10);
  EXPECT_LT(peak->left_minutes, 0.25);
  EXPECT_GT(peak->right_minutes, 0.10);
  EXPECT_LT(peak->right_minutes, 0.25);
}

TEST(ObserveTeacher, TailsAreFollowedButNotForEver) {
  SimulatedTrace wanted = standard(0.0);
  wanted.peaks = {{5.0, 0.05, 60.0, 0.1}};
  const auto peak = seen_in(wanted, "tail", 5.05);
  ASSERT_TRUE(peak);
  EXPECT_GT(peak->right_minutes, 2.0 * peak->left_minutes);
  EXPECT_LT(peak->right_minutes, 0.8);
}

TEST(ObserveTeacher, TakesThePeakNearestToTheMethodsTime) {
  SimulatedTrace wanted = standard(100.0);
  wanted.peaks.push_back(gaussian_of_height(5.45, 0.05, 900.0));
  const TargetSettings wide = target_at(5.1, 0.5);
  const auto peak =
      observe_teacher(simulate_trace(wanted, "two"), wide, 1, Role::Standard);
  ASSERT_TRUE(peak);
  EXPECT_TRUE(agrees_to_digits(peak->retention_minutes, 5.0, 3));
}

TEST(ObserveTeacher, ANeighboursValleyIsTheFootAndMarksOverlap) {
  SimulatedTrace wanted = standard(300.0);
  wanted.peaks.push_back(gaussian_of_height(5.2, 0.05, 250.0));
  const auto peak = seen_in(wanted, "fused");
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->left_overlapped);
  EXPECT_TRUE(peak->right_overlapped);
  EXPECT_GT(peak->right_minutes, 0.08);
  EXPECT_LT(peak->right_minutes, 0.12);
}

TEST(ObserveTeacher, ABaselineResolvedNeighbourIsNoOverlap) {
  SimulatedTrace wanted = standard(300.0);
  wanted.peaks.push_back(gaussian_of_height(5.35, 0.05, 300.0));
  const auto peak = seen_in(wanted, "resolved");
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->left_overlapped);
  EXPECT_FALSE(peak->right_overlapped);
}

TEST(ObserveTeacher, SeesSaturation) {
  SimulatedTrace wanted = standard(300.0);
  wanted.ceiling = 200.0;
  const auto peak = seen_in(wanted, "clipped");
  ASSERT_TRUE(peak);
  EXPECT_TRUE(peak->saturated);
}

TEST(ObserveTeacher, CoarseDigitsAreNoSaturation) {
  SimulatedTrace wanted = standard(300.0);
  wanted.white_noise = 0.0;
  wanted.digit = 5.0;
  wanted.step_minutes = 0.002;
  const auto peak = seen_in(wanted, "coarse");
  ASSERT_TRUE(peak);
  EXPECT_FALSE(peak->saturated);
}

TEST(ObserveTeacher, SaysWhyThereIsNone) {
  const auto empty = seen_in(standard(0.0), "empty");
  ASSERT_FALSE(empty);
  EXPECT_TRUE(begins_with(empty.reason(), "no-peak"));
  const auto late = seen_in(standard(300.0), "short", 9.95);
  ASSERT_FALSE(late);
  EXPECT_TRUE(begins_with(late.reason(), "window-not-covered"));
  EXPECT_FALSE(observe_teacher(Trace{}, target_at(5.0), 1, Role::Standard));
}

TEST(ObserveTeacher, ASpikeIsNoPeak) {
  Trace trace = simulate_trace(standard(0.0), "spike");
  trace.signal[500] += 300.0;
  EXPECT_FALSE(observe_teacher(trace, target_at(5.0), 1, Role::Standard));
}

TeacherPeak teacher(int injection, double left, double right, double width) {
  TeacherPeak peak;
  peak.injection = injection;
  peak.retention_minutes = 5.0 + 0.01 * injection;
  peak.left_minutes = left;
  peak.right_minutes = right;
  peak.width_half_minutes = width;
  peak.height = 100.0 * injection;
  peak.height_over_noise = 100.0;
  return peak;
}

TEST(LearnTemplate, TakesMediansOfGoodTeachers) {
  std::vector<TeacherPeak> seen = {
      teacher(1, 0.1, 0.3, 0.11), teacher(2, 0.2, 0.2, 0.12),
      teacher(3, 0.3, 0.9, 0.19), teacher(4, 9.0, 9.0, 9.0),
      teacher(5, 9.0, 9.0, 9.0),  teacher(6, 9.0, 9.0, 9.0)};
  seen[3].saturated = true;
  seen[4].height_over_noise = 49.9;
  seen[5].right_overlapped = true;
  const auto window = learn_template(seen);
  ASSERT_TRUE(window);
  EXPECT_EQ(window->left_minutes, 0.2);
  EXPECT_EQ(window->right_minutes, 0.3);
  EXPECT_EQ(window->width_half_minutes, 0.12);
  EXPECT_FALSE(window->weak);
  EXPECT_EQ(window->teachers, (std::vector<int>{1, 2, 3}));
}

TEST(LearnTemplate, OfLowStandardsTheHighestTeachWeakly) {
  std::vector<TeacherPeak> seen;
  for (int i = 1; i <= 5; ++i) {
    seen.push_back(teacher(i, 0.1 * i, 0.1 * i, 0.1 * i));
    seen.back().height_over_noise = 5.0 + 5.0 * i;  // 10 to 30
  }
  seen[4].role = Role::CheckStandard;
  const auto window = learn_template(seen);
  ASSERT_TRUE(window);
  EXPECT_TRUE(window->weak);
  EXPECT_EQ(window->teachers, (std::vector<int>{2, 3, 4}));
  EXPECT_EQ(window->left_minutes, 0.1 * 3);
}

TEST(LearnTemplate, AnOverlappedPeakGivesItsFreeFootAndTheValley) {
  std::vector<TeacherPeak> seen = {teacher(1, 0.2, 0.08, 0.12),
                                   teacher(2, 0.22, 0.09, 0.12)};
  seen[0].right_overlapped = true;
  seen[1].right_overlapped = true;
  seen[1].left_overlapped = true;
  const auto window = learn_template(seen);
  ASSERT_TRUE(window);
  EXPECT_TRUE(window->weak);
  EXPECT_EQ(window->left_minutes, 0.2);  // of the one that is free there
  EXPECT_TRUE(within_condition(window->right_minutes, 0.085, 4.0));
}

TEST(LearnTemplate, NobodyMayTeach) {
  const auto none = learn_template({});
  ASSERT_FALSE(none);
  EXPECT_TRUE(begins_with(none.reason(), "no-teacher"));
  std::vector<TeacherPeak> seen = {teacher(1, 0.1, 0.1, 0.1)};
  seen[0].height_over_noise = 9.9;
  EXPECT_FALSE(learn_template(seen));
  seen[0].height_over_noise = 900.0;
  seen[0].saturated = true;
  EXPECT_FALSE(learn_template(seen));
  seen[0] = teacher(1, 0.1, 0.1, 0.1);
  seen[0].height_over_noise = 20.0;
  seen[0].role = Role::Control;
  EXPECT_FALSE(learn_template(seen));
}

TEST(ExpectedTime, DriftIsPiecewiseLinearAndConstantBeyond) {
  WindowTemplate window;
  window.drift = {{4, 5.0}, {8, 5.5}, {10, 5.25}};
  EXPECT_EQ(expected_minutes(window, 1), 5.0);
  EXPECT_EQ(expected_minutes(window, 4), 5.0);
  EXPECT_EQ(expected_minutes(window, 5), 5.125);
  EXPECT_EQ(expected_minutes(window, 8), 5.5);
  EXPECT_EQ(expected_minutes(window, 9), 5.375);
  EXPECT_EQ(expected_minutes(window, 40), 5.25);
}

TEST(ExpectedTime, DriftLeavesOutWhatIsTooLowOrSaturated) {
  std::vector<TeacherPeak> seen = {teacher(1, 0.1, 0.1, 0.1),
                                   teacher(2, 0.1, 0.1, 0.1),
                                   teacher(3, 0.1, 0.1, 0.1)};
  seen[1].height_over_noise = 9.0;
  seen[2].saturated = true;
  const auto window = learn_template(seen);
  ASSERT_TRUE(window);
  ASSERT_EQ(window->drift.size(), 1u);
  EXPECT_EQ(window->drift[0].first, 1);
}

}  // namespace
}  // namespace loqsmith
