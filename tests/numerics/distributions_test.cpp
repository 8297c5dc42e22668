#include "loqsmith/numerics/distributions.hpp"

#include <cmath>

#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

struct Quantile {
  double df;
  double value;
};

// Upper percentage points as in the usual tables (e.g. NIST/SEMATECH
// e-Handbook 1.3.6.7), to 6 decimals.
bool to_six_decimals(double found, double wanted) {
  return std::abs(found - wanted) <= 0.5000001e-6;
}

TEST(StudentT, UpperFivePercentPoints) {
  for (const Quantile& row : std::initializer_list<Quantile>{{1, 6.313752},
                                                             {2, 2.919986},
                                                             {3, 2.353363},
                                                             {4, 2.131847},
                                                             {5, 2.015048},
                                                             {6, 1.943180},
                                                             {7, 1.894579},
                                                             {8, 1.859548},
                                                             {9, 1.833113},
                                                             {10, 1.812461},
                                                             {12, 1.782288},
                                                             {15, 1.753050},
                                                             {20, 1.724718},
                                                             {30, 1.697261},
                                                             {60, 1.670649},
                                                             {120, 1.657651}})
    EXPECT_TRUE(to_six_decimals(student_t_quantile(0.95, row.df), row.value))
        << row.df;
}

TEST(StudentT, UpperTwoAndAHalfPercentPoints) {
  for (const Quantile& row : std::initializer_list<Quantile>{{1, 12.706205},
                                                             {2, 4.302653},
                                                             {3, 3.182446},
                                                             {4, 2.776445},
                                                             {5, 2.570582},
                                                             {6, 2.446912},
                                                             {7, 2.364624},
                                                             {8, 2.306004},
                                                             {9, 2.262157},
                                                             {10, 2.228139},
                                                             {12, 2.178813},
                                                             {15, 2.131450},
                                                             {20, 2.085963},
                                                             {30, 2.042272},
                                                             {60, 2.000298},
                                                             {120, 1.979930}})
    EXPECT_TRUE(to_six_decimals(student_t_quantile(0.975, row.df), row.value))
        << row.df;
}

TEST(StudentT, FarTails) {
  EXPECT_TRUE(to_six_decimals(student_t_quantile(0.99, 1), 31.820516));
  EXPECT_TRUE(to_six_decimals(student_t_quantile(0.99, 6), 3.142668));
  EXPECT_TRUE(to_six_decimals(student_t_quantile(0.995, 1), 63.656741));
  EXPECT_TRUE(to_six_decimals(student_t_quantile(0.995, 30), 2.749996));
  EXPECT_TRUE(to_six_decimals(student_t_quantile(0.90, 5), 1.475884));
  EXPECT_TRUE(to_six_decimals(student_t_quantile(0.05, 5), -2.015048));
}

// One degree of freedom is the Cauchy distribution, two have a closed form.
TEST(StudentT, ClosedFormsAtOneAndTwoDegreesOfFreedom) {
  const double pi = 3.14159265358979324;
  for (double t : {-3.0, -0.5, 0.25, 1.0, 7.0}) {
    EXPECT_TRUE(
        within_condition(student_t_cdf(t, 1), 0.5 + std::atan(t) / pi, 100));
    EXPECT_TRUE(within_condition(student_t_cdf(t, 2),
                                 0.5 + 0.5 * t / std::sqrt(2.0 + t * t), 100));
    EXPECT_TRUE(within_condition(
        student_t_upper_tail(t, 2),
        1.0 / (2.0 + t * t) / (1.0 + t / std::sqrt(2.0 + t * t)), 100));
  }
}

