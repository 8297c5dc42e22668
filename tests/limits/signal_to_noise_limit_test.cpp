#include "loqsmith/limits/signal_to_noise_limit.hpp"

#include "limits/evidence_builders.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

using Measure = NoiseMeasure;

LimitEvidence heights(const std::vector<std::pair<double, double>>& pairs,
                      double noise, Measure measure = Measure::HalfPeakToPeak) {
  LimitEvidence evidence;
  evidence.noise = noise;
  evidence.noise_measure = measure;
  for (const auto& [concentration, height] : pairs)
    evidence.heights.push_back(
        {static_cast<int>(evidence.heights.size()) + 1, concentration, height});
  return evidence;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence) {
  return signal_to_noise_limit(evidence, {}, {});
}

// Ph. Eur. 2.2.46: H 50 and h 4 are S/N 25, so a standard at 1.0 has its
// limits at 3/25 and 10/25.
TEST(SignalToNoiseLimit, OneStandardByProportion) {
  const auto found = limit(heights({{1.0, 50.0}}, 4.0));
  ASSERT_TRUE(found);
  EXPECT_TRUE(within_condition(*found->detection, 0.12, 4));
  EXPECT_TRUE(within_condition(*found->quantitation, 0.40, 4));
  EXPECT_EQ(found->n, 1U);
  EXPECT_TRUE(finding(*found, "line-through-zero"));
  ASSERT_TRUE(finding(*found, "height-over-noise"));
  EXPECT_TRUE(contains(finding(*found, "height-over-noise")->text,
                       "H/h is 1.5 at the detection and 5 at the"));
  EXPECT_EQ(found->grade(), Grade::Note);
}

// Plain H/h asks for twice the height; so does H/sd for that figure.
TEST(SignalToNoiseLimit, OtherMeasures) {
  for (Measure measure : {Measure::PeakToPeak, Measure::StandardDeviation}) {
    const auto found = limit(heights({{1.0, 50.0}}, 4.0, measure));
    ASSERT_TRUE(found);
    EXPECT_TRUE(within_condition(*found->detection, 0.24, 4));
    EXPECT_TRUE(within_condition(*found->quantitation, 0.80, 4));
    EXPECT_FALSE(finding(*found, "height-over-noise"));
  }
}

// Heights 2 + 10 x exactly: (T h / 2 - 2) / 10 with h 4 is 0.4 and 1.8.
TEST(SignalToNoiseLimit, LineWithIntercept) {
  const auto found = limit(heights({{1, 12}, {2, 22}, {5, 52}, {5, 52}}, 4.0));
  ASSERT_TRUE(found);
  EXPECT_TRUE(within_condition(*found->detection, 0.4, 100));
  EXPECT_TRUE(within_condition(*found->quantitation, 1.8, 100));
  EXPECT_EQ(found->n, 4U);
  EXPECT_FALSE(finding(*found, "line-through-zero"));
  EXPECT_TRUE(
      within_condition((3.0 / 2.0 * *term(*found, "noise h, peak to peak") -
                        *term(*found, "intercept of the heights")) /
                           *term(*found, "slope of the heights"),
                       *found->detection, 4));
}

TEST(SignalToNoiseLimit, OnlyStandardsUpToTenTimesTheLowest) {
  const auto found = limit(
      heights({{0.1, 3}, {0.3, 5}, {1.0, 12}, {1.1, 500}, {100, 9}}, 4.0));
  ASSERT_TRUE(found);
  EXPECT_EQ(found->n, 3U);
  EXPECT_TRUE(within_condition(*found->detection, 0.4, 100));
}

TEST(SignalToNoiseLimit, NotApplicable) {
  LimitEvidence evidence = heights({{1, 12}, {2, 22}, {5, 52}}, 4.0);
  evidence.noise.reset();
  EXPECT_TRUE(contains(limit(evidence).reason(), "no-noise: "));
  evidence.noise = 0.0;
  EXPECT_TRUE(contains(limit(evidence).reason(), "noise-zero: "));
  EXPECT_TRUE(contains(limit(heights({}, 4.0)).reason(), "no-found-peak: "));
  EXPECT_TRUE(contains(limit(heights({{1, 9}, {2, 8}, {3, 7}}, 4.0)).reason(),
                       "slope-not-positive: "));
  // An intercept of 12 is already above a ratio of 3.
  EXPECT_TRUE(
      contains(limit(heights({{1, 22}, {2, 32}, {5, 62}}, 4.0)).reason(),
               "limit-not-positive: "));
}

TEST(SignalToNoiseLimit, FarBelowTheLowestStandard) {
  const auto found = limit(heights({{10, 2000}, {20, 4000}, {50, 10000}}, 4.0));
  ASSERT_TRUE(found);
  EXPECT_TRUE(finding(*found, "far-below-standards"));
  EXPECT_EQ(found->grade(), Grade::Caution);
}

}  // namespace
}  // namespace loqsmith::test
