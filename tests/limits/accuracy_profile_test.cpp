#include "loqsmith/limits/accuracy_profile.hpp"

#include <array>
#include <cmath>

#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/tolerance_interval.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

struct Level {
  double nominal;
  std::vector<std::vector<double>> runs;
};

// Five levels, four runs of three replicates, made with a seeded random stream.
const std::vector<Level> kLevels = {{0.5,
                                     {{0.481, 0.453, 0.508},
                                      {0.586, 0.490, 0.484},
                                      {0.520, 0.514, 0.500},
                                      {0.424, 0.471, 0.509}}},
                                    {1,
                                     {{0.800, 0.913, 0.841},
                                      {1.002, 0.994, 0.969},
                                      {0.720, 0.858, 0.893},
                                      {0.941, 0.826, 0.899}}},
                                    {2,
                                     {{1.916, 2.009, 1.859},
                                      {1.925, 1.948, 1.943},
                                      {2.005, 2.137, 2.268},
                                      {1.779, 2.024, 1.949}}},
                                    {5,
                                     {{4.921, 5.015, 4.872},
                                      {5.624, 5.483, 5.621},
                                      {5.489, 5.093, 5.258},
                                      {4.696, 4.807, 4.561}}},
                                    {10,
                                     {{9.450, 9.615, 10.067},
                                      {9.396, 9.875, 9.990},
                                      {10.860, 10.682, 10.363},
                                      {10.451, 10.488, 11.043}}}};

LimitEvidence night(const std::vector<Level>& levels) {
  LimitEvidence evidence;
  for (const Level& level : levels)
    for (std::size_t run = 0; run < level.runs.size(); ++run)
      for (double found : level.runs[run])
        evidence.spikes.push_back({static_cast<int>(evidence.spikes.size()),
                                   level.nominal, found,
                                   "P" + std::to_string(run)});
  evidence.calibration = known_line(0.0, 1.0, 0.5, 20.0);
  return evidence;
}

ProcedureSettings settings(double beta = 0.80) {
  ProcedureSettings settings;
  settings.beta = beta;
  return settings;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const ProcedureSettings& with = settings()) {
  return accuracy_profile(evidence, {}, with);
}

struct Row {
  double mean, msb, msw, sd, ratio, b_squared, nu;
  double lower_80, upper_80, lower_95, upper_95;  // relative error, percent
};

// Formulas of Mee (1984) and Hubert et al. (2004), from memory; figures
// computed with another library.
const std::array<Row, 5> kRows{{
    {0.495, 0.0018262222, 0.0014876667, 0.04000648, 0.075858, 0.876410,
     10.393196, -12.458767, 10.458767, -19.561112, 17.561112},
    {0.888, 0.015550444, 0.0038303333, 0.08796043, 1.019938, 0.497544, 6.126319,
     -24.849138, 2.449138, -34.340101, 11.940101},
    {1.98016667, 0.032883889, 0.0097325, 0.13209705, 0.792924, 0.530644,
     6.719797, -11.087699, 9.104366, -17.934355, 15.951022},
    {5.12, 0.454016, 0.0166285, 0.40301902, 8.767828, 0.357750, 3.448662,
     -11.757940, 16.557940, -24.097312, 28.897312},
    {10.19, 0.83969933, 0.093668, 0.58510265, 2.654878, 0.407700, 4.405681,
     -7.772505, 11.572505, -15.299015, 19.099015},
}};

double relative_error(double found, double nominal) {
  return 100.0 * (found - nominal) / nominal;
}

TEST(ToleranceInterval, FiveLevels) {
  for (std::size_t i = 0; i < kRows.size(); ++i) {
    const Row& row = kRows[i];
    const double c = kLevels[i].nominal;
    const auto at_80 = beta_expectation_interval(kLevels[i].runs, 0.80);
    const auto at_95 = beta_expectation_interval(kLevels[i].runs, 0.95);
    ASSERT_TRUE(at_80 && at_95);
    EXPECT_TRUE(agrees_to_digits(at_80->mean, row.mean, 9));
    EXPECT_TRUE(agrees_to_digits(at_80->mean_square_between, row.msb, 8));
    EXPECT_TRUE(agrees_to_digits(at_80->mean_square_within, row.msw, 8));
    EXPECT_TRUE(agrees_to_digits(at_80->intermediate_sd, row.sd, 7));
    EXPECT_TRUE(agrees_to_digits(at_80->variance_ratio, row.ratio, 5));
    EXPECT_TRUE(agrees_to_digits(at_80->b_squared, row.b_squared, 6));
    EXPECT_TRUE(agrees_to_digits(at_80->degrees_of_freedom, row.nu, 7));
    EXPECT_TRUE(
        agrees_to_digits(relative_error(at_80->lower, c), row.lower_80, 7));
    EXPECT_TRUE(
        agrees_to_digits(relative_error(at_80->upper, c), row.upper_80, 7));
    EXPECT_TRUE(
        agrees_to_digits(relative_error(at_95->lower, c), row.lower_95, 8));
    EXPECT_TRUE(
        agrees_to_digits(relative_error(at_95->upper, c), row.upper_95, 8));
  }
}

// Equal means of the runs: no variance between them, one of all results.
TEST(ToleranceInterval, NoVarianceBetweenRuns) {
  const auto found =
      beta_expectation_interval({{1, 3}, {1, 3}, {1, 3}, {1, 3}}, 0.95);
  ASSERT_TRUE(found);
  EXPECT_TRUE(same_bits(found->variance_ratio, 0.0));
  EXPECT_TRUE(
      within_condition(found->intermediate_sd, std::sqrt(8.0 / 7.0), 4));
  EXPECT_TRUE(same_bits(found->b_squared, 1.0));
}

