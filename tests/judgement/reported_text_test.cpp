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

TEST(ReportedText, NoExponentHoweverLargeOrSmall) {
  ReportingSettings settings;
  ReportedNumbers numbers;
  numbers.result = 12450.0;
  EXPECT_EQ(reported_text(Status::Reportable, numbers, settings), "12400");
  numbers.result = 6.0221e23;
  EXPECT_EQ(reported_text(Status::Reportable, numbers, settings),
            "602000000000000000000000");
  numbers.result = 1.5e-9;
  EXPECT_EQ(reported_text(Status::Reportable, numbers, settings),
            "0.00000000150");
  numbers.result = -0.0;
  settings.decimals = 2;
  EXPECT_EQ(reported_text(Status::Reportable, numbers, settings), "0.00");
  numbers.result = -0.0049;
  EXPECT_EQ(reported_text(Status::Estimated, numbers, settings), "0.00");
}

// JCGM 100:2008, 7.2.6 (from memory). 6.207216 with an expanded uncertainty of
// 0.62 is 6.21 +/- 0.62.
TEST(ReportedText, UncertaintyIsRoundedFirstAndGivesThePlace) {
  ReportingSettings settings;
  settings.relative_uncertainty = 10.0;
  const auto text = [&](double result) {
    ReportedNumbers numbers;
    numbers.result = result;
    return reported_text(Status::Reportable, numbers, settings);
  };
  EXPECT_EQ(text(6.207216), "6.21 +/- 0.62");
  // The method's digits give way: not finer than the uncertainty, not coarser.
  EXPECT_EQ(text(1234.5), "1230 +/- 120");
  EXPECT_EQ(text(123456.0), "123000 +/- 12000");
  settings.significant_digits = 1;
  EXPECT_EQ(text(0.0123456), "0.0123 +/- 0.0012");
  // 9.95 rounds to 10 (half-even and half-up differ at 0.985).
  EXPECT_EQ(text(99.5), "100 +/- 10");
  EXPECT_EQ(text(9.85), "9.85 +/- 0.98");
  settings.rounding = ReportingSettings::Rounding::HalfUp;
  EXPECT_EQ(text(9.85), "9.85 +/- 0.99");
  settings.relative_uncertainty = 300.0;
  EXPECT_EQ(text(4.04), "4 +/- 12");
  EXPECT_EQ(text(0.0), "0");
}

TEST(ReportedText, UncertaintyStandsBesideReportableResultsOnly) {
  ReportingSettings settings;
  settings.relative_uncertainty = 24.0;
  EXPECT_EQ(reported_text(Status::Reportable, kNumbers, settings),
            "0.235 +/- 0.056");
  EXPECT_EQ(reported_text(Status::Estimated, kNumbers, settings), "0.235");
  EXPECT_EQ(reported_text(Status::NotDetected, kNumbers, settings), "< 0.121");
  EXPECT_EQ(reported_text(Status::AboveRange, kNumbers, settings), "> 499");
}

TEST(ReportedText, NothingBelowTheReportingLimitIsPrinted) {
  ReportingSettings settings;
  settings.reporting_limit = 0.3;
  EXPECT_EQ(reported_text(Status::NotDetected, kNumbers, settings), "< 0.300");
  EXPECT_EQ(reported_text(Status::Estimated, kNumbers, settings), "< 0.300");
  EXPECT_EQ(reported_text(Status::Reportable, kNumbers, settings), "< 0.300");
  EXPECT_EQ(reported_text(Status::AboveRange, kNumbers, settings), "> 499");
  // At the limit counts as at or above; compared unrounded.
  settings.reporting_limit = 0.23451;
  EXPECT_EQ(reported_text(Status::Reportable, kNumbers, settings), "0.235");
  settings.reporting_limit = 0.234511;
  EXPECT_EQ(reported_text(Status::Reportable, kNumbers, settings), "< 0.235");
  // The sample's own limit counts where it is the larger one.
  settings.reporting_limit = 0.05;
  EXPECT_EQ(reported_text(Status::NotDetected, kNumbers, settings), "< 0.121");
  settings.below_quantitation = ReportingSettings::BelowQuantitation::Limit;
  EXPECT_EQ(reported_text(Status::Estimated, kNumbers, settings), "< 0.401");
}

TEST(SampleUnits, AReportingLimitHoldsInTheSampleOnly) {
  UnitSettings units;
  units.sample_amount = "mg";
  units.final_volume = "mL";
  ReportingSettings settings;
  settings.reporting_limit = 2.0;
  Injection weighed;
  weighed.sample_amount = 500.0;
  weighed.final_volume = 5.0;
  EXPECT_EQ(reporting_of(weighed, units, settings).reporting_limit, 2.0);
  EXPECT_FALSE(reporting_of({}, units, settings).reporting_limit);
  EXPECT_EQ(reporting_of({}, {}, settings).reporting_limit, 2.0);
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
