#include "loqsmith/judgement/calibration_sets.hpp"

#include <stdexcept>

#include "judgement/night_builder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::NightBuilder;
using Sets = CalibrationSettings::Sets;
using Numbers = std::vector<int>;

Numbers numbers_of(const SetMembers& set, Role role) {
  Numbers numbers;
  for (const InjectionResponse& one : set.analyte.injections) {
    if (one.injection->role == role) numbers.push_back(one.injection->number);
  }
  return numbers;
}

// 1 blank; 2 to 7 standards with a blank and a check between; 8 sample;
// 9 blank; 10 to 12 standards; 13, 14 samples.
NightBuilder two_blocks(Sets sets) {
  NightBuilder night;
  night.settings.calibration.sets = sets;
  night.add(Role::SolventBlank, 0.0, false);
  night.standard(1.0);
  night.standard(2.0);
  night.add(Role::SolventBlank, 0.0, false);
  night.add_level(Role::CheckStandard, 3.0, 6.0);
  night.add(Role::Conditioning, 0.0);
  night.standard(4.0);
  night.add(Role::Sample, 3.0);
  night.add(Role::SolventBlank, 0.0, false);
  night.standard(1.0);
  night.standard(2.0);
  night.standard(4.0);
  night.add(Role::Sample, 3.0);
  night.add(Role::Sample, 3.0);
  return night;
}

TEST(CalibrationSets, OneHoldsTheWholeNight) {
  NightBuilder night = two_blocks(Sets::One);
  const auto sets = divide_into_sets(night.collect());
  ASSERT_EQ(sets.size(), 1U);
  EXPECT_EQ(sets[0].name, "1");
  EXPECT_EQ(numbers_of(sets[0], Role::Standard),
            (Numbers{2, 3, 7, 10, 11, 12}));
  EXPECT_EQ(sets[0].analyte.injections.size(), 13U);
}

TEST(CalibrationSets, LatestStartsAnewWithEachBlock) {
  NightBuilder night = two_blocks(Sets::Latest);
  const auto sets = divide_into_sets(night.collect());
  ASSERT_EQ(sets.size(), 2U);
  EXPECT_EQ(sets[0].name, "1");
  EXPECT_EQ(sets[1].name, "2");
  EXPECT_EQ(numbers_of(sets[0], Role::Standard), (Numbers{2, 3, 7}));
  EXPECT_EQ(numbers_of(sets[0], Role::SolventBlank), (Numbers{1, 4, 9}));
  EXPECT_EQ(numbers_of(sets[0], Role::CheckStandard), Numbers{5});
  EXPECT_EQ(numbers_of(sets[0], Role::Sample), Numbers{8});
  EXPECT_EQ(numbers_of(sets[1], Role::Standard), (Numbers{10, 11, 12}));
  EXPECT_EQ(numbers_of(sets[1], Role::Sample), (Numbers{13, 14}));
  EXPECT_TRUE(numbers_of(sets[1], Role::SolventBlank).empty());
}

TEST(CalibrationSets, BracketsShareTheBlockBetweenThem) {
  NightBuilder night = two_blocks(Sets::Bracketing);
  for (const double x : {1.0, 2.0, 4.0}) night.standard(x);  // 15 to 17
  night.add(Role::Sample, 3.0);                              // 18
  const auto sets = divide_into_sets(night.collect());
  ASSERT_EQ(sets.size(), 2U);
  EXPECT_EQ(sets[0].name, "1+2");
  EXPECT_EQ(sets[1].name, "2+3");
  EXPECT_EQ(numbers_of(sets[0], Role::Standard),
            (Numbers{2, 3, 7, 10, 11, 12}));
  EXPECT_EQ(numbers_of(sets[1], Role::Standard),
            (Numbers{10, 11, 12, 15, 16, 17}));
  EXPECT_EQ(sets[0].closing, (Numbers{10, 11, 12}));
  EXPECT_EQ(sets[1].closing, (Numbers{15, 16, 17}));
  EXPECT_EQ(sets[0].opens, 2);
  EXPECT_EQ(sets[0].closes, 12);
  EXPECT_EQ(numbers_of(sets[0], Role::Sample), Numbers{8});
  EXPECT_EQ(numbers_of(sets[1], Role::Sample), (Numbers{13, 14, 18}));
}

TEST(CalibrationSets, AStandardAtZeroMakesNoBlockOfItsOwn) {
  NightBuilder night;
  night.settings.calibration.sets = Sets::Latest;
  night.standard(0.0);           // 1
  night.add(Role::Sample, 1.0);  // 2
  night.standard(0.0);           // 3: opens the first block
  night.standard(1.0);           // 4
  night.add(Role::Sample, 1.0);  // 5
  night.standard(0.0);           // 6: nothing above zero beside it
  night.add(Role::Sample, 1.0);  // 7
  night.standard(1.0);           // 8
  const auto sets = divide_into_sets(night.collect());
  ASSERT_EQ(sets.size(), 2U);
  EXPECT_EQ(numbers_of(sets[0], Role::Standard), (Numbers{1, 3, 4, 6}));
  EXPECT_EQ(numbers_of(sets[0], Role::Sample), (Numbers{2, 5, 7}));
  EXPECT_EQ(numbers_of(sets[1], Role::Standard), Numbers{8});
}

// A mixture without the analyte is no standard of it and starts nothing.
TEST(CalibrationSets, OnlyLevelsWithTheAnalyteMakeABlock) {
  NightBuilder night = two_blocks(Sets::Latest);
  for (const int injection : {10, 11, 12}) {
    night.rows[static_cast<std::size_t>(injection) - 1].injection.level =
        "other mixture";
  }
  const auto sets = divide_into_sets(night.collect());
  ASSERT_EQ(sets.size(), 1U);
  EXPECT_EQ(numbers_of(sets[0], Role::Sample), (Numbers{8, 13, 14}));
}

TEST(CalibrationSets, ANightWithoutStandardsIsOneSet) {
  for (const Sets kind : {Sets::One, Sets::Latest, Sets::Bracketing}) {
    NightBuilder night;
    night.settings.calibration.sets = kind;
    night.add(Role::Sample, 1.0);
    const auto sets = divide_into_sets(night.collect());
    ASSERT_EQ(sets.size(), 1U);
    EXPECT_EQ(numbers_of(sets[0], Role::Sample), Numbers{1});
    EXPECT_EQ(sets[0].opens, 0);
  }
}

TEST(CalibrationSets, WhatEndsABlock) {
  for (const Role role :
       {Role::Sample, Role::Duplicate, Role::Fortified, Role::Control,
        Role::FortifiedDuplicate, Role::AddedStandard, Role::LowSpike}) {
    EXPECT_TRUE(ends_a_block(role)) << role_name(role);
  }
  for (const Role role :
       {Role::Conditioning, Role::SolventBlank, Role::MethodBlank,
        Role::Standard, Role::SecondSource, Role::CheckStandard}) {
    EXPECT_FALSE(ends_a_block(role)) << role_name(role);
  }
}

}  // namespace
}  // namespace loqsmith
