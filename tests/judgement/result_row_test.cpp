#include "loqsmith/judgement/result_row.hpp"

#include <cmath>

#include "judgement/night_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_word;
using test::line;
using test::NightBuilder;
using test::NightRow;
using test::same_bits;

using Words = std::vector<std::string>;

/// Slope 2, range 1 to 100, detection limit 0.5, quantitation limit 1.
struct ResultRows : testing::Test {
  ResultRows() {
    set.set = "1";
    set.calibration = line(2.0, 1.0, 100.0);
    GoverningLimits limits;
    limits.detection = 0.5;
    limits.quantitation = 1.0;
    limits.decision_threshold = 0.5;
    limits.detection_procedure = "blank-deviation";
    limits.quantitation_procedure = "lowest-standard";
    set.limits.governing = limits;
  }

  /// The last injection's row.
  ResultRow judge() {
    const MeasuredAnalyte analyte = night.collect();
    return judge_result(analyte.injections.back(), analyte, set, findings);
  }

  ResultRow judge_area(double area, bool found = true) {
    night.add(Role::Sample, area, found);
    return judge();
  }

  NightBuilder night;
  CalibrationSet set;
  AnalyteFindings findings;
};

TEST_F(ResultRows, AShapeThatFitsIdentifiesWithoutAPeak) {
  night.add(Role::Sample, 4.0, false);
  EXPECT_EQ(judge().status, Status::Withheld);
  night.rows.back().peak.value().shape_passed = true;
  const ResultRow row = judge();
  EXPECT_EQ(row.status, Status::Reportable);
  EXPECT_FALSE(row.found);
  EXPECT_FALSE(has_word(row.reasons, "response-without-peak"));
}

TEST_F(ResultRows, AtALimitCountsAsAbove) {
  const double just_below_detection = std::nextafter(1.0, 0.0);
  const double just_below_quantitation = std::nextafter(2.0, 0.0);
  const double just_above_range = std::nextafter(200.0, 300.0);
  EXPECT_EQ(judge_area(just_below_detection).status, Status::NotDetected);
  EXPECT_EQ(judge_area(1.0).status, Status::Estimated);
  EXPECT_EQ(judge_area(just_below_quantitation).status, Status::Estimated);
  EXPECT_EQ(judge_area(2.0).status, Status::Reportable);
  EXPECT_EQ(judge_area(200.0).status, Status::Reportable);
  EXPECT_EQ(judge_area(just_above_range).status, Status::AboveRange);
}

// Through every dilution the classes stay where they are in the vial.
TEST_F(ResultRows, AtALimitCountsAsAboveThroughAnyFactor) {
  for (const double dilution : {0.1, 3.0, 7.0, 10.0, 1e3}) {
    for (const double amount : {0.3, 0.7, 2.5}) {
      const auto status = [&](double area) {
        NightRow& row = night.add(Role::Sample, area);
        row.injection.dilution = dilution;
        row.injection.final_volume = 10.0;
        row.injection.sample_amount = amount;
        return judge().status;
      };
      EXPECT_EQ(status(1.0), Status::Estimated);
      EXPECT_EQ(status(0.9999999999), Status::NotDetected);
      EXPECT_EQ(status(2.0), Status::Reportable);
      EXPECT_EQ(status(1.9999999999), Status::Estimated);
      EXPECT_EQ(status(200.0), Status::Reportable);
      EXPECT_EQ(status(200.0000001), Status::AboveRange);
    }
  }
}

TEST_F(ResultRows, DilutionAndPreparationScaleResultLimitsAndUncertainty) {
  set.calibration.value().covariance[1][1] = 1e-6;
  const ResultRow vial = judge_area(20.0);
  NightRow& row = night.add(Role::Sample, 20.0);
  row.injection.dilution = 4.0;
  row.injection.final_volume = 50.0;
  row.injection.sample_amount = 2.0;
  night.units.factor = 0.001;
  night.units.result = "mg/kg";
  const ResultRow sample = judge();
  EXPECT_TRUE(same_bits(*sample.vial_concentration, 10.0));
  EXPECT_TRUE(same_bits(*sample.result, 1.0));
  EXPECT_EQ(sample.unit, "mg/kg");
  EXPECT_TRUE(same_bits(sample.dilution, 4.0));
  EXPECT_TRUE(same_bits(*sample.detection_limit, 0.05));
  EXPECT_TRUE(same_bits(*sample.quantitation_limit, 0.1));
  ASSERT_TRUE(vial.calibration_uncertainty.has_value());
  EXPECT_TRUE(agrees_to_digits(*sample.calibration_uncertainty,
                               0.1 * *vial.calibration_uncertainty, 12));
  EXPECT_EQ(sample.reported, "1.00");
}

TEST_F(ResultRows, ReportedTextsInTheSamplesUnit) {
  const auto reported = [&](double area, double dilution) {
    night.add(Role::Sample, area).injection.dilution = dilution;
    return judge().reported;
  };
  EXPECT_EQ(reported(0.1, 3.0), "< 1.50");
  EXPECT_EQ(reported(1.5, 3.0), "2.25");
  EXPECT_EQ(reported(24.69, 1.0), "12.3");
  EXPECT_EQ(reported(300.0, 5.0), "> 500");
}

TEST_F(ResultRows, ResultIsNeverCensored) {
  EXPECT_TRUE(same_bits(*judge_area(-3.0, false).result, -1.5));
  EXPECT_TRUE(same_bits(*judge_area(900.0).result, 450.0));
  findings.withholding = {"calibration-failed"};
  const ResultRow row = judge_area(20.0);
  EXPECT_TRUE(same_bits(*row.result, 10.0));
  EXPECT_EQ(row.reported, "withheld");
  EXPECT_EQ(row.qualifier, "R");
}

