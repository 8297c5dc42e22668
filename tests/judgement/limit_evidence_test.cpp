#include "loqsmith/judgement/limit_evidence.hpp"

#include "judgement/night_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::line;
using test::NightBuilder;
using test::NightRow;
using test::same_bits;

LimitEvidence evidence_of(NightBuilder& night) {
  return gather_limit_evidence(night.collect(), line(2.0, 1.0, 100.0));
}

TEST(LimitEvidence, BlanksByKindSignedAndInRunOrder) {
  NightBuilder night;
  night.add(Role::SolventBlank, -0.3, false);
  night.add(Role::MethodBlank, 0.2, false).injection.prep = "P1";
  night.standard(0.0);
  night.add(Role::SolventBlank, 0.1, false).peak = NotApplicable{"no-signal"};
  night.add(Role::Sample, 1.0);
  const LimitEvidence evidence = evidence_of(night);
  ASSERT_EQ(evidence.blanks.size(), 3U);
  EXPECT_EQ(evidence.blanks[0].kind, BlankKind::Solvent);
  EXPECT_TRUE(same_bits(evidence.blanks[0].response, -0.3));
  EXPECT_EQ(evidence.blanks[1].kind, BlankKind::Method);
  EXPECT_EQ(evidence.blanks[1].prep, "P1");
  EXPECT_EQ(evidence.blanks[2].kind, BlankKind::ZeroStandard);
  EXPECT_EQ(evidence.blanks[2].injection, 3);
}

TEST(LimitEvidence, PredictedNoiseOfBlanksInTheirResponsesUnit) {
  NightBuilder night;
  night.add(Role::SolventBlank, 0.3, false).peak.value().response_noise = 0.5;
  night.add(Role::MethodBlank, 0.2, false).peak.value().response_noise = 0.25;
  night.add(Role::SolventBlank, 0.1, false).peak.value().response_noise_absent =
      "noise-trace-short: 41 widths";
  night.add(Role::Sample, 1.0).peak.value().response_noise = 7.0;
  const LimitEvidence evidence = evidence_of(night);
  ASSERT_EQ(evidence.predicted_noise.size(), 2U);
  EXPECT_EQ(evidence.predicted_noise[0].injection, 1);
  EXPECT_EQ(evidence.predicted_noise[0].kind, BlankKind::Solvent);
  EXPECT_TRUE(same_bits(evidence.predicted_noise[0].sd, 0.5));
  EXPECT_EQ(evidence.predicted_noise[1].kind, BlankKind::Method);
  EXPECT_TRUE(same_bits(evidence.predicted_noise[1].sd, 0.25));
  EXPECT_EQ(evidence.predicted_noise_absent, "noise-trace-short: 41 widths");
}

// Divided as the response itself: by the blank's own internal standard, and
// where it has none by the standards' mean.
TEST(LimitEvidence, PredictedNoiseIsDividedByTheInternalStandard) {
  NightBuilder night;
  night.settings.internal_standard = "neutral";
  const auto internal_standard = [](NightRow& row, double area, bool found) {
    row.internal_standard = test::peak_of(area, found);
  };
  internal_standard(night.standard(10.0), 40.0, true);
  internal_standard(night.standard(20.0), 60.0, true);
  NightRow& with = night.add(Role::MethodBlank, 0.3, false);
  with.peak.value().response_noise = 0.5;
  internal_standard(with, 25.0, true);
  NightRow& without = night.add(Role::SolventBlank, 0.3, false);
  without.peak.value().response_noise = 0.5;
  internal_standard(without, 0.1, false);
  const LimitEvidence evidence = evidence_of(night);
  ASSERT_EQ(evidence.predicted_noise.size(), 2U);
  EXPECT_TRUE(same_bits(evidence.predicted_noise[0].sd, 0.02));
  EXPECT_TRUE(same_bits(evidence.predicted_noise[1].sd, 0.01));
}

// Half the range is 50; the detector gives 2 a unit.
TEST(LimitEvidence, AfterHighGoesByTheInjectionRightBefore) {
  NightBuilder night;
  night.add(Role::SolventBlank, 0.0);  // nothing before it
  night.add(Role::Sample, 100.0);      // exactly half: not above
  night.add(Role::SolventBlank, 0.0);
  night.add(Role::Sample, 100.1);
  night.add(Role::SolventBlank, 0.0);  // after high
  night.add(Role::SolventBlank, 0.0);  // a blank stands between
  night.add(Role::Sample, 150.0);
  night.add(Role::Conditioning, 0.0);
  night.add(Role::SolventBlank, 0.0);  // conditioning stands between
  // A standard whose file could not be read still carried its amount.
  night.add_level(Role::Standard, 100.0, 0.0).peak =
      NotApplicable{"file-refused: cut off"};
  night.add(Role::SolventBlank, 0.0);  // after high
  // The amount of a control is not one in the vial: its response decides.
  night.add_level(Role::Control, 100.0, 10.0);
  night.add(Role::SolventBlank, 0.0);
  std::string after_high;
  for (const BlankResponse& blank : evidence_of(night).blanks) {
    after_high += blank.after_high ? 'H' : '.';
  }
  EXPECT_EQ(after_high, "..H..H.");
}

