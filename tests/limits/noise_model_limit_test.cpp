#include "loqsmith/limits/noise_model_limit.hpp"

#include <cmath>

#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

ProcedureSettings noise_model() {
  return with_factors(procedure("noise-model"), 3.29, 10.0);
}

LimitEvidence predicting(const std::vector<double>& deviations,
                         BlankKind kind = BlankKind::Solvent) {
  LimitEvidence evidence = evidence_of(
      std::vector<double>(deviations.size(), 0.1), known_line(0.0, 2.0, 5.0));
  for (BlankResponse& blank : evidence.blanks) blank.kind = kind;
  for (const double sd : deviations) {
    const int number = static_cast<int>(evidence.predicted_noise.size()) + 1;
    evidence.predicted_noise.push_back({number, kind, sd});
  }
  return evidence;
}

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const LimitSettings& settings = {}) {
  return noise_model_limit(evidence, settings, noise_model());
}

std::string refusal(const LimitEvidence& evidence,
                    const LimitSettings& settings = {}) {
  const auto found = limit(evidence, settings);
  return found ? "" : found.reason().substr(0, found.reason().find(':'));
}

// Window of 21 points less the mean of 20 others, independent noise of 1:
// sqrt(21 + 21^2/20) = 6.561249881 (propagation of variances, as in ISO
// 11843-7). A single blank is enough.
TEST(NoiseModelLimit, OneBlankOfIndependentNoise) {
  const auto found = limit(predicting({std::sqrt(21.0 + 21.0 * 21.0 / 20.0)}));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "predicted response noise (root mean square)"), 6.561249881,
      10));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 3.29 * 3.2806249405, 10));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 32.806249405, 10));
  EXPECT_EQ(found->n, 1U);
  EXPECT_FALSE(found->detection_lower);
  EXPECT_FALSE(found->degrees_of_freedom);
  EXPECT_FALSE(found->critical_value);
}

TEST(NoiseModelLimit, SaysThatItIsNoMethodLimit) {
  const auto found = limit(predicting({1.0}));
  ASSERT_TRUE(found);
  ASSERT_NE(finding(*found, "instrument-noise-only"), nullptr);
  EXPECT_EQ(found->grade(), Grade::Caution);
  EXPECT_EQ(finding(*found, "far-below-standards"), nullptr);
  // 10 sd / b = 0.49, the lowest standard at 5.
  EXPECT_NE(finding(*limit(predicting({0.098})), "far-below-standards"),
            nullptr);
}

TEST(NoiseModelLimit, RootMeanSquareOfTheBlanksOfTheKind) {
  LimitEvidence evidence = predicting({3.0, 4.0});
  evidence.predicted_noise.push_back({3, BlankKind::Method, 30.0});
  const auto solvent = limit(evidence);
  ASSERT_TRUE(solvent);
  EXPECT_TRUE(
      within_condition(*solvent->quantitation, 5.0 * std::sqrt(12.5), 10.0));
  EXPECT_EQ(solvent->n, 2U);
  LimitSettings all;
  all.blanks = BlankKind::All;
  EXPECT_TRUE(within_condition(*limit(evidence, all)->quantitation,
                               5.0 * std::sqrt(925.0 / 3.0), 10.0));
  LimitSettings method;
  method.blanks = BlankKind::Method;
  EXPECT_TRUE(
      within_condition(*limit(evidence, method)->quantitation, 150.0, 10.0));
}

TEST(NoiseModelLimit, SaysWhyItIsNotApplicable) {
  LimitEvidence evidence = predicting({1.0});
  evidence.calibration.reset();
  EXPECT_EQ(refusal(evidence), "no-calibration");
  evidence.calibration = known_line(0.0, 0.0);
  EXPECT_EQ(refusal(evidence), "slope-not-positive");
  EXPECT_EQ(refusal(predicting({})), "few-blanks");
  LimitSettings zero_standards;
  zero_standards.blanks = BlankKind::ZeroStandard;
  EXPECT_EQ(refusal(predicting({1.0}), zero_standards), "few-blanks");
  EXPECT_EQ(refusal(predicting({0.0, 0.0})), "noise-zero");
  LimitEvidence bent = predicting({1.0});
  bent.baseline_biased = true;
  EXPECT_EQ(refusal(bent), "baseline-not-linear");
}

TEST(NoiseModelLimit, PassesOnWhyNoiseWasNotPredicted) {
  LimitEvidence evidence = predicting({1.0});
  evidence.predicted_noise.clear();
  EXPECT_EQ(refusal(evidence), "no-noise");
  evidence.predicted_noise_absent = "noise-trace-short: 41 widths";
  EXPECT_EQ(limit(evidence).reason(), "noise-trace-short: 41 widths");
}

// Experimental: neither the first nor the largest, unless the method names it.
TEST(NoiseModelLimit, GovernsOnlyWhereNamed) {
  ASSERT_TRUE(find_limit_procedure("noise-model")->experimental);
  LimitEvidence evidence = predicting(std::vector<double>(8, 1.0));
  const double responses[] = {0.1, -0.2, 0.3, 0.0, -0.1, 0.2, -0.3, 0.05};
  for (std::size_t i = 0; i < 8; ++i)
    evidence.blanks[i].response = responses[i];
  LimitSettings settings;
  settings.procedures = {noise_model(), procedure("blank-deviation")};
  const auto governing = [&](const std::string& rule) {
    settings.governing = rule;
    return compute_limits(evidence, settings).governing->detection_procedure;
  };
  EXPECT_EQ(governing("first"), "blank-deviation");
  EXPECT_EQ(governing("largest"), "blank-deviation");
  EXPECT_EQ(governing("noise-model"), "noise-model");
}

}  // namespace
}  // namespace loqsmith::test
