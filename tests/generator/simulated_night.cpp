#include "generator/simulated_night.hpp"

#include <chrono>
#include <cmath>
#include <cstddef>
#include <cstdio>
#include <numbers>

#include "generator/random_stream.hpp"

namespace loqsmith::test {
namespace {

/// Exponentially modified Gaussian of area 1 at time t after its centre.
double modified_gaussian(double t, double sigma, double tau) {
  if (t < -7.0 * sigma || t > 7.0 * sigma + 25.0 * tau) return 0.0;
  const double ratio = sigma / tau;
  return 0.5 / tau * std::exp(0.5 * ratio * ratio - t / tau) *
         std::erfc((ratio - t / sigma) / std::numbers::sqrt2);
}

void add_peak(std::vector<double>& signal, const Detector& detector,
              const Substance& shape, double area, double shift) {
  for (std::size_t i = 0; i < signal.size(); ++i) {
    const double t =
        time_of_point(detector, i) - shape.retention_minutes - shift;
    signal[i] +=
        area * modified_gaussian(t, shape.sigma_minutes, shape.tau_minutes);
  }
}

void add_detector(std::vector<double>& signal, const Detector& detector,
                  RandomStream& random) {
  const double phase = 2.0 * std::numbers::pi * random.uniform();
  const double pace = 2.0 * std::numbers::pi / detector.wave_period_minutes;
  const double slope = detector.slope_per_minute * random.normal();
  for (std::size_t i = 0; i < signal.size(); ++i) {
    const double t = time_of_point(detector, i);
    signal[i] += detector.offset + slope * t +
                 detector.wave_amplitude * std::sin(phase + pace * t) +
                 detector.noise_sd * random.normal();
  }
}

double retention_shift(const SimulatedNight& night, const Vial& vial,
                       RandomStream& random) {
  const double last = static_cast<double>(night.vials.size()) - 1.0;
  const double progress = (vial.number - 1) / last;
  return night.retention_drift_minutes * progress +
         night.retention_jitter_minutes * random.normal();
}

}  // namespace

double time_of_point(const Detector& detector, std::size_t i) {
  return static_cast<double>(i) / detector.points_per_minute;
}

std::string start_time(const SimulatedNight& night, const Vial& vial) {
  using namespace std::chrono;
  const sys_time<seconds> begun{
      seconds{night.start_microseconds / 1'000'000 +
              std::int64_t{60} * night.minutes_between * (vial.number - 1)}};
  const auto day = floor<days>(begun);
  const year_month_day date{day};
  const hh_mm_ss clock{begun - day};
  char text[64];
  std::snprintf(text, sizeof text, "%04d-%02u-%02uT%02d:%02d:%02dZ",
                static_cast<int>(date.year()),
                static_cast<unsigned>(date.month()),
                static_cast<unsigned>(date.day()),
                static_cast<int>(clock.hours().count()),
                static_cast<int>(clock.minutes().count()),
                static_cast<int>(clock.seconds().count()));
  return text;
}

std::vector<double> simulate_signal(const SimulatedNight& night,
                                    const Vial& vial) {
  const Detector& detector = night.detector;
  const std::string name = night.name + "/" + std::to_string(vial.number);
  RandomStream injector(name + "/injector");
  RandomStream noise(name + "/noise");
  const auto last = static_cast<std::size_t>(detector.run_minutes *
                                             detector.points_per_minute);
  std::vector<double> signal(last + 1, 0.0);
  const double shift = retention_shift(night, vial, injector);
  const double volume = 1.0 + night.injection_error * injector.normal();
  const auto inject = [&](const Substance& substance, double concentration) {
    const double own = 1.0 + night.peak_error * injector.normal();
    add_peak(signal, detector, substance,
             substance.slope * concentration * volume * own, shift);
  };
  for (std::size_t a = 0; a < night.analytes.size(); ++a) {
    inject(night.analytes[a], vial.concentrations[a]);
  }
  if (night.internal_standard) {
    inject(*night.internal_standard, vial.internal_standard);
  }
  for (const MatrixPeak& peak : night.every_injection) {
    add_peak(signal, detector, peak.shape, peak.area, 0.0);
  }
  if (vial.role == "sample") {
    for (const MatrixPeak& peak : night.samples_only) {
      add_peak(signal, detector, peak.shape,
               peak.area * injector.uniform() / vial.dilution, shift);
    }
  }
  add_detector(signal, detector, noise);
  for (double& value : signal) {
    value = detector.step * std::nearbyint(value / detector.step);
  }
  return signal;
}

}  // namespace loqsmith::test
