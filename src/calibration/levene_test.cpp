#include "loqsmith/calibration/levene_test.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr double kConfidence = 0.95;
constexpr double kRoundingShare = 1e-12;

std::vector<ReplicateGroup> distances_of(
    const std::vector<ReplicateGroup>& groups, LeveneCentre kind) {
  std::vector<ReplicateGroup> distances;
  for (const ReplicateGroup& group : groups) {
    if (group.responses.size() < 3) continue;
    const double centre = kind == LeveneCentre::Median ? median(group.responses)
                                                       : mean(group.responses);
    ReplicateGroup from_centre;
    from_centre.concentration = group.concentration;
    for (double response : group.responses)
      from_centre.responses.push_back(std::abs(response - centre));
    distances.push_back(std::move(from_centre));
  }
  return distances;
}

struct Partition {
  double n = 0.0;
  double between = 0.0;
  double within = 0.0;
  double largest = 0.0;
};

Partition partition_of(const std::vector<ReplicateGroup>& groups) {
  Partition parts;
  std::vector<double> all;
  for (const ReplicateGroup& group : groups) {
    parts.within += squares_within(group);
    all.insert(all.end(), group.responses.begin(), group.responses.end());
  }
  parts.n = static_cast<double>(all.size());
  parts.largest = *std::max_element(all.begin(), all.end());
  const double centre = mean(all);
  for (const ReplicateGroup& group : groups) {
    const double off = mean(group.responses) - centre;
    parts.between += static_cast<double>(group.responses.size()) * off * off;
  }
  return parts;
}

}  // namespace

Outcome<DiagnosticTest> levene_test(const std::vector<ReplicateGroup>& groups,
                                    LeveneCentre centre) {
  const std::vector<ReplicateGroup> distances = distances_of(groups, centre);
  if (distances.size() < 2)
    return NotApplicable{
        "few-replicates: fewer than two levels were injected three times"};
  const Partition parts = partition_of(distances);
  const auto levels = static_cast<double>(distances.size());
  const double degrees = parts.n - levels;
  if (!(std::sqrt(parts.within / degrees) > kRoundingShare * parts.largest))
    return NotApplicable{
        "not-defined: the distances from the centre agree within each level"};

  DiagnosticTest test;
  test.name = "levene";
  test.degrees_1 = levels - 1.0;
  test.degrees_2 = degrees;
  test.statistic = parts.between / *test.degrees_1 / (parts.within / degrees);
  test.critical = f_quantile(kConfidence, *test.degrees_1, degrees);
  test.p = f_upper_tail(test.statistic, *test.degrees_1, degrees);
  test.passed = test.statistic <= test.critical;
  test.meaning = std::string(test.passed ? "the levels scatter alike"
                                         : "the levels scatter differently") +
                 " (F " + figure(test.statistic) + ", critical value " +
                 figure(test.critical) + ")";
  return test;
}

}  // namespace loqsmith
