#include <cmath>
#include <string>

#include "limits/line_examples.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

/// All procedures on a line, each way of them.
std::vector<ProcedureSettings> line_procedures() {
  std::vector<ProcedureSettings> all;
  for (const char* name : {"intercept-deviation", "critical-and-detectable",
                           "critical-and-detectable", "din-32645", "din-32645",
                           "prediction-band", "error-propagation"})
    all.push_back(procedure(name));
  all[2].variance_linear = true;
  all[4].way_blank = true;
  return all;
}

std::string name_of(const ProcedureSettings& settings) {
  return settings.name + (settings.variance_linear ? ", linear" : "") +
         (settings.way_blank ? ", blank" : "");
}

Outcome<LimitEstimate> computed(const LimitEvidence& evidence,
                                const ProcedureSettings& settings) {
  return find_limit_procedure(settings.name)->compute(evidence, {}, settings);
}

std::vector<const std::optional<double>*> numbers_of(
    const LimitEstimate& estimate) {
  return {&estimate.critical_value,     &estimate.detection,
          &estimate.quantitation,       &estimate.detection_lower,
          &estimate.detection_upper,    &estimate.quantitation_lower,
          &estimate.quantitation_upper, &estimate.degrees_of_freedom};
}

void expect_sound(const Outcome<LimitEstimate>& found,
                  const ProcedureSettings& settings) {
  if (!found) {
    EXPECT_TRUE(contains(found.reason(), ": ")) << found.reason();
    return;
  }
  for (const std::optional<double>* one : numbers_of(*found)) {
    if (!*one) continue;
    EXPECT_TRUE(std::isfinite(**one) && **one > 0.0) << name_of(settings);
  }
  EXPECT_TRUE(found->detection) << name_of(settings);
  for (const LimitTerm& one : found->terms)
    EXPECT_TRUE(std::isfinite(one.value)) << name_of(settings) << one.name;
}

// Bounds lie about the limit, the critical value not above it.
void expect_in_order(const LimitEstimate& found,
                     const ProcedureSettings& settings) {
  const auto rising = [&](const std::optional<double>& low,
                          const std::optional<double>& high) {
    if (low && high) {
      EXPECT_LT(*low, *high) << name_of(settings);
    }
  };
  rising(found.critical_value, found.detection);
  rising(found.detection_lower, found.detection);
  rising(found.detection, found.detection_upper);
  rising(found.quantitation_lower, found.quantitation);
  rising(found.quantitation, found.quantitation_upper);
}

// Standards as a clumsy laboratory might make them: few or many levels, once or
// often, from nearly no scatter to nothing but scatter, rising or not.
std::vector<StandardPoint> clumsy_standards(RandomStream& random) {
  const double slope = random.normal() + 0.5;
  const double scatter = std::pow(10.0, 8.0 * random.uniform() - 7.0);
  const double growth = random.uniform() < 0.5 ? 0.0 : 0.3 * random.uniform();
  const int levels = 2 + static_cast<int>(6.0 * random.uniform());
  const int replicates = 1 + static_cast<int>(4.0 * random.uniform());
  const double zero = random.uniform() < 0.5 ? 0.0 : 1.0;
  std::vector<std::pair<double, double>> pairs;
  for (int level = 0; level < levels; ++level)
    for (int i = 0; i < replicates; ++i) {
      const double x = zero + level;
      pairs.emplace_back(
          x, slope * x + scatter * (1.0 + growth * x) * random.normal());
    }
  return standards(pairs);
}

double level_from(RandomStream& random) {
  return 0.4 * std::pow(10.0, -12.0 * random.uniform());
}

// Computed without the guard that withholds what is not finite.
TEST(LineProperties, ClumsyStandardsGiveFiniteLimitsOrNone) {
  RandomStream random("clumsy standards");
  std::vector<int> limits(line_procedures().size(), 0);
  for (int trial = 0; trial < 800; ++trial) {
    CalibrationSettings calibration;
    if (trial % 4 == 1) calibration.intercept = Intercept::Zero;
    if (trial % 4 == 2) calibration.weight = Weight::InverseX;
    if (trial % 20 == 3) calibration.model = Model::Quadratic;
    LimitEvidence evidence = fitted(clumsy_standards(random), calibration);
    evidence.blanks = blanks_of(
        {random.normal(), random.normal(), random.normal(), random.normal()});
    std::vector<ProcedureSettings> procedures = line_procedures();
    for (std::size_t i = 0; i < procedures.size(); ++i) {
      procedures[i].alpha = level_from(random);
      procedures[i].beta = level_from(random);
      procedures[i].replicates =
          1 + static_cast<int>(1000.0 * std::pow(random.uniform(), 8));
      if (trial % 2 == 1) procedures[i].up_to.reset();
      const auto found = computed(evidence, procedures[i]);
      expect_sound(found, procedures[i]);
      if (!found) continue;
      expect_in_order(*found, procedures[i]);
      ++limits[i];
    }
  }
  for (int count : limits) EXPECT_GT(count, 30);
}

