// How often the 95 % bounds of limits on a line hold the limit that the true
// standard deviation and the true line give.

#include <map>

#include "limits/line_examples.hpp"
#include "limits/line_nights.hpp"
#include "loqsmith/limits/found_deviation.hpp"
#include "loqsmith/limits/low_range_line.hpp"
#include "loqsmith/limits/prediction_band.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/noncentral_t.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

constexpr int kNights = 1000;

struct TrueLimits {
  double detection = 0.0;
  double quantitation = 0.0;
};

/// Each procedure's limits for a line whose slope and standard deviation (1)
/// are the true ones; alpha and beta 0.05.
std::map<std::string, TrueLimits> true_limits(const TrueLine& truth) {
  LowRangeLine line;
  for (double level : truth.levels)
    for (int i = 0; i < truth.replicates; ++i)
      line.concentrations.push_back(level);
  line.leverage = leverage_of(line.concentrations, {}, false);
  line.slope = truth.slope;
  line.residual_sd = 1.0;
  line.degrees_of_freedom = static_cast<int>(line.concentrations.size()) - 2;
  const double df = line.degrees_of_freedom;
  const double at_zero = line.leverage.at(0.0);
  const FoundDeviation found{1.0, 0.0, 1.0, 1.0, line.leverage, line.slope};
  const double t = student_t_quantile(0.95, df);
  const double delta = detectable_noncentrality(0.05, 0.05, df).value();
  const double of_slope = truth.intercept / truth.slope;
  const double all =
      std::sqrt(1.0 + at_zero +
                of_slope * of_slope * line.leverage.inverse_squares) /
      truth.slope;
  return {
      {"intercept-deviation",
       {3.3 * std::sqrt(at_zero) / line.slope,
        10.0 * std::sqrt(at_zero) / line.slope}},
      {"critical-and-detectable",
       {delta * found.at(0.0), *multiple_of_deviation(10.0, found)}},
      {"din-32645",
       {2.0 * t * found.at(0.0),
        *multiple_of_deviation(3.0 * student_t_quantile(0.975, df), found)}},
      {"prediction-band",
       {*band_detection_limit(line, 1.0, {}), 10.0 / line.slope}},
      {"error-propagation", {3.0 * all, 10.0 * all}}};
}

struct Coverage {
  int detection = 0;
  int quantitation = 0;
  int nights = 0;

  static double share(int covered, int nights) {
    return static_cast<double>(covered) / nights;
  }
};

/// A limit without an upper bound is bounded by nothing.
bool holds(const std::optional<double>& lower,
           const std::optional<double>& upper, double truth) {
  return lower && *lower <= truth && (!upper || truth <= *upper);
}

std::map<std::string, Coverage> simulate(const TrueLine& truth) {
  const auto limits = true_limits(truth);
  std::map<std::string, Coverage> coverage;
  RandomStream random("bounds of limits on a line");
  for (int night = 0; night < kNights; ++night) {
    const LimitEvidence evidence = drawn_night(truth, random);
    for (const auto& [name, limit] : limits) {
      ProcedureSettings settings = with_levels(name, 0.05, 0.05);
      if (name == "intercept-deviation") settings.detection_factor = 3.3;
      const auto found =
          find_limit_procedure(name)->compute(evidence, {}, settings);
      if (!found) continue;
      Coverage& one = coverage[name];
      ++one.nights;
      if (holds(found->detection_lower, found->detection_upper,
                limit.detection))
        ++one.detection;
      if (holds(found->quantitation_lower, found->quantitation_upper,
                limit.quantitation))
        ++one.quantitation;
    }
  }
  return coverage;
}

void expect_between(double share, const std::string& name) {
  EXPECT_GE(share, 0.93) << name;
  EXPECT_LE(share, 0.97) << name;
}

// Seven single points, and five levels twice: a slope known to 3 % and to 6 %.
TEST(LineCoverage, BoundsHoldTheTrueLimits) {
  TrueLine single, twice;
  single.levels = {0, 1, 2, 4, 6, 8, 10};
  twice.levels = {1, 2, 4, 7, 10};
  twice.replicates = 2;
  TrueLine single_flat = single, twice_flat = twice;
  single_flat.slope = twice_flat.slope = 2.0;
  for (TrueLine truth : {single, twice, single_flat, twice_flat}) {
    truth.blanks = 7;
    for (const auto& [name, found] : simulate(truth)) {
      EXPECT_EQ(found.nights, kNights) << name;
      expect_between(Coverage::share(found.detection, found.nights), name);
      expect_between(Coverage::share(found.quantitation, found.nights), name);
    }
  }
}

// 8 % and more: the estimate says that the bounds are approximate.
TEST(LineCoverage, ApproximateWhereTheSlopeIsPoorlyKnown) {
  TrueLine truth;
  truth.levels = {0, 1, 2, 4, 6, 8, 10};
  truth.blanks = 7;
  for (double slope : {8.0, 0.9}) {  // some 1.4 % and 12 %
    truth.slope = slope;
    RandomStream random("a slope poorly known");
    int said = 0;
    for (int night = 0; night < 20; ++night) {
      const auto found = find_limit_procedure("error-propagation")
                             ->compute(drawn_night(truth, random), {},
                                       procedure("error-propagation"));
      ASSERT_TRUE(found);
      if (finding(*found, "bounds-approximate")) ++said;
    }
    if (slope > 1.0)
      EXPECT_EQ(said, 0);
    else
      EXPECT_GE(said, 15);  // the night's own estimate decides
  }
  const auto band =
      find_limit_procedure("prediction-band")
          ->compute(fitted(fluorescence()), {}, procedure("prediction-band"));
  EXPECT_FALSE(finding(*band, "bounds-approximate"));
}

}  // namespace
}  // namespace loqsmith::test
