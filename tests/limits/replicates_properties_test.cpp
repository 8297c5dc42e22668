#include <algorithm>
#include <cmath>
#include <string>
#include <vector>

#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/governing.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

const std::vector<std::string> kNames = {
    "spike-replicates", "low-level-precision", "blank-and-low-level",
    "accuracy-profile"};

ProcedureSettings settings_of(const std::string& name) {
  ProcedureSettings settings = procedure(name);
  if (name == "accuracy-profile") settings.beta = 0.80;
  return settings;
}

LimitSettings all_of_them(BlankKind kind) {
  LimitSettings settings;
  settings.blanks = kind;
  for (const std::string& name : kNames) {
    settings.procedures.push_back(settings_of(name));
    if (name != "accuracy-profile") settings.procedures.back().blanks = kind;
  }
  return settings;
}

void expect_sound(const LimitEstimate& estimate, const std::string& name) {
  for (const std::optional<double>& one :
       {estimate.critical_value, estimate.detection, estimate.quantitation,
        estimate.detection_lower, estimate.detection_upper,
        estimate.quantitation_lower, estimate.quantitation_upper}) {
    if (!one) continue;
    EXPECT_TRUE(std::isfinite(*one)) << name;
    EXPECT_GT(*one, 0.0) << name;
  }
  if (estimate.degrees_of_freedom) {
    EXPECT_GT(*estimate.degrees_of_freedom, 0.0) << name;
  }
  for (const LimitTerm& term : estimate.terms)
    EXPECT_TRUE(std::isfinite(term.value)) << name << ' ' << term.name;
}

/// Numbers of every size and sign, some of them the same, some zero.
class Wild {
 public:
  explicit Wild(const std::string& name) : random_(name) {}

  double number(double decades) {
    const double kind = random_.uniform();
    if (kind < 0.1) return 0.0;
    if (kind < 0.2) return last_;
    last_ =
        random_.normal() * std::pow(10.0, decades * (random_.uniform() - 0.5));
    return last_;
  }
  std::size_t count(std::size_t most) {
    return static_cast<std::size_t>(random_.uniform() *
                                    static_cast<double>(most + 1));
  }

 private:
  RandomStream random_;
  double last_ = 1.0;
};

LimitEvidence wild_evidence(Wild& wild, double decades) {
  LimitEvidence evidence;
  evidence.calibration = known_line(wild.number(decades), wild.number(decades));
  std::vector<double> blanks;
  for (std::size_t n = wild.count(12); n > 0; --n)
    blanks.push_back(wild.number(decades));
  evidence.blanks = blanks_of(blanks);
  for (BlankResponse& blank : evidence.blanks)
    blank.prep = std::to_string(wild.count(3));
  for (std::size_t levels = wild.count(3); levels > 0; --levels) {
    const double nominal = wild.number(decades);
    for (std::size_t n = wild.count(12); n > 0; --n)
      evidence.spikes.push_back(
          {0, nominal, wild.number(decades), std::to_string(wild.count(4)),
           wild.count(9) > 0, std::abs(wild.number(2.0))});
  }
  return evidence;
}

// Whatever comes in, every number that comes out is finite and every limit
// above zero; and what does not exist says why.
TEST(ReplicatesProperties, WildInputsGiveFiniteLimitsOrReasons) {
  LimitSettings settings = all_of_them(BlankKind::Solvent);
  int limits = 0;
  for (double decades : {1.0, 20.0, 600.0}) {
    Wild wild("wild replicates " + std::to_string(decades));
    for (int trial = 0; trial < 1000; ++trial) {
      for (ProcedureSettings& one : settings.procedures)
        one.ranks = trial % 2 == 1;
      const LimitsOfAnalyte found =
          compute_limits(wild_evidence(wild, decades), settings);
      for (const LimitRow& row : found.rows) {
        if (row.estimate) {
          ++limits;
          expect_sound(*row.estimate, row.procedure);
        } else {
          EXPECT_TRUE(contains(row.estimate.reason(), "-")) << row.procedure;
          EXPECT_GT(row.estimate.reason().size(), 10U);
        }
      }
    }
  }
  EXPECT_GT(limits, 500);
}

/// Spikes of two levels in four preparations of three, blanks of as many.
LimitEvidence sound_evidence(double responses, double concentrations) {
  RandomStream random("sound replicates");
  LimitEvidence evidence;
  evidence.calibration =
      known_line(3.0 * responses, 2.0 * responses / concentrations,
                 concentrations, 100.0 * concentrations);
  std::vector<double> blanks;
  for (int i = 0; i < 12; ++i)
    blanks.push_back(responses * (3.3 + 0.1 * random.normal()));
  evidence.blanks = blanks_of(blanks, BlankKind::Method);
  for (double nominal : {1.0, 2.0})
    for (int i = 0; i < 12; ++i)
      evidence.spikes.push_back(
          {i, nominal * concentrations,
           concentrations * (nominal + 0.1 * random.normal()),
           "P" + std::to_string(i % 4)});
  return evidence;
}

// Another detector unit changes no limit; another concentration unit changes
// every limit by its factor. Powers of two keep the bits.
TEST(ReplicatesProperties, ScaleOfResponsesAndConcentrations) {
  const LimitSettings settings = all_of_them(BlankKind::Method);
  for (const ProcedureSettings& one : settings.procedures) {
    const LimitFunction compute = find_limit_procedure(one.name)->compute;
    const auto before = compute(sound_evidence(1.0, 1.0), settings, one);
    const auto detector = compute(sound_evidence(1e-3, 1.0), settings, one);
    const auto unit = compute(sound_evidence(1.0, 1024.0), settings, one);
    ASSERT_TRUE(before && detector && unit) << one.name;
    EXPECT_TRUE(
        within_condition(*detector->quantitation, *before->quantitation, 1000));
    EXPECT_TRUE(same_bits(*unit->quantitation, 1024.0 * *before->quantitation))
        << one.name;
    EXPECT_EQ(unit->grade(), before->grade());
    EXPECT_EQ(detector->grade(), before->grade());
    if (!before->detection) continue;
    EXPECT_TRUE(
        within_condition(*detector->detection, *before->detection, 10000));
    EXPECT_TRUE(same_bits(*unit->detection, 1024.0 * *before->detection));
    EXPECT_TRUE(
        same_bits(*unit->detection_upper, 1024.0 * *before->detection_upper));
  }
}

// The order of spikes changes nothing that is said of them.
TEST(ReplicatesProperties, OrderOfTheSpikes) {
  const LimitSettings settings = all_of_them(BlankKind::Method);
  LimitEvidence turned = sound_evidence(1.0, 1.0);
  std::reverse(turned.spikes.begin(), turned.spikes.end());
  for (const ProcedureSettings& one : settings.procedures) {
    const LimitFunction compute = find_limit_procedure(one.name)->compute;
    const auto before = compute(sound_evidence(1.0, 1.0), settings, one);
    const auto after = compute(turned, settings, one);
    ASSERT_TRUE(before && after) << one.name;
    EXPECT_TRUE(
        within_condition(*after->quantitation, *before->quantitation, 1000))
        << one.name;
    EXPECT_EQ(after->grade(), before->grade());
  }
}

}  // namespace
}  // namespace loqsmith::test
