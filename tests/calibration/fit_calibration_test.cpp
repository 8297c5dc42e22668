#include "loqsmith/calibration/fit_calibration.hpp"

#include <cmath>

#include "calibration/examples.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

std::vector<double> deviations(const Calibration& calibration) {
  std::vector<double> result;
  for (const StandardPoint& point : calibration.points)
    result.push_back(point.deviation_percent.value());
  return result;
}

// Miller and Miller (from memory): b 1.93, a 1.52, s 0.433, s_b 0.0409, s_a
// 0.2949, r 0.9989; further digits computed independently.
TEST(FitCalibration, FluorescenceLine) {
  const auto line = fit_calibration(fluorescence(), {});
  ASSERT_TRUE(line);
  EXPECT_TRUE(agrees_to_digits(line->slope, 1.93, 3));
  EXPECT_TRUE(agrees_to_digits(line->slope, 1.930357143, 10));
  EXPECT_TRUE(agrees_to_digits(line->intercept, 1.52, 3));
  EXPECT_TRUE(agrees_to_digits(line->intercept, 1.517857143, 10));
  EXPECT_TRUE(agrees_to_digits(line->residual_sd, 0.4328477132, 10));
  const double slope_error = std::sqrt(line->covariance[1][1]);
  const double intercept_error = std::sqrt(line->covariance[0][0]);
  EXPECT_TRUE(agrees_to_digits(slope_error, 0.0409, 3));
  EXPECT_TRUE(agrees_to_digits(slope_error, 0.04090026446, 10));
  EXPECT_TRUE(agrees_to_digits(intercept_error, 0.2949, 4));
  EXPECT_TRUE(agrees_to_digits(intercept_error, 0.2949360014, 10));
  EXPECT_TRUE(agrees_to_digits(std::sqrt(line->r2), 0.9989, 4));
  EXPECT_TRUE(agrees_to_digits(std::sqrt(line->r2), 0.9988795653, 10));
  EXPECT_EQ(line->degrees_of_freedom, 5);
  EXPECT_EQ(line->used_points(), 7U);
  EXPECT_EQ(line->used_levels(), 6U);  // zero is no level
  EXPECT_TRUE(same_bits(line->lowest, 2.0));
  EXPECT_TRUE(same_bits(line->highest, 12.0));
}

struct Expected {
  Weight weight;
  double intercept, slope, sd, intercept_error, slope_error, r2, rse;
  std::vector<double> deviations;
};

// Closed-form weighted regression, computed independently in high precision.
TEST(FitCalibration, SevenLevelsByWeight) {
  const std::vector<Expected> table = {
      {Weight::None,
       -0.3745748756,
       10.05862779,
       5.698913195,
       2.7522664,
       0.063792155,
       0.9997989335,
       5.7687347,
       {11.094427, 1.776183, 5.132780, -2.198812, 2.088764, -2.099057,
        0.448550}},
      {Weight::InverseX,
       0.6343450269,
       10.02106162,
       0.9795978812,
       0.76979645,
       0.076979645,
       0.9997050379,
       2.789056,
       {1.442895, -2.876283, 3.513294, -2.838982, 1.968066, -1.933413,
        0.724424}},
      {Weight::InverseXSquared,
       0.6959331257,
       10.00452082,
       0.2784077996,
       0.31164246,
       0.13445589,
       0.9990977123,
       2.7828199,
       {0.995011, -3.023507, 3.561316, -2.739903, 2.105873, -1.783588,
        0.884799}}};
  for (const Expected& row : table) {
    const auto line = fit_calibration(seven_levels(), {.weight = row.weight});
    ASSERT_TRUE(line);
    EXPECT_TRUE(agrees_to_digits(line->intercept, row.intercept, 10));
    EXPECT_TRUE(agrees_to_digits(line->slope, row.slope, 10));
    EXPECT_TRUE(agrees_to_digits(line->residual_sd, row.sd, 10));
    EXPECT_TRUE(agrees_to_digits(std::sqrt(line->covariance[0][0]),
                                 row.intercept_error, 8));
    EXPECT_TRUE(agrees_to_digits(std::sqrt(line->covariance[1][1]),
                                 row.slope_error, 8));
    EXPECT_TRUE(agrees_to_digits(line->r2, row.r2, 10));
    EXPECT_TRUE(agrees_to_digits(*line->relative_standard_error, row.rse, 7));
    const std::vector<double> found = deviations(*line);
    for (std::size_t i = 0; i < found.size(); ++i)
      EXPECT_TRUE(agrees_to_digits(found[i], row.deviations[i], 6)) << i;
  }
}

