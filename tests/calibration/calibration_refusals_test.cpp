#include "calibration/examples.hpp"

namespace loqsmith::test {
namespace {

std::string reason(const Outcome<Calibration>& outcome) {
  return outcome ? "fitted" : outcome.reason();
}

bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

TEST(CalibrationRefusals, TooFewLevels) {
  const auto two = standards({{1, 10}, {2, 20}, {1, 11}, {2, 21}});
  EXPECT_TRUE(contains(reason(fit_calibration(two, {})),
                       "2 levels above zero, this model needs at least 3"));
  EXPECT_TRUE(fit_calibration(two, {.intercept = Intercept::Zero}));
  EXPECT_TRUE(fit_calibration(two, {.model = Model::ResponseFactor}));

  const auto three = standards({{1, 10}, {2, 20}, {3, 31}});
  EXPECT_TRUE(fit_calibration(three, {}));
  EXPECT_TRUE(
      contains(reason(fit_calibration(three, {.model = Model::Quadratic})),
               "needs at least 4"));

  const auto one = standards({{1, 10}, {1, 11}});
  EXPECT_TRUE(
      contains(reason(fit_calibration(one, {.model = Model::ResponseFactor})),
               "1 level above zero"));
  EXPECT_TRUE(contains(reason(fit_calibration({}, {})), "0 levels"));
}

TEST(CalibrationRefusals, ZeroIsNoLevel) {
  const auto points = standards({{0, 0.1}, {1, 10}, {2, 20}});
  EXPECT_TRUE(contains(reason(fit_calibration(points, {})), "2 levels"));
}

TEST(CalibrationRefusals, FlatOrFallingResponses) {
  EXPECT_TRUE(
      contains(reason(fit_calibration(standards({{1, 5}, {2, 5}, {3, 5}}), {})),
               "flat-response: all standards gave the same response"));
  EXPECT_TRUE(
      contains(reason(fit_calibration(standards({{1, 5}, {2, 4}, {3, 3}}), {})),
               "slope-not-positive: "));
}

TEST(CalibrationRefusals, CurveThatTurnsOverInsideTheRange) {
  std::vector<std::pair<double, double>> pairs;
  for (double x : {1.0, 2.0, 4.0, 6.0, 8.0, 10.0})
    pairs.emplace_back(x, 10.0 * x - 0.7 * x * x);
  EXPECT_TRUE(contains(
      reason(fit_calibration(standards(pairs), {.model = Model::Quadratic})),
      "curve-turns-over: "));
}

TEST(CalibrationRefusals, WeightFromReplicatesWithoutReplicates) {
  EXPECT_TRUE(
      contains(reason(fit_calibration(seven_levels(),
                                      {.weight = Weight::InverseVariance})),
               "no-replicates: weight 1/s2 needs replicate standards at two "
               "levels"));
}

TEST(AcceptLevels, WithoutLimitsEveryUsedLevelIsAccepted) {
  auto points = seven_levels();
  points[0].used = false;
  const auto line = fit_calibration(points, {});
  ASSERT_TRUE(line);
  EXPECT_EQ(line->accepted_levels(), 6U);
  EXPECT_EQ(line->accepted_lowest, 2.0);
  EXPECT_EQ(line->accepted_highest, 100.0);
}

// Unweighted: the deviations are 11.1, 1.8, 5.1, -2.2, 2.1, -2.1, 0.4 percent.
TEST(AcceptLevels, FailingEndsNarrowTheRange) {
  auto fitted = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(fitted);
  Calibration line = *fitted;
  const double slope = line.slope;

  accept_levels(line, 10.0, std::nullopt);
  EXPECT_EQ(line.accepted_levels(), 6U);
  EXPECT_EQ(line.accepted_lowest, 2.0);

  accept_levels(line, 10.0, 15.0);  // the lowest level has its own limit
  EXPECT_EQ(line.accepted_levels(), 7U);
  EXPECT_EQ(line.accepted_lowest, 1.0);

  accept_levels(line, 5.0, 15.0);  // a failing inner level leaves the range
  EXPECT_EQ(line.accepted_levels(), 6U);
  EXPECT_FALSE(line.levels[2].accepted);
  EXPECT_EQ(line.accepted_lowest, 1.0);
  EXPECT_EQ(line.accepted_highest, 100.0);

  accept_levels(line, 1.0, std::nullopt);
  EXPECT_EQ(line.accepted_lowest, 100.0);
  accept_levels(line, 0.1, std::nullopt);
  EXPECT_EQ(line.accepted_levels(), 0U);
  EXPECT_FALSE(line.accepted_lowest);
  EXPECT_FALSE(line.accepted_highest);
  EXPECT_EQ(line.slope, slope);  // no new fit
}

TEST(AcceptLevels, ExactlyAtTheLimitPasses) {
  auto fitted = fit_calibration(seven_levels(), {});
  ASSERT_TRUE(fitted);
  Calibration line = *fitted;
  accept_levels(line, line.levels[0].mean_deviation_percent, std::nullopt);
  EXPECT_EQ(line.accepted_levels(), 7U);
}

}  // namespace
}  // namespace loqsmith::test
