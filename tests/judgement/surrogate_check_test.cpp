#include "loqsmith/judgement/surrogate_check.hpp"

#include "judgement/quality_night.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::add_found;
using test::add_known;
using test::NightBuilder;
using test::quality_night;
using test::rows_of;
using test::same_bits;
using test::with_word;
using test::within_condition;

using Numbers = std::vector<int>;

// 20 in every undiluted vial: method blank 14, sample 15, sample 16 diluted
// twofold, check standard 17, sample 18 too low.
NightBuilder surrogate_night() {
  NightBuilder night = quality_night();
  night.settings.surrogate_concentration = 20.0;
  night.settings.acceptance.surrogate = {CheckAction::Withhold, {80.0, 120.0}};
  add_found(night, Role::MethodBlank, 20.0, "blank");
  add_found(night, Role::Sample, 18.0, "W1");
  add_found(night, Role::Sample, 22.0, "W2", 2.0);
  add_known(night, Role::CheckStandard, 5.0, 5.0);
  add_found(night, Role::Sample, 10.0, "W3");
  return night;
}

TEST(Surrogate, RecoveryInEverythingThatWasPrepared) {
  NightBuilder night = surrogate_night();
  const AnalyteJudgement judged = night.judge();
  const auto rows = rows_of(judged.checks, "surrogate");
  ASSERT_EQ(rows.size(), 4U);
  const std::vector<double> wanted{100.0, 90.0, 110.0, 50.0};
  const Numbers injections{14, 15, 16, 18};
  for (std::size_t i = 0; i < rows.size(); ++i) {
    EXPECT_EQ(rows[i].injection, injections[i]);
    EXPECT_TRUE(within_condition(*rows[i].value, wanted[i], 1e3));
    EXPECT_EQ(rows[i].passed, i < 3);
    EXPECT_EQ(rows[i].affects, "all results of the injection");
  }
  EXPECT_TRUE(same_bits(*rows[0].low, 80.0));
  EXPECT_TRUE(same_bits(*rows[0].high, 120.0));
  EXPECT_EQ(with_word(judged, "surrogate-failed"), Numbers{18});
  EXPECT_EQ(judged.results.back().status, Status::Withheld);
  ASSERT_EQ(judged.for_others.size(), 1U);
  EXPECT_EQ(judged.for_others[0].injection, 18);
  EXPECT_TRUE(judged.for_others[0].whole_injection);
}

TEST(Surrogate, WithoutANumberNothingShowsThatItHeld) {
  NightBuilder night = surrogate_night();
  night.rows[14].peak = NotApplicable{"file-refused: cut off"};
  auto rows = rows_of(night.judge().checks, "surrogate");
  EXPECT_EQ(rows.at(1).passed, false);
  EXPECT_EQ(rows.at(1).note, "file-refused: cut off");

  const AnalyteJudgement judged = night.judge("no peak in any standard");
  rows = rows_of(judged.checks, "surrogate");
  ASSERT_EQ(rows.size(), 4U);
  EXPECT_EQ(rows[0].passed, false);
  EXPECT_EQ(rows[0].note, "no calibration");
  EXPECT_EQ(judged.for_others.size(), 4U);
}

// A method blank holds 20 of it: no blank to take its limits from.
TEST(Surrogate, ItsMethodBlanksAreNoBlanks) {
  NightBuilder night = surrogate_night();
  EXPECT_EQ(night.judge().sets.at(0).blanks.size(), 7U);
  night.settings.surrogate_concentration.reset();
  EXPECT_EQ(night.judge().sets.at(0).blanks.size(), 8U);
}

TEST(Surrogate, OfOtherAnalytesOrOfNobodyItIsUnchecked) {
  NightBuilder night = surrogate_night();
  night.settings.surrogate_concentration.reset();
  auto rows = rows_of(night.judge().checks, "surrogate");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].note, "not checked: the analyte is no surrogate");
  night.settings.acceptance.surrogate.reset();
  rows = rows_of(night.judge().checks, "surrogate");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].note, "not checked: the method does not ask for it");
}

// Two surrogates fail in injections 15 and 18; the analyte before and the one
// after them, and each other, learn of both.
TEST(Surrogate, WhatOneShowsHoldsForEveryOtherAnalyte) {
  std::vector<NightBuilder> nights(4, surrogate_night());
  nights[2].rows[17].peak = test::peak_of(40.0);
  nights[2].rows[14].peak = test::peak_of(4.0);
  nights[0].settings.surrogate_concentration.reset();
  nights[3].settings.surrogate_concentration.reset();
  const std::vector<AnalyteJudgement> judged = judge_surrogates_first(
      {false, true, true, false},
      [&](std::size_t i, const std::vector<CheckEffect>& from_others) {
        NightBuilder& night = nights[i];
        return judge_analyte(night.settings, night.units, night.sequence,
                             night.measured(), {}, from_others);
      });
  ASSERT_EQ(judged.size(), 4U);
  for (const AnalyteJudgement& one : judged) {
    EXPECT_EQ(with_word(one, "surrogate-failed"), (Numbers{15, 18}));
    EXPECT_EQ(one.results.back().status, Status::Withheld);
  }
  EXPECT_EQ(judged[1].for_others.size(), 1U);
  EXPECT_EQ(judged[2].for_others.size(), 1U);
}

}  // namespace
}  // namespace loqsmith
