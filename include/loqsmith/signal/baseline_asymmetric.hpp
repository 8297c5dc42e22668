#pragma once

#include <span>
#include <vector>

namespace loqsmith {

/// A curve below the peaks, found by smoothing again and again with weights
/// that points above the curve lose.
struct AsymmetricBaseline {
  std::vector<double> signal;  ///< one for each point
  int solves = 0;
  bool settled = false;  ///< false: the weights still moved after the last
};

/// Weight p for points above the curve, 1 - p below it, from a start with all
/// weights 1 until no weight changes, 50 solves at most.
///
/// @param smoothness  see WhittakerSmoother
/// @param p           above 0, below 0.5 (0.001 to 0.1 as published)
///
/// Source: P. H. C. Eilers, Anal. Chem. 75 (2003) 3631; P. H. C. Eilers,
/// H. F. M. Boelens (2005); from memory.
AsymmetricBaseline asymmetric_baseline(std::span<const double> minutes,
                                       std::span<const double> signal,
                                       double smoothness, double p);

/// Weights that know how large the noise is: with d the signal above the curve,
/// m and s mean and standard deviation (n - 1) of the negative d,
///
///     w = 1 / (1 + exp(2 (d - (2 s - m)) / s))
///
/// for every point; until the weights change by less than `ratio` of their own
/// length (Euclidean), or no point lies below the curve, or the negative d are
/// all the same. 100 solves at most.
///
/// Source: S.-J. Baek et al., Analyst 140 (2015) 250, with the formula used on
/// both sides of the curve; from memory.
AsymmetricBaseline reweighted_baseline(std::span<const double> minutes,
                                       std::span<const double> signal,
                                       double smoothness, double ratio);

}  // namespace loqsmith
