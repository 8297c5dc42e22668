#pragma once

#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/numerics/random.hpp"

namespace loqsmith {

/// In one drawn world, estimated limit over true limit, above zero: infinite
/// where the true one lies at or below zero, nothing where one of the two does
/// not exist.
struct DrawnRatios {
  std::optional<double> detection;
  std::optional<double> quantitation;
};

/// Draws one world. Two ways of doing so:
///
/// - Resampling: the estimate at hand counts as the truth, its observations
///   are drawn again (with replacement, or from the fitted distribution), and
///   the ratio is new limit over limit at hand.
/// - Generalised intervals: the estimate at hand stays, and a truth that may
///   have led to it is drawn (a standard deviation s becomes
///   s sqrt(nu / chi2)); the ratio is limit at hand over drawn limit.
///
/// Both are the same for a limit proportional to a standard deviation. The
/// second keeps its coverage where means enter as well.
using RatioDraw = std::function<DrawnRatios(RandomStream&)>;

inline constexpr int kBootstrapDraws = 999;

struct RatioBounds {
  double lower = 0.0;
  double upper = 0.0;
};

/// 95 % bounds of a limit from drawn ratios R of estimate over truth:
///
///     L / R_0.975  ...  L / R_0.025
///
/// with R_p the value of rank p (draws + 1). The ratio form does to the limit
/// what the chi-square interval does to a standard deviation; percentiles of
/// drawn limits (L R_0.025 ... L R_0.975) do the reverse.
///
/// Simulated for the standard deviation of n = 7 normal values: ratio form with
/// normal draws is the chi-square interval (0.95); with the 7 values drawn
/// again it covers 0.86, and percentiles of these 0.70.
///
/// @param limit   estimate at hand, above zero
/// @param ratios  above zero, infinite ones among them
/// @return not applicable: fewer than 199 ratios.
///
/// Source: B. Efron and R. J. Tibshirani, An Introduction to the Bootstrap
/// (1993), 13 (percentiles and transformations); S. Weerahandi, J. Am. Stat.
/// Assoc. 88 (1993) 899 (generalised intervals); from memory.
Outcome<RatioBounds> bootstrap_ratio_bounds(double limit,
                                            std::vector<double> ratios);

/// Fills the confidence bounds of the detection and quantitation limit, where
/// the estimate has them, from kBootstrapDraws draws. The random stream is
/// seeded by its name alone, which is kept in the terms: the same observations
/// give the same bounds on every machine.
///
/// A limit that does not exist in more than one of a hundred draws gets no
/// bounds, and one that may lie at or below zero no lower one; a note
/// bounds-absent says so.
///
/// @param stream    name of procedure and random stream: "blank-deviation"
/// @param coverage  empty where a simulation shows that the bounds cover 93 to
///                  97 %; otherwise what was found ("0.91 at 7 blanks"), which
///                  goes into a note bounds-approximate
void set_bootstrap_bounds(LimitEstimate& estimate, std::string_view stream,
                          const RatioDraw& draw,
                          const std::string& coverage = "");

/// One value of chi-square with so many degrees of freedom, at least 1.
double drawn_chi_square(RandomStream& random, int degrees_of_freedom);

}  // namespace loqsmith
