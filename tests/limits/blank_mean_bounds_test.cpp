#include "loqsmith/limits/blank_mean_bounds.hpp"

#include <cmath>
#include <iostream>
#include <string>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/blank_deviation.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

ProcedureSettings with_offset() {
  ProcedureSettings settings = procedure("blank-deviation");
  settings.offset_blank_mean = true;
  return settings;
}

struct Covered {
  double studies = 0.0;  // that gave a limit
  double detection = 0.0;
  double quantitation = 0.0;
};

// Without a lower bound the interval begins at zero.
bool holds(const std::optional<double>& lower, double true_limit,
           const std::optional<double>& upper) {
  return upper && lower.value_or(0.0) <= true_limit && true_limit <= *upper;
}

// Blanks of standard deviation 1 so far above the intercept; slope 4.
Covered coverage(double above, bool fitted, int studies) {
  RandomStream random("bounds of blanks " + std::to_string(above) +
                      (fitted ? " fitted" : " known"));
  Covered covered;
  for (int study = 0; study < studies; ++study) {
    std::vector<double> blanks;
    for (int i = 0; i < 7; ++i) blanks.push_back(above + random.normal());
    Calibration line = known_line(0.0, 4.0);
    if (fitted) {
      std::vector<std::pair<double, double>> pairs;
      for (double x : {1.0, 2.0, 3.0, 4.0, 6.0, 8.0, 10.0})
        pairs.emplace_back(x, 4.0 * x + random.normal());
      line = fit_calibration(standards(pairs), {}).value();
    }
    const auto limit =
        blank_deviation(evidence_of(blanks, line), {}, with_offset());
    if (!limit) continue;
    ++covered.studies;
    const double detection = (above + 3.0) / 4.0;
    const double quantitation = (above + 10.0) / 4.0;
    if (holds(limit->detection_lower, detection, limit->detection_upper))
      ++covered.detection;
    if (holds(limit->quantitation_lower, quantitation,
              limit->quantitation_upper))
      ++covered.quantitation;
  }
  return covered;
}

void expect_coverage(double covered, double studies) {
  EXPECT_TRUE(within_sampling_error(covered / studies, std::sqrt(0.95 * 0.05),
                                    static_cast<std::size_t>(studies), 0.95));
}

TEST(BlankMeanBounds, CoverTheTrueLimit) {
  for (bool fitted : {false, true})
    for (double above : {0.0, 8.0}) {
      const Covered found = coverage(above, fitted, 400);
      std::cout << (fitted ? "fitted" : "known") << " line, blanks " << above
                << " above: " << found.detection / found.studies << " and "
                << found.quantitation / found.studies << '\n';
      EXPECT_GT(found.studies, 380.0);
      expect_coverage(found.detection, found.studies);
      expect_coverage(found.quantitation, found.studies);
    }
}

// With the blanks' mean on the intercept of a known line the quantitation
// limit's bounds are nearly those of its spread alone.
TEST(BlankMeanBounds, StandBesideThoseOfTheSpread) {
  const LimitEvidence evidence =
      evidence_of({-1.0, 0.5, 1.5, -0.5, 0.0, -1.2, 0.7}, known_line(0.0, 2.0));
  const auto with_mean = blank_deviation(evidence, {}, with_offset());
  const auto spread =
      blank_deviation(evidence, {}, procedure("blank-deviation"));
  ASSERT_TRUE(with_mean && spread);
  ASSERT_TRUE(with_mean->quantitation_lower && with_mean->quantitation_upper);
  EXPECT_LT(
      std::abs(*with_mean->quantitation_lower / *spread->quantitation_lower -
               1.0),
      0.1);
  EXPECT_LT(
      std::abs(*with_mean->quantitation_upper / *spread->quantitation_upper -
               1.0),
      0.1);
  EXPECT_LT(*with_mean->detection_lower, *with_mean->detection);
  EXPECT_GT(*with_mean->detection_upper, *with_mean->detection);
}

// A slope that may well be zero leaves the limit without bounds.
TEST(BlankMeanBounds, AnUncertainSlopeLeavesNone) {
  Calibration line = known_line(0.0, 2.0);
  line.covariance[1][1] = 1.0;
  const auto limit =
      blank_deviation(evidence_of({-1.0, 0.5, 1.5, -0.5, 0.0, -1.2, 0.7}, line),
                      {}, with_offset());
  ASSERT_TRUE(limit);
  EXPECT_FALSE(limit->detection_lower || limit->quantitation_upper);
  EXPECT_NE(finding(*limit, "bounds-absent"), nullptr);
}

}  // namespace
}  // namespace loqsmith::test