TEST(FitCalibration, QuadraticBackCalculation) {
  const auto curve =
      fit_calibration(seven_levels(), {.model = Model::Quadratic});
  ASSERT_TRUE(curve);
  const std::vector<double> wanted = {0.83690109,  1.79765497,  5.13891619,
                                      9.81580294,  20.74476157, 49.59463196,
                                      100.07097754};
  for (std::size_t i = 0; i < wanted.size(); ++i)
    EXPECT_TRUE(
        agrees_to_digits(*curve->points[i].back_calculated, wanted[i], 8));
}

TEST(FitCalibration, LineThroughZero) {
  const auto line =
      fit_calibration(seven_levels(), {.intercept = Intercept::Zero});
  ASSERT_TRUE(line);
  EXPECT_TRUE(same_bits(line->intercept, 0.0));
  EXPECT_TRUE(agrees_to_digits(line->slope, 10.05322333, 10));
  EXPECT_TRUE(
      agrees_to_digits(std::sqrt(line->covariance[1][1]), 0.04565960401, 10));
  EXPECT_TRUE(agrees_to_digits(line->residual_sd, 5.211999298, 10));
  EXPECT_TRUE(agrees_to_digits(*line->relative_standard_error, 3.8691171, 8));
  EXPECT_EQ(line->degrees_of_freedom, 6);
}

// NIST StRD NoInt1, certified values, through the whole of the room.
TEST(FitCalibration, NoInt1) {
  std::vector<std::pair<double, double>> pairs;
  for (int i = 0; i <= 10; ++i) pairs.emplace_back(60 + i, 130 + i);
  const auto line =
      fit_calibration(standards(pairs), {.intercept = Intercept::Zero});
  ASSERT_TRUE(line);
  EXPECT_TRUE(agrees_to_digits(line->slope, 2.07438016528926, 13));
  EXPECT_TRUE(agrees_to_digits(line->residual_sd, 3.56753034006338, 13));
  EXPECT_TRUE(agrees_to_digits(line->r2, 0.999365492298663, 13));
}

// The relative standard error of a mean response factor is its relative
// standard deviation (EPA method 8000D, 11.5.6, from memory).
TEST(FitCalibration, MeanResponseFactor) {
  const auto factor =
      fit_calibration(seven_levels(), {.model = Model::ResponseFactor});
  ASSERT_TRUE(factor);
  EXPECT_TRUE(agrees_to_digits(factor->slope, 10.19142857, 10));
  EXPECT_TRUE(agrees_to_digits(factor->residual_sd, 0.3591855867, 10));
  EXPECT_TRUE(
      agrees_to_digits(*factor->relative_standard_error, 3.524388992, 10));
  EXPECT_TRUE(within_condition(*factor->relative_standard_error,
                               100.0 * factor->residual_sd / factor->slope,
                               50));
  EXPECT_TRUE(within_condition(std::sqrt(factor->covariance[1][1]),
                               factor->residual_sd / std::sqrt(7.0), 50));
}

TEST(FitCalibration, Quadratic) {
  struct Row {
    Weight weight;
    double c0, c1, c2, sd, rse;
  };
  for (const Row& row : std::initializer_list<Row>{
           {Weight::None, 2.704840952, 9.669464018, 0.00396061995, 4.532522369,
            9.9248718},
           {Weight::InverseX, 0.9460278662, 9.891735504, 0.001698505774,
            1.03547461, 3.2426178},
           {Weight::InverseXSquared, 0.7219484589, 9.984712454, 0.0004773921318,
            0.3107554479, 3.1088217}}) {
    const auto curve = fit_calibration(
        seven_levels(), {.model = Model::Quadratic, .weight = row.weight});
    ASSERT_TRUE(curve);
    EXPECT_TRUE(agrees_to_digits(curve->intercept, row.c0, 9));
    EXPECT_TRUE(agrees_to_digits(curve->slope, row.c1, 9));
    EXPECT_TRUE(agrees_to_digits(curve->curvature, row.c2, 9));
    EXPECT_TRUE(agrees_to_digits(curve->residual_sd, row.sd, 9));
    EXPECT_TRUE(agrees_to_digits(*curve->relative_standard_error, row.rse, 8));
    EXPECT_EQ(curve->degrees_of_freedom, 4);
  }
}

