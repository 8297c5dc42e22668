// What holds for each row of the table of procedures, new ones included.

#include <cctype>
#include <cmath>
#include <functional>
#include <set>
#include <string>

#include "limits/whole_evidence.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

using Model = CalibrationSettings::Model;

ProcedureSettings named(std::string_view name) {
  ProcedureSettings settings = procedure(std::string(name));
  settings.detection = 0.4;  // of "established" alone
  settings.quantitation = 1.2;
  return settings;
}

// Each way of every attribute that leads to a branch of its own.
std::vector<ProcedureSettings> ways_of(std::string_view name) {
  std::vector<ProcedureSettings> ways(9, named(name));
  ways[1].offset_blank_mean = true;
  ways[2].way_blank = true;
  ways[3].ranks = true;
  ways[4].variance_linear = true;
  ways[5].up_to.reset();
  ways[6].blanks = BlankKind::All;
  ways[7].replicates = 3;
  ways[7].blank_replicates = 2;
  ways[8].relative_deviation = 0.001;
  return ways;
}

std::vector<CalibrationSettings> calibration_kinds() {
  std::vector<CalibrationSettings> kinds(5);
  kinds[1].weight = Weight::InverseXSquared;
  kinds[2].intercept = Intercept::Zero;
  kinds[3].model = Model::ResponseFactor;
  kinds[4].model = Model::Quadratic;
  return kinds;
}

// "word: a sentence that a chemist understands".
bool is_usable_reason(const std::string& reason) {
  const std::size_t colon = reason.find(": ");
  if (colon == std::string::npos || colon < 5) return false;
  for (char letter : reason.substr(0, colon)) {
    const unsigned char one = static_cast<unsigned char>(letter);
    if (std::islower(one) == 0 && std::isdigit(one) == 0 && letter != '-')
      return false;
  }
  return reason.size() >= colon + 12;
}

void expect_sound(const std::optional<double>& limit, const char* what) {
  if (!limit) return;
  EXPECT_TRUE(std::isfinite(*limit)) << what;
  EXPECT_GT(*limit, 0.0) << what;
}

void expect_sound(const LimitEstimate& estimate) {
  EXPECT_TRUE(estimate.critical_value || estimate.detection ||
              estimate.quantitation);
  expect_sound(estimate.critical_value, "critical value");
  expect_sound(estimate.detection, "detection");
  expect_sound(estimate.quantitation, "quantitation");
  expect_sound(estimate.detection_lower, "detection, lower");
  expect_sound(estimate.detection_upper, "detection, upper");
  expect_sound(estimate.quantitation_lower, "quantitation, lower");
  expect_sound(estimate.quantitation_upper, "quantitation, upper");
  for (const LimitTerm& one : estimate.terms)
    EXPECT_TRUE(std::isfinite(one.value)) << one.name;
  for (const LimitFinding& one : estimate.findings)
    EXPECT_FALSE(one.word.empty() || one.text.empty());
  if (estimate.degrees_of_freedom) {
    EXPECT_GT(*estimate.degrees_of_freedom, 0.0);
  }
}

// The procedures that refused in every way.
std::set<std::string> refused_by(const LimitEvidence& evidence) {
  std::set<std::string> refused;
  for (const LimitProcedure& row : limit_procedures()) {
    if (row.compute == nullptr) continue;
    SCOPED_TRACE(std::string(row.name));
    bool refuses = true;
    for (const ProcedureSettings& way : ways_of(row.name)) {
      const auto estimate = row.compute(evidence, {}, way);
      refuses = refuses && !estimate;
      if (estimate)
        expect_sound(*estimate);
      else
        EXPECT_TRUE(is_usable_reason(estimate.reason())) << estimate.reason();
    }
    if (refuses) refused.insert(std::string(row.name));
  }
  return refused;
}

using Damage = std::function<void(LimitEvidence&)>;

// Over every kind of calibration; gives those that refuse on each.
std::set<std::string> refused_after(const Damage& damage) {
  std::set<std::string> all;
  bool first = true;
  for (const CalibrationSettings& kind : calibration_kinds()) {
    LimitEvidence evidence = whole_evidence("every procedure", kind);
    EXPECT_TRUE(evidence.calibration);
    damage(evidence);
    const std::set<std::string> refused = refused_by(evidence);
    if (first) all = refused;
    first = false;
    std::erase_if(
        all, [&](const std::string& one) { return refused.count(one) == 0; });
  }
  return all;
}

std::set<std::string> every_name() {
  std::set<std::string> names;
  for (const LimitProcedure& row : limit_procedures())
    if (row.compute != nullptr) names.insert(std::string(row.name));
  return names;
}

// Otherwise the tests below would say nothing of a procedure.
TEST(EveryProcedure, GivesALimitOfHealthyEvidence) {
  const LimitEvidence evidence = whole_evidence("every procedure");
  for (const LimitProcedure& row : limit_procedures()) {
    if (row.compute == nullptr) continue;
    const auto estimate = row.compute(evidence, {}, named(row.name));
    ASSERT_TRUE(estimate) << row.name << ": " << estimate.reason();
    expect_sound(*estimate);
  }
  EXPECT_TRUE(refused_by(evidence).empty());
}

TEST(EveryProcedure, NothingAtAll) {
  const std::set<std::string> refused =
      refused_after([](LimitEvidence& evidence) { evidence = {}; });
  std::set<std::string> wanted = every_name();
  wanted.erase("established");
  EXPECT_EQ(refused, wanted);
}

void expect_among(const std::set<std::string>& refused,
                  const std::vector<std::string>& wanted) {
  for (const std::string& one : wanted)
    if (find_limit_procedure(one)->compute != nullptr) {
      EXPECT_EQ(refused.count(one), 1U) << one;
    }
}

