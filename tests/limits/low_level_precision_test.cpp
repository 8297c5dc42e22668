#include "loqsmith/limits/low_level_precision.hpp"

#include "limits/evidence_builders.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Harris, Quantitative Chemical Analysis, detection-limit example (from
// memory): signals in nA, slope 0.229 nA/uM.
const std::vector<double> kBlanks = {1.4, 2.2, 1.7, 0.9, 0.4, 1.5, 0.7};
const double kSlope = 0.229;

LimitEvidence blanks_night() {
  return evidence_of(kBlanks, known_line(1.25, kSlope, 20.0));
}

ProcedureSettings averaging(int replicates, int blank_replicates) {
  ProcedureSettings settings;
  settings.replicates = replicates;
  settings.blank_replicates = blank_replicates;
  return settings;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const ProcedureSettings& settings = {},
                             const LimitSettings& limits = {}) {
  return low_level_precision(evidence, limits, settings);
}

// Rules of Eurachem, Fitness for Purpose (2014) 6.2, from memory; figures
// computed with another library.
TEST(LowLevelPrecision, TwoResultsAveraged) {
  const auto found = limit(blanks_night(), averaging(2, 0));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of single results"), 2.7254079733, 11));
  EXPECT_TRUE(
      agrees_to_digits(*term(*found, "standard deviation of what is reported"),
                       1.9271544594, 11));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 5.7814633782, 11));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 19.271544594, 11));
  EXPECT_EQ(found->degrees_of_freedom, 6.0);
  EXPECT_EQ(found->n, 7U);
}

TEST(LowLevelPrecision, CorrectedByOneBlank) {
  const auto found = limit(blanks_night(), averaging(2, 1));
  ASSERT_TRUE(found);
  EXPECT_TRUE(
      agrees_to_digits(*term(*found, "standard deviation of what is reported"),
                       3.3379294377, 11));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 10.0137883132, 12));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 33.3792943772, 12));
  EXPECT_TRUE(agrees_to_digits(*found->detection_upper / *found->detection,
                               2.202066, 7));
}

TEST(LowLevelPrecision, OtherQuantitationFactors) {
  ProcedureSettings settings;
  settings.quantitation_factor = 6.0;
  EXPECT_TRUE(agrees_to_digits(*limit(blanks_night(), settings)->quantitation,
                               6 * 2.7254079733, 10));
}

LimitEvidence spikes_night(const std::vector<double>& found, double nominal) {
  LimitEvidence evidence = blanks_night();
  evidence.spikes = spikes_of(nominal, found);
  return evidence;
}

// s 0.2160246899, detection 0.648074.
const std::vector<double> kSpikes = {1.9, 2.1, 1.7, 2.3, 2.0, 1.8, 2.2};

TEST(LowLevelPrecision, SpikesGoBeforeBlanksWhereSixAreThere) {
  const auto found = limit(spikes_night(kSpikes, 2.0));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->detection, 3 * 0.2160246899, 9));
  EXPECT_EQ(found->grade(), Grade::Note);  // 10 or more are advised

  const auto five = limit(spikes_night({1.9, 2.1, 1.7, 2.3, 2.0}, 2.0));
  ASSERT_TRUE(five);
  EXPECT_EQ(five->n, 7U);  // the blanks

  ProcedureSettings named;
  named.blanks = BlankKind::Solvent;
  EXPECT_TRUE(agrees_to_digits(
      *limit(spikes_night(kSpikes, 2.0), named)->detection, 8.1762239198, 11));
}

TEST(LowLevelPrecision, SpikesFarAboveTheLimit) {
  EXPECT_FALSE(finding(*limit(spikes_night(kSpikes, 6.4)), "spike-level"));
  const auto found = limit(spikes_night(kSpikes, 6.6));
  ASSERT_TRUE(finding(*found, "spike-level"));
  EXPECT_EQ(found->grade(), Grade::Caution);
  EXPECT_TRUE(contains(finding(*found, "spike-level")->text,
                       "it should be at most 10 times it"));
}

TEST(LowLevelPrecision, FewResults) {
  const auto seven = limit(blanks_night());
  ASSERT_TRUE(finding(*seven, "few-results"));
  EXPECT_EQ(finding(*seven, "few-results")->grade, Grade::Note);

  LimitSettings limits;
  limits.minimum_blanks = 3;
  const auto five = limit(
      evidence_of({1.4, 2.2, 1.7, 0.9, 0.4}, known_line(1.25, kSlope, 20.0)),
      {}, limits);
  ASSERT_TRUE(five);
  EXPECT_EQ(finding(*five, "few-results")->grade, Grade::NotValid);

  LimitEvidence spikes = spikes_night({1.9, 2.1, 1.7}, 2.0);
  spikes.blanks.clear();
  ASSERT_TRUE(limit(spikes));
  EXPECT_EQ(limit(spikes)->grade(), Grade::NotValid);
}

// A mean that differs from the intercept matters only to single results that
// are not corrected by blanks.
TEST(LowLevelPrecision, BlanksThatDifferFromTheIntercept) {
  const LimitEvidence evidence =
      evidence_of(kBlanks, known_line(0.0, kSlope, 20.0));
  EXPECT_TRUE(finding(*limit(evidence), "blank-differs-from-intercept"));
  EXPECT_FALSE(finding(*limit(evidence, averaging(1, 1)),
                       "blank-differs-from-intercept"));
}

TEST(LowLevelPrecision, BiasedBaselineNeedsACorrection) {
  LimitEvidence evidence = blanks_night();
  evidence.baseline_biased = true;
  EXPECT_TRUE(finding(*limit(evidence), "baseline-biases-blanks"));
  EXPECT_FALSE(
      finding(*limit(evidence, averaging(1, 1)), "baseline-biases-blanks"));
}

TEST(LowLevelPrecision, NotApplicable) {
  LimitEvidence evidence = blanks_night();
  evidence.blanks.clear();
  EXPECT_EQ(limit(evidence).reason(),
            "few-spikes: 0 low spikes of one level, at least 3 are needed; "
            "few-blanks: 0 solvent blanks, at least 3 are needed");
  evidence = evidence_of({1, 1, 1, 1, 1, 1, 1}, known_line(1.25, kSlope));
  EXPECT_TRUE(contains(limit(evidence).reason(), "blanks-all-equal"));
  evidence.blanks.clear();
  evidence.spikes = spikes_of(2.0, {2, 2, 2, 2, 2, 2, 2});
  EXPECT_TRUE(contains(limit(evidence).reason(), "spikes-all-equal"));
  evidence = blanks_night();
  evidence.calibration->slope = -0.2;
  EXPECT_TRUE(contains(limit(evidence).reason(), "slope-not-positive"));
  evidence.calibration.reset();
  EXPECT_TRUE(contains(limit(evidence).reason(), "no-calibration"));
}

}  // namespace
}  // namespace loqsmith::test
