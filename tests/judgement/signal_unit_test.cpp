// Signals are never rescaled: unlike units are not calibrated together.

#include "judgement/night_builder.hpp"

namespace loqsmith::test {
namespace {

NightBuilder night_in(const std::string& unit) {
  NightBuilder night;
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0}) {
    night.standard(x).signal_unit = unit;
  }
  for (int i = 0; i < 9; ++i) {
    night.add(Role::SolventBlank, 0.01 * (i - 4), false).signal_unit = unit;
  }
  ProcedureSettings blanks;
  blanks.name = "blank-deviation";
  night.settings.limits.procedures = {blanks};
  return night;
}

TEST(SignalUnit, ACalibrationFromSeveralUnitsIsRefused) {
  NightBuilder night = night_in("AU");
  night.rows[2].signal_unit = "mAU";
  night.add(Role::Sample, 10.0).signal_unit = "AU";
  const AnalyteJudgement judgement = night.judge();
  ASSERT_FALSE(judgement.sets[0].calibration);
  EXPECT_EQ(judgement.sets[0].calibration.reason(),
            "mixed-units: standards with \"AU\" and with \"mAU\"");
  EXPECT_EQ(judgement.results.back().status, Status::Withheld);
  EXPECT_EQ(judgement.results.back().reasons.front(), "mixed-units");
}

TEST(SignalUnit, AStandardWithoutAUnitIsNotMixedWithOneThatStatesIt) {
  NightBuilder night = night_in("AU");
  night.rows[0].signal_unit = "";
  EXPECT_FALSE(night.judge().sets[0].calibration);
}

TEST(SignalUnit, ASampleInAnotherUnitIsWithheldAlone) {
  NightBuilder night = night_in("AU");
  night.add(Role::Sample, 10.0).signal_unit = "mAU";
  night.add(Role::Sample, 10.0).signal_unit = "AU";
  const AnalyteJudgement judgement = night.judge();
  ASSERT_TRUE(judgement.sets[0].calibration);
  const ResultRow& other = judgement.results[judgement.results.size() - 2];
  EXPECT_EQ(other.status, Status::Withheld);
  EXPECT_TRUE(has_word(other.reasons, "mixed-units"));
  EXPECT_EQ(judgement.results.back().status, Status::Reportable);
}

TEST(SignalUnit, NoUnitAnywhereIsCalibratedAsItIs) {
  NightBuilder night = night_in("");
  night.add(Role::Sample, 10.0);
  EXPECT_EQ(night.judge().results.back().status, Status::Reportable);
}

}  // namespace
}  // namespace loqsmith::test
