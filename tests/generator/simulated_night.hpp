#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <vector>

namespace loqsmith::test {

/// A substance as the detector sees it. Gaussian of standard deviation `sigma`
/// convolved with an exponential of time constant `tau`.
struct Substance {
  std::string id;
  double retention_minutes = 0.0;  ///< centre of the Gaussian
  double slope = 0.0;  ///< signal unit x minute per concentration unit
  double sigma_minutes = 0.0;
  double tau_minutes = 0.0;
};

/// A peak that the method does not ask for.
struct MatrixPeak {
  Substance shape;
  double area = 0.0;  ///< signal unit x minute, 0 or below means a dip
};

/// The detector's part of a trace. The signal is rounded to multiples of
/// `step`, a power of two, so that it does not depend on the last bit of a
/// machine's exp and erfc.
struct Detector {
  double points_per_minute = 256.0;
  double run_minutes = 0.0;
  double step = 0.0;
  double offset = 0.0;
  double noise_sd = 0.0;        ///< white, each point
  double wave_amplitude = 0.0;  ///< slow wave of random phase
  double wave_period_minutes = 1.0;
  double slope_per_minute = 0.0;  ///< standard deviation of a straight drift
};

/// One vial: its row of the sequence sheet and what it truly holds.
struct Vial {
  int number = 0;
  std::string file;
  std::string run;
  std::string sample;
  std::string role;
  std::string level;
  double dilution = 1.0;
  double internal_standard_dilution = 1.0;
  std::optional<double> sample_amount;
  std::optional<double> final_volume;
  std::string prep;
  std::vector<double> concentrations;  ///< true, as injected, per analyte
  double internal_standard = 0.0;      ///< true, as injected; 0: none
};

/// One row of levels.csv for all analytes.
struct NamedLevel {
  std::string name;
  std::vector<double> concentrations;  ///< per analyte
  std::string lot;
  std::string expires;
};

/// A night with its truth.
struct SimulatedNight {
  std::string name;
  std::vector<Substance> analytes;
  std::optional<Substance> internal_standard;
  std::vector<MatrixPeak> every_injection;  ///< e.g. the void disturbance
  std::vector<MatrixPeak> samples_only;
  Detector detector;
  std::int64_t start_microseconds = 0;  ///< since 1970, UTC
  int minutes_between = 0;
  double retention_drift_minutes = 0.0;  ///< first to last, linear
  double retention_jitter_minutes = 0.0;
  double injection_error = 0.0;  ///< relative sd, common to all peaks
  double peak_error = 0.0;       ///< relative sd, each peak alone
  double result_factor = 1.0;    ///< result = vial x dilution x V / m x factor
  std::vector<std::string> columns;  ///< of sequence.csv
  std::vector<NamedLevel> levels;
  std::vector<Vial> vials;  ///< in run order
};

/// When an injection began, "2026-03-10T18:00:00Z".
std::string start_time(const SimulatedNight& night, const Vial& vial);

/// The signal of one injection at i / points_per_minute, i from 0.
std::vector<double> simulate_signal(const SimulatedNight& night,
                                    const Vial& vial);

/// "time at which point i was taken", minutes.
double time_of_point(const Detector& detector, std::size_t i);

}  // namespace loqsmith::test
