#include "calibration/inverse_coverage.hpp"

namespace loqsmith::test {
namespace {

TEST(InverseCoverage, UnweightedLineOfFiveSevenFourteenPoints) {
  const int nights = 8000;
  const std::vector<double> at{0.5, 4.0, 11.0};
  const Noise noise{6.0, 0.0};
  expect_95_percent(
      coverage("five", {{0.0, 2.5, 5.0, 7.5, 10.0}, 1, {}, noise}, at, nights),
      nights);
  const std::vector<double> seven{0, 1, 2, 4, 6, 8, 10};
  expect_95_percent(coverage("seven", {seven, 1, {}, noise}, at, nights),
                    nights);
  expect_95_percent(coverage("fourteen", {seven, 2, {}, noise}, at, nights),
                    nights);
  expect_95_percent(coverage("three", {seven, 1, {}, noise}, at, nights, 3),
                    nights);
}

TEST(InverseCoverage, ThroughZero) {
  const int nights = 6000;
  Design zero{{1, 2, 3, 5, 7, 10}, 1, {.intercept = Intercept::Zero}, {4, 0}};
  zero.intercept = 0.0;
  expect_95_percent(coverage("through zero", zero, {1.5, 6.0, 9.0}, nights),
                    nights);
}

TEST(InverseCoverage, Quadratic) {
  const int nights = 6000;
  Design curve{{1, 2, 3, 5, 7, 10}, 1, {.model = Model::Quadratic}, {1, 0}};
  curve.curvature = -0.2;
  expect_95_percent(coverage("quadratic", curve, {1.5, 6.0, 9.0}, nights),
                    nights);
}

// Where the weights' law is the truth, coverage is exact as well.
TEST(InverseCoverage, WeightsThatHold) {
  const int nights = 6000;
  const std::vector<double> levels{1, 2, 5, 10, 20, 50, 100};
  const std::vector<double> at{1.0, 7.0, 90.0};
  expect_95_percent(
      coverage("proportional",
               {levels, 1, {.weight = Weight::InverseXSquared}, {0.0, 0.05}},
               at, nights),
      nights);
}

}  // namespace
}  // namespace loqsmith::test
