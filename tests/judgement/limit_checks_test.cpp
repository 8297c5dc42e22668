#include <string>
#include <vector>

#include "judgement/night_builder.hpp"
#include "loqsmith/judgement/established_limit_check.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::has_word;
using test::line;
using test::NightBuilder;
using test::rows_of;
using test::same_bits;
using test::within_condition;

// Seven spikes at a level of 0.5: the prediction interval is too wide, or not.
const std::vector<double> kFailing = {.45, .55, .62, .40, .52, .47, .50};
const std::vector<double> kPassing = {.47, .52, .55, .46, .52, .47, .50};

LimitRow limit_row(const std::string& procedure, double detection,
                   double quantitation) {
  LimitEstimate estimate;
  estimate.detection = detection;
  estimate.quantitation = quantitation;
  LimitRow row;
  row.procedure = procedure;
  row.estimate = estimate;
  return row;
}

AnalyteRules comparing(const std::string& procedure) {
  AnalyteRules settings;
  settings.analyte = "zinol";
  settings.acceptance.established_limit.emplace();
  settings.acceptance.established_limit->procedure = procedure;
  return settings;
}

CalibrationSet set_of_limits(const LimitRow& tonight) {
  CalibrationSet set;
  set.calibration = line(2.0, 0.5, 100.0);
  set.limits.rows = {limit_row("established", 0.68, 2.0), tonight};
  return set;
}

LimitCheck compare(double detection, double quantitation) {
  return check_established_limit(
      comparing("blank-deviation"),
      set_of_limits(limit_row("blank-deviation", detection, quantitation)));
}

// US EPA 40 CFR 136 Appendix B, Revision 2 (2016), II 4, from memory: from 0.5
// to 2.0, ends included.
TEST(EstablishedLimit, RatioOfTonightsLimits) {
  LimitCheck check = compare(1.36, 1.0);
  EXPECT_FALSE(check.failed);
  ASSERT_EQ(check.rows.size(), 2U);
  EXPECT_TRUE(same_bits(*check.rows[0].value, 2.0));
  EXPECT_TRUE(same_bits(*check.rows[1].value, 0.5));
  EXPECT_EQ(check.rows[0].passed, true);
  EXPECT_EQ(check.rows[1].passed, true);

  check = compare(1.3601, 1.0);
  EXPECT_TRUE(check.failed);
  EXPECT_EQ(check.rows[0].passed, false);
  EXPECT_EQ(check.rows[0].affects, "all results of the analyte");
  EXPECT_EQ(check.rows[0].note,
            "detection limit by blank-deviation over the established one");
  EXPECT_TRUE(compare(0.68, 0.9999).failed);
}

TEST(EstablishedLimit, OneLimitIsEnough) {
  LimitRow tonight = limit_row("accuracy-profile", 1.0, 1.9);
  tonight.estimate.value().detection.reset();
  const LimitCheck check = check_established_limit(
      comparing("accuracy-profile"), set_of_limits(tonight));
  ASSERT_EQ(check.rows.size(), 1U);
  EXPECT_TRUE(within_condition(*check.rows[0].value, 0.95, 4));
}

// Strictly fewer than 3 %.
TEST(EstablishedLimit, ShareOfBlanksAbove) {
  EXPECT_TRUE(few_blanks_above(2, 70));    // 2.857 %
  EXPECT_FALSE(few_blanks_above(3, 100));  // 3.0 %
  EXPECT_TRUE(few_blanks_above(1, 34));
  EXPECT_FALSE(few_blanks_above(1, 33));
  EXPECT_FALSE(few_blanks_above(0, 0));
}

LimitCheck compare_blanks(std::size_t n, std::size_t above) {
  CalibrationSet set = set_of_limits(limit_row("spike-replicates", 0.7, 2.0));
  for (std::size_t i = 0; i < n; ++i) {
    BlankResponse blank;
    blank.kind = BlankKind::Method;
    // Slope 2: the established limit 0.68 has the response 1.36.
    blank.response = i < above ? 1.37 : 0.01 * static_cast<double>(i);
    set.blanks.push_back(blank);
    blank.kind = BlankKind::Solvent;
    blank.response = 9.0;
    set.blanks.push_back(blank);
  }
  return check_established_limit(comparing("spike-replicates"), set);
}

TEST(EstablishedLimit, MethodBlanksAboveIt) {
  LimitCheck check = compare_blanks(70, 2);
  EXPECT_FALSE(check.failed);
  ASSERT_EQ(check.rows.size(), 3U);
  EXPECT_TRUE(within_condition(*check.rows[2].value, 200.0 / 70.0, 4));
  EXPECT_EQ(check.rows[2].passed, true);
  EXPECT_TRUE(compare_blanks(100, 3).failed);

  check = compare_blanks(33, 1);
  EXPECT_FALSE(check.failed);
  EXPECT_FALSE(check.rows[2].passed.has_value());
  EXPECT_NE(check.rows[2].note.find("34 are needed"), std::string::npos);
}

