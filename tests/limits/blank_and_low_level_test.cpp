#include "loqsmith/limits/blank_and_low_level.hpp"

#include <string>

#include "limits/blank_and_low_example.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/limit_of_blank.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

/// Blanks of five preparations on a line of intercept 2 and slope 4; the low
/// samples at levels from `lowest` up in steps of `step`.
LimitEvidence example(double lowest, double step) {
  LimitEvidence evidence;
  int number = 0;
  for (std::size_t i = 0; i < kBlankSamples.size(); ++i)
    for (double blank : kBlankSamples[i])
      evidence.blanks.push_back({++number, BlankKind::Solvent,
                                 2.0 + 4.0 * blank, false,
                                 "P" + std::to_string(i)});
  for (std::size_t i = 0; i < kLowSamples.size(); ++i)
    for (const SpikeResult& spike :
         spikes_of(lowest + step * static_cast<double>(i), kLowSamples[i]))
      evidence.spikes.push_back(spike);
  evidence.calibration = known_line(2.0, 4.0);
  return evidence;
}

ProcedureSettings by_ranks() {
  ProcedureSettings settings;
  settings.ranks = true;
  return settings;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const ProcedureSettings& settings = {},
                             const LimitSettings& limits = {}) {
  return blank_and_low_level(evidence, limits, settings);
}

// CLSI EP17-A2 (2012), classical approach, formulas from memory; figures
// computed with another library.
TEST(LimitOfBlank, Moments) {
  EXPECT_TRUE(
      agrees_to_digits(corrected_normal_factor(0.95, 55.0), 1.65236437, 9));
  const std::vector<double> blanks = together(kBlankSamples);
  EXPECT_TRUE(agrees_to_digits(mean(blanks), 0.303, 8));
  EXPECT_TRUE(agrees_to_digits(standard_deviation(blanks), 0.11872629, 8));
  const double of_blank = limit_of_blank(blanks, 5, 0.05);
  EXPECT_TRUE(agrees_to_digits(of_blank, 0.49917909, 8));
  const PooledSpread low = pooled_spread(kLowSamples);
  EXPECT_EQ(low.degrees_of_freedom(), 55U);
  EXPECT_TRUE(agrees_to_digits(low.sd, 0.14226043, 8));
  EXPECT_TRUE(
      agrees_to_digits(limit_of_detection(of_blank, low, 0.05), 0.73424516, 8));
}

TEST(LimitOfBlank, Ranks) {
  const auto of_blank = limit_of_blank_by_rank(together(kBlankSamples), 0.05);
  ASSERT_TRUE(of_blank);
  EXPECT_TRUE(agrees_to_digits(*of_blank, 0.480000, 6));
  EXPECT_TRUE(agrees_to_digits(
      limit_of_detection(*of_blank, pooled_spread(kLowSamples), 0.05),
      0.71506607, 8));
}

// Rank 57.5 of 60: the mean of the 57th and the 58th.
TEST(LimitOfBlank, RanksBetweenTwoResults) {
  std::vector<double> blanks;
  for (int i = 60; i > 0; --i) blanks.push_back(i);
  EXPECT_TRUE(within_condition(*limit_of_blank_by_rank(blanks, 0.05), 57.5, 4));
  blanks.resize(10);  // 60 down to 51; rank 10
  EXPECT_TRUE(same_bits(*limit_of_blank_by_rank(blanks, 0.05), 60.0));
  blanks.resize(9);  // rank 9.05
  EXPECT_EQ(limit_of_blank_by_rank(blanks, 0.05).reason(),
            "few-blanks-for-ranks: the limit of blank has rank 9.05 of 9 "
            "blanks");
}

TEST(BlankAndLowLevel, ByMoments) {
  const auto found = limit(example(0.88, 0.01));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->critical_value, 0.49917909, 8));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.73424516, 8));
  EXPECT_EQ(found->n, 120U);
  EXPECT_EQ(found->degrees_of_freedom, 55.0);
  EXPECT_EQ(found->grade(), Grade::Valid);
  EXPECT_LT(*found->detection_lower, *found->detection);
  EXPECT_GT(*found->detection_upper, *found->detection);
}

// All low results at one level: their median is 0.86, none lies below 0.48.
TEST(BlankAndLowLevel, ByRanks) {
  const auto found = limit(example(0.9, 0.0), by_ranks());
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->critical_value, 0.480000, 6));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.86, 12));
  EXPECT_TRUE(same_bits(
      *term(*found, "part of its results below the limit of blank"), 0.0));
  EXPECT_FALSE(found->detection_lower);
}

TEST(BlankAndLowLevel, ByRanksTheLowestLevelThatIsHighEnough) {
  LimitEvidence evidence = example(0.9, 0.0);
  for (const SpikeResult& spike : spikes_of(0.5, {0.5, 0.47, 0.6, 0.55, 0.49}))
    evidence.spikes.push_back(spike);
  EXPECT_TRUE(
      agrees_to_digits(*limit(evidence, by_ranks())->detection, 0.86, 12));
  ProcedureSettings settings = by_ranks();
  settings.beta = 0.2;  // one of five
  EXPECT_TRUE(agrees_to_digits(*limit(evidence, settings)->detection, 0.5, 12));
  evidence.spikes = spikes_of(0.4, {0.4, 0.37, 0.45, 0.5});
  EXPECT_TRUE(contains(limit(evidence, by_ranks()).reason(), "levels-too-low"));
}

