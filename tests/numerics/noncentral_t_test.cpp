#include "loqsmith/numerics/noncentral_t.hpp"

#include <algorithm>
#include <cfenv>
#include <cmath>
#include <initializer_list>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/normal.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Simpson's rule in 2 * half steps.
template <class F>
double simpson(F f, double from, double to, int half) {
  const double h = (to - from) / (2.0 * half);
  double sum = f(from) + f(to);
  for (int i = 1; i < 2 * half; ++i)
    sum += (i % 2 == 1 ? 4.0 : 2.0) * f(from + i * h);
  return sum * h / 3.0;
}

// The definition itself: T' <= t where the normal part z + delta is below t
// times the estimated standard deviation s, so
//
//     P = integral of Phi(t s - delta) f(s) ds,
//     f(s) = 2 (nu/2)^(nu/2) / Gamma(nu/2) s^(nu-1) exp(-nu s^2 / 2).
//
// Nothing of the library's series.
// For t > 0.
double slow_cdf(double t, double nu, double delta) {
  const double log_factor =
      std::log(2.0) + 0.5 * nu * std::log(0.5 * nu) - std::lgamma(0.5 * nu);
  const auto integrand = [&](double s) {
    const double power = nu == 1.0 ? 0.0 : (nu - 1.0) * std::log(s);
    if (s == 0.0 && nu > 1.0) return 0.0;
    return normal_cdf(t * s - delta) *
           std::exp(log_factor + power - 0.5 * nu * s * s);
  };
  const double width = 1.0 / std::sqrt(2.0 * nu);
  const double to = nu < 4.0 ? 9.0 : 1.0 + 12.0 * width;
  // Beyond `risen` the normal part is 1, before it the finer steps are needed.
  const double risen = std::min(to, (delta + 10.0) / t);
  return simpson(integrand, 0.0, risen, 10000) +
         simpson(integrand, risen, to, 10000);
}

struct Case {
  double t, nu, delta, probability;
};

// R 4.2, pt(t, nu, delta), whose algorithm (AS 243) is good for 1e-12.
TEST(NoncentralT, AgreesWithAnotherLibrary) {
  for (const Case& row :
       std::initializer_list<Case>{{1, 5, 1, 0.480926141242},
                                   {2, 10, 3, 0.168485838588},
                                   {0, 4, 2, 0.022750131948},
                                   {3, 3, 1.5, 0.790998746950},
                                   {-1, 8, -2, 0.841559660151},
                                   {2.5, 30, 2, 0.675723698973},
                                   {10, 6, 8, 0.689488879270}})
    EXPECT_LE(
        std::abs(noncentral_t_cdf(row.t, row.nu, row.delta) - row.probability),
        1e-12)
        << row.t << ' ' << row.nu << ' ' << row.delta;
}

// Down to 1 degree of freedom and out to the t of alpha = 0.001, 318.3.
TEST(NoncentralT, AgreesWithTheDefinition) {
  for (double nu : {1.0, 2.0, 3.0, 7.0, 40.0})
    for (double alpha : {0.05, 0.01, 0.001})
      for (double delta : {0.0, 0.5, 3.0, 6.0, 15.0}) {
        const double t = student_t_quantile(1.0 - alpha, nu);
        const double wanted = slow_cdf(t, nu, delta);
        EXPECT_TRUE(
            within_condition(noncentral_t_cdf(t, nu, delta), wanted, 1e5, 1.0))
            << nu << ' ' << alpha << ' ' << delta;
      }
}

// At 1 degree of freedom delta 0 is Cauchy's distribution.
TEST(NoncentralT, KnownExactly) {
  EXPECT_TRUE(within_condition(noncentral_t_cdf(1.0, 1.0, 0.0), 0.75, 10));
  EXPECT_TRUE(within_condition(noncentral_t_cdf(0.0, 5.0, 1.25),
                               normal_cdf(-1.25), 100));
  for (double t : {-2.0, 0.3, 4.0})  // P(T'(-delta) <= -t) = 1 - P(T' <= t)
    EXPECT_TRUE(within_condition(noncentral_t_cdf(-t, 6.0, -1.5),
                                 1.0 - noncentral_t_cdf(t, 6.0, 1.5), 100,
                                 1.0));
}

struct Detectable {
  double nu, at_five, at_one;
};

