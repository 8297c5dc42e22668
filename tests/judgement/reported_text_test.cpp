#include "loqsmith/judgement/reported_text.hpp"

#include <cmath>

#include "loqsmith/judgement/sample_units.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

constexpr ReportedNumbers kNumbers{.result = 0.23451,
                                   .detection_limit = 0.1204,
                                   .quantitation_limit = 0.4001,
                                   .highest = 499.9};

TEST(ReportedText, NumbersByTheMethodsDigits) {
  ReportingSettings settings;
  EXPECT_EQ(reported_text(Status::Reportable, kNumbers, settings), "0.235");
  EXPECT_EQ(reported_text(Status::Estimated, kNumbers, settings), "0.235");
  settings.decimals = 1;
  EXPECT_EQ(reported_text(Status::Reportable, kNumbers, settings), "0.2");
}

TEST(ReportedText, TiesByTheMethodsRule) {
  ReportingSettings settings;
  ReportedNumbers numbers = kNumbers;
  numbers.result = 99.85;
  EXPECT_EQ(reported_text(Status::Reportable, numbers, settings), "99.8");
  settings.rounding = ReportingSettings::Rounding::HalfUp;
  EXPECT_EQ(reported_text(Status::Reportable, numbers, settings), "99.9");
}

TEST(ReportedText, LimitsAreRoundedUpAndTheRangeDown) {
  ReportingSettings settings;
  EXPECT_EQ(reported_text(Status::NotDetected, kNumbers, settings), "< 0.121");
  EXPECT_EQ(reported_text(Status::AboveRange, kNumbers, settings), "> 499");
  settings.significant_digits = 1;
  EXPECT_EQ(reported_text(Status::NotDetected, kNumbers, settings), "< 0.2");
  EXPECT_EQ(reported_text(Status::AboveRange, kNumbers, settings), "> 400");
  settings.decimals = 1;
  EXPECT_EQ(reported_text(Status::NotDetected, kNumbers, settings), "< 0.2");
}

TEST(ReportedText, BelowAsTheMethodChooses) {
  ReportingSettings settings;
  settings.below_detection = ReportingSettings::BelowDetection::Quantitation;
  settings.below_quantitation = ReportingSettings::BelowQuantitation::Limit;
  EXPECT_EQ(reported_text(Status::NotDetected, kNumbers, settings), "< 0.401");
  EXPECT_EQ(reported_text(Status::Estimated, kNumbers, settings), "< 0.401");
  EXPECT_EQ(reported_text(Status::Reportable, kNumbers, settings), "0.235");
}

TEST(ReportedText, WithheldNeverShowsANumber) {
  const ReportingSettings settings;
  EXPECT_EQ(reported_text(Status::Withheld, kNumbers, settings), "withheld");
  for (const Status status : {Status::NotDetected, Status::Estimated,
                              Status::Reportable, Status::AboveRange}) {
    EXPECT_EQ(reported_text(status, {}, settings), "withheld");
  }
}

TEST(SampleUnits, FactorFollowsDilutionAndPreparation) {
  Injection injection;
  injection.dilution = 10.0;
  UnitSettings units;
  EXPECT_TRUE(test::same_bits(sample_factor(injection, units), 10.0));
  injection.final_volume = 50.0;
  injection.sample_amount = 2.0;
  units.factor = 0.001;
  EXPECT_TRUE(test::same_bits(sample_factor(injection, units), 0.25));
}

TEST(SampleUnits, AVialBesideWeighedSamplesKeepsItsConcentration) {
  UnitSettings units;
  units.concentration = "mg/L";
  units.result = "ug/g";
  units.factor = 1000.0;
  units.sample_amount = "mg";
  units.final_volume = "mL";
  Injection check;
  check.dilution = 2.0;
  EXPECT_TRUE(test::same_bits(sample_factor(check, units), 2.0));
  EXPECT_EQ(result_unit(check, units), "mg/L");
  Injection weighed;
  weighed.final_volume = 5.0;
  weighed.sample_amount = 500.0;
  EXPECT_TRUE(test::same_bits(sample_factor(weighed, units), 10.0));
  EXPECT_EQ(result_unit(weighed, units), "ug/g");
}

TEST(SampleUnits, WithoutPreparationTheFactorConvertsEveryVial) {
  UnitSettings units;
  units.concentration = "ug/L";
  units.result = "mg/L";
  units.factor = 0.001;
  EXPECT_TRUE(test::same_bits(sample_factor(Injection{}, units), 0.001));
  EXPECT_EQ(result_unit(Injection{}, units), "mg/L");
}

TEST(SampleUnits, DropsTheArithmeticsOwnErrorOnly) {
  EXPECT_TRUE(test::same_bits(in_sample(0.1, 3.0), 0.3));
  EXPECT_TRUE(test::same_bits(in_sample(0.0345, 100.0), 3.45));
  // With a factor of one nothing is touched.
  EXPECT_TRUE(test::same_bits(in_sample(0.1 + 0.2, 1.0), 0.1 + 0.2));
  // A third is no decimal: it stays.
  EXPECT_TRUE(test::same_bits(in_sample(1.0 / 3.0, 2.0), 2.0 / 3.0));
  EXPECT_TRUE(test::same_bits(in_sample(1.23456789012345, 2.0),
                              2.0 * 1.23456789012345));
}

TEST(SampleUnits, NeverDecreases) {
  for (const double factor : {3.0, 7.0, 0.1, 10.0 / 3.0, 1e-3}) {
    double vial = 0.0999999999999999;
    double before = in_sample(vial, factor);
    for (int i = 0; i < 40; ++i) {
      vial = std::nextafter(vial, 1.0);
      const double now = in_sample(vial, factor);
      EXPECT_GE(now, before);
      before = now;
    }
  }
}

TEST(SampleUnits, ALimitTimesThreePrintsAsTheChemistExpects) {
  ReportedNumbers numbers;
  numbers.detection_limit = in_sample(0.1, 3.0);
  EXPECT_EQ(reported_text(Status::NotDetected, numbers, {}), "< 0.300");
}

}  // namespace
}  // namespace loqsmith