// All variance between the runs: their means alone count.
TEST(ToleranceInterval, NoVarianceWithinRuns) {
  const auto found = beta_expectation_interval({{1, 1}, {2, 2}, {3, 3}}, 0.95);
  ASSERT_TRUE(found);
  EXPECT_TRUE(within_condition(found->intermediate_sd, 1.0, 4));
  EXPECT_TRUE(same_bits(found->degrees_of_freedom, 2.0));
  // 2 + t sqrt(1 + 1/3): the prediction interval of three values.
  EXPECT_TRUE(
      agrees_to_digits(found->upper, 2.0 + 4.302653 * std::sqrt(4.0 / 3.0), 7));
}

TEST(ToleranceInterval, NotApplicable) {
  const auto reason = [](const std::vector<std::vector<double>>& runs) {
    return beta_expectation_interval(runs, 0.8).reason();
  };
  EXPECT_TRUE(contains(reason({}), "few-runs"));
  EXPECT_TRUE(contains(reason({{1, 2, 3}}), "few-runs"));
  EXPECT_TRUE(contains(reason({{1}, {2}, {3}}), "no-replicates"));
  EXPECT_TRUE(contains(reason({{1, 1}, {1, 1}}), "all-equal"));
}

TEST(AccuracyProfile, FourFifthsOfFutureResults) {
  const auto found = limit(night(kLevels));
  ASSERT_TRUE(found);
  // Level 0.5 passes but 1 fails: every higher level counts.
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 1.35237144, 9));
  EXPECT_FALSE(found->detection);
  EXPECT_FALSE(found->critical_value);
  EXPECT_EQ(found->n, 60U);
  EXPECT_TRUE(agrees_to_digits(*found->degrees_of_freedom, 6.719797, 7));
  EXPECT_EQ(found->grade(), Grade::Caution);
  EXPECT_TRUE(finding(*found, "one-night"));
  EXPECT_TRUE(
      agrees_to_digits(*term(*found, "lower bound of recovery at level 2"),
                       100.0 - 11.087699, 8));
}

TEST(AccuracyProfile, NineteenOfTwenty) {
  EXPECT_TRUE(agrees_to_digits(
      *limit(night(kLevels), settings(0.95))->quantitation, 9.54023380, 9));
}

TEST(AccuracyProfile, AtTheLowestLevel) {
  ProcedureSettings wide = settings();
  wide.acceptance_low = 70.0;
  wide.acceptance_high = 130.0;
  const auto found = limit(night(kLevels), wide);
  ASSERT_TRUE(found);
  EXPECT_TRUE(same_bits(*found->quantitation, 0.5));
  EXPECT_TRUE(finding(*found, "at-lowest-level"));
}

// Recovery may be wrong on one side alone.
TEST(AccuracyProfile, LimitsNeedNotBeSymmetric) {
  const std::vector<ProfilePoint> profile = {
      {1.0, 85.0, 130.0}, {3.0, 92.0, 110.0}, {5.0, 95.0, 105.0}};
  EXPECT_TRUE(within_condition(*profile_limit(profile, 80, 120), 2.0, 4));
  EXPECT_TRUE(same_bits(*profile_limit(profile, 80, 130), 1.0));
  EXPECT_TRUE(within_condition(*profile_limit(profile, 90, 120),
                               1.0 + 2.0 * 5.0 / 7.0, 4));
  EXPECT_TRUE(within_condition(*profile_limit(profile, 95, 120), 5.0, 4));
  EXPECT_FALSE(profile_limit(profile, 96, 120));
  EXPECT_FALSE(profile_limit({}, 80, 120));
}

TEST(AccuracyProfile, LevelsWithoutThreePreparationsAreLeftOut) {
  std::vector<Level> levels = kLevels;
  levels[1].runs.resize(2);  // the one that fails
  const auto found = limit(night(levels));
  ASSERT_TRUE(found);
  EXPECT_TRUE(same_bits(*found->quantitation, 0.5));
  ASSERT_TRUE(finding(*found, "levels-left-out"));
  EXPECT_TRUE(contains(finding(*found, "levels-left-out")->text, "1 level "));
  EXPECT_EQ(found->n, 48U);
}

TEST(AccuracyProfile, UnequalRunsAreApproximate) {
  std::vector<Level> levels = kLevels;
  levels[2].runs[0].pop_back();
  EXPECT_TRUE(finding(*limit(night(levels)), "unequal-runs"));
  EXPECT_FALSE(finding(*limit(night(kLevels)), "unequal-runs"));
}

TEST(AccuracyProfile, NotApplicable) {
  EXPECT_TRUE(contains(limit(night({})).reason(), "few-spikes"));
  std::vector<Level> levels = kLevels;
  for (Level& level : levels) level.runs.resize(2);
  EXPECT_TRUE(contains(limit(night(levels)).reason(), "few-spikes"));
  levels = kLevels;
  for (Level& level : levels)
    for (auto& run : level.runs) run.resize(1);
  EXPECT_TRUE(contains(limit(night(levels)).reason(), "few-spikes"));
  levels = {{1.0, {{1, 1}, {1, 1}, {1, 1}}}};
  EXPECT_EQ(limit(night(levels)).reason(),
            "all-equal: the results have no spread, at level 1");
  EXPECT_TRUE(contains(
      limit(night({{1.0, {{0.5, 2.0}, {0.7, 1.0}, {1.5, 0.1}}}})).reason(),
      "highest-level-fails"));

  LimitEvidence evidence = night(kLevels);
  evidence.calibration->slope = 0.0;
  EXPECT_TRUE(contains(limit(evidence).reason(), "slope-not-positive"));
  evidence.calibration.reset();
  EXPECT_TRUE(contains(limit(evidence).reason(), "no-calibration"));
}

}  // namespace
}  // namespace loqsmith::test