std::string why_not_compared(const CalibrationSet& set) {
  const LimitCheck check =
      check_established_limit(comparing("blank-deviation"), set);
  EXPECT_EQ(check.rows.size(), 1U);
  EXPECT_FALSE(check.failed);
  EXPECT_FALSE(check.rows[0].passed.has_value());
  return check.rows[0].note;
}

TEST(EstablishedLimit, NotChecked) {
  EXPECT_TRUE(check_established_limit({}, set_of_limits(limit_row("x", 1, 1)))
                  .rows.empty());
  LimitRow tonight = limit_row("blank-deviation", 0.7, 2.0);
  tonight.estimate.value().findings = {{Grade::NotValid, "few-blanks", ""}};
  EXPECT_EQ(why_not_compared(set_of_limits(tonight)),
            "not checked: blank-deviation is not valid tonight: few-blanks");
  tonight.estimate = NotApplicable{"few-blanks: 2 solvent blanks"};
  EXPECT_EQ(why_not_compared(set_of_limits(tonight)),
            "not checked: blank-deviation: few-blanks: 2 solvent blanks");
  CalibrationSet set = set_of_limits(limit_row("another", 0.7, 2.0));
  EXPECT_EQ(why_not_compared(set),
            "not checked: blank-deviation is not among the limits");
  set.limits.rows.erase(set.limits.rows.begin());
  EXPECT_EQ(why_not_compared(set),
            "not checked: established is not among the limits");
  set.calibration = NotApplicable{"slope"};
  EXPECT_EQ(why_not_compared(set), "not checked: no calibration");
}

/// Standards, blanks and seven low spikes at the lowest standard.
NightBuilder whole_night(const std::vector<double>& spikes) {
  NightBuilder night;
  for (double x : {0.5, 1.0, 2.0, 5.0, 10.0, 20.0}) night.standard(x);
  // The first blank, after the highest standard, is left out.
  for (double blank : {0.0, 0.1, -0.1, 0.05, -0.05, 0.02, -0.02, 0.08})
    night.add(Role::SolventBlank, blank, false);
  for (double spike : spikes) night.add_level(Role::LowSpike, 0.5, 2.0 * spike);
  night.add(Role::Sample, 10.0);
  ProcedureSettings deviation;
  deviation.name = "blank-deviation";
  ProcedureSettings established;
  established.name = "established";
  established.detection = 0.2;
  established.quantitation = 0.5;
  night.settings.limits.procedures = {deviation, established};
  night.settings.limits.governing = "established";
  return night;
}

TEST(LimitChecks, FlagOrWithholdTheResults) {
  NightBuilder night = whole_night(kFailing);
  night.settings.acceptance.confirmation.emplace();
  AnalyteJudgement judged = night.judge();
  EXPECT_EQ(rows_of(judged.checks, "confirmation").size(), 4U);
  EXPECT_EQ(judged.results.back().status, Status::Reportable);
  EXPECT_TRUE(has_word(judged.results.back().reasons, "confirmation-failed"));

  night.settings.acceptance.confirmation->action = CheckAction::Withhold;
  judged = night.judge();
  EXPECT_EQ(judged.results.back().status, Status::Withheld);
  EXPECT_EQ(judged.results.back().reasons.front(), "confirmation-failed");

  night = whole_night(kPassing);
  night.settings.acceptance.confirmation.emplace();
  judged = night.judge();
  EXPECT_FALSE(has_word(judged.results.back().reasons, "confirmation-failed"));
}

// The blanks' deviation is 0.036 in concentration: detection 0.107,
// quantitation 0.36.
TEST(LimitChecks, EstablishedLimitOfAWholeNight) {
  NightBuilder night = whole_night(kPassing);
  night.settings.acceptance.established_limit.emplace();
  night.settings.acceptance.established_limit->procedure = "blank-deviation";
  AnalyteJudgement judged = night.judge();
  ASSERT_EQ(rows_of(judged.checks, "established-limit").size(), 2U);
  EXPECT_FALSE(
      has_word(judged.results.back().reasons, "established-limit-failed"));

  night.settings.acceptance.established_limit->ratio_low = 0.8;
  judged = night.judge();
  EXPECT_EQ(rows_of(judged.checks, "established-limit")[0].passed, false);
  EXPECT_TRUE(
      has_word(judged.results.back().reasons, "established-limit-failed"));
  EXPECT_EQ(judged.results.back().status, Status::Reportable);
}

TEST(LimitChecks, NotAskedForIsSaid) {
  const AnalyteJudgement judged = whole_night(kPassing).judge();
  for (const char* check : {"established-limit", "confirmation"}) {
    const auto rows = rows_of(judged.checks, check);
    ASSERT_EQ(rows.size(), 1U);
    EXPECT_EQ(rows[0].note, "not checked: the method does not ask for it");
  }
}

}  // namespace
}  // namespace loqsmith