TEST_F(ResultRows, WithoutAPeakNothingWasRetained) {
  const ResultRow row = judge_area(0.1, false);
  EXPECT_FALSE(row.found);
  EXPECT_FALSE(row.retention_minutes.has_value());
  EXPECT_EQ(row.status, Status::NotDetected);
  EXPECT_EQ(row.reasons, Words{"below-detection-limit"});
  EXPECT_EQ(row.qualifier, "U");
}

TEST_F(ResultRows, ResponseWithoutPeakIsWithheld) {
  const ResultRow row = judge_area(1.0, false);
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reasons,
            (Words{"response-without-peak", "below-quantitation-limit"}));
}

TEST_F(ResultRows, CriticalValueDecidesWhereTheLimitsSaySo) {
  set.limits.governing.value().decision_threshold = 0.25;
  const ResultRow present = judge_area(0.6);
  EXPECT_EQ(present.status, Status::Estimated);
  EXPECT_EQ(present.reported, "0.300");
  const ResultRow absent = judge_area(0.4);
  EXPECT_EQ(absent.status, Status::NotDetected);
  EXPECT_EQ(absent.reasons, Words{"below-critical-value"});
  EXPECT_EQ(absent.reported, "< 0.500");
}

TEST_F(ResultRows, PeaksReasonsAreKept) {
  night.add(Role::Sample, 3.0).peak.value().reasons = {"overlapped",
                                                       "saturated"};
  const ResultRow row = judge();
  EXPECT_EQ(row.status, Status::Reportable);
  EXPECT_EQ(row.reasons, (Words{"saturated", "overlapped"}));
}

TEST_F(ResultRows, UnreadableInjectionKeepsItsRow) {
  NightRow& added = night.add(Role::Sample, 3.0);
  added.injection.dilution = 2.0;
  added.peak = NotApplicable{"file-refused: a.mzML: cut off"};
  const ResultRow row = judge();
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reasons, Words{"file-refused"});
  EXPECT_EQ(row.sample, added.injection.sample);
  EXPECT_FALSE(row.response || row.vial_concentration || row.result);
  EXPECT_TRUE(same_bits(*row.detection_limit, 1.0));
  EXPECT_EQ(row.reported, "withheld");
}

TEST_F(ResultRows, NoCalibrationNoLimitsNoNumbersButARow) {
  set.calibration = NotApplicable{"no standards"};
  set.limits.governing = NotApplicable{"no calibration"};
  findings.withholding = {"no-calibration"};
  const ResultRow row = judge_area(3.0);
  EXPECT_TRUE(same_bits(*row.response, 3.0));
  EXPECT_FALSE(row.result || row.detection_limit || row.quantitation_limit);
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_EQ(row.reasons, Words{"no-calibration"});
}

// y = 2x - 0.009x^2 turns over at 111 (x), 111.1 (y).
TEST_F(ResultRows, BeyondAQuadraticsEndIsAboveRangeWithoutANumber) {
  set.calibration.value().curvature = -0.009;
  const ResultRow row = judge_area(120.0);
  EXPECT_EQ(row.status, Status::AboveRange);
  EXPECT_FALSE(row.result.has_value());
  EXPECT_EQ(row.reasons, (Words{"above-range", "beyond-curve"}));
  EXPECT_EQ(row.reported, "> 100");
}

// y = 2x + 0.1x^2 turns over at -10 (x), -10 (y).
TEST_F(ResultRows, BelowAQuadraticsEndIsNotDetectedWithoutANumber) {
  set.calibration.value().curvature = 0.1;
  const ResultRow row = judge_area(-11.0, false);
  EXPECT_EQ(row.status, Status::NotDetected);
  EXPECT_FALSE(row.result.has_value());
  EXPECT_EQ(row.reported, "< 0.500");
}

TEST_F(ResultRows, CheckStandardsWithholdOrFlagWhatTheyGovern) {
  night.settings.acceptance.check_standard.emplace();
  findings.check_standards = {{2, 100.0, true, ""}, {4, 70.0, false, ""}};
  for (int i = 0; i < 6; ++i) night.add(Role::Sample, 20.0);
  const auto statuses = [&] {
    const MeasuredAnalyte analyte = night.collect();
    std::string text;
    for (const InjectionResponse& one : analyte.injections) {
      const ResultRow row = judge_result(one, analyte, set, findings);
      const bool failed = has_word(row.reasons, "check-standard-failed");
      const bool open = has_word(row.reasons, "no-closing-check");
      text += row.status == Status::Withheld ? 'W' : failed ? 'F' : '.';
      text += open ? 'n' : ' ';
    }
    return text;
  };
  EXPECT_EQ(statuses(), ". . W W WnWn");
  night.settings.acceptance.check_standard->action = CheckAction::Flag;
  EXPECT_EQ(statuses(), ". . F F FnFn");
  night.settings.acceptance.check_standard->governs =
      CheckStandardAcceptance::Governs::Forward;
  EXPECT_EQ(statuses(), ". . . F F F ");
  night.settings.acceptance.check_standard.reset();
  EXPECT_EQ(statuses(), ". . . . . . ");
}

// An added standard is a standard in a sample's own matrix.
TEST(QuantifiedRoles, AllButConditioningAndStandards) {
  for (const std::string& name : role_names()) {
    const Role role = *role_from_name(name);
    EXPECT_EQ(is_quantified(role), name != "conditioning" &&
                                       name != "standard" &&
                                       name != "added-standard");
  }
}

}  // namespace
}  // namespace loqsmith
