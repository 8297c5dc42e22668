#include <cmath>
#include <iostream>
#include <optional>
#include <string>
#include <vector>

#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/limit_of_blank.hpp"
#include "loqsmith/limits/method_blank_limit.hpp"
#include "loqsmith/limits/spike_replicates.hpp"
#include "loqsmith/limits/tolerance_interval.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/normal.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

void expect_rate(double found, double wanted, int studies) {
  EXPECT_TRUE(within_sampling_error(found, std::sqrt(wanted * (1.0 - wanted)),
                                    static_cast<std::size_t>(studies), wanted));
}

std::vector<double> normals(RandomStream& random, std::size_t n, double mean,
                            double sd = 1.0) {
  std::vector<double> values;
  for (std::size_t i = 0; i < n; ++i)
    values.push_back(mean + sd * random.normal());
  return values;
}

/// The whole procedure on blanks and spikes of a line of slope 1.
double limit_of(const std::vector<double>& blanks,
                const std::vector<double>& spikes) {
  LimitEvidence evidence = evidence_of({}, known_line(0.0, 1.0, 5.0));
  evidence.blanks = blanks_of(blanks, BlankKind::Method);
  evidence.spikes = spikes_of(8.0, spikes);
  return *spike_replicates(evidence, {}, {})->detection;
}

// Blanks of known mean zero that scatter as the spikes do: the t rule keeps its
// 1 %.
TEST(SpikeReplicatesSimulation, TheSpikesRuleLetsOnePercentOfBlanksPass) {
  constexpr int kStudies = 20000;
  RandomStream random("spikes alone");
  // Blanks that never decide.
  const std::vector<double> quiet = {1e-6, 2e-6, 0, 1e-6, 2e-6, 0, 1e-6};
  int positive = 0;
  for (int study = 0; study < kStudies; ++study)
    if (random.normal() >= limit_of(quiet, normals(random, 7, 8.0))) ++positive;
  expect_rate(static_cast<double>(positive) / kStudies, 0.01, kStudies);
}

// Where the blanks' own spread decides as well, it keeps less: the larger of
// two limits.
TEST(SpikeReplicatesSimulation, TheLargerOfBothLetsFewerPass) {
  constexpr int kStudies = 3000;
  RandomStream random("larger of both");
  int positive = 0;
  for (int study = 0; study < kStudies; ++study)
    if (random.normal() >=
        limit_of(normals(random, 7, 0.0), normals(random, 7, 8.0)))
      ++positive;
  const double found = static_cast<double>(positive) / kStudies;
  std::cout << "larger of both rules, 7 spikes and 7 blanks: " << found << '\n';
  // Three standard errors below 1 %.
  EXPECT_LT(found, 0.01 - 3.0 * std::sqrt(0.01 * 0.99 / kStudies));
}

double blank_rule_rate(const std::string& name, std::size_t n, double mean,
                       int studies) {
  RandomStream random(name);
  int positive = 0;
  for (int study = 0; study < studies; ++study) {
    std::vector<std::optional<double>> results;
    for (double one : normals(random, n, mean)) results.emplace_back(one);
    const auto limit = method_blank_limit(results, 0.99);
    if (limit && mean + random.normal() >= limit->value) ++positive;
  }
  return static_cast<double>(positive) / studies;
}

// The rule takes the blanks' estimated mean for the true one; exact would be a
// factor sqrt(1 + 1/n) on t.
TEST(SpikeReplicatesSimulation, TheBlanksRuleLetsALittleMorePass) {
  constexpr int kStudies = 20000;
  for (std::size_t n : {7U, 20U}) {
    const double count = static_cast<double>(n);
    const double t = student_t_quantile(0.99, count - 1.0);
    const double exact =
        student_t_upper_tail(t / std::sqrt(1.0 + 1.0 / count), count - 1.0);
    const std::string name = "blanks alone " + std::to_string(n);
    const double found = blank_rule_rate(name, n, 10.0, kStudies);
    std::cout << n << " blanks alone: " << 100.0 * found << " %, exact "
              << 100.0 * exact << " %\n";
    expect_rate(found, exact, kStudies);
    EXPECT_GT(exact, 0.0105);
    // A mean at zero counts as zero where it is found below.
    EXPECT_LT(blank_rule_rate(name, n, 0.0, kStudies), exact);
  }
}

