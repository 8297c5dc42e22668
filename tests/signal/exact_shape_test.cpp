#include <gtest/gtest.h>

#include <cmath>
#include <iostream>
#include <numbers>

#include "signal_support.hpp"
#include "support/tolerance.hpp"

// Measures of exponentially modified Gaussians against what bisection of the
// analytic function gives in extended precision.

namespace loqsmith {
namespace {

struct Shape {
  long double mu, sigma, tau;
};

void PrintTo(const Shape& shape, std::ostream* out) {
  *out << "tau " << static_cast<double>(shape.tau);
}

long double density(const Shape& s, long double x) {
  const long double z = (s.sigma / s.tau - (x - s.mu) / s.sigma) /
                        std::numbers::sqrt2_v<long double>;
  const long double exponent =
      s.sigma * s.sigma / (2.0L * s.tau * s.tau) - (x - s.mu) / s.tau;
  return std::exp(exponent) * std::erfc(z) / (2.0L * s.tau);
}

// Where f goes from above zero (at a) to below (at b).
template <typename Function>
long double bisect(Function f, long double a, long double b) {
  for (int i = 0; i < 200; ++i) {
    const long double middle = 0.5L * (a + b);
    (f(middle) > 0.0L ? a : b) = middle;
  }
  return 0.5L * (a + b);
}

struct Exact {
  long double apex = 0.0L;
  long double height = 0.0L;

  explicit Exact(const Shape& shape) : shape_(shape) {
    const long double hair = 1e-7L * shape.sigma;
    apex = bisect(
        [&](long double x) {
          return density(shape, x + hair) - density(shape, x - hair);
        },
        shape.mu - shape.sigma, shape.mu + 3.0L * shape.sigma);
    height = density(shape, apex);
  }

  long double front(long double fraction) const {
    return apex - bisect(
                      [&](long double x) {
                        return fraction * height - density(shape_, x);
                      },
                      shape_.mu - 8.0L * shape_.sigma, apex);
  }
  long double rear(long double fraction) const {
    return bisect(
               [&](long double x) {
                 return density(shape_, x) - fraction * height;
               },
               apex, shape_.mu + 8.0L * shape_.sigma + 12.0L * shape_.tau) -
           apex;
  }
  long double width(long double fraction) const {
    return front(fraction) + rear(fraction);
  }

 private:
  Shape shape_;
};

test::SimulatedPeak simulated(const Shape& shape, double area) {
  return {static_cast<double>(shape.mu), static_cast<double>(shape.sigma), area,
          static_cast<double>(shape.tau)};
}

// The window is what a clean standard teaches; 24 to 40 points across the half
// width.
Peak measured(const std::vector<test::SimulatedPeak>& peaks, double expected) {
  test::SimulatedTrace wanted;
  wanted.step_minutes = 0.005;
  wanted.peaks = {peaks.front()};
  const TargetSettings target = test::target_at(expected, 0.15);
  const auto window =
      test::taught_by(simulate_trace(wanted, "standard"), target);
  wanted.peaks = peaks;
  return *measure_peak(simulate_trace(wanted, "peaks"), target, *window,
                       expected, test::no_noise(), "");
}

testing::AssertionResult within_one_percent(const std::optional<double>& found,
                                            long double wanted) {
  if (!found) return testing::AssertionFailure() << "not stated";
  const long double off = *found / wanted - 1.0L;
  if (std::abs(off) <= 0.01L) return testing::AssertionSuccess();
  return testing::AssertionFailure()
         << *found << " instead of " << static_cast<double>(wanted);
}

class ExactShapes : public testing::TestWithParam<Shape> {};

TEST_P(ExactShapes, MeasuresAgreeToOnePercent) {
  const Exact exact(GetParam());
  const Peak peak =
      measured({simulated(GetParam(), 100.0)}, static_cast<double>(exact.apex));
  ASSERT_TRUE(peak.found);
  const long double ratio = exact.apex / exact.width(0.5L);
  EXPECT_TRUE(within_one_percent(peak.plates, 5.54L * ratio * ratio));
  EXPECT_TRUE(within_one_percent(
      peak.tailing, exact.width(0.05L) / (2.0L * exact.front(0.05L))));
  EXPECT_TRUE(
      within_one_percent(peak.asymmetry, exact.rear(0.1L) / exact.front(0.1L)));
}

TEST_P(ExactShapes, ResolutionAgreesToOnePercent) {
  const Exact exact(GetParam());
  Shape later = GetParam();
  later.mu += 6.0L * (later.sigma + later.tau);
  const Exact second(later);
  const Peak peak =
      measured({simulated(GetParam(), 100.0), simulated(later, 60.0)},
               static_cast<double>(exact.apex));
  EXPECT_TRUE(within_one_percent(peak.resolution,
                                 1.18L * (second.apex - exact.apex) /
                                     (exact.width(0.5L) + second.width(0.5L))));
}

INSTANTIATE_TEST_SUITE_P(Signal, ExactShapes,
                         testing::Values(Shape{5.0L, 0.05L, 0.01L},
                                         Shape{5.0L, 0.05L, 0.025L},
                                         Shape{5.0L, 0.05L, 0.05L},
                                         Shape{5.0L, 0.05L, 0.075L}));

// Ph. Eur. 2.2.46: t 5.0 with hold-up time 1.2.
TEST(CapacityFactor, IsTheTimeBeyondTheHoldUpTimeOverIt) {
  test::SimulatedTrace wanted;
  wanted.peaks = {test::gaussian_of_height(5.0, 0.05, 100.0)};
  const Trace trace = simulate_trace(wanted, "clean");
  TargetSettings target = test::target_at(5.0);
  const auto factor = [&] {
    return measure_peak(trace, target, test::window_of(0.19, 0.19, 0.1177), 5.0,
                        test::no_noise(), "")
        ->capacity_factor;
  };
  EXPECT_FALSE(factor());
  target.integration.hold_up_minutes = 1.2;
  ASSERT_TRUE(factor());
  EXPECT_TRUE(test::agrees_to_digits(*factor(), 3.166666667, 6));
  target.integration.hold_up_minutes = 6.0;
  EXPECT_FALSE(factor());
}

}  // namespace
}  // namespace loqsmith
