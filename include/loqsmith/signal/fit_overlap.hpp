#pragma once

#include <cstddef>
#include <span>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/signal/emg.hpp"

namespace loqsmith {

/// One peak of a fit: where it starts from and what of it is free. Its area is
/// always free and signed.
struct EmgGuess {
  /// Given: sigma and tau stay. Own: they are fitted. AsFirst: they are those
  /// of the first peak, whatever these come to.
  enum class Shape { Given, Own, AsFirst };

  double apex_minutes = 0.0;
  double sigma = 0.0;  ///< minutes, > 0
  double tau = 0.0;    ///< minutes
  bool free_time = true;
  Shape shape = Shape::Given;
};

struct FittedEmg {
  EmgShape shape;
  double area = 0.0;  ///< signal unit x minute, from end to end

  double signal_at(double minutes) const { return area * emg(shape, minutes); }
  double apex() const { return emg_apex(shape); }
};

/// Peaks and a straight line that together come nearest to a stretch.
struct OverlapFit {
  std::vector<FittedEmg> peaks;  ///< in the order of the guesses
  double middle_minutes = 0.0;
  double intercept = 0.0;           ///< signal of the line at the middle
  double slope = 0.0;               ///< per minute
  double residual_deviation = 0.0;  ///< n - p degrees of freedom
  int evaluations = 0;
  /// Of the first peak's area between two distances from its apex: the weight
  /// of each point's signal, to first order about the fit.
  std::vector<double> area_weights;

  double baseline_at(double minutes) const {
    return intercept + slope * (minutes - middle_minutes);
  }
};

/// What of the first peak counts as its area: from `left` before to `right`
/// behind its apex, minutes.
struct AreaWindow {
  double left = 0.0;
  double right = 0.0;
};

double fitted_area(const FittedEmg& peak, const AreaWindow& window);

/// Exponentially modified Gaussians and a straight baseline fitted together to
/// all points of a stretch by least squares, all points alike. Areas and line
/// start from the linear fit at the guessed times and shapes. Where no time
/// and no shape is free the fit is linear, so that the first peak's area is
/// unbiased and signed.
///
/// What is fitted of a peak is its mean, the logarithm of its standard
/// deviation w (of sigma and tau together) and (tau / w)^3, half its skewness:
/// three moments that points determine for every shape, from fronting through
/// the Gaussian to tailing, where mu, sigma and tau themselves run into each
/// other. Times are in units of `width_half` about the middle of the stretch.
///
/// @param minutes  strictly increasing, as many as signal
/// @return not applicable: "model-not-converged", with why
Outcome<OverlapFit> fit_overlap(std::span<const double> minutes,
                                std::span<const double> signal,
                                const std::vector<EmgGuess>& guesses,
                                const AreaWindow& window, double width_half);

}  // namespace loqsmith
