#include <cmath>

#include "calibration/examples.hpp"
#include "calibration/gear_data.hpp"
#include "loqsmith/calibration/cochran_test.hpp"
#include "loqsmith/calibration/grubbs_test.hpp"
#include "loqsmith/calibration/levene_test.hpp"
#include "loqsmith/calibration/residual_normality.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Published (from memory): Brown-Forsythe 1.705910. The further figures from
// R 4.2.2 (aov, pf).
TEST(Levene, GearBatches) {
  const auto median = levene_test(gear_batches());
  ASSERT_TRUE(median);
  EXPECT_TRUE(agrees_to_digits(median->statistic, 1.70591, 5));
  EXPECT_TRUE(agrees_to_digits(median->statistic, 1.70591769, 8));
  EXPECT_TRUE(agrees_to_digits(median->critical, 1.98559496, 9));
  EXPECT_TRUE(agrees_to_digits(*median->p, 0.09908298, 7));
  EXPECT_TRUE(median->passed);
  EXPECT_EQ(median->degrees_1, 9.0);
  EXPECT_EQ(median->degrees_2, 90.0);

  const auto mean = levene_test(gear_batches(), LeveneCentre::Mean);
  ASSERT_TRUE(mean);
  EXPECT_TRUE(agrees_to_digits(mean->statistic, 2.15945985647, 11));
  EXPECT_TRUE(agrees_to_digits(*mean->p, 0.0322368265598, 9));
  EXPECT_FALSE(mean->passed);
}

TEST(Levene, NeedsThreeReplicatesAndUnequalDistances) {
  const auto of = [](std::vector<std::vector<double>> levels) {
    std::vector<ReplicateGroup> groups;
    for (auto& responses : levels)
      groups.push_back({static_cast<double>(groups.size()), responses,
                        std::vector<int>(responses.size(), 0)});
    const auto found = levene_test(groups);
    return found ? std::string("done") : found.reason().substr(0, 11);
  };
  EXPECT_EQ(of({}), "few-replica");
  EXPECT_EQ(of({{1, 2}, {3, 4}, {5, 6, 7}}), "few-replica");
  EXPECT_EQ(of({{1, 1, 1}, {2, 2, 2}}), "not-defined");
  EXPECT_EQ(of({{1, 2, 3}, {4, 7, 9}}), "done");
}

TEST(Cochran, GearBatches) {
  const auto found = cochran_test(gear_batches());
  ASSERT_TRUE(found);
  // R 4.2.2 (tapply, var, qf, pf).
  EXPECT_TRUE(agrees_to_digits(found->statistic, 0.277126654064, 12));
  EXPECT_TRUE(agrees_to_digits(found->critical, 0.24388295, 8));
  EXPECT_TRUE(agrees_to_digits(*found->p, 0.01210390545, 7));
  EXPECT_FALSE(found->passed);
  EXPECT_EQ(found->concentration, 6.0);
}

// k levels of n values, one of them scattering: the critical values at 5 % of
// ISO 5725-2:1994, table 4 (from memory), with one digit more computed.
TEST(Cochran, CriticalValues) {
  struct Row {
    int levels, replicates;
    double critical;
  };
  for (const Row& row : std::initializer_list<Row>{{2, 3, .9750},
                                                   {3, 2, .9669},
                                                   {3, 3, .8709},
                                                   {3, 4, .7977},
                                                   {4, 2, .9065},
                                                   {4, 3, .7679},
                                                   {5, 2, .8413},
                                                   {5, 3, .6838},
                                                   {5, 5, .5440},
                                                   {6, 3, .6161},
                                                   {8, 3, .5157},
                                                   {10, 3, .4450},
                                                   {10, 6, .3028}}) {
    std::vector<ReplicateGroup> groups;
    for (int level = 0; level < row.levels; ++level) {
      ReplicateGroup group{level + 1.0, {}, {}};
      for (int i = 0; i < row.replicates; ++i)
        group.responses.push_back(10.0 * level + (level + 1.0) * (i % 2));
      groups.push_back(group);
    }
    const auto found = cochran_test(groups);
    ASSERT_TRUE(found);
    EXPECT_TRUE(agrees_to_digits(found->critical, row.critical, 4));
  }
}

// With unequal numbers the level that is least likely is named, not the one of
// the largest sum of squares.
TEST(Cochran, UnequalNumbersOfReplicates) {
  const std::vector<ReplicateGroup> groups{
      {1, {0, 4}, {1, 2}},                                        // SS 8, nu 1
      {2, {1, 2, 3, 2, 1, 3, 2, 1, 3, 2, 1, 3, 2, 2, 4, 0}, {}},  // SS 16
      {5, {3, 3.1, 3.2}, {}}};
  const auto found = cochran_test(groups);
  ASSERT_TRUE(found);
  EXPECT_EQ(found->concentration, 1.0);
  EXPECT_EQ(found->degrees_1, 1.0);
  EXPECT_EQ(found->degrees_2, 17.0);
  EXPECT_TRUE(within_condition(found->statistic, 8.0 / 24.02, 16));
}