TEST(ChiSquare, PercentagePoints) {
  for (const Quantile& row : std::initializer_list<Quantile>{{1, 0.000982},
                                                             {2, 0.050636},
                                                             {4, 0.484419},
                                                             {5, 0.831212},
                                                             {6, 1.237344},
                                                             {7, 1.689869},
                                                             {9, 2.700389},
                                                             {10, 3.246973},
                                                             {20, 9.590777},
                                                             {30, 16.790772}})
    EXPECT_TRUE(to_six_decimals(chi_square_quantile(0.025, row.df), row.value))
        << row.df;
  for (const Quantile& row : std::initializer_list<Quantile>{{5, 12.832502},
                                                             {6, 14.449375},
                                                             {7, 16.012764},
                                                             {9, 19.022768},
                                                             {10, 20.483177},
                                                             {20, 34.169607}})
    EXPECT_TRUE(to_six_decimals(chi_square_quantile(0.975, row.df), row.value))
        << row.df;
  EXPECT_TRUE(to_six_decimals(chi_square_quantile(0.95, 1), 3.841459));
  EXPECT_TRUE(to_six_decimals(chi_square_quantile(0.99, 10), 23.209251));
  // Two degrees of freedom: the exponential distribution.
  EXPECT_TRUE(within_condition(chi_square_cdf(3.0, 2), -std::expm1(-1.5), 20));
}

TEST(FisherF, PercentagePoints) {
  EXPECT_TRUE(to_six_decimals(f_quantile(0.95, 1, 1), 161.447639));
  EXPECT_TRUE(to_six_decimals(f_quantile(0.95, 1, 3), 10.127964));
  EXPECT_TRUE(to_six_decimals(f_quantile(0.95, 4, 6), 4.533677));
  EXPECT_TRUE(to_six_decimals(f_quantile(0.95, 10, 10), 2.978237));
  EXPECT_TRUE(to_six_decimals(f_quantile(0.99, 1, 4), 21.197690));
  EXPECT_TRUE(to_six_decimals(f_quantile(0.99, 2, 4), 18.000000));
  EXPECT_TRUE(to_six_decimals(f_quantile(0.99, 10, 10), 4.849147));
  // F(2, nu): 1 - (1 + 2x/nu)^(-nu/2).
  EXPECT_TRUE(within_condition(f_cdf(2.0, 2, 4), 1.0 - 0.25, 20));
  // With two and two degrees of freedom the tail is 1 / (1 + x).
  EXPECT_TRUE(within_condition(f_upper_tail(2.0, 2, 4), 0.25, 20));
  EXPECT_TRUE(
      within_condition(f_upper_tail(1e12, 2, 2), 1.0 / (1.0 + 1e12), 40));
}

// 95 % interval of a standard deviation for n - 1 = 6, 7, 9, 19, 59 and for
// the 5 degrees of freedom of a line through 7 points.
TEST(StandardDeviationBounds, MultipliersOfTheChiSquareInterval) {
  struct Row {
    double df, lower, upper;
  };
  for (const Row& row : std::initializer_list<Row>{{6, 0.644393, 2.202066},
                                                   {7, 0.661174, 2.035272},
                                                   {9, 0.687835, 1.825610},
                                                   {19, 0.760490, 1.460572},
                                                   {59, 0.847634, 1.219662},
                                                   {5, 0.624208, 2.452614}}) {
    const SpreadBounds bounds = standard_deviation_bounds(row.df, 0.95);
    EXPECT_TRUE(to_six_decimals(bounds.lower, row.lower)) << row.df;
    EXPECT_TRUE(to_six_decimals(bounds.upper, row.upper)) << row.df;
  }
}

TEST(Distributions, QuantileUndoesTheDistributionFunction) {
  for (double p : {1e-6, 0.01, 0.3, 0.5, 0.9, 0.999}) {
    for (double df : {1.0, 2.5, 7.0, 40.0}) {
      EXPECT_TRUE(within_condition(student_t_cdf(student_t_quantile(p, df), df),
                                   p, 1e4));
      EXPECT_TRUE(within_condition(
          chi_square_cdf(chi_square_quantile(p, df), df), p, 1e4));
      EXPECT_TRUE(
          within_condition(f_cdf(f_quantile(p, 3.0, df), 3.0, df), p, 1e4));
    }
  }
}

TEST(Distributions, OutsideTheirRangesAnswerNaNWithoutThrowing) {
  EXPECT_TRUE(std::isnan(student_t_quantile(0.5, -1.0)));
  EXPECT_TRUE(std::isnan(student_t_quantile(1.5, 5.0)));
  EXPECT_TRUE(std::isnan(chi_square_quantile(0.5, 0.0)));
  EXPECT_TRUE(std::isnan(f_quantile(-0.1, 1.0, 1.0)));
}

}  // namespace
}  // namespace loqsmith::test