// Quantitation is that of low-level-precision, with its attributes where the
// method has it.
TEST(BlankAndLowLevel, Quantitation) {
  const auto alone = limit(example(0.9, 0.0));
  ASSERT_TRUE(alone && alone->quantitation);
  const double sd = standard_deviation(together(kLowSamples));
  EXPECT_TRUE(within_condition(*alone->quantitation, 10.0 * sd, 100));
  EXPECT_TRUE(agrees_to_digits(
      *alone->quantitation_upper / *alone->quantitation, 1.219662, 7));

  LimitSettings limits;
  limits.procedures = {procedure("low-level-precision")};
  limits.procedures[0].quantitation_factor = 6.0;
  EXPECT_TRUE(within_condition(
      *limit(example(0.9, 0.0), {}, limits)->quantitation, 6.0 * sd, 100));
}

// Levels more than 4 times above the lowest are no low samples any more.
TEST(BlankAndLowLevel, HighLevelsDoNotEnterThePooledSpread) {
  LimitEvidence evidence = example(0.9, 0.0);
  const double before = *limit(evidence)->detection;
  for (const SpikeResult& spike : spikes_of(3.7, {2, 3, 4, 5, 6, 7, 8}))
    evidence.spikes.push_back(spike);
  EXPECT_TRUE(same_bits(*limit(evidence)->detection, before));
  for (const SpikeResult& spike : spikes_of(3.5, {2, 3, 4, 5, 6, 7, 8}))
    evidence.spikes.push_back(spike);
  EXPECT_GT(*limit(evidence)->detection, 1.1 * before);
}

// The first of the five samples, stretched about 0.9.
TEST(BlankAndLowLevel, ALowSampleThatScattersMore) {
  struct Row {
    double stretch;
    std::optional<Grade> grade;
  };
  for (const Row& row : std::initializer_list<Row>{{1.0, std::nullopt},
                                                   {1.6, Grade::Caution},
                                                   {2.5, Grade::NotValid}}) {
    LimitEvidence evidence = example(0.88, 0.01);
    for (std::size_t i = 0; i < 12; ++i) {
      double& found = evidence.spikes[i].found_vial;
      found = 0.9 + row.stretch * (found - 0.9);
    }
    const auto found = limit(evidence);
    ASSERT_TRUE(found);
    const LimitFinding* one = finding(*found, "spread-differs");
    ASSERT_EQ(one != nullptr, row.grade.has_value()) << row.stretch;
    if (one == nullptr) continue;
    EXPECT_EQ(one->grade, *row.grade) << one->text;
  }
}

TEST(BlankAndLowLevel, FewResults) {
  struct Row {
    std::size_t blanks, low;
    std::optional<Grade> grade;
  };
  for (const Row& row : std::initializer_list<Row>{{60, 60, std::nullopt},
                                                   {59, 60, Grade::Caution},
                                                   {60, 59, Grade::Caution},
                                                   {20, 60, Grade::Caution},
                                                   {19, 60, Grade::NotValid},
                                                   {60, 19, Grade::NotValid}}) {
    LimitEvidence evidence = example(0.9, 0.0);
    evidence.blanks.resize(row.blanks);
    evidence.spikes.resize(row.low);
    const auto found = limit(evidence);
    ASSERT_TRUE(found);
    const LimitFinding* one = finding(*found, "few-results");
    ASSERT_EQ(one != nullptr, row.grade.has_value()) << row.blanks << row.low;
    if (one == nullptr) continue;
    EXPECT_EQ(one->grade, *row.grade) << one->text;
  }
}

TEST(BlankAndLowLevel, BlankSamples) {
  LimitEvidence evidence = example(0.9, 0.0);
  EXPECT_EQ(term(*limit(evidence), "blank samples"), 5.0);
  for (BlankResponse& blank : evidence.blanks) blank.prep.clear();
  EXPECT_EQ(term(*limit(evidence), "blank samples"), 1.0);
  for (BlankResponse& blank : evidence.blanks)
    blank.prep = std::to_string(blank.injection);
  EXPECT_EQ(term(*limit(evidence), "blank samples"), 1.0);
  evidence.blanks[0].prep = evidence.blanks[1].prep;
  EXPECT_EQ(term(*limit(evidence), "blank samples"), 2.0);
}

TEST(BlankAndLowLevel, NotApplicable) {
  LimitEvidence evidence = example(0.9, 0.0);
  evidence.blanks.clear();
  EXPECT_TRUE(contains(limit(evidence).reason(), "few-blanks: 0"));
  evidence = example(0.9, 0.0);
  evidence.spikes.clear();
  EXPECT_EQ(limit(evidence).reason(), "few-spikes: no level with 3 low spikes");
  evidence.spikes = spikes_of(0.9, {0.9, 0.9, 0.9, 0.9});
  EXPECT_TRUE(contains(limit(evidence).reason(), "spikes-all-equal"));
  evidence = example(0.9, 0.0);
  evidence.calibration->intercept = 6.0;  // all blanks a unit lower
  EXPECT_TRUE(contains(limit(evidence).reason(), "limit-not-positive"));
  EXPECT_TRUE(
      contains(limit(evidence, by_ranks()).reason(), "limit-not-positive"));
  evidence = example(0.9, 0.0);
  evidence.blanks.resize(9);
  EXPECT_TRUE(
      contains(limit(evidence, by_ranks()).reason(), "few-blanks-for-ranks"));
  evidence.calibration->slope = 0.0;
  EXPECT_TRUE(contains(limit(evidence).reason(), "slope-not-positive"));
  evidence.calibration.reset();
  EXPECT_TRUE(contains(limit(evidence).reason(), "no-calibration"));
}

}  // namespace
}  // namespace loqsmith::test
