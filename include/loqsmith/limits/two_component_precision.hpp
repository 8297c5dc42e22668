#pragma once

#include <array>
#include <span>

#include "loqsmith/limits/two_component_model.hpp"

namespace loqsmith {

/// How well the additive error of a model fitted by maximum likelihood is
/// known. The likelihood knows nothing of the degrees of freedom that the line
/// takes, so its standard deviations come out low, by half of `shortfall` on
/// the scale of logarithms, and with fewer degrees of freedom than the
/// information claims.
struct TwoComponentPrecision {
  /// Expected ln of true over estimated additive variance, 0 to 0.8.
  double shortfall = 0.0;
  /// Of the additive standard deviation, at least 1.
  double degrees_of_freedom = 1.0;
};

/// With w the additive share of each observation's variance v, h its leverage
/// in the line weighted by 1/v, the shortfall solves the likelihood's mean
/// equations for both variances, disturbed by h:
///
///     | sum w^2       sum w (1-w)   | |shortfall|   | sum w h     |
///     | sum w (1-w)   sum (1-w)^2   | |    .    | = | sum (1-w) h |
///
/// and the degrees of freedom are those of a standard deviation whose
/// logarithm has the variance of the observed information (1 / (2 nu)), less
/// the share that the line takes.
///
/// Simulated over 16 designs (six to eight levels over two to three decades in
/// 2 to 5 replicates, additive standard deviation 0.5 or 2 times the lowest
/// level, proportional 3 or 10 %): bounds of the detection and the quantitation
/// limit cover 93 to 97 % (with the information's own degrees of freedom and
/// no shortfall: 91 to 97 %).
TwoComponentPrecision precision_of(const TwoComponentModel& model,
                                   std::span<const double> x);

/// What a limit is to be multiplied by for its 95 % bounds: the chi-square
/// interval of a standard deviation, with the shortfall made good.
///
/// @param log_variance  of the logarithm of the limit, by the delta method
struct LimitFactors {
  double lower = 0.0;
  double upper = 0.0;
};
LimitFactors limit_factors(const TwoComponentPrecision& precision,
                           double log_variance);

/// Standard deviation, in concentration, by which the mean of so many
/// responses of a blank strays from the estimated intercept; to be used with
/// Student's t of the precision's degrees of freedom.
double blank_reading_sd(const TwoComponentModel& model,
                        const TwoComponentPrecision& precision, int replicates);

}  // namespace loqsmith
