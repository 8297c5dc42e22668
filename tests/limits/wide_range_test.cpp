#include <cmath>
#include <cstddef>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/blank_deviation.hpp"
#include "loqsmith/numerics/normal.hpp"
#include "loqsmith/numerics/random.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

// What one simulated night of an unweighted line over two decades shows.
struct Night {
  double rate = 0.0;  // true share of blank samples at or above the limit
  bool governs = false;
};

// Standards in duplicate, slope 10, with a relative standard deviation beside
// the blanks' own of 1; the true intercept is 0.
Night simulate(RandomStream& random, double relative_sd) {
  std::vector<std::pair<double, double>> pairs;
  for (double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0})
    for (int replicate = 0; replicate < 2; ++replicate)
      pairs.emplace_back(x, 10.0 * x * (1.0 + relative_sd * random.normal()) +
                                random.normal());
  std::vector<double> blanks;
  for (int i = 0; i < 10; ++i) blanks.push_back(random.normal());
  const auto line = fit_calibration(standards(pairs), {});
  if (!line) return {};
  const auto limit = blank_deviation(evidence_of(blanks, *line), {}, {});
  if (!limit) return {};
  const double threshold = line->intercept + line->slope * *limit->detection;
  return {1.0 - normal_cdf(threshold), limit->grade() < Grade::NotValid};
}

struct Nights {
  double rate = 0.0;           // of false positives, all nights
  double governed_rate = 0.0;  // of those whose limit may govern
  double governed = 0.0;       // share of the nights
};

Nights simulate_many(double relative_sd) {
  RandomStream random("nights of a wide range");
  constexpr int kNights = 2000;
  Nights sum;
  int governed = 0;
  for (int i = 0; i < kNights; ++i) {
    const Night night = simulate(random, relative_sd);
    sum.rate += night.rate / kNights;
    if (!night.governs) continue;
    ++governed;
    sum.governed_rate += night.rate;
  }
  sum.governed_rate /= governed;
  sum.governed = static_cast<double>(governed) / kNights;
  return sum;
}

// A line over two decades without weights may have an intercept that is off by
// far more than the blanks' spread. Then a limit of three of these lets many
// blanks through, and must not govern.
TEST(WideRange, AStrayInterceptIsFoundOut) {
  const Nights even = simulate_many(0.0);
  const Nights some = simulate_many(0.02);
  const Nights much = simulate_many(0.05);
  EXPECT_LT(even.rate, 0.02);
  EXPECT_GT(even.governed, 0.95);
  EXPECT_GT(some.rate, 0.05);
  EXPECT_GT(much.rate, 0.15);
  for (const Nights& nights : {even, some, much})
    EXPECT_LT(nights.governed_rate, 0.02);
}

}  // namespace
}  // namespace loqsmith::test
