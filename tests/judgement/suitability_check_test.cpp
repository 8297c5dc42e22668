#include <gtest/gtest.h>

#include <array>
#include <string>

#include "judgement/checked_night.hpp"
#include "loqsmith/judgement/repeatability.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::checked_night;
using test::marked;
using test::NightBuilder;
using test::NightRow;
using test::outcomes;
using test::rows_of;
using test::same_bits;
using test::sample;

// European Pharmacopoeia 2.2.46, table of the largest permitted relative
// standard deviation, from memory, to the two decimals printed there; the
// further digits were computed with another library.
TEST(Repeatability, Table) {
  struct Row {
    double excess;
    std::array<double, 4> printed;  // n = 3, 4, 5, 6
    std::array<double, 4> computed;
  };
  const std::array<Row, 3> table{{
      {2.0, {0.41, 0.59, 0.73, 0.85}, {0.414053, 0.593222, 0.732159, 0.848528}},
      {2.5, {0.52, 0.74, 0.92, 1.06}, {0.517566, 0.741527, 0.915198, 1.060660}},
      {3.0, {0.62, 0.89, 1.10, 1.27}, {0.621080, 0.889833, 1.098238, 1.272792}},
  }};
  for (const Row& row : table) {
    for (std::size_t n = 3; n <= 6; ++n) {
      const double found = largest_repeatability(row.excess, n);
      const int digits = row.printed[n - 3] < 1.0 ? 2 : 3;
      EXPECT_TRUE(agrees_to_digits(found, row.printed[n - 3], digits));
      EXPECT_TRUE(
          agrees_to_digits(found, row.computed[n - 3], found < 1.0 ? 6 : 7));
    }
  }
}

TEST(Repeatability, FewerInjectionsAreAllowedLess) {
  EXPECT_EQ(injections_for_repeatability(2.0), 5U);
  EXPECT_EQ(injections_for_repeatability(2.1), 6U);
  EXPECT_TRUE(same_bits(repeatability_of(2.0, 5), 2.0));
  EXPECT_TRUE(same_bits(repeatability_of(2.0, 9), 2.0));
  // From the table: 0.414053, 0.593222 and 0.732159 of 3, 4 and 5.
  EXPECT_TRUE(
      agrees_to_digits(repeatability_of(2.0, 4), 2 * 0.593222 / 0.732159, 6));
  EXPECT_TRUE(
      agrees_to_digits(repeatability_of(5.0, 3), 5 * 0.414053 / 0.848528, 6));
}

NightBuilder suited(SuitabilityAcceptance limits) {
  NightBuilder night = checked_night();
  night.settings.acceptance.suitability = limits;
  for (NightRow& row : night.rows) {
    Peak& peak = row.peak.value();
    peak.tailing = 1.2;
    peak.plates = 5000.0;
    peak.resolution = 2.0;
  }
  sample(night, 5.0);  // 15
  return night;
}

SuitabilityAcceptance all_limits() {
  return {CheckAction::Flag, 1.2, 5000.0, 2.0, std::nullopt, 40.0};
}

// Each value exactly at its limit; the lowest standard has a ratio of 40.
TEST(Suitability, Passes) {
  NightBuilder night = suited(all_limits());
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "suitability"), "++++");
  EXPECT_EQ(marked(judgement, "suitability-failed"), "");
  const std::vector<CheckRow> rows = rows_of(judgement.checks, "suitability");
  EXPECT_EQ(rows[3].note, "signal-to-noise: the worst of 7 standards");
  EXPECT_EQ(rows[3].injection, 8);
}

TEST(Suitability, EachMeasureFailsByTheWorstStandard) {
  const auto failing = [](void (*spoil)(Peak&)) {
    NightBuilder night = suited(all_limits());
    spoil(night.rows[9].peak.value());
    const AnalyteJudgement judgement = night.judge();
    EXPECT_EQ(marked(judgement, "suitability-failed"), "1 2 3 4 5 6 7 15");
    return outcomes(judgement, "suitability");
  };
  EXPECT_EQ(failing([](Peak& peak) { peak.tailing = 1.21; }), "-+++");
  EXPECT_EQ(failing([](Peak& peak) { peak.plates = 4999.0; }), "+-++");
  EXPECT_EQ(failing([](Peak& peak) { peak.resolution = 1.99; }), "++-+");
  EXPECT_EQ(failing([](Peak& peak) { peak.signal_to_noise = 39.9; }), "+++-");
}

TEST(Suitability, OnlyStandardsWhoseShapeShows) {
  NightBuilder night = suited(all_limits());
  night.settings.acceptance.suitability->minimum_signal_to_noise.reset();
  Peak& noisy = night.rows[7].peak.value();
  noisy.signal_to_noise = 9.9;
  noisy.tailing = 3.0;
  Peak& flat = night.rows[13].peak.value();
  flat.reasons = {"saturated"};
  flat.tailing = 3.0;
  EXPECT_EQ(outcomes(night.judge(), "suitability"), "+++");
  for (NightRow& row : night.rows) row.peak.value().resolution.reset();
  EXPECT_EQ(outcomes(night.judge(), "suitability"), "++?");
}

// Three standards at 10, responses 19.8, 20 and 20.2: 1 %.
TEST(Suitability, RepeatabilityDependsOnTheNumber) {
  SuitabilityAcceptance limits;
  limits.maximum_area_rsd = 2.1;
  NightBuilder night = suited(limits);
  EXPECT_EQ(outcomes(night.judge(), "suitability"), "?");
  for (const double response : {19.8, 20.2}) {
    night.add(Role::Standard, response).injection.level =
        night.rows[10].injection.level;
  }
  const AnalyteJudgement judgement = night.judge();
  const CheckRow row = rows_of(judgement.checks, "suitability")[0];
  EXPECT_TRUE(agrees_to_digits(row.value.value(), 1.0, 12));
  EXPECT_TRUE(agrees_to_digits(row.high.value(), 2.1 * 0.414053 / 0.848528, 6));
  EXPECT_EQ(row.passed, true);
  EXPECT_EQ(row.note,
            "area-rsd: 3 standards at 10; 2.1 % is stated for 6 or more");
  night.settings.acceptance.suitability->maximum_area_rsd = 1.9;
  EXPECT_EQ(outcomes(night.judge(), "suitability"), "+");
  night.settings.acceptance.suitability->maximum_area_rsd = 1.7;
  EXPECT_EQ(outcomes(night.judge(), "suitability"), "-");
}

TEST(Suitability, NotCheckedWithoutLimits) {
  NightBuilder night = suited({});
  EXPECT_EQ(outcomes(night.judge(), "suitability"), "?");
}

}  // namespace
}  // namespace loqsmith
