#include "loqsmith/limits/governing.hpp"

#include <algorithm>

#include "limits/evidence_builders.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Blanks of mean 0 and standard deviation 1 on a line of slope 1: detection 3
// and quantitation 10 by the blanks. Heights 10 x over noise 4, 2H/h: 0.6 and
// 2 by signal-to-noise.
LimitEvidence evidence(double lowest_standard = 1.0) {
  LimitEvidence one = evidence_of({-1, 1, -1, 1, -1, 1, 0},
                                  known_line(0.0, 1.0, lowest_standard));
  one.noise = 4.0;
  one.heights = {{1, 1.0, 10.0}, {2, 2.0, 20.0}, {3, 5.0, 50.0}};
  return one;
}

ProcedureSettings given(double detection, double quantitation) {
  ProcedureSettings settings = procedure("established");
  settings.detection = detection;
  settings.quantitation = quantitation;
  settings.source = "validation report 7";
  return settings;
}

LimitSettings settings_of(const std::vector<ProcedureSettings>& procedures,
                          const std::string& governing = "first") {
  LimitSettings settings;
  settings.governing = governing;
  settings.procedures = procedures;
  return settings;
}

const ProcedureSettings kBlank = procedure("blank-deviation");
const ProcedureSettings kNoise = procedure("signal-to-noise");

bool noted(const GoverningLimits& limits, const std::string& word) {
  return std::find(limits.notes.begin(), limits.notes.end(), word) !=
         limits.notes.end();
}

TEST(Governing, FirstAsWritten) {
  const auto blank = compute_limits(evidence(), settings_of({kBlank, kNoise}));
  ASSERT_TRUE(blank.governing);
  EXPECT_EQ(blank.governing->detection_procedure, "blank-deviation");
  EXPECT_TRUE(within_condition(blank.governing->detection, 3.0, 10));
  EXPECT_TRUE(within_condition(blank.governing->quantitation, 10.0, 10));
  EXPECT_TRUE(same_bits(blank.governing->decision_threshold,
                        blank.governing->detection));
  EXPECT_TRUE(blank.governing->notes.empty());
  EXPECT_TRUE(blank.rows[0].governs_detection);
  EXPECT_TRUE(blank.rows[0].governs_quantitation);
  EXPECT_FALSE(blank.rows[1].governs_detection);
  ASSERT_TRUE(blank.rows[1].estimate);  // the others stand beside it

  const auto noise = compute_limits(evidence(), settings_of({kNoise, kBlank}));
  ASSERT_TRUE(noise.governing);
  EXPECT_EQ(noise.governing->detection_procedure, "signal-to-noise");
}

TEST(Governing, NotValidDoesNotGovern) {
  LimitEvidence few = evidence();
  few.blanks.resize(4);
  const auto found = compute_limits(few, settings_of({kBlank, kNoise}));
  EXPECT_EQ(found.rows[0].grade(), Grade::NotValid);
  ASSERT_TRUE(found.governing);
  EXPECT_EQ(found.governing->detection_procedure, "signal-to-noise");
  EXPECT_TRUE(noted(*found.governing, "detection-by-other-procedure"));
  EXPECT_FALSE(found.rows[0].governs_detection);
  EXPECT_TRUE(found.rows[1].governs_detection);
}

TEST(Governing, NoneLeft) {
  LimitEvidence few = evidence();
  few.blanks.resize(4);
  few.noise = 0.0;
  const auto found = compute_limits(few, settings_of({kBlank, kNoise}));
  ASSERT_FALSE(found.governing);
  EXPECT_TRUE(contains(found.governing.reason(),
                       "no-valid-limit: blank-deviation is not valid: "
                       "few-blanks; signal-to-noise: noise-zero: "));
  const auto none = compute_limits(evidence(), settings_of({}));
  ASSERT_FALSE(none.governing);
  EXPECT_TRUE(contains(none.governing.reason(), "names no procedure"));
}

TEST(Governing, EstablishedWhereItIsPresent) {
  const auto found = compute_limits(
      evidence(), settings_of({kBlank, given(2.5, 8.0)}, "established"));
  ASSERT_TRUE(found.governing);
  EXPECT_EQ(found.governing->detection_procedure, "established");
  EXPECT_TRUE(same_bits(found.governing->detection, 2.5));
  EXPECT_TRUE(same_bits(found.governing->quantitation, 8.0));
  ASSERT_TRUE(found.rows[0].estimate);
  EXPECT_TRUE(contains(found.rows[1].estimate->findings[0].text, "report 7"));
}

