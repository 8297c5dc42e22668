#include "loqsmith/judgement/closeness_check.hpp"

#include "judgement/night_builder.hpp"
#include "loqsmith/judgement/repeats.hpp"
#include "loqsmith/judgement/reportable_result.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::has_word;
using test::NightBuilder;
using test::NightRow;
using test::rows_of;
using test::same_bits;

struct One {
  double vial;
  double dilution;
};

/// Standards 1 to 100 on the line 2x; blanks of standard deviation 0.1, so that
/// 10 s / b = 0.5; one sample "W-1" with the given injections, then another.
class Closeness : public testing::Test {
 protected:
  Closeness() {
    ProcedureSettings blanks;
    blanks.name = "blank-deviation";
    night_.settings.limits.procedures = {blanks};
    night_.settings.limits.floor_at_lowest_standard = false;
    for (const double response : {-0.1, 0.1, -0.1, 0.1, -0.1, 0.1, 0.0}) {
      night_.add(Role::SolventBlank, response, false);
    }
    for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0}) {
      night_.standard(x);
    }
    night_.settings.acceptance.closeness.emplace();
  }

  void sample(const std::vector<One>& injections) {
    for (const One& one : injections) {
      NightRow& row = night_.add(Role::Sample, 2.0 * one.vial);
      row.injection.sample = "W-1";
      row.injection.dilution = one.dilution;
    }
    night_.add(Role::Sample, 60.0).injection.sample = "W-2";
  }

  const AnalyteJudgement& judge() {
    judgement_ = night_.judge();
    return judgement_;
  }

  std::vector<const ResultRow*> results_of(const std::string& name) const {
    std::vector<const ResultRow*> rows;
    for (const ResultRow& row : judgement_.results) {
      if (row.sample == name) rows.push_back(&row);
    }
    return rows;
  }

  ReportableRow reportable() const {
    return reportable_results(judgement_, night_.sequence, night_.units, {})
        .front();
  }

  NightBuilder night_;
  AnalyteJudgement judgement_;
};

TEST_F(Closeness, WithoutTheCheckNothingIsCompared) {
  night_.settings.acceptance.closeness.reset();
  sample({{10.0, 1}, {30.0, 1}});
  const auto rows = rows_of(judge().checks, "closeness");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed);
  EXPECT_EQ(rows[0].note, "not checked: the method does not ask for it");
  EXPECT_EQ(reportable().status, Status::Reportable);
}

// 11 and 9 differ by 20 % of 10: at the limit passes.
TEST_F(Closeness, AtTheLimitPasses) {
  sample({{11.0, 1}, {4.5, 2}});
  const auto rows = rows_of(judge().checks, "closeness");
  ASSERT_EQ(rows.size(), 1U);
  night_.settings.acceptance.closeness->replicates = *rows[0].value;
  const auto again = rows_of(judge().checks, "closeness");
  EXPECT_TRUE(test::agrees_to_digits(*again[0].value, 20.0, 12));
  EXPECT_TRUE(again[0].passed.value());
  EXPECT_EQ(again[0].unit, "%");
  EXPECT_EQ(again[0].affects, "sample W-1");
  EXPECT_EQ(again[0].note, "injections 15, 16");
  EXPECT_EQ(reportable().injections, (std::vector<int>{15}));
}

TEST_F(Closeness, BeyondTheLimitTheWholeSampleIsWithheld) {
  sample({{11.0, 1}, {4.49, 2}, {0.3, 20}});
  const auto rows = rows_of(judge().checks, "closeness");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed.value());
  EXPECT_EQ(rows[0].action, "withhold");
  for (const ResultRow* row : results_of("W-1")) {
    EXPECT_EQ(row->status, Status::Withheld);
    EXPECT_EQ(row->reasons.front(), "dilutions-disagree");
    EXPECT_TRUE(row->result);
  }
  EXPECT_EQ(results_of("W-2").front()->status, Status::Reportable);
  const ReportableRow row = reportable();
  EXPECT_EQ(row.status, Status::Withheld);
  EXPECT_FALSE(row.result);
  EXPECT_EQ(row.reasons, (std::vector<std::string>{"dilutions-disagree"}));
  EXPECT_EQ(row.rejected.size(), 3U);
}

TEST_F(Closeness, AFlagLeavesTheNumber) {
  night_.settings.acceptance.closeness->action = CheckAction::Flag;
  sample({{11.0, 1}, {4.0, 2}});
  EXPECT_FALSE(rows_of(judge().checks, "closeness")[0].passed.value());
  for (const ResultRow* row : results_of("W-1")) {
    EXPECT_EQ(row->status, Status::Reportable);
    EXPECT_TRUE(has_word(row->reasons, "dilutions-disagree"));
  }
  const ReportableRow row = reportable();
  EXPECT_EQ(row.reported, "11.0");
  EXPECT_TRUE(has_word(row.reasons, "dilutions-disagree"));
}

TEST_F(Closeness, AContradictionFailsWithoutADifference) {
  sample({{140.0, 1}, {0.3, 10}});
  const auto rows = rows_of(judge().checks, "closeness");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed.value());
  EXPECT_FALSE(rows[0].value);
  EXPECT_EQ(rows[0].note,
            "injections 15, 16: what one says rules out what another says");
  for (const ResultRow* row : results_of("W-1")) {
    EXPECT_EQ(row->status, Status::Withheld);
  }
}

TEST_F(Closeness, SurrogatesAreNotCompared) {
  night_.settings.surrogate_concentration = 10.0;
  sample({{10.0, 1}, {10.0, 5}});
  const auto rows = rows_of(judge().checks, "closeness");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed);
  EXPECT_EQ(results_of("W-1").front()->status, Status::Reportable);
}

TEST_F(Closeness, NothingToCompare) {
  sample({{140.0, 1}, {20.0, 10}, {2.0, 100}});
  night_.rows[15].injection.sample = "W-3";
  night_.rows[16].injection.sample = "W-4";
  const auto rows = rows_of(judge().checks, "closeness");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed);
  EXPECT_EQ(rows[0].note, "not checked: no sample has two results in range");
}

// A failed check standard withholds the second one: it is not compared.
TEST_F(Closeness, WithheldOnesNeverCount) {
  night_.settings.acceptance.check_standard.emplace();
  night_.add_level(Role::CheckStandard, 20.0, 40.0);
  night_.add(Role::Sample, 20.0).injection.sample = "W-1";
  night_.add_level(Role::CheckStandard, 20.0, 40.0);
  night_.add(Role::Sample, 60.0).injection.sample = "W-1";
  night_.add_level(Role::CheckStandard, 20.0, 80.0);
  const auto rows = rows_of(judge().checks, "closeness");
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_FALSE(rows[0].passed);
  const ReportableRow row = reportable();
  EXPECT_EQ(row.reported, "10.0");
  ASSERT_EQ(row.rejected.size(), 1U);
  EXPECT_EQ(row.rejected[0].why, "check-standard-failed");
}

TEST(PercentDifference, IsThatOfTheFarthestPair) {
  EXPECT_TRUE(same_bits(percent_difference({9.0, 11.0}), 20.0));
  EXPECT_TRUE(same_bits(percent_difference({90.0, 100.0, 110.0}), 20.0));
  EXPECT_TRUE(same_bits(percent_difference({5.0}), 0.0));
}

}  // namespace
}  // namespace loqsmith