TEST(EveryProcedure, TooFewPoints) {
  const std::set<std::string> refused =
      refused_after([](LimitEvidence& evidence) {
        const Calibration& before = *evidence.calibration;
        const auto after = fit_calibration(
            {before.points[0], before.points[6], before.points[9]},
            before.settings);
        evidence.calibration.reset();
        if (after) evidence.calibration = *after;
        evidence.blanks.resize(2);
        evidence.spikes.resize(2);
        evidence.heights.clear();
      });
  // Not calibration-residual: a weighted fit of three points has a spread.
  expect_among(refused,
               {"blank-deviation", "intercept-deviation", "signal-to-noise",
                "spike-replicates", "critical-and-detectable", "din-32645",
                "prediction-band", "low-level-precision", "blank-and-low-level",
                "error-propagation", "two-component", "accuracy-profile"});
}

TEST(EveryProcedure, NoVarianceAnywhere) {
  const std::set<std::string> refused =
      refused_after([](LimitEvidence& evidence) {
        for (StandardPoint& point : evidence.calibration->points)
          point.response = 10.0 * point.concentration;
        evidence.calibration->intercept = 0.0;
        evidence.calibration->slope = 10.0;
        evidence.calibration->curvature = 0.0;
        evidence.calibration->residual_sd = 0.0;
        evidence.calibration->covariance = {};
        for (BlankResponse& blank : evidence.blanks) blank.response = 1.0;
        for (PredictedNoise& one : evidence.predicted_noise) one.sd = 0.0;
        for (SpikeResult& spike : evidence.spikes)
          spike.found_vial = spike.nominal_vial;
        evidence.noise = 0.0;
      });
  expect_among(refused,
               {"blank-deviation", "calibration-residual",
                "intercept-deviation", "signal-to-noise", "noise-model",
                "spike-replicates", "critical-and-detectable", "din-32645",
                "prediction-band", "low-level-precision", "blank-and-low-level",
                "error-propagation", "two-component"});
}

void tilt(LimitEvidence& evidence, double slope) {
  for (StandardPoint& point : evidence.calibration->points)
    point.response = 5000.0 + slope * point.concentration +
                     2.0 * std::sin(1.7 * point.injection);
  evidence.calibration->intercept = 5000.0;
  evidence.calibration->slope = slope;
  evidence.calibration->curvature = 0.0;
  for (StandardHeight& one : evidence.heights)
    one.height = 1000.0 + slope * one.concentration;
}

TEST(EveryProcedure, SlopeZeroOrBelow) {
  for (double slope : {0.0, -10.0}) {
    const std::set<std::string> refused =
        refused_after([&](LimitEvidence& evidence) { tilt(evidence, slope); });
    expect_among(
        refused,
        {"blank-deviation", "calibration-residual", "intercept-deviation",
         "signal-to-noise", "noise-model", "critical-and-detectable",
         "din-32645", "prediction-band", "error-propagation", "two-component"});
  }
}

TEST(EveryProcedure, WithoutBlanks) {
  const std::set<std::string> refused =
      refused_after([](LimitEvidence& evidence) {
        evidence.blanks.clear();
        evidence.predicted_noise.clear();
      });
  expect_among(refused, {"blank-deviation", "noise-model",
                         "blank-and-low-level", "error-propagation"});
}

TEST(EveryProcedure, WithoutSpikes) {
  const std::set<std::string> refused =
      refused_after([](LimitEvidence& evidence) { evidence.spikes.clear(); });
  expect_among(refused,
               {"spike-replicates", "blank-and-low-level", "accuracy-profile"});
}

// Numbers of any size, each way: finite limits above zero, or none, with a
// reason; also where they overflow on the way.
TEST(EveryProcedure, WildInputsGiveFiniteLimitsOrNone) {
  RandomStream random("wild inputs");
  const auto wild = [&] {
    return random.normal() * std::pow(10.0, 300.0 * (random.uniform() - 0.5));
  };
  LimitSettings settings;
  for (const LimitProcedure& row : limit_procedures())
    if (row.compute != nullptr) settings.procedures.push_back(named(row.name));
  int limits = 0;
  for (int trial = 0; trial < 400; ++trial) {
    LimitEvidence evidence = whole_evidence("shape of wild inputs");
    std::vector<StandardPoint> points;
    for (int i = 0; i < 12; ++i)
      points.push_back(standard(i, std::abs(wild()), std::abs(wild())));
    for (std::size_t i = 1; trial % 2 == 0 && i < points.size(); i += 2)
      points[i].concentration = points[i - 1].concentration;
    const auto kinds = calibration_kinds();
    const auto calibration = fit_calibration(
        points, kinds[static_cast<std::size_t>(trial) % kinds.size()]);
    evidence.calibration.reset();
    if (calibration) evidence.calibration = *calibration;
    for (BlankResponse& blank : evidence.blanks) blank.response = wild();
    for (PredictedNoise& one : evidence.predicted_noise)
      one.sd = std::abs(wild());
    for (SpikeResult& spike : evidence.spikes) spike.found_vial = wild();
    evidence.heights.clear();
    for (int i = 0; i < 4; ++i)
      evidence.heights.push_back({i, std::abs(wild()), wild()});
    evidence.noise = std::abs(wild());
    for (const LimitRow& row : compute_limits(evidence, settings).rows) {
      SCOPED_TRACE(row.procedure);
      if (!row.estimate) {
        EXPECT_TRUE(is_usable_reason(row.estimate.reason()))
            << row.estimate.reason();
        continue;
      }
      ++limits;
      expect_sound(*row.estimate);
    }
  }
  EXPECT_GT(limits, 1000);
}

}  // namespace
}  // namespace loqsmith::test
