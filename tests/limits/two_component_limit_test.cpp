#include "loqsmith/limits/two_component_limit.hpp"

#include <cmath>

#include "limits/evidence_builders.hpp"
#include "limits/toluene.hpp"
#include "loqsmith/limits/governing.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

ProcedureSettings wanting(double relative_deviation) {
  ProcedureSettings settings = procedure("two-component");
  settings.relative_deviation = relative_deviation;
  return settings;
}

LimitEvidence evidence_from(const std::vector<StandardPoint>& points) {
  LimitEvidence evidence;
  evidence.calibration =
      fit_calibration(points, {.weight = Weight::InverseXSquared}).value();
  return evidence;
}

// Where the likelihood climbs for ever towards no additive error.
const std::vector<std::pair<double, double>> kNoPeak = {
    {1, 12.1},    {1, 10.6},     {10, 106.1},    {10, 97.9},
    {100, 931.3}, {100, 1111.7}, {1000, 8482.3}, {1000, 8982.7}};

std::string reason(const Outcome<LimitEstimate>& estimate) {
  return estimate ? std::string() : estimate.reason();
}

// Rocke and Lorenzato 1995 with their toluene data: s0, V and the limits
// computed from the maximum of the likelihood (quadrature of 801 points).
TEST(TwoComponentLimit, TolueneAtTwentyPercent) {
  const auto limit =
      two_component_limit(evidence_from(toluene()), {}, wanting(0.20));
  ASSERT_TRUE(limit) << limit.reason();
  EXPECT_TRUE(agrees_to_digits(
      *term(*limit, "additive standard deviation over slope"), 3.737565, 6));
  EXPECT_TRUE(agrees_to_digits(
      *term(*limit, "variance V of the proportional part"), 0.01082518, 6));
  EXPECT_TRUE(agrees_to_digits(*limit->critical_value, 6.147748, 6));
  EXPECT_TRUE(agrees_to_digits(*limit->detection, 12.666471, 6));
  EXPECT_TRUE(agrees_to_digits(*limit->quantitation, 21.881883, 6));
  EXPECT_EQ(limit->n, 24U);
  EXPECT_LT(*limit->detection_lower, *limit->detection);
  EXPECT_GT(*limit->detection_upper, *limit->detection);
  EXPECT_LT(*limit->quantitation_lower, *limit->quantitation);
  EXPECT_GT(*limit->quantitation_upper, *limit->quantitation);

  const auto stricter =
      two_component_limit(evidence_from(toluene()), {}, wanting(0.15));
  ASSERT_TRUE(stricter);
  EXPECT_TRUE(agrees_to_digits(*stricter->quantitation, 34.591046, 6));
}

// V is above 0.01: at 10 % there is no quantitation limit, and the detection
// limit stands.
TEST(TwoComponentLimit, TolueneHasNoQuantitationLimitAtTenPercent) {
  const LimitEvidence evidence = evidence_from(toluene());
  const auto limit = two_component_limit(evidence, {}, wanting(0.10));
  ASSERT_TRUE(limit);
  EXPECT_TRUE(agrees_to_digits(*limit->detection, 12.666471, 6));
  EXPECT_FALSE(limit->quantitation);
  EXPECT_FALSE(limit->quantitation_lower || limit->quantitation_upper);
  const LimitFinding* absent = finding(*limit, "quantitation-absent");
  ASSERT_NE(absent, nullptr);
  EXPECT_EQ(absent->grade, Grade::Caution);
  EXPECT_TRUE(contains(absent->text, "falls to 10.4 % at high"));
  EXPECT_TRUE(contains(absent->text, "the wanted 10 %: there is no"));
}

// Where it governs, a quantitation limit comes from the next procedure, or
// there is none.
TEST(TwoComponentLimit, AnAbsentQuantitationLimitIsTakenFromAnother) {
  LimitEvidence evidence = evidence_from(toluene());
  LimitSettings settings;
  settings.governing = "two-component";
  settings.procedures = {wanting(0.10)};
  const LimitsOfAnalyte alone = compute_limits(evidence, settings);
  ASSERT_FALSE(alone.governing);
  EXPECT_TRUE(contains(alone.governing.reason(), "gives no such limit"));

  ProcedureSettings other = procedure("established");
  other.detection = 10.0;
  other.quantitation = 40.0;
  settings.procedures.push_back(other);
  const LimitsOfAnalyte both = compute_limits(evidence, settings);
  ASSERT_TRUE(both.governing) << both.governing.reason();
  EXPECT_EQ(both.governing->detection_procedure, "two-component");
  EXPECT_EQ(both.governing->quantitation_procedure, "established");
  EXPECT_TRUE(agrees_to_digits(both.governing->quantitation, 40.0, 6));
}

