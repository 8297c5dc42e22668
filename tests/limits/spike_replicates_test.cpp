#include "loqsmith/limits/spike_replicates.hpp"

#include "limits/evidence_builders.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

const std::vector<double> kSpikes = {1.9, 2.1, 1.7, 2.3, 2.0, 1.8, 2.2};
const std::vector<double> kBlanks = {0.12, 0.05, 0.21, 0.09,
                                     0.15, 0.02, 0.11, 0.18};

/// Blanks in concentration; the line has intercept 3 and slope 2.
LimitEvidence night(const std::vector<double>& spikes,
                    const std::vector<double>& blanks, double nominal = 2.0) {
  LimitEvidence evidence;
  std::vector<double> responses;
  for (double blank : blanks) responses.push_back(3.0 + 2.0 * blank);
  evidence.blanks = blanks_of(responses, BlankKind::Method);
  evidence.spikes = spikes_of(nominal, spikes);
  evidence.calibration = known_line(3.0, 2.0);
  return evidence;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const ProcedureSettings& settings = {}) {
  return spike_replicates(evidence, {}, settings);
}

// US EPA 40 CFR 136 Appendix B, Revision 2 (2016), II 2, rules from memory;
// figures computed with another library.
TEST(SpikeReplicates, TheSpikesDecide) {
  const auto found = limit(night(kSpikes, kBlanks));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of the spikes"), 0.2160246899, 10));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.6788939674, 10));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 2.160246899, 10));
  EXPECT_TRUE(
      agrees_to_digits(*term(*found, "limit of the blanks"), 0.30716461, 8));
  EXPECT_FALSE(found->critical_value);
  EXPECT_EQ(found->degrees_of_freedom, 6.0);
  EXPECT_EQ(found->n, 15U);
}

// Revision 1.11 prints 0.64 and 2.20 for 7 spikes (from memory).
TEST(SpikeReplicates, BoundsAreTheSpreads) {
  const auto found = limit(night(kSpikes, kBlanks));
  ASSERT_TRUE(found);
  const double lower = *found->detection_lower / *found->detection;
  const double upper = *found->detection_upper / *found->detection;
  EXPECT_TRUE(agrees_to_digits(lower, 0.64, 2));
  EXPECT_TRUE(agrees_to_digits(upper, 2.20, 3));
  EXPECT_TRUE(agrees_to_digits(lower, 0.644393, 6));
  EXPECT_TRUE(agrees_to_digits(upper, 2.202066, 7));
  EXPECT_TRUE(agrees_to_digits(
      *found->quantitation_lower / *found->quantitation, 0.644393, 6));
}

TEST(SpikeReplicates, TheBlanksDecide) {
  const auto found =
      limit(night(kSpikes, {0.62, 0.55, 0.71, 0.59, 0.65, 0.52, 0.61, 0.68}));
  ASSERT_TRUE(found);
  // The same spread, half a unit higher.
  EXPECT_TRUE(agrees_to_digits(*found->detection, 0.80716461, 8));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 2.160246899, 10));
  // Not the bounds of the spikes, nor those of the blanks' spread alone.
  EXPECT_LT(*found->detection_lower, 0.95 * *found->detection);
  EXPECT_GT(*found->detection_lower, *found->detection * 0.661174);
  EXPECT_LT(*found->detection_upper, *found->detection * 2.035272);
  EXPECT_GT(*found->detection_upper, 1.2 * *found->detection);
  EXPECT_TRUE(agrees_to_digits(
      *found->quantitation_upper / *found->quantitation, 2.202066, 7));
  EXPECT_EQ(found->degrees_of_freedom, 7.0);
  EXPECT_TRUE(finding(*found, "blanks-decide"));
  EXPECT_FALSE(finding(*found, "bounds-approximate"));
  // About a mean that may be zero the bounds are not quite 95 %.
  const auto near_zero =
      limit(night({1.99, 2.01, 2.0, 2.02, 1.98, 2.0, 2.01},
                  {0.12, -0.15, 0.01, -0.09, 0.15, 0.02, -0.11, 0.08}));
  EXPECT_TRUE(finding(*near_zero, "bounds-approximate"));
}

TEST(SpikeReplicates, OneNightIsAlwaysACaution) {
  const auto found = limit(night(kSpikes, kBlanks));
  ASSERT_TRUE(found);
  ASSERT_TRUE(finding(*found, "one-night"));
  EXPECT_TRUE(contains(finding(*found, "one-night")->text, "7 preparations"));
  EXPECT_EQ(found->grade(), Grade::Caution);
  EXPECT_EQ(found->findings.size(), 1U);
}