TEST(LimitEvidence, SpikesAreDividedBackToTheVial) {
  NightBuilder night;
  auto& spike = night.add_level(Role::LowSpike, 40.0, 3.0);
  spike.injection.dilution = 2.0;
  spike.injection.final_volume = 10.0;
  spike.injection.sample_amount = 0.5;
  night.add_level(Role::LowSpike, 40.0, -0.2, false);
  night.add(Role::LowSpike, 3.0).injection.level = "without the analyte";
  const LimitEvidence evidence = evidence_of(night);
  ASSERT_EQ(evidence.spikes.size(), 2U);
  EXPECT_TRUE(same_bits(evidence.spikes[0].nominal_vial, 1.0));
  EXPECT_TRUE(same_bits(evidence.spikes[0].found_vial, 1.5));
  EXPECT_TRUE(same_bits(evidence.spikes[0].sample_factor, 40.0));
  EXPECT_TRUE(evidence.spikes[0].identified);
  EXPECT_FALSE(evidence.spikes[1].identified);
  // Below zero it stays what it is.
  EXPECT_TRUE(agrees_to_digits(evidence.spikes[1].found_vial, -0.1, 14));
}

// Means over the blanks; peaks of samples say nothing of blanks.
TEST(LimitEvidence, BiasOfAnEstimatedBaseline) {
  NightBuilder night;
  night.standard(1.0);
  for (int i = 0; i < 3; ++i) night.add(Role::SolventBlank, 0.0);
  night.settings.baseline_biased = true;
  EXPECT_FALSE(evidence_of(night).predicted_bias);
  night.rows[0].peak.value().baseline_bias = BaselineBias{9, 9, 9, 9, 9};
  night.rows[1].peak.value().baseline_bias = BaselineBias{3, 1, 2, -1, 3};
  night.rows[2].peak.value().baseline_bias = BaselineBias{5, 3, 2, -3, 5};
  const auto bias = evidence_of(night).predicted_bias;
  ASSERT_TRUE(bias);
  EXPECT_TRUE(same_bits(bias->blank, 4.0));
  EXPECT_TRUE(same_bits(bias->blank_error, 2.0));
  EXPECT_TRUE(same_bits(bias->low_peak, -2.0));
  EXPECT_TRUE(same_bits(bias->spread_ratio, 2.0));
}

TEST(LimitEvidence, HeightsAndNoiseOfTheLowStandards) {
  NightBuilder night;
  for (const double x : {0.0, 0.5, 1.0, 2.0, 10.0, 10.1}) night.standard(x);
  night.rows[0].peak.value().found = true;
  night.rows[1].peak.value().found = false;
  night.rows[2].peak.value().noise = 3.0;
  night.rows[3].peak.value().noise = 5.0;
  night.rows[4].peak.value().noise = 4.0;
  night.rows[5].peak.value().noise = 100.0;  // beyond 10 times the lowest
  LimitEvidence evidence = evidence_of(night);
  ASSERT_EQ(evidence.heights.size(), 4U);
  EXPECT_TRUE(same_bits(evidence.heights[0].concentration, 1.0));
  EXPECT_TRUE(same_bits(evidence.heights[0].height, 20.0));
  EXPECT_TRUE(same_bits(*evidence.noise, 4.0));
  night.rows[4].peak.value().reasons = {"saturated"};
  evidence = evidence_of(night);
  EXPECT_EQ(evidence.heights.size(), 3U);
  EXPECT_TRUE(same_bits(*evidence.noise, 4.0));  // mean of 3 and 5
  for (NightRow& row : night.rows) row.peak.value().noise.reset();
  EXPECT_FALSE(evidence_of(night).noise.has_value());
}

TEST(LimitEvidence, SettingsThatBiasBlanksAreHandedOn) {
  NightBuilder night;
  night.standard(1.0);
  EXPECT_FALSE(evidence_of(night).bounds_own);
  EXPECT_FALSE(evidence_of(night).baseline_biased);
  night.settings.bounds_own = true;
  night.settings.baseline_biased = true;
  EXPECT_TRUE(evidence_of(night).bounds_own);
  EXPECT_TRUE(evidence_of(night).baseline_biased);
}

TEST(LimitEvidence, BlanksWithoutInternalStandardAreNoted) {
  NightBuilder night;
  night.settings.internal_standard = "is1";
  night.standard(1.0).internal_standard = test::peak_of(100.0);
  night.add(Role::SolventBlank, 0.1).internal_standard =
      test::peak_of(0.0, false);
  LimitsOfAnalyte limits;
  limits.rows = {{"blank-deviation", LimitEstimate{}, true, true},
                 {"signal-to-noise", LimitEstimate{}, false, false},
                 {"blank-deviation", NotApplicable{"few"}, false, false}};
  note_mean_internal_standard(night.collect(), limits);
  ASSERT_EQ(limits.rows[0].estimate->findings.size(), 1U);
  EXPECT_EQ(limits.rows[0].estimate->findings[0].word,
            "mean-internal-standard");
  EXPECT_TRUE(limits.rows[1].estimate->findings.empty());
}

}  // namespace
}  // namespace loqsmith
