#include "loqsmith/numerics/shapiro_wilk.hpp"

#include <cmath>
#include <vector>

#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Weights of eleven men in pounds: Shapiro and Wilk 1965 print W 0.79 (from
// memory); further digits and p from R 4.2.2, shapiro.test.
TEST(ShapiroWilk, PublishedSample) {
  const auto found = shapiro_wilk(std::vector<double>{
      148, 154, 158, 160, 161, 162, 166, 170, 182, 195, 236});
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(found->w, 0.79, 2));
  EXPECT_TRUE(agrees_to_digits(found->w, 0.7888146948354, 9));
  EXPECT_TRUE(agrees_to_digits(found->p, 0.0067038140565, 8));
}

// R 4.2.2, shapiro.test of round(7 sin i + i^1.5/3, 3), i from 1 to n: each
// branch of the algorithm.
TEST(ShapiroWilk, EachBranch) {
  struct Row {
    int n;
    double w, p;
  };
  for (const Row& row :
       std::initializer_list<Row>{{3, 0.915131564913, 0.435429621512},
                                  {4, 0.914754458065, 0.507951198366},
                                  {5, 0.869147775164, 0.262990047827},
                                  {6, 0.892127980492, 0.329488024703},
                                  {8, 0.954954253597, 0.760900799379},
                                  {11, 0.958975806346, 0.758848540869},
                                  {12, 0.957756141578, 0.751382994875},
                                  {20, 0.972554242991, 0.807643211174},
                                  {50, 0.933361234583, 0.00742303465161}}) {
    std::vector<double> values;
    for (int i = 1; i <= row.n; ++i)
      values.push_back(
          std::round(1000.0 * (7.0 * std::sin(i) + std::pow(i, 1.5) / 3.0)) /
          1000.0);
    const auto found = shapiro_wilk(values);
    ASSERT_TRUE(found);
    EXPECT_TRUE(agrees_to_digits(found->w, row.w, 9));
    EXPECT_TRUE(agrees_to_digits(found->p, row.p, 7));
  }
}

// Five percent points of Shapiro and Wilk's own table (from memory), which the
// later approximation meets to two digits.
TEST(ShapiroWilk, CriticalValuesAreThoseOfTheTable) {
  EXPECT_TRUE(agrees_to_digits(shapiro_wilk_critical(10, 0.05), 0.842, 2));
  EXPECT_TRUE(agrees_to_digits(shapiro_wilk_critical(20, 0.05), 0.905, 2));
}

TEST(ShapiroWilk, CriticalValueAndPAgree) {
  std::vector<double> values;
  for (int i = 0; i < 12; ++i) values.push_back(std::exp(0.2 * i));
  for (std::size_t n : {3U, 5U, 9U, 12U}) {
    const std::vector<double> first(values.begin(),
                                    values.begin() + static_cast<long>(n));
    const auto found = shapiro_wilk(first);
    ASSERT_TRUE(found);
    EXPECT_TRUE(
        agrees_to_digits(shapiro_wilk_critical(n, found->p), found->w, 9));
  }
}

TEST(ShapiroWilk, Refusals) {
  EXPECT_FALSE(shapiro_wilk(std::vector<double>{1, 2}));
  EXPECT_FALSE(shapiro_wilk(std::vector<double>{2, 2, 2, 2}));
  EXPECT_FALSE(shapiro_wilk(std::vector<double>(5001, 1.0)));
}

}  // namespace
}  // namespace loqsmith::test
