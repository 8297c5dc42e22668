#include <cmath>
#include <string>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/blank_deviation.hpp"
#include "loqsmith/limits/calibration_residual.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/limits/signal_to_noise_limit.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/normal.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Normal blanks of standard deviation 1 on a known line: the chance that one
// more blank reaches the detection limit, a value for each study.
std::vector<double> chances(std::size_t n, bool offset, int studies) {
  RandomStream random("blanks at the limit, n = " + std::to_string(n));
  ProcedureSettings settings;
  settings.offset_blank_mean = offset;
  std::vector<double> found;
  for (int study = 0; study < studies; ++study) {
    std::vector<double> blanks;
    for (std::size_t i = 0; i < n; ++i)
      blanks.push_back(20.0 + random.normal());
    const auto limit = blank_deviation(
        evidence_of(blanks, known_line(20.0, 4.0)), {}, settings);
    // Below the intercept by more than 3 of their spreads: no limit.
    if (limit) found.push_back(normal_cdf(-4.0 * *limit->detection));
  }
  return found;
}

void expect_mean_chance(const std::vector<double>& found, double wanted) {
  EXPECT_TRUE(within_sampling_error(mean(found), standard_deviation(found),
                                    found.size(), wanted));
}

void expect_rate(double found, double wanted, int studies) {
  EXPECT_TRUE(within_sampling_error(found, std::sqrt(wanted * (1.0 - wanted)),
                                    static_cast<std::size_t>(studies), wanted));
}

// About a known intercept a new blank over the estimated spread is Student's t
// with n - 1 degrees of freedom; about the blanks' own mean that is widened
// by sqrt(1 + 1/n).
TEST(BlankDeviationSimulation, FalsePositivesAreThoseOfStudentsT) {
  for (std::size_t n : {5U, 7U, 10U}) {
    const double count = static_cast<double>(n);
    expect_mean_chance(chances(n, false, 10000),
                       student_t_upper_tail(3.0, count - 1.0));
    // Fewer, since every such limit draws its bounds.
    expect_mean_chance(
        chances(n, true, 400),
        student_t_upper_tail(3.0 / std::sqrt(1.0 + 1.0 / count), count - 1.0));
  }
}

// Of healthy nights few may be called anything but valid.
TEST(BlankDeviationSimulation, HealthyBlanksAreRarelyGradedDown) {
  RandomStream random("healthy blanks");
  int worse_than_note = 0;
  constexpr int kStudies = 4000;
  for (int study = 0; study < kStudies; ++study) {
    std::vector<double> blanks;
    for (int i = 0; i < 10; ++i) blanks.push_back(random.normal());
    const auto limit =
        blank_deviation(evidence_of(blanks, known_line(0.0, 1.0)), {}, {});
    ASSERT_TRUE(limit);
    if (limit->grade() > Grade::Note) ++worse_than_note;
  }
  // 1 % for an outlier, 1 % for a drift, at most 2.5 % for the offset.
  EXPECT_LT(worse_than_note, kStudies * 5 / 100);
}

// The chi-square interval covers the limit of the true spread in 95 %.
TEST(BlankDeviationSimulation, BoundsCoverTheTrueLimit) {
  RandomStream random("bounds");
  constexpr int kStudies = 4000;
  int covered = 0;
  for (int study = 0; study < kStudies; ++study) {
    std::vector<double> blanks;
    for (int i = 0; i < 7; ++i) blanks.push_back(random.normal());
    const auto limit =
        blank_deviation(evidence_of(blanks, known_line(0.0, 2.0)), {}, {});
    ASSERT_TRUE(limit);
    if (*limit->detection_lower <= 1.5 && 1.5 <= *limit->detection_upper)
      ++covered;
  }
  expect_rate(static_cast<double>(covered) / kStudies, 0.95, kStudies);
}

struct Scaled {
  double responses;
  double concentrations;
};

LimitEvidence scaled_evidence(const Scaled& by) {
  auto points = fluorescence();
  for (StandardPoint& point : points) {
    point.response *= by.responses;
    point.concentration *= by.concentrations;
  }
  LimitEvidence evidence;
  evidence.calibration = fit_calibration(points, {}).value();
  for (double blank : {1.3, 1.6, 1.5, 1.2, 1.9, 1.45, 1.55})
    evidence.blanks.push_back(blanks_of({blank * by.responses}).front());
  for (const StandardPoint& point : points)
    if (point.concentration > 0.0)
      evidence.heights.push_back(
          {point.injection, point.concentration, point.response});
  evidence.noise = 4.0 * by.responses;
  return evidence;
}

// Another detector unit changes no limit; another concentration unit changes
// every limit by its factor.
TEST(LimitProperties, ScaleOfResponsesAndConcentrations) {
  using Compute = Outcome<LimitEstimate> (*)(
      const LimitEvidence&, const LimitSettings&, const ProcedureSettings&);
  for (Compute compute :
       {Compute{blank_deviation}, Compute{calibration_residual},
        Compute{signal_to_noise_limit}}) {
    const auto one = compute(scaled_evidence({1.0, 1.0}), {}, {});
    const auto unit = compute(scaled_evidence({1e-3, 1.0}), {}, {});
    const auto moles = compute(scaled_evidence({1.0, 250.0}), {}, {});
    ASSERT_TRUE(one && unit && moles);
    EXPECT_TRUE(within_condition(*unit->detection, *one->detection, 1000));
    EXPECT_TRUE(
        within_condition(*moles->detection, 250.0 * *one->detection, 1000));
    EXPECT_TRUE(within_condition(*moles->quantitation,
                                 250.0 * *one->quantitation, 1000));
    EXPECT_EQ(unit->grade(), one->grade());
    EXPECT_EQ(moles->grade(), one->grade());
  }
}

TEST(LimitProperties, AConstantOnAllResponsesChangesNothing) {
  for (bool offset : {false, true}) {
    ProcedureSettings settings;
    settings.offset_blank_mean = offset;
    LimitEvidence evidence = scaled_evidence({1.0, 1.0});
    const auto before = blank_deviation(evidence, {}, settings);
    for (BlankResponse& blank : evidence.blanks) blank.response += 32.0;
    evidence.calibration->intercept += 32.0;
    const auto after = blank_deviation(evidence, {}, settings);
    ASSERT_TRUE(before && after);
    EXPECT_TRUE(within_condition(*after->detection, *before->detection, 1000));
    EXPECT_EQ(after->grade(), before->grade());
  }
}

}  // namespace
}  // namespace loqsmith::test
