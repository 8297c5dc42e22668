#pragma once

#include <span>
#include <vector>

#include "loqsmith/numerics/pentadiagonal.hpp"

namespace loqsmith {

/// The smooth curve z nearest to a signal y under weights w:
///
///     sum w (y - z)^2 + smoothness * sum (D z)^2,
///     (diag(w) + smoothness D'D) z = w y
///
/// D z are second differences in the true times. Each row is the divided second
/// difference times 2 h^2 (h the middle distance between points), so that on
/// even times it is z[i-1] - 2 z[i] + z[i+1] as published, and its square
/// counts by the time that it stands for, (t[i+1] - t[i-1]) / 2h: the penalty
/// is the integral of the squared curvature, whatever the sampling. A straight
/// line in time costs nothing, however uneven the times.
///
/// Parts of a signal with a period of 2 pi smoothness^(1/4) points are halved;
/// longer ones stay, shorter ones go with the fourth power of the period.
///
/// One round of refinement follows the solve: without it rounding would grow
/// with the smoothness, with it it grows with its square root.
///
/// Source: P. H. C. Eilers, Anal. Chem. 75 (2003) 3631; from memory.
class WhittakerSmoother {
 public:
  /// @param minutes     strictly increasing
  /// @param smoothness  in units of points to the fourth power, > 0
  WhittakerSmoother(std::span<const double> minutes, double smoothness);

  /// @param weights  at least 0, two of them above it
  /// @return the signal itself where fewer than 3 points, or where the weights
  ///         hold no curve
  std::vector<double> smooth(std::span<const double> signal,
                             std::span<const double> weights) const;

 private:
  struct Row {
    double before;
    double here;
    double after;
  };

  Pentadiagonal system(std::span<const double> weights) const;
  std::vector<double> penalty_of(std::span<const double> curve) const;

  std::vector<Row> rows_;  // of D, each times sqrt(smoothness)
};

}  // namespace loqsmith