TEST(TwoComponentLimit, GovernsOnlyWhereNamed) {
  ASSERT_TRUE(find_limit_procedure("two-component")->experimental);
  LimitSettings settings;
  settings.procedures = {wanting(0.20)};
  const LimitEvidence evidence = evidence_from(toluene());
  EXPECT_FALSE(compute_limits(evidence, settings).governing);
  settings.governing = "two-component";
  settings.decision = LimitSettings::Decision::CriticalValue;
  const LimitsOfAnalyte named = compute_limits(evidence, settings);
  ASSERT_TRUE(named.governing) << named.governing.reason();
  EXPECT_TRUE(
      agrees_to_digits(named.governing->decision_threshold, 6.147748, 6));
}

// s0 = 1, sigma_eta = 0.05: V and the limit by the formula with V as it is;
// with V taken as sigma_eta^2 it would be 11.54700538.
TEST(TwoComponentLimit, VIsNotTheSquareOfSigma) {
  TwoComponentModel model;
  model.slope = 2.0;
  model.additive_sd = 2.0;
  model.proportional_sd = 0.05;
  EXPECT_TRUE(agrees_to_digits(model.relative_variance(), 0.0025093933, 8));
  const TwoComponentLimits limits = two_component_limits(model, wanting(0.10));
  EXPECT_TRUE(agrees_to_digits(*limits.quantitation, 11.55424311, 10));
}

// The detection limit solves the equation that defines it.
TEST(TwoComponentLimit, DetectionSolvesItsEquation) {
  TwoComponentModel model;
  model.slope = 3.0;
  model.additive_sd = 1.5;
  for (double sigma : {1e-3, 0.05, 0.2, 0.4}) {
    model.proportional_sd = sigma;
    const TwoComponentLimits limits = two_component_limits(model, wanting(0.1));
    ASSERT_TRUE(limits.detection);
    const double x = *limits.detection;
    const double z = limits.critical_value / 0.5;
    EXPECT_TRUE(within_condition(
        z * 0.5 + z * std::sqrt(0.25 + x * x * model.relative_variance()), x,
        1000));
  }
  model.proportional_sd = 0.6;  // z^2 V = 1.67
  EXPECT_FALSE(two_component_limits(model, wanting(0.1)).detection);
}

TEST(TwoComponentLimit, ReplicatesLowerTheCriticalValueAlone) {
  TwoComponentModel model;
  model.slope = 1.0;
  model.additive_sd = 1.0;
  model.proportional_sd = 0.1;
  ProcedureSettings four = wanting(0.2);
  four.replicates = 4;
  const TwoComponentLimits one = two_component_limits(model, wanting(0.2));
  const TwoComponentLimits many = two_component_limits(model, four);
  EXPECT_TRUE(
      within_condition(many.critical_value, 0.5 * one.critical_value, 10));
  EXPECT_TRUE(same_bits(*many.detection, *one.detection));
}

TEST(TwoComponentLimit, WithoutAPeakMomentsStepIn) {
  const auto limit =
      two_component_limit(evidence_from(standards(kNoPeak)), {}, wanting(0.20));
  ASSERT_TRUE(limit) << limit.reason();
  const LimitFinding* moments = finding(*limit, "moment-estimates");
  ASSERT_NE(moments, nullptr);
  EXPECT_EQ(moments->grade, Grade::Caution);
  EXPECT_FALSE(limit->detection_lower || limit->quantitation_upper);
  EXPECT_FALSE(limit->degrees_of_freedom);
  EXPECT_GT(*limit->critical_value, 0.0);
}

TEST(TwoComponentLimit, SaysWhatIsMissing) {
  EXPECT_TRUE(contains(reason(two_component_limit({}, {}, wanting(0.1))),
                       "no-calibration"));
  const auto of = [](const std::vector<StandardPoint>& points) {
    return reason(two_component_limit(evidence_from(points), {}, wanting(0.1)));
  };
  EXPECT_TRUE(contains(of(seven_levels()), "few-standards: 7 standards"));
  EXPECT_TRUE(contains(of(standards({{1, 10},
                                     {1, 11},
                                     {2, 20},
                                     {2, 21},
                                     {20, 207},
                                     {20, 203},
                                     {50, 500},
                                     {50, 520}})),
                       "range-too-short: the highest standard is 50 times"));
  EXPECT_TRUE(contains(of(standards({{1, 10},
                                     {2, 21},
                                     {5, 48},
                                     {10, 104},
                                     {20, 203},
                                     {50, 500},
                                     {100, 1020},
                                     {200, 2010}})),
                       "no-replicates"));
  LimitEvidence curved;
  curved.calibration =
      fit_calibration(toluene(), {.model = Model::Quadratic}).value();
  EXPECT_TRUE(contains(reason(two_component_limit(curved, {}, wanting(0.1))),
                       "curve-not-straight"));
}

}  // namespace
}  // namespace loqsmith::test
