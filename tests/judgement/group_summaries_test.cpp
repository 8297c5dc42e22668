#include "loqsmith/judgement/group_summaries.hpp"

#include "judgement/censored_examples.hpp"
#include "judgement/sample_results.hpp"
#include "loqsmith/judgement/summary_inputs.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::below;
using test::measured;
using test::same_bits;
using test::SampleResults;

TEST(GroupSummaries, GroupsStayTogetherAndUnitsApart) {
  const std::vector<SummaryInput> inputs{
      {"wells", "zinol", "ug/L", measured(1)},
      {"", "zinol", "ug/L", measured(50)},
      {"river", "zinol", "ug/L", measured(2)},
      {"wells", "zinol", "ug/L", std::nullopt},
      {"wells", "zinol", "ug/kg", measured(3)},
      {"wells", "zinol", "ug/L", measured(4)},
      {"wells", "amidrin", "ug/L", below(5)}};
  const std::vector<SummaryRow> rows = summarise_groups(inputs);
  ASSERT_EQ(rows.size(), 4U);
  const auto is = [&](std::size_t i, const char* group, const char* analyte,
                      const char* unit) {
    return rows[i].group == group && rows[i].analyte == analyte &&
           rows[i].unit == unit;
  };
  EXPECT_TRUE(is(0, "wells", "zinol", "ug/L"));
  EXPECT_TRUE(is(1, "wells", "zinol", "ug/kg"));
  EXPECT_TRUE(is(2, "wells", "amidrin", "ug/L"));
  EXPECT_TRUE(is(3, "river", "zinol", "ug/L"));
  EXPECT_EQ(rows[0].withheld, 1U);
  EXPECT_EQ(rows[0].summary.counts.all(), 2U);
  EXPECT_TRUE(same_bits(*rows[0].summary.advised_estimate()->mean, 2.5));
  EXPECT_EQ(rows[2].summary.advice, "nothing-measured");
}

std::vector<SummaryInput> inputs_of(const SampleResults& night,
                                    const ReportingSettings& settings = {}) {
  return summary_inputs(night.reportable(settings));
}

void expect_value(const SummaryInput& input, double value, Censoring kind) {
  ASSERT_TRUE(input.value);
  EXPECT_TRUE(same_bits(input.value->value, value));
  EXPECT_EQ(input.value->censoring, kind);
}

TEST(SummaryInputs, EachStatusByWhatIsPrinted) {
  SampleResults night;
  night.add("a", Status::Reportable, 12.0);
  night.add("b", Status::Estimated, 2.0);
  night.add("c", Status::NotDetected, 0.4, 2.0);
  night.add("d", Status::AboveRange, 900.0, 5.0);
  night.add("e", Status::Withheld, 7.0);
  std::vector<SummaryInput> found = inputs_of(night);
  ASSERT_EQ(found.size(), 5U);
  expect_value(found[0], 12.0, Censoring::Measured);
  expect_value(found[1], 2.0, Censoring::Measured);
  expect_value(found[2], 2.0, Censoring::Below);
  expect_value(found[3], 500.0, Censoring::Above);
  EXPECT_FALSE(found[4].value);

  ReportingSettings settings;
  settings.below_detection = ReportingSettings::BelowDetection::Quantitation;
  settings.below_quantitation = ReportingSettings::BelowQuantitation::Limit;
  found = inputs_of(night, settings);
  expect_value(found[1], 3.0, Censoring::Below);
  expect_value(found[2], 6.0, Censoring::Below);
  settings = {};
  settings.reporting_limit = 15.0;
  found = inputs_of(night, settings);
  expect_value(found[0], 15.0, Censoring::Below);
  expect_value(found[2], 15.0, Censoring::Below);
}

TEST(SummaryInputs, SamplesOfAGroupOnly) {
  SampleResults night;
  night.add("blank", Status::NotDetected, 0.0, 1.0, Role::MethodBlank);
  night.add("check", Status::Reportable, 9.0, 1.0, Role::CheckStandard);
  night.add("a", Status::Reportable, 9.0, 1.0, Role::Sample, "");
  EXPECT_TRUE(inputs_of(night).empty());
}

TEST(SummaryInputs, OneValueASample) {
  SampleResults night;
  // In range only when diluted, twice injected there, once more beyond.
  night.add("a", Status::AboveRange, 180.0);
  night.add("a", Status::Reportable, 190.0, 10.0);
  night.add("a", Status::Reportable, 196.0, 10.0);
  night.add("a", Status::Estimated, 210.0, 100.0);
  // Above the range at every dilution.
  night.add("b", Status::AboveRange, 1.0, 10.0);
  night.add("b", Status::AboveRange, 1.0);
  // Nowhere seen: the least diluted says most.
  night.add("c", Status::NotDetected, 0.0, 10.0);
  night.add("c", Status::NotDetected, 0.0);
  // A withheld injection beside a good one.
  night.add("d", Status::Withheld, 3.0);
  night.add("d", Status::Reportable, 8.0);
  // They contradict each other.
  night.add("e", Status::AboveRange, 200.0);
  night.add("e", Status::NotDetected, 0.0, 10.0);
  const std::vector<SummaryInput> found = inputs_of(night);
  ASSERT_EQ(found.size(), 5U);
  expect_value(found[0], 193.0, Censoring::Measured);
  expect_value(found[1], 1000.0, Censoring::Above);
  expect_value(found[2], 1.0, Censoring::Below);
  expect_value(found[3], 8.0, Censoring::Measured);
  EXPECT_FALSE(found[4].value);
  const std::vector<SummaryRow> rows = summarise_groups(found);
  ASSERT_EQ(rows.size(), 1U);
  EXPECT_EQ(rows[0].withheld, 1U);
  EXPECT_EQ(rows[0].summary.counts.all(), 4U);
}

}  // namespace
}  // namespace loqsmith