TEST(Cochran, Refusals) {
  const auto reason = [](const std::vector<ReplicateGroup>& groups) {
    const auto found = cochran_test(groups);
    return found ? std::string("done") : found.reason().substr(0, 11);
  };
  EXPECT_EQ(reason({}), "no-replicat");
  EXPECT_EQ(reason({{1, {1, 2}, {}}, {2, {3}, {}}}), "no-replicat");
  EXPECT_EQ(reason({{1, {2, 2}, {}}, {2, {3, 3}, {}}}), "not-defined");
  // One level scatters, the other does not at all: certainly unequal.
  const auto one = cochran_test({{1, {2, 2}, {}}, {2, {3, 4}, {}}});
  ASSERT_TRUE(one);
  EXPECT_FALSE(one->passed);
  EXPECT_EQ(one->p, 0.0);
}

// Two-sided critical values (computed; those of Grubbs 1969 are one-sided).
TEST(Grubbs, CriticalValues) {
  struct Row {
    std::size_t n;
    double five_percent;
  };
  for (const Row& row : std::initializer_list<Row>{{3, 1.1543},
                                                   {4, 1.4812},
                                                   {5, 1.7150},
                                                   {6, 1.8871},
                                                   {8, 2.1266},
                                                   {10, 2.2900},
                                                   {15, 2.5483},
                                                   {20, 2.7082},
                                                   {100, 3.3841}})
    EXPECT_TRUE(
        agrees_to_digits(grubbs_critical(row.n, 0.05), row.five_percent, 5));
  EXPECT_TRUE(agrees_to_digits(grubbs_critical(3, 0.01), 1.1547, 5));
  EXPECT_TRUE(agrees_to_digits(grubbs_critical(20, 0.01), 3.0008, 5));
  // One-sided at 5 % is two-sided at 10 %: published 2.032 (NIST/SEMATECH
  // e-Handbook, uranium isotopes; from memory).
  EXPECT_TRUE(agrees_to_digits(grubbs_critical(8, 0.10), 2.032, 4));
  EXPECT_TRUE(agrees_to_digits(grubbs_critical(8, 0.10), 2.031652, 7));
}

TEST(Grubbs, PublishedSamples) {
  // Uranium isotopes: published G 2.4687 (NIST/SEMATECH e-Handbook; from
  // memory). p here and below from R 4.2.2 (pt).
  const std::vector<double> uranium{199.31, 199.53, 200.19, 200.82,
                                    201.92, 201.95, 202.18, 245.57};
  const auto isotopes = grubbs_test(uranium);
  ASSERT_TRUE(isotopes);
  EXPECT_TRUE(agrees_to_digits(isotopes->g, 2.468765, 7));
  EXPECT_TRUE(agrees_to_digits(isotopes->p, 3.00263868e-7, 6));
  EXPECT_EQ(isotopes->place, 7U);
  // Nitrite, mg/L: Miller and Miller (from memory); four values keep the low
  // one, seven do not.
  const auto four = grubbs_test(std::vector{.403, .410, .401, .380});
  ASSERT_TRUE(four);
  EXPECT_TRUE(agrees_to_digits(four->g, 1.431573, 7));
  EXPECT_LT(four->g, four->critical);
  EXPECT_TRUE(agrees_to_digits(four->p, 0.182472052832, 10));
  const auto seven =
      grubbs_test(std::vector{.403, .410, .401, .380, .400, .413, .408});
  ASSERT_TRUE(seven);
  EXPECT_TRUE(agrees_to_digits(seven->g, 2.034315, 7));
  EXPECT_GT(seven->g, seven->critical);
  EXPECT_TRUE(agrees_to_digits(seven->p, 0.0432266440662, 10));
  // Semidiameters of Venus (ASTM E178; from memory).
  const auto venus =
      grubbs_test(std::vector{-1.4, -.44, -.3, -.24, -.22, -.13, -.05, .06, .1,
                              .18, .2, .39, .48, .63, 1.01});
  ASSERT_TRUE(venus);
  EXPECT_TRUE(agrees_to_digits(venus->g, 2.573737, 7));
  EXPECT_GT(venus->g, venus->critical);
}

TEST(Grubbs, Corners) {
  EXPECT_EQ(grubbs_test(std::vector{1.0, 2.0}).reason().substr(0, 10),
            "few-points");
  EXPECT_EQ(grubbs_test(std::vector{2.0, 2.0, 2.0}).reason().substr(0, 11),
            "not-defined");
  EXPECT_EQ(grubbs_test(std::vector{2.0, 2.0, 5.0}).reason().substr(0, 11),
            "not-defined");
  EXPECT_TRUE(grubbs_test(std::vector{2.0, 2.1, 5.0}));
}

TEST(ResidualNormality, AgainstAnIndependentComputation) {
  // R 4.2.2: shapiro.test(rstandard(lm(...))).
  const auto plain = fit_calibration(seven_levels(), {});
  const auto weighted =
      fit_calibration(seven_levels(), {.weight = Weight::InverseXSquared});
  ASSERT_TRUE(plain && weighted);
  const auto one = residual_normality(*plain);
  const auto other = residual_normality(*weighted);
  ASSERT_TRUE(one && other);
  EXPECT_TRUE(agrees_to_digits(one->statistic, 0.947761534334, 8));
  EXPECT_TRUE(agrees_to_digits(*one->p, 0.709287445308, 6));
  EXPECT_TRUE(agrees_to_digits(other->statistic, 0.890550050532, 8));
  EXPECT_TRUE(agrees_to_digits(*other->p, 0.277545110272, 6));
  EXPECT_TRUE(one->passed && other->passed);
}

}  // namespace
}  // namespace loqsmith::test
