// Several calibration sets, from responses to verdicts.

#include <array>
#include <cmath>
#include <stdexcept>

#include "judgement/night_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_word;
using test::NightBuilder;
using test::NightRow;
using test::rows_of;
using test::within_condition;
using Sets = CalibrationSettings::Sets;

constexpr std::array<double, 6> kLevels{1.0, 2.0, 5.0, 10.0, 20.0, 50.0};

void add_standards(NightBuilder& night) {
  for (const double x : kLevels) night.standard(x);
}

// Seven with mean 0 and standard deviation 0.1.
void add_blanks(NightBuilder& night) {
  for (const double response : {-0.1, 0.1, -0.1, 0.1, -0.1, 0.1, 0.0}) {
    night.add(Role::SolventBlank, response, false);
  }
}

NightBuilder empty_night(Sets sets) {
  NightBuilder night;
  ProcedureSettings blanks;
  blanks.name = "blank-deviation";
  night.settings.limits.procedures = {blanks};
  night.settings.limits.floor_at_lowest_standard = false;
  night.settings.calibration.sets = sets;
  night.settings.acceptance.calibration.emplace();
  return night;
}

void add_sample(NightBuilder& night, double truth) {
  night.add(Role::Sample, night.sensitivity * truth);
}

// Blanks 1 to 7, standards 8 to 13, sample 14, standards 15 to 20, sample 21;
// then the detector gives half: standards 22 to 27, sample 28, standards 29 to
// 34, sample 35.
NightBuilder changing_night(Sets sets) {
  NightBuilder night = empty_night(sets);
  add_blanks(night);
  add_standards(night);
  add_sample(night, 8.0);
  add_standards(night);
  add_sample(night, 8.0);
  night.sensitivity = 1.0;
  add_standards(night);
  add_sample(night, 8.0);
  add_standards(night);
  add_sample(night, 8.0);
  return night;
}

const ResultRow& row_of(const AnalyteJudgement& judgement, int injection) {
  for (const ResultRow& row : judgement.results) {
    if (row.injection == injection) return row;
  }
  throw std::runtime_error("no row for injection " + std::to_string(injection));
}

TEST(JudgeSets, LatestFollowsTheSensitivity) {
  NightBuilder night = changing_night(Sets::Latest);
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 4U);
  const std::array<int, 4> samples{14, 21, 28, 35};
  for (std::size_t i = 0; i < samples.size(); ++i) {
    const ResultRow& row = row_of(judgement, samples[i]);
    EXPECT_TRUE(within_condition(*row.result, 8.0, 1e3)) << row.injection;
    EXPECT_EQ(row.set, std::to_string(i + 1));
    EXPECT_EQ(row.status, Status::Reportable);
    EXPECT_EQ(judgement.sets[i].standards.size(), 6U);
    EXPECT_FALSE(judgement.sets[i].alone);
  }
}

TEST(JudgeSets, OneCurveMixesThemAll) {
  NightBuilder night = changing_night(Sets::One);
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 1U);
  EXPECT_GT(*row_of(judgement, 14).result, 10.0);
  EXPECT_LT(*row_of(judgement, 35).result, 6.0);
}

// The sample between the two sensitivities cannot be right, and is said not to
// be; those with equal standards on both sides are.
TEST(JudgeSets, BracketingTestsBothSides) {
  NightBuilder night = changing_night(Sets::Bracketing);
  // Exact points have no scatter to hold a difference against.
  double sign = 0.01;
  for (NightRow& row : night.rows) {
    if (row.injection.role != Role::Standard) continue;
    row.peak.value().area *= 1.0 + sign;
    sign = -sign;
  }
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 3U);
  EXPECT_TRUE(agrees_to_digits(*row_of(judgement, 14).result, 8.0, 2));
  EXPECT_EQ(row_of(judgement, 14).set, "1+2");
  EXPECT_TRUE(row_of(judgement, 14).reasons.empty());
  EXPECT_EQ(row_of(judgement, 21).set, "2+3");
  EXPECT_TRUE(has_word(row_of(judgement, 21).reasons, "brackets-differ"));
  EXPECT_TRUE(agrees_to_digits(*row_of(judgement, 28).result, 8.0, 2));
  EXPECT_TRUE(row_of(judgement, 28).reasons.empty());
  EXPECT_EQ(row_of(judgement, 35).set, "3+4");
  EXPECT_EQ(row_of(judgement, 35).reasons,
            std::vector<std::string>{"no-closing-standards"});

  const auto rows = rows_of(judgement.checks, "bracketing");
  ASSERT_EQ(rows.size(), 3U);
  EXPECT_EQ(rows[0].passed, true);
  EXPECT_EQ(rows[1].passed, false);
  EXPECT_EQ(rows[2].passed, true);
  EXPECT_EQ(rows[1].set, "2+3");
  EXPECT_EQ(rows[1].affects, "results of injections 15 to 27");
  EXPECT_NE(rows[1].note.find("set 2+3: F test"), std::string::npos);
  EXPECT_NE(rows[1].note.find("respond 50"), std::string::npos);
  EXPECT_NE(rows[1].note.find("% less"), std::string::npos);
  EXPECT_GT(*rows[1].value, *rows[1].high);
}