struct LowRates {
  double false_positives = 0.0;  ///< of blanks, at the limit of blank
  double false_negatives = 0.0;  ///< of samples at each night's own limit
  double at_true_limit = 0.0;    ///< of samples at the true limit
};

LowRates low_level_rates(std::size_t n, int studies) {
  RandomStream random("low level " + std::to_string(n));
  const double true_limit = 2.0 * normal_quantile(0.95);
  int positive = 0, missed = 0, missed_at_true = 0;
  for (int study = 0; study < studies; ++study) {
    const double critical = limit_of_blank(normals(random, n, 0.0), 1, 0.05);
    const PooledSpread low = pooled_spread({normals(random, n, true_limit)});
    const double detection = limit_of_detection(critical, low, 0.05);
    if (random.normal() >= critical) ++positive;
    if (detection + random.normal() < critical) ++missed;
    if (true_limit + random.normal() < critical) ++missed_at_true;
  }
  const double all = studies;
  return {positive / all, missed / all, missed_at_true / all};
}

// The factors take the standard deviations for known, and the blanks' mean as
// well: Student's t tells what remains of alpha and beta.
TEST(BlankAndLowLevelSimulation, FalsePositivesAndNegatives) {
  constexpr int kStudies = 8000;
  for (std::size_t n : {7U, 20U, 60U}) {
    const double count = static_cast<double>(n);
    const double c = corrected_normal_factor(0.95, count - 1.0);
    const LowRates found = low_level_rates(n, kStudies);
    const double positive =
        student_t_upper_tail(c / std::sqrt(1.0 + 1.0 / count), count - 1.0);
    const double negative = student_t_upper_tail(c, count - 1.0);
    std::cout << n << " blanks and spikes: false positives "
              << found.false_positives << " (exact " << positive
              << "), false negatives " << found.false_negatives << " (exact "
              << negative << ") at the night's own limit, "
              << found.at_true_limit << " at the true one\n";
    expect_rate(found.false_positives, positive, kStudies);
    expect_rate(found.false_negatives, negative, kStudies);
    EXPECT_GT(positive, 0.05);
    EXPECT_GT(negative, 0.05);
  }
}

// Of n + 1 exchangeable results the last one reaches rank k of the others with
// probability (n + 1 - k)/(n + 1); with these n the rank is a whole number.
TEST(BlankAndLowLevelSimulation, FalsePositivesOfRanks) {
  constexpr int kStudies = 10000;
  for (std::size_t n : {10U, 30U, 70U}) {
    RandomStream random("ranks " + std::to_string(n));
    int positive = 0;
    for (int study = 0; study < kStudies; ++study) {
      const auto limit = limit_of_blank_by_rank(normals(random, n, 0.0), 0.05);
      if (limit && random.normal() >= *limit) ++positive;
    }
    const double count = static_cast<double>(n);
    const double exact = (0.5 + 0.05 * count) / (count + 1.0);
    std::cout << n << " blanks by ranks: false positives exactly " << exact
              << '\n';
    expect_rate(static_cast<double>(positive) / kStudies, exact, kStudies);
  }
}

double drawn_content(const std::string& name, double between, double beta,
                     int studies) {
  RandomStream random(name);
  double content = 0.0;
  const double sd = std::sqrt(1.0 + between * between);
  for (int study = 0; study < studies; ++study) {
    std::vector<std::vector<double>> runs;
    for (int run = 0; run < 4; ++run)
      runs.push_back(normals(random, 3, between * random.normal()));
    const auto interval = beta_expectation_interval(runs, beta);
    if (interval)
      content +=
          normal_cdf(interval->upper / sd) - normal_cdf(interval->lower / sd);
  }
  return content / studies;
}

// The interval holds the part beta on the average, nearly: nu is
// Satterthwaite's approximation.
TEST(ToleranceIntervalSimulation, HoldsItsPartOnTheAverage) {
  constexpr int kStudies = 4000;
  for (double between : {0.0, 0.5, 1.0, 3.0}) {
    for (double beta : {0.80, 0.95}) {
      const std::string name = "content " + std::to_string(between);
      const double found = drawn_content(name, between, beta, kStudies);
      std::cout << "between runs " << between << ", beta " << beta
                << ": on the average " << found << '\n';
      EXPECT_GT(found, beta - 0.02);
      EXPECT_LT(found, beta + 0.02);
    }
  }
}

}  // namespace
}  // namespace loqsmith::test
