#pragma once

#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/numerics/random.hpp"

namespace loqsmith::test {

/// exp(z^2) erfc(z): products below z = 25, the asymptotic series above.
double scaled_complementary_error(double z);

/// Exponentially modified Gaussian of unit area; tau = 0 is a Gaussian, tau
/// below 0 fronts instead of tailing. Three formulas, each where it is stable.
///
/// Source: Y. Kalambet et al., J. Chemometrics 25 (2011) 352; from memory.
double modified_gaussian(double x, double mu, double sigma, double tau);

/// One peak of known area; its apex lies at `minutes` where tau is 0.
struct SimulatedPeak {
  double minutes = 0.0;  ///< mu of the Gaussian
  double sigma = 0.05;   ///< minutes, > 0
  double area = 0.0;     ///< signal unit x minute
  double tau = 0.0;      ///< minutes
};

/// A peak of given height instead, without tail.
SimulatedPeak gaussian_of_height(double minutes, double sigma, double height);

/// What a simulated detector draws. All noise is in signal units.
struct SimulatedTrace {
  double start_minutes = 0.0;
  double end_minutes = 10.0;
  double step_minutes = 0.01;
  double jitter = 0.0;  ///< of each time, in shares of the step, below 0.5
  double offset = 0.0;
  double drift_per_minute = 0.0;
  double bend_per_minute2 = 0.0;  ///< about the middle of the trace
  double white_noise = 0.0;       ///< standard deviation of a point
  double creeping_noise = 0.0;    ///< standard deviation of a point
  double creep = 0.9;             ///< its correlation from point to point
  double relative_noise = 0.0;    ///< of each point, times the peaks' signal
  double flicker_noise = 0.0;     ///< 1/f-like: standard deviation of a point
  double ripple = 0.0;            ///< amplitude of a sine, as a pump leaves it
  double ripple_minutes = 0.5;    ///< its period
  double ceiling = 0.0;           ///< the signal is cut off there; 0: none
  double digit = 0.0;             ///< the signal is rounded to it; 0: none
  std::vector<SimulatedPeak> peaks;
};

/// The trace, drawn with the stream's numbers in fixed order: one for each
/// point's time (where there is jitter), then its white, creeping, relative and
/// flicker noise (where there is any). Flicker noise is the sum of six Markov
/// series of equal variance whose lengths grow by fours from one point: its
/// spectrum falls as 1/f over three decades. A ripple's phase is drawn at the
/// beginning. Without noise and jitter the stream is left
/// alone. Creeping noise is first-order Markov and starts in equilibrium.
Trace simulate_trace(const SimulatedTrace& wanted, RandomStream& stream);

/// The same with a stream of its own.
Trace simulate_trace(const SimulatedTrace& wanted, std::string_view name);

}  // namespace loqsmith::test