TEST(Governing, Named) {
  const auto found = compute_limits(
      evidence(), settings_of({kBlank, kNoise}, "signal-to-noise"));
  ASSERT_TRUE(found.governing);
  EXPECT_EQ(found.governing->detection_procedure, "signal-to-noise");

  LimitEvidence silent = evidence();
  silent.noise = 0.0;
  const auto lost =
      compute_limits(silent, settings_of({kBlank, kNoise}, "signal-to-noise"));
  ASSERT_FALSE(lost.governing);  // no silent change of procedure
  EXPECT_TRUE(contains(lost.governing.reason(), "noise-zero"));
  EXPECT_FALSE(contains(lost.governing.reason(), "blank-deviation"));

  const auto absent =
      compute_limits(evidence(), settings_of({kBlank}, "established"));
  ASSERT_FALSE(absent.governing);
  EXPECT_TRUE(
      contains(absent.governing.reason(), "does not compute established"));
}

TEST(Governing, ANamedOneThatLacksALimitIsCompletedByTheOthers) {
  ProcedureSettings half = given(2.5, 8.0);
  half.quantitation.reset();
  const auto found = compute_limits(
      evidence(), settings_of({half, kNoise, kBlank}, "established"));
  ASSERT_TRUE(found.governing);
  EXPECT_EQ(found.governing->detection_procedure, "established");
  EXPECT_TRUE(noted(*found.governing, "quantitation-by-other-procedure"));

  const auto alone =
      compute_limits(evidence(), settings_of({half}, "established"));
  ASSERT_FALSE(alone.governing);
  EXPECT_TRUE(contains(alone.governing.reason(), "gives no such limit"));
}

TEST(Governing, LargestOfEach) {
  const auto found = compute_limits(
      evidence(), settings_of({kNoise, kBlank, given(4.0, 5.0)}, "largest"));
  ASSERT_TRUE(found.governing);
  EXPECT_EQ(found.governing->detection_procedure, "established");
  EXPECT_EQ(found.governing->quantitation_procedure, "blank-deviation");
  EXPECT_TRUE(found.rows[2].governs_detection);
  EXPECT_TRUE(found.rows[1].governs_quantitation);
  EXPECT_FALSE(found.rows[1].governs_detection);
  EXPECT_TRUE(noted(*found.governing, "largest-of-tonight"));

  LimitEvidence few = evidence();
  few.blanks.resize(4);  // not valid: its limits do not count
  const auto without =
      compute_limits(few, settings_of({kNoise, kBlank}, "largest"));
  ASSERT_TRUE(without.governing);
  EXPECT_EQ(without.governing->quantitation_procedure, "signal-to-noise");
}

TEST(Governing, QuantitationIsNotBelowTheLowestAcceptedStandard) {
  LimitEvidence high = evidence(15.0);
  const auto floored = compute_limits(high, settings_of({kBlank}));
  ASSERT_TRUE(floored.governing);
  EXPECT_TRUE(same_bits(floored.governing->quantitation, 15.0));
  EXPECT_EQ(floored.governing->quantitation_procedure, "lowest-standard");
  EXPECT_TRUE(noted(*floored.governing, "quantitation-at-lowest-standard"));
  EXPECT_TRUE(floored.rows[0].governs_detection);
  EXPECT_FALSE(floored.rows[0].governs_quantitation);

  const auto validated =
      compute_limits(high, settings_of({given(2.5, 8.0)}, "established"));
  EXPECT_TRUE(same_bits(validated.governing->quantitation, 15.0));

  high.calibration->accepted_lowest = 20.0;  // the level at 15 failed
  EXPECT_TRUE(same_bits(
      compute_limits(high, settings_of({kBlank})).governing->quantitation,
      20.0));

  LimitSettings free = settings_of({kBlank});
  free.floor_at_lowest_standard = false;
  EXPECT_TRUE(within_condition(
      compute_limits(high, free).governing->quantitation, 10.0, 10));
}