// Computed with another library, the row of 3 degrees of freedom at 1 % with
// the definition above; for 4 degrees of freedom Currie,
// Pure Appl. Chem. 67 (1995) 1699, gives 4.07 (from memory).
TEST(DetectableNoncentrality, Table) {
  for (const Detectable& row : std::initializer_list<Detectable>{
           {2, 5.515883, 15.217228},  {3, 4.456361, 9.337498},
           {4, 4.067276, 7.520264},   {5, 3.869942, 6.683199},
           {6, 3.751604, 6.212670},   {7, 3.673015, 5.914560},
           {8, 3.617127, 5.710027},   {9, 3.575385, 5.561515},
           {10, 3.543041, 5.449027},  {12, 3.496213, 5.290299},
           {15, 3.451335, 5.142913},  {19, 3.414994, 5.027064},
           {20, 3.408324, 5.006147},  {24, 3.387493, 4.941527},
           {30, 3.367100, 4.879301},  {40, 3.347134, 4.819386},
           {50, 3.335356, 4.784512},  {60, 3.327586, 4.761700},
           {100, 3.312242, 4.717102}, {120, 3.308447, 4.706163}}) {
    const auto five = detectable_noncentrality(0.05, 0.05, row.nu);
    const auto one = detectable_noncentrality(0.01, 0.01, row.nu);
    ASSERT_TRUE(five && one);
    EXPECT_LE(std::abs(*five - row.at_five), 0.5000001e-6) << row.nu;
    EXPECT_LE(std::abs(*one - row.at_one), 0.5000001e-6) << row.nu;
  }
  EXPECT_TRUE(agrees_to_digits(
      detectable_noncentrality(0.05, 0.05, 4.0).value(), 4.07, 3));
}

// Currie 1995 (from memory): 2 t is 4.26 for 4 degrees of freedom, and
// 2 t 4nu/(4nu+1), 4.012888 there, comes close to delta.
TEST(DetectableNoncentrality, ApproximationsOfTheLiterature) {
  const double t = student_t_quantile(0.95, 4.0);
  EXPECT_TRUE(agrees_to_digits(2.0 * t, 4.263694, 7));
  EXPECT_TRUE(agrees_to_digits(2.0 * t * 16.0 / 17.0, 4.012888, 7));
  EXPECT_LT(detectable_noncentrality(0.05, 0.05, 4.0).value(), 2.0 * t);
  // Many degrees of freedom: z + z.
  EXPECT_TRUE(agrees_to_digits(
      detectable_noncentrality(0.05, 0.05, 1e7).value(), 3.289707, 6));
}

// Put back into the definition, also at 1 degree of freedom and levels of one
// in a thousand.
TEST(DetectableNoncentrality, MissesWithProbabilityBeta) {
  for (double nu : {1.0, 2.0, 5.0, 33.0})
    for (double alpha : {0.2, 0.05, 0.001})
      for (double beta : {0.2, 0.05, 0.001}) {
        const auto delta = detectable_noncentrality(alpha, beta, nu);
        ASSERT_TRUE(delta) << nu;
        const double t = student_t_quantile(1.0 - alpha, nu);
        EXPECT_LE(std::abs(noncentral_t_cdf(t, nu, *delta) - beta), 1e-10)
            << nu << ' ' << alpha << ' ' << beta;
        EXPECT_LE(std::abs(slow_cdf(t, nu, *delta) - beta), 1e-10)
            << nu << ' ' << alpha << ' ' << beta;
      }
}

TEST(DetectableNoncentrality, NotApplicable) {
  for (double bad : {0.0, 0.5, -0.1, 1.0, std::nan("")}) {
    EXPECT_FALSE(detectable_noncentrality(bad, 0.05, 5.0));
    EXPECT_FALSE(detectable_noncentrality(0.05, bad, 5.0));
  }
  for (double bad : {0.0, -1.0, std::nan(""), HUGE_VAL}) {
    EXPECT_FALSE(detectable_noncentrality(0.05, 0.05, bad));
    EXPECT_TRUE(std::isnan(noncentral_t_cdf(1.0, bad, 1.0)));
  }
  EXPECT_FALSE(detectable_noncentrality(1e-6, 1e-6, 1.0));
  EXPECT_TRUE(std::isnan(noncentral_t_cdf(1.0, 5.0, 1e9)));
}

// Whoever traps divisions by zero is not stopped by those on the way.
TEST(NoncentralT, RunsUnderArmedTraps) {
  std::fenv_t kept;
  std::fegetenv(&kept);
  std::feclearexcept(FE_ALL_EXCEPT);
  feenableexcept(FE_DIVBYZERO | FE_INVALID | FE_OVERFLOW);
  double sum = 0.0;
  for (double nu : {1.0, 2.0, 3.0})
    for (double t : {0.0, 1e-9, 6.0, 318.0})
      for (double delta : {0.0, 1.0, 40.0})
        sum += noncentral_t_cdf(t, nu, delta);
  const auto delta = detectable_noncentrality(0.001, 0.001, 1.0);
  const int raised = std::fetestexcept(FE_DIVBYZERO);
  std::fesetenv(&kept);
  EXPECT_GT(sum, 1.0);
  EXPECT_TRUE(delta);
  EXPECT_EQ(raised, 0);
}

}  // namespace
}  // namespace loqsmith::test
