#include <algorithm>
#include <cmath>

#include "calibration/examples.hpp"
#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/calibration/prediction_spread.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

Calibration fitted(const CalibrationSettings& settings) {
  return *fit_calibration(seven_levels(), settings);
}

// R 4.2.2: uniroot of (y0 - predict)^2 - t^2 (s^2 / (w m) + v' vcov v), fits by
// lm; the weight of the lowest level below it.
TEST(InverseInterval, AgainstAnIndependentComputation) {
  struct Row {
    CalibrationSettings settings;
    double response;
    int replicates;
    double lower, upper;
  };
  const CalibrationSettings squared{.weight = Weight::InverseXSquared};
  const CalibrationSettings once{.weight = Weight::InverseX};
  for (const Row& row : std::initializer_list<Row>{
           {squared, 15.0, 1, 1.31655257749, 1.5576623701},
           {squared, 300.0, 1, 27.7340055318, 32.4762848167},
           {squared, 0.2, 1, -0.159612649813, 0.0569041792729},
           {once, 300.0, 1, 28.4358468633, 31.3950166381},
           {once, 300.0, 3, 28.9301108522, 30.8586403264},
           {{.model = Model::Quadratic},
            300.0,
            1,
            28.8450355709,
            31.9208884687},
           {{.model = Model::Quadratic, .weight = Weight::InverseXSquared},
            300.0,
            1,
            27.3132347373,
            33.0816023015},
           {{.intercept = Intercept::Zero},
            300.0,
            1,
            28.5335645009,
            31.1561582266},
           {{.model = Model::ResponseFactor},
            300.0,
            1,
            26.9517385604,
            32.4259479675}}) {
    const Calibration curve = fitted(row.settings);
    const auto found =
        concentration_from_response(curve, row.response, row.replicates);
    ASSERT_TRUE(found && found->interval);
    EXPECT_TRUE(agrees_to_digits(found->interval->lower, row.lower, 9));
    EXPECT_TRUE(agrees_to_digits(found->interval->upper, row.upper, 9));
    EXPECT_TRUE(
        same_bits(*found->expanded_uncertainty,
                  std::max(found->interval->upper - found->concentration,
                           found->concentration - found->interval->lower)));
  }
}

// The closed form and the search for ends share nothing but the coefficients.
TEST(InverseInterval, ClosedFormAndProfileAreOne) {
  for (const CalibrationSettings& settings :
       {CalibrationSettings{},
        CalibrationSettings{.intercept = Intercept::Zero}}) {
    const Calibration line = fitted(settings);
    for (double response : {-20.0, 3.0, 60.0, 700.0, 2500.0}) {
      for (int replicates : {1, 4}) {
        const auto closed = fieller_interval(line, response, replicates);
        const auto search = profile_interval(line, response, replicates);
        ASSERT_TRUE(closed && search);
        EXPECT_TRUE(within_condition(search->lower, closed->lower, 1e3, 10.0));
        EXPECT_TRUE(within_condition(search->upper, closed->upper, 1e3, 10.0));
      }
    }
  }
}

// As the curvature goes, the quadratic's interval becomes the line's with one
// degree of freedom less; here both are given the same.
TEST(InverseInterval, VanishingCurvature) {
  Calibration line = fitted({});
  const auto straight = fieller_interval(line, 300.0);
  line.settings.model = Model::Quadratic;
  line.curvature = 1e-14;
  const auto curved = profile_interval(line, 300.0);
  ASSERT_TRUE(straight && curved);
  EXPECT_TRUE(agrees_to_digits(curved->lower, straight->lower, 9));
  EXPECT_TRUE(agrees_to_digits(curved->upper, straight->upper, 9));
}