// Miller and Miller, absorbance with weights (data and printed values from
// memory): unweighted b 0.0725, a 0.0133. And their standard-addition line: a
// 0.3218, b 0.0186, s 0.0109.
TEST(FitCalibration, MoreTextbookLines) {
  const auto absorbance = fit_calibration(
      standards(
          {{0, .009}, {2, .158}, {4, .301}, {6, .472}, {8, .577}, {10, .739}}),
      {});
  ASSERT_TRUE(absorbance);
  EXPECT_TRUE(agrees_to_digits(absorbance->slope, 0.0725, 3));
  EXPECT_TRUE(agrees_to_digits(absorbance->intercept, 0.0133, 3));
  EXPECT_TRUE(agrees_to_digits(absorbance->residual_sd, 0.01458913, 7));

  const auto addition = fit_calibration(standards({{0, .32},
                                                   {5, .41},
                                                   {10, .52},
                                                   {15, .60},
                                                   {20, .70},
                                                   {25, .77},
                                                   {30, .89}}),
                                        {});
  ASSERT_TRUE(addition);
  EXPECT_TRUE(agrees_to_digits(addition->intercept, 0.3218, 4));
  EXPECT_TRUE(agrees_to_digits(addition->slope, 0.0186, 3));
  EXPECT_TRUE(agrees_to_digits(addition->residual_sd, 0.0109, 3));
}

// The curved set of the same book (from memory): r 0.98783937 for the line;
// the quadratic -0.64285714 + 4.97857143 x - 0.15 x^2 turns at x = 16.6.
TEST(FitCalibration, CurvedSet) {
  const auto points = standards(
      {{0, 0.1}, {2, 8.0}, {4, 15.7}, {6, 24.2}, {8, 31.5}, {10, 33.0}});
  const auto line = fit_calibration(points, {});
  ASSERT_TRUE(line);
  EXPECT_TRUE(agrees_to_digits(line->intercept, 1.35714286, 9));
  EXPECT_TRUE(agrees_to_digits(line->slope, 3.47857143, 9));
  EXPECT_TRUE(agrees_to_digits(std::sqrt(line->r2), 0.98783937, 8));
  const auto curve = fit_calibration(points, {.model = Model::Quadratic});
  ASSERT_TRUE(curve);
  EXPECT_TRUE(agrees_to_digits(curve->intercept, -0.64285714, 8));
  EXPECT_TRUE(agrees_to_digits(curve->slope, 4.97857143, 9));
  EXPECT_TRUE(agrees_to_digits(curve->curvature, -0.15, 14));
  EXPECT_TRUE(agrees_to_digits(curve->r2, 0.99131022, 8));
}

TEST(FitCalibration, ZeroLevelOnlyInUnweightedFits) {
  auto points = seven_levels();
  points.insert(points.begin(), standard(0, 0.0, 0.5));
  const auto plain = fit_calibration(points, {});
  ASSERT_TRUE(plain);
  EXPECT_TRUE(plain->points[0].used);
  EXPECT_FALSE(plain->points[0].deviation_percent);
  EXPECT_EQ(plain->used_levels(), 7U);
  EXPECT_EQ(plain->degrees_of_freedom, 6);

  for (const CalibrationSettings& settings :
       {CalibrationSettings{.weight = Weight::InverseX},
        CalibrationSettings{.weight = Weight::InverseXSquared},
        CalibrationSettings{.model = Model::ResponseFactor}}) {
    const auto with = fit_calibration(points, settings);
    const auto without = fit_calibration(seven_levels(), settings);
    ASSERT_TRUE(with && without);
    EXPECT_FALSE(with->points[0].used);
    EXPECT_EQ(with->points[0].note, "zero-level-unweighted-only");
    EXPECT_TRUE(same_bits(with->slope, without->slope));
    EXPECT_TRUE(same_bits(with->r2, without->r2));
  }
}

TEST(FitCalibration, UnusedStandardsStayInTheTable) {
  auto points = seven_levels();
  points[3].used = false;
  points[3].note = "saturated";
  points[3].response = 9e9;
  const auto line = fit_calibration(points, {});
  ASSERT_TRUE(line);
  EXPECT_EQ(line->points.size(), 7U);
  EXPECT_EQ(line->points[3].note, "saturated");
  EXPECT_TRUE(same_bits(line->points[3].weight, 0.0));
  EXPECT_EQ(line->levels.size(), 7U);
  EXPECT_EQ(line->used_levels(), 6U);
  EXPECT_FALSE(line->levels[3].accepted);
  EXPECT_TRUE(agrees_to_digits(line->slope, 10.06, 3));
}

TEST(FitCalibration, ReplicatesShareALevel) {
  auto points = seven_levels();
  points.push_back(standard(8, 5.0, 47.5));
  const auto line = fit_calibration(points, {});
  ASSERT_TRUE(line);
  EXPECT_EQ(line->used_levels(), 7U);
  EXPECT_EQ(line->levels[2].points, 2U);
  EXPECT_TRUE(within_condition(*line->levels[2].mean_deviation_percent,
                               (*line->points[2].deviation_percent +
                                *line->points[7].deviation_percent) /
                                   2.0,
                               1000));
}

}  // namespace
}  // namespace loqsmith::test
