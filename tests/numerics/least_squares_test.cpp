#include "loqsmith/numerics/least_squares.hpp"

#include <cmath>

#include "numerics/nist_regression_data.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Every wanted figure is the certified value of NIST StRD; certified values
// have 15 digits.
void expect_coefficients(const LeastSquaresFit& fit,
                         const std::vector<double>& certified, int digits) {
  ASSERT_EQ(fit.coefficients.size(), certified.size());
  for (std::size_t k = 0; k < certified.size(); ++k)
    EXPECT_TRUE(agrees_to_digits(fit.coefficients[k], certified[k], digits))
        << "coefficient " << k;
}

void expect_errors(const LeastSquaresFit& fit,
                   const std::vector<double>& certified, int digits) {
  ASSERT_EQ(fit.standard_errors.size(), certified.size());
  for (std::size_t k = 0; k < certified.size(); ++k)
    EXPECT_TRUE(agrees_to_digits(fit.standard_errors[k], certified[k], digits))
        << "standard error " << k;
}

TEST(LeastSquares, Norris) {
  const auto fit = fit_polynomial(norris_x, norris_y, 0, 1);
  ASSERT_TRUE(fit);
  expect_coefficients(*fit, {-0.262323073774029, 1.00211681802045}, 13);
  expect_errors(*fit, {0.232818234301152, 0.429796848199937e-3}, 13);
  EXPECT_TRUE(agrees_to_digits(fit->residual_sd, 0.884796396144373, 13));
  EXPECT_TRUE(agrees_to_digits(fit->r2_centred, 0.999993745883712, 14));
  EXPECT_TRUE(
      agrees_to_digits(fit->weighted_residual_sum, 26.6173985294224, 13));
  EXPECT_EQ(fit->degrees_of_freedom, 34);
}

TEST(LeastSquares, LinesThroughZero) {
  const auto first = fit_polynomial(noint1_x, noint1_y, 1, 1);
  ASSERT_TRUE(first);
  expect_coefficients(*first, {2.07438016528926}, 14);
  expect_errors(*first, {0.165289256198347e-01}, 13);
  EXPECT_TRUE(agrees_to_digits(first->residual_sd, 3.56753034006338, 13));
  EXPECT_TRUE(agrees_to_digits(first->r2_uncentred, 0.999365492298663, 14));

  const auto second = fit_polynomial(noint2_x, noint2_y, 1, 1);
  ASSERT_TRUE(second);
  expect_coefficients(*second, {0.727272727272727}, 14);
  expect_errors(*second, {0.420827318078432e-01}, 13);
  EXPECT_TRUE(agrees_to_digits(second->residual_sd, 0.369274472937998, 13));
  EXPECT_TRUE(agrees_to_digits(second->r2_uncentred, 0.993348115299335, 14));
}

TEST(LeastSquares, Pontius) {
  const auto fit = fit_polynomial(pontius_x, pontius_y, 0, 2);
  ASSERT_TRUE(fit);
  expect_coefficients(
      *fit,
      {0.673565789473684e-03, 0.732059160401003e-06, -0.316081871345029e-14},
      12);
  expect_errors(
      *fit,
      {0.107938612033077e-03, 0.157817399981659e-09, 0.486652849992036e-16},
      11);
  EXPECT_TRUE(agrees_to_digits(fit->residual_sd, 0.205177424076185e-03, 11));
  EXPECT_TRUE(agrees_to_digits(fit->r2_centred, 0.999999900178537, 14));
}

TEST(LeastSquares, WamplerPolynomialsOfDegreeFive) {
  std::vector<double> x, first, second;
  for (int i = 0; i <= 20; ++i) {
    const double t = i;
    x.push_back(t);
    first.push_back(1 + t * (1 + t * (1 + t * (1 + t * (1 + t)))));
    // 100000 times the published responses: these are whole numbers.
    second.push_back(1e5 + t * (1e4 + t * (1e3 + t * (1e2 + t * (10 + t)))));
  }
  const auto one = fit_polynomial(x, first, 0, 5);
  ASSERT_TRUE(one);
  expect_coefficients(*one, {1, 1, 1, 1, 1, 1}, 12);
  EXPECT_TRUE(within_condition(one->residual_sd, 0.0, 1.0, 4e6));
  EXPECT_TRUE(agrees_to_digits(one->r2_centred, 1.0, 15));

  const auto two = fit_polynomial(x, second, 0, 5);
  ASSERT_TRUE(two);
  expect_coefficients(*two, {1e5, 1e4, 1e3, 1e2, 10, 1}, 12);
}

TEST(LeastSquares, Longley) {
  std::vector<std::vector<double>> columns = longley_x;
  columns.insert(columns.begin(), std::vector<double>(longley_y.size(), 1.0));
  const auto fit = fit_columns(columns, longley_y);
  ASSERT_TRUE(fit);
  expect_coefficients(
      *fit,
      {-3482258.63459582, 15.0618722713733, -0.358191792925910e-01,
       -2.02022980381683, -1.03322686717359, -0.511041056535807e-01,
       1829.15146461355},
      12);
  expect_errors(*fit,
                {890420.383607373, 84.9149257747669, 0.334910077722432e-01,
                 0.488399681651699, 0.214274163161675, 0.226073200069370,
                 455.478499142212},
                12);
  EXPECT_TRUE(agrees_to_digits(fit->residual_sd, 304.854073561965, 13));
}