TEST(InverseInterval, NoFiniteEnd) {
  const auto word = [](const Outcome<ConcentrationInterval>& found) {
    return found ? std::string("found")
                 : found.reason().substr(0, found.reason().find(':'));
  };
  const auto flat = standards({{1, 10}, {2, 2}, {3, 14}, {4, 3}, {5, 13}});
  for (Weight weight :
       {Weight::None, Weight::InverseX, Weight::InverseXSquared}) {
    const auto line = fit_calibration(flat, {.weight = weight});
    if (!line) continue;
    EXPECT_EQ(word(profile_interval(*line, 9.0)), "no-finite-interval");
    EXPECT_FALSE(concentration_from_response(*line, 9.0)->interval);
  }
  const auto curve = fit_calibration(
      standards(
          {{0, 0.1}, {2, 8.0}, {4, 15.7}, {6, 24.2}, {8, 31.5}, {10, 33.0}}),
      {.model = Model::Quadratic});
  ASSERT_TRUE(curve);
  EXPECT_EQ(word(profile_interval(*curve, 41.0)), "no-finite-interval");
  EXPECT_EQ(word(profile_interval(*curve, 40.0)), "no-finite-interval");
  EXPECT_EQ(word(profile_interval(*curve, 10.0)), "found");
}

TEST(InverseInterval, WithoutScatterTheIntervalIsAPoint) {
  for (Weight weight : {Weight::None, Weight::InverseXSquared}) {
    const auto line = fit_calibration(
        standards({{1, 2}, {2, 4}, {4, 8}, {8, 16}}), {.weight = weight});
    ASSERT_TRUE(line);
    Calibration exact = *line;
    exact.residual_sd = 0.0;
    exact.covariance = {};
    const auto found = concentration_from_response(exact, 6.0);
    ASSERT_TRUE(found && found->expanded_uncertainty);
    EXPECT_TRUE(within_condition(*found->expanded_uncertainty, 0.0, 8, 3.0));
  }
}

// Blanks that scatter widen what lies near them and nothing far above; the
// unweighted fit has its own scatter and does not look at them.
TEST(PredictionSpread, BlanksOfWeightedFits) {
  Calibration line = fitted({.weight = Weight::InverseXSquared});
  const PredictionSpread before(line, 1);
  const double low = before.variance_at(1.0);
  const double high = before.variance_at(100.0);
  EXPECT_TRUE(same_bits(before.degrees_at(1.0), 5.0));
  line.blanks = BlankSpread{0.5, 6.0};
  const PredictionSpread after(line, 1);
  EXPECT_GT(after.variance_at(1.0), low + 0.5 * 0.5);
  EXPECT_LT(after.variance_at(100.0), high);
  EXPECT_GT(after.degrees_at(1.0), 5.0);

  Calibration plain = fitted({});
  const double alone = PredictionSpread(plain, 1).variance_at(1.0);
  plain.blanks = BlankSpread{50.0, 6.0};
  EXPECT_TRUE(same_bits(PredictionSpread(plain, 1).variance_at(1.0), alone));
}

// Blanks without any scatter leave the law of the weights.
TEST(PredictionSpread, SilentBlanksChangeNothing) {
  Calibration line = fitted({.weight = Weight::InverseXSquared});
  const double alone = PredictionSpread(line, 2).variance_at(7.0);
  line.blanks = BlankSpread{0.0, 6.0};
  const PredictionSpread silent(line, 2);
  EXPECT_TRUE(within_condition(silent.variance_at(7.0), alone, 1e3));
  EXPECT_TRUE(within_condition(silent.degrees_at(7.0), 5.0, 16));
}

// Blanks that scatter more than everything else explain all of it.
TEST(PredictionSpread, LoudBlanksLeaveNoOtherPart) {
  Calibration line = fitted({.weight = Weight::InverseXSquared});
  line.blanks = BlankSpread{1e4, 3.0};
  const PredictionSpread loud(line, 1);
  EXPECT_TRUE(within_condition(loud.degrees_at(7.0), 3.0, 16));
  EXPECT_GT(loud.variance_at(7.0), 1e8);
}

}  // namespace
}  // namespace loqsmith::test