// Whatever the magnitudes, with the guard of all procedures.
TEST(LineProperties, WildInputsGiveFiniteLimitsOrNone) {
  RandomStream random("wild lines");
  const auto wild = [&] {
    return random.normal() * std::pow(10.0, 300.0 * (random.uniform() - 0.5));
  };
  LimitSettings settings;
  settings.procedures = line_procedures();
  for (ProcedureSettings& one : settings.procedures) one.up_to.reset();
  int limits = 0;
  for (int trial = 0; trial < 600; ++trial) {
    std::vector<StandardPoint> points;
    const double x = std::abs(wild()), y = std::abs(wild());
    for (int i = 0; i < 8; ++i)
      points.push_back(trial % 2 == 0
                           ? standard(i, std::abs(wild()), std::abs(wild()))
                           : standard(i, x * (1 + i / 2),
                                      y * (1 + i / 2 + 0.1 * random.normal())));
    LimitEvidence evidence = fitted(points);
    evidence.blanks = blanks_of({wild(), wild(), wild(), wild(), wild()});
    const LimitsOfAnalyte found = compute_limits(evidence, settings);
    for (std::size_t i = 0; i < found.rows.size(); ++i) {
      expect_sound(found.rows[i].estimate, settings.procedures[i]);
      if (found.rows[i].estimate) ++limits;
    }
  }
  EXPECT_GT(limits, 300);
}

LimitEvidence scaled(double responses, double concentrations) {
  std::vector<StandardPoint> points = growing_scatter();
  for (StandardPoint& point : points) {
    point.response *= responses;
    point.concentration *= concentrations;
  }
  LimitEvidence evidence = fitted(points);
  evidence.blanks.clear();
  for (double blank : {0.95, 1.03, 1.01, 0.97, 1.06, 0.99, 1.02})
    evidence.blanks.push_back(blanks_of({blank * responses}).front());
  return evidence;
}

// Another detector unit changes no limit; another concentration unit changes
// every limit by its factor.
TEST(LineProperties, ScaleOfResponsesAndConcentrations) {
  for (ProcedureSettings settings : line_procedures()) {
    settings.up_to.reset();
    const auto one = computed(scaled(1.0, 1.0), settings);
    const auto unit = computed(scaled(1e-3, 1.0), settings);
    const auto moles = computed(scaled(1.0, 250.0), settings);
    ASSERT_TRUE(one && unit && moles) << name_of(settings);
    const auto before = numbers_of(*one), same = numbers_of(*unit),
               larger = numbers_of(*moles);
    for (std::size_t i = 0; i + 1 < before.size(); ++i) {
      ASSERT_EQ(before[i]->has_value(), same[i]->has_value());
      if (!*before[i]) continue;
      EXPECT_TRUE(within_condition(**same[i], **before[i], 1e4));
      EXPECT_TRUE(within_condition(**larger[i], 250.0 * **before[i], 1e4));
    }
    EXPECT_EQ(unit->grade(), one->grade()) << name_of(settings);
    EXPECT_EQ(moles->grade(), one->grade()) << name_of(settings);
  }
}

// A constant on all responses moves the intercept and no limit; only
// propagated errors know the intercept itself.
TEST(LineProperties, AConstantOnAllResponses) {
  for (ProcedureSettings settings : line_procedures()) {
    LimitEvidence evidence = scaled(1.0, 1.0);
    const auto before = computed(evidence, settings);
    std::vector<StandardPoint> points = growing_scatter();
    for (StandardPoint& point : points) point.response += 32.0;
    std::vector<BlankResponse> blanks = evidence.blanks;
    for (BlankResponse& blank : blanks) blank.response += 32.0;
    evidence = fitted(points);
    evidence.blanks = blanks;
    const auto after = computed(evidence, settings);
    ASSERT_TRUE(before && after) << name_of(settings);
    if (settings.name == "error-propagation")
      EXPECT_GT(*after->detection, *before->detection);
    else
      EXPECT_TRUE(within_condition(*after->detection, *before->detection, 1e5));
  }
}

// More measurements averaged: lower limits. Stricter levels: higher ones.
TEST(LineProperties, ReplicatesAndLevelsMoveLimitsAsTheyShould) {
  for (ProcedureSettings settings : line_procedures()) {
    if (settings.name == "intercept-deviation" ||
        settings.name == "error-propagation")
      continue;
    settings.up_to.reset();
    const LimitEvidence evidence = scaled(1.0, 1.0);
    const auto plain = computed(evidence, settings);
    settings.replicates = 4;
    const auto averaged = computed(evidence, settings);
    settings.replicates = 1;
    settings.alpha = 0.001;
    const auto strict = computed(evidence, settings);
    settings.alpha = 0.05;
    settings.beta = 0.001;
    const auto sure = computed(evidence, settings);
    ASSERT_TRUE(plain && averaged && strict && sure) << name_of(settings);
    EXPECT_LT(*averaged->critical_value, *plain->critical_value);
    EXPECT_LT(*averaged->detection, *plain->detection);
    EXPECT_GT(*strict->critical_value, *plain->critical_value);
    EXPECT_GT(*sure->detection, *plain->detection);
    EXPECT_TRUE(same_bits(*sure->critical_value, *plain->critical_value));
  }
}

}  // namespace
}  // namespace loqsmith::test