TEST(SpikeReplicates, SpikeLevelAgainstTheRule) {
  struct Row {
    double ratio;
    std::optional<Grade> grade;
  };
  for (const Row& row : std::initializer_list<Row>{{0.99, Grade::NotValid},
                                                   {1.01, Grade::Caution},
                                                   {1.99, Grade::Caution},
                                                   {2.01, std::nullopt},
                                                   {9.99, std::nullopt},
                                                   {10.01, Grade::Caution}}) {
    const auto found = limit(night(kSpikes, kBlanks, row.ratio * 0.6788939674));
    ASSERT_TRUE(found);
    const LimitFinding* one = finding(*found, "spike-level");
    ASSERT_EQ(one != nullptr, row.grade.has_value()) << row.ratio;
    if (one == nullptr) continue;
    EXPECT_EQ(one->grade, *row.grade) << row.ratio;
  }
  ProcedureSettings wide;
  wide.spike_ratio_high = 20.0;
  EXPECT_FALSE(finding(*limit(night(kSpikes, kBlanks, 12 * 0.6788939674), wide),
                       "spike-level"));
}

TEST(SpikeReplicates, FewOrUnseenSpikesAreNotValid) {
  auto evidence = night({1.9, 2.1, 1.7, 2.3, 2.0, 1.8}, kBlanks);
  EXPECT_TRUE(finding(*limit(evidence), "few-spikes"));
  EXPECT_EQ(limit(evidence)->grade(), Grade::NotValid);

  evidence = night(kSpikes, kBlanks);
  evidence.spikes[3].identified = false;
  ASSERT_TRUE(finding(*limit(evidence), "spike-not-seen"));
  EXPECT_TRUE(contains(finding(*limit(evidence), "spike-not-seen")->text,
                       "1 of 7 low spikes"));
  EXPECT_EQ(limit(evidence)->grade(), Grade::NotValid);
}

TEST(SpikeReplicates, NotApplicable) {
  LimitEvidence evidence = night(kSpikes, kBlanks);
  evidence.spikes.clear();
  EXPECT_EQ(limit(evidence).reason(),
            "few-spikes: 0 low spikes of one level, at least 3 are needed");
  evidence = night({2.0, 2.0, 2.0, 2.0, 2.0, 2.0, 2.0}, kBlanks);
  EXPECT_TRUE(contains(limit(evidence).reason(), "spikes-all-equal: 7"));
  evidence = night(kSpikes, kBlanks);
  evidence.spikes.resize(2);
  EXPECT_TRUE(contains(limit(evidence).reason(), "few-spikes: 2"));

  evidence = night(kSpikes, {});
  EXPECT_EQ(limit(evidence).reason(),
            "few-blanks: 0 method blanks, at least 3 are needed");
  evidence = night(kSpikes, {0.1, 0.1, 0.1, 0.1, 0.1, 0.1, 0.1});
  EXPECT_TRUE(contains(limit(evidence).reason(), "blanks-all-equal"));

  evidence = night(kSpikes, kBlanks);
  evidence.calibration->slope = 0.0;
  EXPECT_TRUE(contains(limit(evidence).reason(), "slope-not-positive"));
  evidence.calibration->slope = -2.0;
  EXPECT_TRUE(contains(limit(evidence).reason(), "slope-not-positive"));
  evidence.calibration.reset();
  EXPECT_TRUE(contains(limit(evidence).reason(), "no-calibration"));
}

// Method blanks unless the method names others.
TEST(SpikeReplicates, KindOfBlanks) {
  LimitEvidence evidence = night(kSpikes, kBlanks);
  for (BlankResponse blank : blanks_of({3.9, 4.5, 4.0, 4.2, 4.1, 4.4, 4.3}))
    evidence.blanks.push_back(blank);
  EXPECT_EQ(limit(evidence)->n, 15U);
  ProcedureSettings all;
  all.blanks = BlankKind::All;
  EXPECT_EQ(limit(evidence, all)->n, 22U);
}

// Spikes that were made up to other volumes stay one level: the spread is
// that of the sample, divided back.
TEST(SpikeReplicates, SpreadInTheSampleDividedBackToTheVial) {
  LimitEvidence evidence = night(kSpikes, kBlanks, 2.0);
  for (std::size_t i = 0; i < evidence.spikes.size(); ++i) {
    SpikeResult& spike = evidence.spikes[i];
    spike.sample_factor = i % 2 == 0 ? 0.25 : 0.5;
    // The sample holds what it held; the vial holds factor times less.
    spike.found_vial = kSpikes[i] / spike.sample_factor;
    spike.nominal_vial = 2.0 / spike.sample_factor;
  }
  const auto found = limit(evidence);
  ASSERT_TRUE(found);
  const double mean_factor = (4 * 0.25 + 3 * 0.5) / 7.0;
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of the spikes") * mean_factor,
      0.2160246899, 10));
  EXPECT_TRUE(
      within_condition(*term(*found, "spike level"), 2.0 / mean_factor, 10));
}

// The lowest level with 7 spikes, whatever else was added.
TEST(SpikeReplicates, OfSeveralLevelsTheLowestThatSuffices) {
  LimitEvidence evidence = night({20, 21, 22, 23, 20, 21, 22, 24}, kBlanks, 20);
  for (const SpikeResult& one : spikes_of(2.0, kSpikes))
    evidence.spikes.push_back(one);
  for (const SpikeResult& one : spikes_of(0.2, {0.1, 0.3, 0.2}))
    evidence.spikes.push_back(one);
  EXPECT_TRUE(agrees_to_digits(*limit(evidence)->detection, 0.6788939674, 10));
}

}  // namespace
}  // namespace loqsmith::test
