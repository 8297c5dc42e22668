#include "support/simulator.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

namespace loqsmith::test {
namespace {

double gaussian(double away, double sigma) {
  const double z = away / sigma;
  return std::exp(-0.5 * z * z) * std::numbers::inv_sqrtpi_v<double> /
         (std::numbers::sqrt2 * sigma);
}

double peaks_at(const std::vector<SimulatedPeak>& peaks, double minutes) {
  double signal = 0.0;
  for (const SimulatedPeak& peak : peaks) {
    signal += peak.area *
              modified_gaussian(minutes, peak.minutes, peak.sigma, peak.tau);
  }
  return signal;
}

double baseline_at(const SimulatedTrace& wanted, double minutes) {
  const double middle = 0.5 * (wanted.start_minutes + wanted.end_minutes);
  const double away = minutes - middle;
  return wanted.offset + wanted.drift_per_minute * away +
         wanted.bend_per_minute2 * away * away;
}

double as_digitised(const SimulatedTrace& wanted, double signal) {
  if (wanted.ceiling > 0.0) signal = std::min(signal, wanted.ceiling);
  if (wanted.digit > 0.0) {
    signal = std::round(signal / wanted.digit) * wanted.digit;
  }
  return signal;
}

// Six Markov series whose lengths grow by fours.
class Flicker {
 public:
  Flicker() {
    for (std::size_t k = 0; k < kSeries; ++k) {
      kept_[k] = std::exp(-std::pow(4.0, -static_cast<double>(k)));
      fresh_[k] = std::sqrt(1.0 - kept_[k] * kept_[k]);
    }
  }

  double next(RandomStream& stream) {
    double sum = 0.0;
    for (std::size_t k = 0; k < kSeries; ++k) {
      const double share = begun_ ? fresh_[k] : 1.0;
      series_[k] = kept_[k] * series_[k] + share * stream.normal();
      sum += series_[k];
    }
    begun_ = true;
    return sum / std::sqrt(static_cast<double>(kSeries));
  }

 private:
  static constexpr std::size_t kSeries = 6;
  std::array<double, kSeries> kept_{};
  std::array<double, kSeries> fresh_{};
  std::array<double, kSeries> series_{};
  bool begun_ = false;
};

}  // namespace

double scaled_complementary_error(double z) {
  if (z < 25.0) return std::exp(z * z) * std::erfc(z);
  const double u = 1.0 / (2.0 * z * z);
  double series = 1.0;
  for (const double k : {11.0, 9.0, 7.0, 5.0, 3.0, 1.0}) {
    series = 1.0 - k * u * series;
  }
  return series * std::numbers::inv_sqrtpi_v<double> / z;
}

double modified_gaussian(double x, double mu, double sigma, double tau) {
  constexpr double kFarTail = 6.7e7;
  if (tau == 0.0) return gaussian(x - mu, sigma);
  const double away = tau > 0.0 ? x - mu : mu - x;
  const double decay = std::abs(tau);
  const double z = (sigma / decay - away / sigma) / std::numbers::sqrt2;
  if (z < 0.0) {
    const double half = sigma / decay;
    return std::exp(0.5 * half * half - away / decay) * std::erfc(z) /
           (2.0 * decay);
  }
  const double bell = std::exp(-0.5 * (away / sigma) * (away / sigma));
  if (z <= kFarTail)
    return bell * scaled_complementary_error(z) / (2.0 * decay);
  return gaussian(away, sigma) / (1.0 - away * decay / (sigma * sigma));
}

SimulatedPeak gaussian_of_height(double minutes, double sigma, double height) {
  return {minutes, sigma, height * sigma * std::sqrt(2.0 * std::numbers::pi),
          0.0};
}

Trace simulate_trace(const SimulatedTrace& wanted, RandomStream& stream) {
  const auto points =
      static_cast<std::size_t>(std::floor(
          (wanted.end_minutes - wanted.start_minutes) / wanted.step_minutes +
          1e-9)) +
      1;
  const double innovation = std::sqrt(1.0 - wanted.creep * wanted.creep);
  Trace trace;
  const double phase =
      wanted.ripple > 0.0 ? 2.0 * std::numbers::pi * stream.uniform() : 0.0;
  double creeping = 0.0;
  Flicker flicker;
  for (std::size_t i = 0; i < points; ++i) {
    double minutes =
        wanted.start_minutes + static_cast<double>(i) * wanted.step_minutes;
    if (wanted.jitter > 0.0) {
      minutes +=
          wanted.jitter * wanted.step_minutes * (2.0 * stream.uniform() - 1.0);
    }
    const double peaks = peaks_at(wanted.peaks, minutes);
    double signal = peaks + baseline_at(wanted, minutes);
    if (wanted.white_noise > 0.0) {
      signal += wanted.white_noise * stream.normal();
    }
    if (wanted.creeping_noise > 0.0) {
      creeping = i == 0
                     ? stream.normal()
                     : wanted.creep * creeping + innovation * stream.normal();
      signal += wanted.creeping_noise * creeping;
    }
    if (wanted.relative_noise > 0.0) {
      signal += wanted.relative_noise * peaks * stream.normal();
    }
    if (wanted.flicker_noise > 0.0) {
      signal += wanted.flicker_noise * flicker.next(stream);
    }
    if (wanted.ripple > 0.0) {
      signal += wanted.ripple * std::sin(2.0 * std::numbers::pi * minutes /
                                             wanted.ripple_minutes +
                                         phase);
    }
    trace.minutes.push_back(minutes);
    trace.signal.push_back(as_digitised(wanted, signal));
  }
  trace.header.points = points;
  trace.header.time_unit = "minute";
  return trace;
}

Trace simulate_trace(const SimulatedTrace& wanted, std::string_view name) {
  RandomStream stream(name);
  return simulate_trace(wanted, stream);
}

}  // namespace loqsmith::test