TEST(Governing, NoAcceptedStandardNoFloor) {
  LimitEvidence none = evidence();
  none.calibration->accepted_lowest.reset();
  const auto found = compute_limits(none, settings_of({kBlank}));
  ASSERT_FALSE(found.governing);
  EXPECT_TRUE(contains(found.governing.reason(), "no-accepted-standard: "));
  EXPECT_FALSE(found.rows[0].governs_detection);
}

TEST(Governing, DetectionAboveQuantitationRaisesIt) {
  LimitSettings settings = settings_of({given(9.0, 5.0)}, "established");
  const auto found = compute_limits(evidence(), settings);
  ASSERT_TRUE(found.governing);
  EXPECT_TRUE(same_bits(found.governing->detection, 9.0));
  EXPECT_TRUE(same_bits(found.governing->quantitation, 9.0));
  EXPECT_TRUE(noted(*found.governing, "detection-above-quantitation"));
  EXPECT_TRUE(found.rows[0].governs_quantitation);

  // Above the floor too.
  const auto floored = compute_limits(evidence(7.0), settings);
  EXPECT_TRUE(same_bits(floored.governing->quantitation, 9.0));
  EXPECT_EQ(floored.governing->quantitation_procedure, "established");
}

TEST(Governing, DecisionByCriticalValue) {
  LimitSettings settings = settings_of({kBlank});
  settings.decision = LimitSettings::Decision::CriticalValue;
  const auto found = compute_limits(evidence(), settings);
  ASSERT_TRUE(found.governing);  // this procedure has none
  EXPECT_TRUE(same_bits(found.governing->decision_threshold,
                        found.governing->detection));
  EXPECT_TRUE(noted(*found.governing, "no-critical-value"));
}

TEST(Procedures, TheWholeVocabularyStandsInTheTable) {
  EXPECT_EQ(limit_procedures().size(), 15U);
  for (const char* name : {"blank-deviation", "calibration-residual",
                           "signal-to-noise", "established"}) {
    ASSERT_TRUE(find_limit_procedure(name)) << name;
    EXPECT_TRUE(find_limit_procedure(name)->compute != nullptr) << name;
  }
  EXPECT_TRUE(find_limit_procedure("two-component")->experimental);
  EXPECT_TRUE(find_limit_procedure("noise-model")->experimental);
  EXPECT_FALSE(find_limit_procedure("nonsense"));
}

TEST(Procedures, WhatIsNotKnownSaysSo) {
  const auto found =
      compute_limits(evidence(), settings_of({procedure("rule-of-thumb")}));
  EXPECT_EQ(found.rows[0].grade(), Grade::NotApplicable);
  EXPECT_EQ(found.rows[0].estimate.reason(),
            "not-available: rule-of-thumb is not available in this version");
  EXPECT_FALSE(found.governing);
}

TEST(Established, AsGivenOrNotAtAll) {
  const ProcedureSettings nothing = procedure("established");
  EXPECT_TRUE(contains(compute_limits(evidence(), settings_of({nothing}))
                           .rows[0]
                           .estimate.reason(),
                       "not-given: "));
  EXPECT_TRUE(
      contains(compute_limits(evidence(), settings_of({given(0.0, 1.0)}))
                   .rows[0]
                   .estimate.reason(),
               "limit-not-positive: "));
}

TEST(Grades, TheWorstFindingGrades) {
  LimitEstimate estimate;
  EXPECT_EQ(estimate.grade(), Grade::Valid);
  estimate.findings.push_back({Grade::Caution, "one", ""});
  estimate.findings.push_back({Grade::Note, "two", ""});
  EXPECT_EQ(estimate.grade(), Grade::Caution);
  estimate.findings.push_back({Grade::NotValid, "three", ""});
  EXPECT_EQ(estimate.grade(), Grade::NotValid);
  EXPECT_EQ(grade_name(Grade::Valid), "valid");
  EXPECT_EQ(grade_name(Grade::Note), "note");
  EXPECT_EQ(grade_name(Grade::Caution), "caution");
  EXPECT_EQ(grade_name(Grade::NotValid), "not-valid");
  EXPECT_EQ(grade_name(Grade::NotApplicable), "not-applicable");
}

}  // namespace
}  // namespace loqsmith::test
