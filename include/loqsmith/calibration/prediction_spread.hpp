#pragma once

#include <array>
#include <vector>

#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

/// How far the mean of m responses at a concentration x lies from the fitted
/// curve, by chance:
///
///     variance(x) = V(x)/m + sum_i l_i(x)^2 V(x_i)
///
/// l_i(x) the share of standard i in the curve at x, V(x) the variance of one
/// response. Three laws for V:
///
/// - weights as they are: V = s_w^2 / w(max(x, lowest)), s_w the residual
///   standard deviation, and the sum is v^T Cov v. So of every fit without
///   blanks, of unweighted fits, and with weight 1/s2, which holds its own
///   additive part; with 1/s2 one response scatters at least as blanks do.
/// - 1/x, 1/x2 and mean response factors where there are blanks: V =
///   s_blank^2 + q^2 / w(max(x, lowest)), for additive noise stays where the
///   weight says it vanishes (D. M. Rocke and S. Lorenzato, Technometrics 37
///   (1995) 176, for 1/x2; from memory). q is such that the squares of the
///   residuals over V sum to n - p. Degrees of freedom of both parts after
///   Welch and Satterthwaite.
///
/// The larger of s_w^2 / w and s_blank^2 instead of their sum covers, at
/// nominal 95 %, 0.90 at the lowest standard and 0.98 at the highest where
/// both parts are equal at the lowest (14 standards over two decades, 1/x2);
/// the sum covers between 0.93 and 0.97 at both.
class PredictionSpread {
 public:
  /// @param replicates  m >= 1
  PredictionSpread(const Calibration& calibration, int replicates);

  double variance_at(double concentration) const;

  /// Degrees of freedom of that variance.
  double degrees_at(double concentration) const;

 private:
  struct Parts {
    double additive = 0.0;      ///< of the blanks
    double proportional = 0.0;  ///< of the weights' law
  };
  Parts parts_at(double concentration) const;
  double share_of(const StandardPoint& point, double concentration) const;
  void separate_additive_part();
  double squares_over_variance(double q2) const;

  const Calibration& calibration_;
  double replicates_;
  std::vector<const StandardPoint*> used_;  ///< empty: weights as they are
  double q2_ = 0.0;
};

}  // namespace loqsmith
