#include "loqsmith/limits/method_blank_limit.hpp"

#include <optional>
#include <vector>

#include "limits/evidence_builders.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

using Results = std::vector<std::optional<double>>;
using Rule = MethodBlankLimit::Rule;

Outcome<MethodBlankLimit> limit(const Results& results) {
  return method_blank_limit(results, 0.99);
}

// The cases follow US EPA 40 CFR 136 Appendix B, Revision 2 (2016), II 2 d
// (iii) A to C, from memory; figures of A to C computed with another library.
TEST(MethodBlankLimit, AllGiveANumber) {
  const auto found = limit({0.12, 0.05, 0.21, 0.09, 0.15, 0.02, 0.11, 0.18});
  ASSERT_TRUE(found);
  EXPECT_EQ(found->rule, Rule::MeanAndSpread);
  EXPECT_TRUE(agrees_to_digits(found->mean, 0.11625, 5));
  EXPECT_TRUE(agrees_to_digits(found->sd, 0.06368169, 7));
  EXPECT_TRUE(agrees_to_digits(found->value, 0.30716461, 8));
}

TEST(MethodBlankLimit, ANegativeMeanCountsAsZero) {
  const auto found = limit({-0.12, 0.05, -0.21, -0.09, 0.15, 0.02, -0.11});
  ASSERT_TRUE(found);
  EXPECT_TRUE(same_bits(found->mean, 0.0));
  EXPECT_TRUE(agrees_to_digits(found->sd, 0.12272695, 8));
  EXPECT_TRUE(agrees_to_digits(found->value, 0.38569011, 8));
}

TEST(MethodBlankLimit, SomeGiveANumber) {
  const auto none = std::nullopt;
  const auto found = limit({none, none, 0.31, none, 0.75, none, none});
  ASSERT_TRUE(found);
  EXPECT_EQ(found->rule, Rule::Highest);
  EXPECT_TRUE(same_bits(found->value, 0.75));
}

TEST(MethodBlankLimit, NoneGivesANumber) {
  EXPECT_TRUE(contains(limit(Results(7)).reason(), "blanks-without-number"));
  EXPECT_TRUE(contains(limit({}).reason(), "blanks-without-number"));
  EXPECT_TRUE(contains(limit({0.3}).reason(), "few-blanks"));
}

// The document's own example (from memory): 164 blanks, the highest five 1.5,
// 1.7, 1.9, 5.0 and 10; 164 x 0.99 = 162.36, so the value of rank 162: 1.9.
TEST(MethodBlankLimit, ThePublishedPercentile) {
  Results results(164);
  const std::vector<double> highest = {1.5, 1.7, 1.9, 5.0, 10.0};
  for (std::size_t i = 0; i < highest.size(); ++i) results[20 * i] = highest[i];
  const auto found = limit(results);
  ASSERT_TRUE(found);
  EXPECT_EQ(found->rule, Rule::Percentile);
  EXPECT_EQ(found->n, 164U);
  EXPECT_TRUE(same_bits(found->value, 1.9));
}

TEST(MethodBlankLimit, RanksFromAHundredBlanksOn) {
  Results results(99);
  results[0] = 5.0;
  results[1] = 4.0;
  EXPECT_TRUE(same_bits(limit(results)->value, 5.0));
  results.emplace_back();
  EXPECT_TRUE(same_bits(limit(results)->value, 4.0));  // rank 99 of 100
  results[1].reset();
  EXPECT_TRUE(contains(limit(results).reason(), "blanks-without-number"));
}

// One-sided t at 99 % as the document tabulates it, n - 1 degrees of freedom.
TEST(MethodBlankLimit, StudentsT) {
  struct Row {
    double n, printed, computed;
  };
  for (const Row& row : std::vector<Row>{{7, 3.143, 3.142668},
                                         {8, 2.998, 2.997952},
                                         {9, 2.896, 2.896459},
                                         {10, 2.821, 2.821438},
                                         {11, 2.764, 2.763769},
                                         {16, 2.602, 2.602480},
                                         {21, 2.528, 2.527977},
                                         {26, 2.485, 2.485107},
                                         {31, 2.457, 2.457262},
                                         {32, 2.453, 2.452824},
                                         {48, 2.408, 2.408345},
                                         {50, 2.405, 2.404892},
                                         {61, 2.390, 2.390119},
                                         {64, 2.387, 2.387008},
                                         {80, 2.374, 2.374482},
                                         {96, 2.366, 2.366243},
                                         {100, 2.365, 2.364606}}) {
    const double t = student_t_quantile(0.99, row.n - 1.0);
    EXPECT_TRUE(agrees_to_digits(t, row.printed, 4)) << row.n;
    EXPECT_TRUE(agrees_to_digits(t, row.computed, 7)) << row.n;
  }
}

}  // namespace
}  // namespace loqsmith::test