TEST(JudgeSets, OneBlockOfStandardsClosesNothing) {
  NightBuilder night = empty_night(Sets::Bracketing);
  add_sample(night, 8.0);  // 1
  add_blanks(night);       // 2 to 8
  add_standards(night);    // 9 to 14
  add_sample(night, 8.0);  // 15
  night.add(Role::SolventBlank, 0.0, false);
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 1U);
  EXPECT_EQ(judgement.sets[0].set, "1");
  EXPECT_TRUE(has_word(row_of(judgement, 1).reasons, "no-opening-standards"));
  EXPECT_FALSE(has_word(row_of(judgement, 1).reasons, "no-closing-standards"));
  EXPECT_TRUE(has_word(row_of(judgement, 15).reasons, "no-closing-standards"));
  EXPECT_EQ(row_of(judgement, 15).status, Status::Reportable);
  EXPECT_FALSE(has_word(row_of(judgement, 16).reasons, "no-closing-standards"));
  const auto rows = rows_of(judgement.checks, "bracketing");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed.has_value());
  EXPECT_EQ(rows[0].note, "not checked: no standards follow the samples");
}

// 3 s / b: the same blanks, half the slope. Sets without blanks of their own
// say whose they took.
TEST(JudgeSets, LimitsFollowEachSetsSlope) {
  NightBuilder night = changing_night(Sets::Latest);
  const AnalyteJudgement judgement = night.judge();
  const std::array<double, 4> wanted{0.15, 0.15, 0.30, 0.30};
  for (std::size_t i = 0; i < wanted.size(); ++i) {
    const auto& governing = judgement.sets[i].limits.governing;
    ASSERT_TRUE(governing);
    EXPECT_TRUE(agrees_to_digits(governing->detection, wanted[i], 12));
    EXPECT_EQ(has_word(governing->notes, "blanks-of-all-sets"), i > 0);
  }
  EXPECT_TRUE(
      agrees_to_digits(*row_of(judgement, 28).detection_limit, 0.30, 12));
}

// Seven blanks of its own are enough for a set: ten times the scatter.
TEST(JudgeSets, OwnBlanksAreTakenWhereThereAreEnough) {
  NightBuilder night = changing_night(Sets::Latest);
  for (const double response : {-1.0, 1.0, -1.0, 1.0, -1.0, 1.0, 0.0}) {
    night.add(Role::SolventBlank, response, false);  // 36 to 42, set 4
  }
  const AnalyteJudgement judgement = night.judge();
  const auto detection = [&](std::size_t set) {
    return judgement.sets[set].limits.governing->detection;
  };
  EXPECT_TRUE(agrees_to_digits(detection(0), 0.15, 12));
  EXPECT_TRUE(agrees_to_digits(detection(3), 3.0, 12));
  // Neither has enough: all fourteen.
  EXPECT_GT(detection(1), 0.15);
  EXPECT_TRUE(agrees_to_digits(detection(2), 2.0 * detection(1), 12));
  EXPECT_EQ(judgement.sets[2].limits.rows[0].estimate->n, 14U);
}

// What comes after the high sample of another set carries over all the same.
TEST(JudgeSets, ABlankAfterAHighSampleOfAnotherSetIsLeftOut) {
  NightBuilder night = empty_night(Sets::Latest);
  add_blanks(night);
  add_standards(night);
  add_sample(night, 45.0);
  NightBuilder with_zero = night;
  with_zero.settings.limits.blanks = BlankKind::All;
  with_zero.standard(0.0).peak = test::peak_of(5.0, false);
  add_standards(with_zero);
  const AnalyteJudgement judgement = with_zero.judge();
  ASSERT_EQ(judgement.sets.size(), 2U);
  EXPECT_EQ(judgement.sets[1].limits.rows[0].estimate->n, 7U);
}

