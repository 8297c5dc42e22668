#pragma once

namespace loqsmith {

/// Exponentially modified Gaussian: a Gaussian (mu, sigma) convolved with an
/// exponential decay (tau). Times in minutes; the peak has unit area.
///
///     f = exp(sigma^2/(2 tau^2) - u/tau) erfc(z) / (2 tau),
///     z = (sigma/tau - u/sigma) / sqrt(2),  u = t - mu
///
/// tau above 0 tails, 0 is the Gaussian, below 0 the mirror image fronts.
///
/// Source: E. Grushka, Anal. Chem. 44 (1972) 1733; evaluated as Y. Kalambet et
/// al., J. Chemometrics 25 (2011) 352, by three formulas, so that no
/// intermediate leaves the range of doubles; from memory.
struct EmgShape {
  double mu = 0.0;
  double sigma = 0.0;  ///< > 0
  double tau = 0.0;
};

/// Finite for every finite argument; agrees with high precision to 12 digits.
double emg(const EmgShape& shape, double minutes);

/// Value and derivatives by the parameters. For |tau| below sigma / 20 the
/// derivatives are taken from the series in tau/sigma (Hermite polynomials
/// times the Gaussian), where the closed forms cancel.
struct EmgDerivatives {
  double value = 0.0;
  double by_mu = 0.0;
  double by_sigma = 0.0;
  double by_tau = 0.0;
  /// By the cube of tau (half the third central moment) at constant mean and
  /// variance. At tau 0 a change of tau is one of mu, to first order, and
  /// tells nothing of its own; a change of its cube does.
  double by_tau_cubed = 0.0;
};
EmgDerivatives emg_derivatives(const EmgShape& shape, double minutes);

/// Area from minus infinity to a time: Phi(u / sigma) - tau f.
double emg_area_until(const EmgShape& shape, double minutes);

/// Where the peak is highest, to 1e-10 of sigma.
double emg_apex(const EmgShape& shape);

/// Time at which the peak has fallen to a fraction of its height, before or
/// after the apex.
double emg_fallen_to(const EmgShape& shape, double fraction, bool before_apex);

}  // namespace loqsmith
