#include <cmath>
#include <string>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/blank_deviation.hpp"
#include "loqsmith/limits/calibration_residual.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/limits/signal_to_noise_limit.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// Normal blanks of standard deviation 1 on a known line, one more blank each:
// how often does it reach the detection limit?
double simulated_rate(std::size_t n, bool offset, int studies) {
  RandomStream random("blanks at the limit, n = " + std::to_string(n));
  ProcedureSettings settings;
  settings.offset_blank_mean = offset;
  int positive = 0;
  for (int study = 0; study < studies; ++study) {
    std::vector<double> blanks;
    for (std::size_t i = 0; i < n; ++i)
      blanks.push_back(20.0 + random.normal());
    const auto limit = blank_deviation(
        evidence_of(blanks, known_line(20.0, 4.0)), {}, settings);
    const double found = (20.0 + random.normal() - 20.0) / 4.0;
    if (limit && found >= *limit->detection) ++positive;
  }
  return static_cast<double>(positive) / studies;
}

void expect_rate(double found, double wanted, int studies) {
  EXPECT_TRUE(within_sampling_error(found, std::sqrt(wanted * (1.0 - wanted)),
                                    static_cast<std::size_t>(studies), wanted));
}

// About a known intercept a new blank over the estimated spread is Student's t
// with n - 1 degrees of freedom; about the blanks' own mean that is widened
// by sqrt(1 + 1/n).
TEST(BlankDeviationSimulation, FalsePositivesAreThoseOfStudentsT) {
  constexpr int kStudies = 10000;
  for (std::size_t n : {5U, 7U, 10U}) {
    const double count = static_cast<double>(n);
    expect_rate(simulated_rate(n, false, kStudies),
                student_t_upper_tail(3.0, count - 1.0), kStudies);
    expect_rate(
        simulated_rate(n, true, kStudies),
        student_t_upper_tail(3.0 / std::sqrt(1.0 + 1.0 / count), count - 1.0),
        kStudies);
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

// Whatever comes in, every number that comes out is finite and every limit
// above zero.
TEST(LimitProperties, WildInputsGiveFiniteLimitsOrNone) {
  RandomStream random("wild inputs");
  const auto wild = [&] {
    return random.normal() * std::pow(10.0, 300.0 * (random.uniform() - 0.5));
  };
  LimitSettings settings;
  for (const char* name :
       {"blank-deviation", "calibration-residual", "signal-to-noise"})
    settings.procedures.push_back(procedure(name));
  int limits = 0;
  for (int trial = 0; trial < 2000; ++trial) {
    std::vector<StandardPoint> points;
    for (int i = 0; i < 6; ++i)
      points.push_back(standard(i, std::abs(wild()), std::abs(wild())));
    const auto weight = trial % 3 == 0   ? Weight::None
                        : trial % 3 == 1 ? Weight::InverseX
                                         : Weight::InverseXSquared;
    const auto calibration = fit_calibration(points, {.weight = weight});
    LimitEvidence evidence;
    if (calibration) evidence.calibration = *calibration;
    evidence.blanks = blanks_of({wild(), wild(), wild(), wild(), wild()});
    for (int i = 0; i < 4; ++i)
      evidence.heights.push_back({i, std::abs(wild()), wild()});
    evidence.noise = std::abs(wild());
    const LimitsOfAnalyte found = compute_limits(evidence, settings);
    for (const LimitRow& row : found.rows) {
      if (!row.estimate) continue;
      ++limits;
      EXPECT_TRUE(std::isfinite(*row.estimate->detection));
      EXPECT_GT(*row.estimate->detection, 0.0);
      EXPECT_TRUE(std::isfinite(*row.estimate->quantitation));
      for (const LimitTerm& one : row.estimate->terms)
        EXPECT_TRUE(std::isfinite(one.value)) << one.name;
    }
  }
  EXPECT_GT(limits, 1000);
}

}  // namespace
}  // namespace loqsmith::test