TEST(JudgeSets, ASetWithoutCurveWithholdsItsOwnResultsOnly) {
  NightBuilder night = changing_night(Sets::Latest);
  for (std::size_t i = 14; i < 20; ++i) {
    night.rows[i].peak = NotApplicable{"file-refused: cut off"};
  }
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(row_of(judgement, 14).status, Status::Reportable);
  EXPECT_EQ(row_of(judgement, 21).status, Status::Withheld);
  EXPECT_EQ(row_of(judgement, 21).reasons,
            std::vector<std::string>{"no-calibration"});
  EXPECT_EQ(row_of(judgement, 28).status, Status::Reportable);
  EXPECT_EQ(judgement.sets[1].unmeasured.size(), 6U);
  const auto rows = rows_of(judgement.checks, "calibration");
  ASSERT_EQ(rows.size(), 7U);  // two for each set, one for the lost one
  EXPECT_EQ(rows[2].set, "2");
  EXPECT_EQ(rows[2].passed, false);
  EXPECT_EQ(rows[2].affects, "all results of the set 2");
  EXPECT_EQ(rows[2].note.rfind("set 2: no calibration: ", 0), 0U);
}

// A check standard speaks of the set that it is judged by, and of no other.
TEST(JudgeSets, CheckStandardsGovernTheirOwnSet) {
  NightBuilder night = empty_night(Sets::Latest);
  night.settings.acceptance.check_standard.emplace();
  add_blanks(night);                                // 1 to 7
  add_standards(night);                             // 8 to 13
  night.add_level(Role::CheckStandard, 20.0, 40);   // 14
  add_sample(night, 8.0);                           // 15
  night.add_level(Role::CheckStandard, 20.0, 40);   // 16
  add_standards(night);                             // 17 to 22
  add_sample(night, 8.0);                           // 23
  night.add_level(Role::CheckStandard, 20.0, 100);  // 24
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(row_of(judgement, 15).status, Status::Reportable);
  EXPECT_EQ(row_of(judgement, 23).status, Status::Withheld);
  const auto rows = rows_of(judgement.checks, "check-standard");
  ASSERT_EQ(rows.size(), 3U);
  EXPECT_EQ(rows[2].set, "2");
  EXPECT_EQ(rows[2].affects, "injections from the first to the end");
}

// Each spike by the curve of its own set, whatever set the limits are for: by
// another's they would come out at twice or half.
TEST(JudgeSets, SpikesAreFoundByTheirOwnCurve) {
  NightBuilder night = empty_night(Sets::Latest);
  night.settings.limits.procedures[0].name = "spike-replicates";
  night.settings.limits.procedures[0].blanks = BlankKind::Solvent;
  add_blanks(night);  // made so quiet that the spikes decide
  for (NightRow& row : night.rows) row.peak.value().area *= 0.1;
  add_standards(night);
  for (const double x : {1.9, 2.0, 2.1, 2.0}) {
    night.add_level(Role::LowSpike, 2.0, night.sensitivity * x);
  }
  night.sensitivity = 1.0;
  add_standards(night);
  for (const double x : {2.1, 1.9, 2.0, 2.0}) {
    night.add_level(Role::LowSpike, 2.0, night.sensitivity * x);
  }
  const AnalyteJudgement judgement = night.judge();
  ASSERT_EQ(judgement.sets.size(), 2U);
  // t_0.99(7) s, s^2 = 4 (0.1)^2 / 7: 2.997952 from a table of t.
  const double wanted = 2.997952 * 0.2 / std::sqrt(7.0);
  for (const CalibrationSet& set : judgement.sets) {
    ASSERT_TRUE(set.limits.rows[0].estimate);
    EXPECT_TRUE(
        agrees_to_digits(*set.limits.rows[0].estimate->detection, wanted, 6));
    ASSERT_TRUE(set.limits.governing);
    EXPECT_TRUE(has_word(set.limits.governing->notes, "spikes-of-all-sets"));
  }
}

TEST(JudgeSets, ResultsStandInRunOrder) {
  NightBuilder night = changing_night(Sets::Bracketing);
  const AnalyteJudgement judgement = night.judge();
  int before = 0;
  for (const ResultRow& row : judgement.results) {
    EXPECT_GT(row.injection, before);
    before = row.injection;
  }
  EXPECT_EQ(judgement.results.size(), 11U);
}

}  // namespace
}  // namespace loqsmith
