#pragma once

#include <cstddef>
#include <vector>

namespace loqsmith {

struct StandardPoint;

/// The used standards of one nominal concentration.
struct ReplicateGroup {
  double concentration = 0.0;
  std::vector<double> responses;  ///< in the order of the points
  std::vector<int> injections;
};

/// Groups of used standards by equal nominal concentration, ascending, zero
/// included; groups of one as well.
std::vector<ReplicateGroup> replicate_groups(
    const std::vector<StandardPoint>& points);

/// The same with each response times the square root of its weight: of equal
/// variance at all levels where the weights hold.
std::vector<ReplicateGroup> weighted_replicate_groups(
    const std::vector<StandardPoint>& points);

/// Sum of squared differences from the group's mean, in two passes; exactly
/// zero where all are equal.
double squares_within(const ReplicateGroup& group);

}  // namespace loqsmith
