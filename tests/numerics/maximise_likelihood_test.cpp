#include "loqsmith/numerics/maximise_likelihood.hpp"

#include <cmath>

#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Normal values with mean m and ln sd s: the maximum lies at the mean and the
// root of the mean square, with variances sd^2 / n and 1 / (2 n).
std::optional<LikelihoodAt> normal_likelihood(std::span<const double> at) {
  LikelihoodAt there{0.0, {0.0, 0.0}, {0.0, 0.0, 0.0, 0.0}, {0.0, 0.0}};
  const double u = std::exp(-2.0 * at[1]);
  for (double value : {3.0, 7.0, 4.0, 10.0}) {
    const double r = value - at[0];
    there.value += -at[1] - 0.5 * u * r * r;
    there.gradient[0] += u * r;
    there.gradient[1] += u * r * r - 1.0;
    there.information[0] += u;
    there.information[1] += 2.0 * u * r;
    there.information[3] += 2.0 * u * r * r;
  }
  there.information[2] = there.information[1];
  there.scale = {there.information[0], there.information[3]};
  if (!std::isfinite(there.value)) return std::nullopt;
  return there;
}

TEST(MaximiseLikelihood, NormalSampleFromFarAway) {
  for (const std::vector<double>& start : {std::vector<double>{6.0, 1.0},
                                           {-300.0, 0.0},
                                           {0.0, 8.0},
                                           {6.0, -3.0}}) {
    const auto top = maximise_likelihood(normal_likelihood, start);
    ASSERT_TRUE(top) << top.reason();
    EXPECT_TRUE(agrees_to_digits(top->parameters[0], 6.0, 8));
    // Squares 9 + 1 + 4 + 16 = 30, over 4.
    EXPECT_TRUE(agrees_to_digits(top->parameters[1], 0.5 * std::log(7.5), 8));
    EXPECT_TRUE(agrees_to_digits(top->covariance[0], 7.5 / 4.0, 7));
    EXPECT_TRUE(agrees_to_digits(top->covariance[3], 1.0 / 8.0, 7));
    EXPECT_LT(top->evaluations, 200);
  }
}

TEST(MaximiseLikelihood, SaysWhyThereIsNoMaximum) {
  // Ever climbing.
  const auto slope = [](std::span<const double> at) {
    return std::optional(LikelihoodAt{at[0], {1.0}, {0.0}, {1.0}});
  };
  const auto rising = maximise_likelihood(slope, {0.0}, {2.0}, 50);
  ASSERT_FALSE(rising);
  EXPECT_EQ(rising.reason().rfind("not-converged", 0), 0U);
  // Out of range from the start.
  const auto nowhere = maximise_likelihood(
      [](std::span<const double>) { return std::optional<LikelihoodAt>(); },
      {0.0});
  ASSERT_FALSE(nowhere);
  EXPECT_EQ(nowhere.reason().rfind("bad-start", 0), 0U);
}

}  // namespace
}  // namespace loqsmith::test