// Certified to 15 digits for the decimals as printed; the nearest doubles are
// themselves off by 1e-16, which this design magnifies by some 1e9.
TEST(LeastSquares, FilipPolynomialOfDegreeTen) {
  const auto fit = fit_polynomial(filip_x, filip_y, 0, 10);
  ASSERT_TRUE(fit);
  expect_coefficients(
      *fit,
      {-1467.48961422980, -2772.17959193342, -2316.37108160893,
       -1127.97394098372, -354.478233703349, -75.1242017393757,
       -10.8753180355343, -1.06221498588947, -0.670191154593408e-01,
       -0.246781078275479e-02, -0.402962525080404e-04},
      7);
  EXPECT_TRUE(agrees_to_digits(fit->residual_sd, 0.334801051324544e-02, 9));
  EXPECT_TRUE(agrees_to_digits(fit->r2_centred, 0.996727416185620, 11));
}

// Seven levels by hand: the closed form of the weighted straight line in its
// centred, two-pass form.
TEST(LeastSquares, WeightedLineEqualsTheClosedForm) {
  const std::vector<double> x = {1, 2, 5, 10, 20, 50, 100};
  const std::vector<double> y = {10.8, 20.1, 52.5, 98.0, 205, 492, 1010};
  std::vector<double> w;
  for (double at : x) w.push_back(1.0 / (at * at));
  double total = 0, mean_x = 0, mean_y = 0;
  for (std::size_t i = 0; i < x.size(); ++i) total += w[i];
  for (std::size_t i = 0; i < x.size(); ++i) mean_x += w[i] * x[i] / total;
  for (std::size_t i = 0; i < x.size(); ++i) mean_y += w[i] * y[i] / total;
  double sxx = 0, sxy = 0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    sxx += w[i] * (x[i] - mean_x) * (x[i] - mean_x);
    sxy += w[i] * (x[i] - mean_x) * (y[i] - mean_y);
  }
  const auto fit = fit_polynomial(x, y, 0, 1, w);
  ASSERT_TRUE(fit);
  EXPECT_TRUE(within_condition(fit->coefficients[1], sxy / sxx, 20));
  EXPECT_TRUE(
      within_condition(fit->coefficients[0], mean_y - sxy / sxx * mean_x, 200));
  const double s = fit->residual_sd;
  EXPECT_TRUE(
      within_condition(fit->standard_errors[1], s / std::sqrt(sxx), 20));
  EXPECT_TRUE(
      within_condition(fit->covariance_of(0, 1), -s * s * mean_x / sxx, 50));
  EXPECT_TRUE(same_bits(fit->covariance_of(0, 1), fit->covariance_of(1, 0)));
}

// Miller and Miller, Statistics and Chemometrics for Analytical Chemistry,
// weights 1/s^2 (data and printed values from memory): b 0.0738, a 0.0091;
// absorbances 0.100 and 0.600 at 1.23 and 8.01.
TEST(LeastSquares, WeightedTextbookLine) {
  std::vector<double> w;
  for (double s : {.001, .004, .010, .013, .017, .022})
    w.push_back(1.0 / (s * s));
  const auto fit = fit_polynomial(
      {0, 2, 4, 6, 8, 10}, {.009, .158, .301, .472, .577, .739}, 0, 1, w);
  ASSERT_TRUE(fit);
  const double a = fit->coefficients[0];
  const double b = fit->coefficients[1];
  EXPECT_TRUE(agrees_to_digits(b, 0.0738, 3));
  EXPECT_TRUE(agrees_to_digits(b, 0.07375997, 7));
  EXPECT_TRUE(agrees_to_digits(a, 0.0091, 2));
  EXPECT_TRUE(agrees_to_digits(a, 0.00908391, 6));
  EXPECT_TRUE(agrees_to_digits((0.100 - a) / b, 1.23, 3));
  EXPECT_TRUE(agrees_to_digits((0.600 - a) / b, 8.01, 3));
  EXPECT_TRUE(agrees_to_digits((0.600 - a) / b, 8.011338974, 10));
}

TEST(LeastSquares, ScaleOfWeightsChangesOnlyTheResidualScale) {
  const std::vector<double> ones(norris_x.size(), 1.0);
  const std::vector<double> fours(norris_x.size(), 4.0);
  const auto one = fit_polynomial(norris_x, norris_y, 0, 1, ones);
  const auto four = fit_polynomial(norris_x, norris_y, 0, 1, fours);
  ASSERT_TRUE(one && four);
  EXPECT_TRUE(same_bits(four->coefficients[1], one->coefficients[1]));
  EXPECT_TRUE(same_bits(four->standard_errors[1], one->standard_errors[1]));
  EXPECT_TRUE(same_bits(four->residual_sd, 2.0 * one->residual_sd));
}

TEST(LeastSquares, SaysWhyThereIsNoFit) {
  EXPECT_FALSE(fit_polynomial({1, 2}, {1, 2}, 0, 1));        // n = p
  EXPECT_FALSE(fit_polynomial({2, 2, 2}, {1, 2, 3}, 0, 1));  // one level
  EXPECT_FALSE(fit_polynomial({0, 0, 0}, {1, 2, 3}, 1, 1));  // all at zero
  EXPECT_FALSE(fit_polynomial({1, 2, 3}, {1, 2}, 0, 1));
  EXPECT_FALSE(fit_polynomial({1, 2, 3}, {1, 2, 3}, 0, 1, {1, 0, 1}));
  EXPECT_FALSE(fit_polynomial({1, 2, 3}, {1, 2, 3}, 0, 1, {1, 1}));
  EXPECT_FALSE(fit_columns({{1, 2, 3}, {2, 4, 6}}, {1, 2, 4}));
  EXPECT_FALSE(
      fit_polynomial({1e-200, 2e-200, 3e-200}, {1e200, 2e200, 4e200}, 1, 1));
}

}  // namespace
}  // namespace loqsmith::test
