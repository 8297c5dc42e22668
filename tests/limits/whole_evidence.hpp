#pragma once

#include <string>
#include <vector>

#include "calibration/examples.hpp"
#include "limits/evidence_builders.hpp"
#include "loqsmith/numerics/random.hpp"

namespace loqsmith::test {

/// Standards in triplicate over two decades and more: y = 5 + 10 x, with an
/// additive standard deviation of 2 and a relative one as given.
inline std::vector<StandardPoint> whole_standards(RandomStream& random,
                                                  double relative_sd = 0.01) {
  std::vector<std::pair<double, double>> pairs;
  for (double x : {1.0, 2.0, 4.0, 7.0, 10.0, 30.0, 100.0, 200.0})
    for (int i = 0; i < 3; ++i)
      pairs.emplace_back(
          x, 5.0 + 10.0 * x * (1.0 + relative_sd * random.normal()) +
                 2.0 * random.normal());
  return standards(pairs);
}

/// Low spikes of six levels in four preparations, three times each: relative
/// standard deviation 3 %, additive 0.05.
inline std::vector<SpikeResult> whole_spikes(RandomStream& random) {
  std::vector<SpikeResult> spikes;
  for (int prep = 1; prep <= 4; ++prep)
    for (double nominal : {0.5, 1.0, 2.0, 4.0, 8.0, 16.0})
      for (int i = 0; i < 3; ++i) {
        SpikeResult spike;
        spike.injection = static_cast<int>(spikes.size()) + 200;
        spike.nominal_vial = nominal;
        spike.found_vial =
            nominal * (1.0 + 0.03 * random.normal()) + 0.05 * random.normal();
        spike.prep = "P" + std::to_string(prep);
        spikes.push_back(spike);
      }
  return spikes;
}

inline std::vector<BlankResponse> whole_blanks(RandomStream& random) {
  std::vector<BlankResponse> blanks;
  for (BlankKind kind :
       {BlankKind::Solvent, BlankKind::Method, BlankKind::ZeroStandard})
    for (int i = 0; i < 12; ++i) {
      BlankResponse blank;
      blank.injection = static_cast<int>(blanks.size()) + 100;
      blank.kind = kind;
      blank.response = 5.0 + 2.0 * random.normal();
      blanks.push_back(blank);
    }
  return blanks;
}

/// Whatever a procedure may ask for, in good health.
inline LimitEvidence whole_evidence(const std::string& stream,
                                    const CalibrationSettings& settings = {}) {
  RandomStream random(stream);
  LimitEvidence evidence;
  const std::vector<StandardPoint> points = whole_standards(random);
  const auto calibration = fit_calibration(points, settings);
  if (calibration) evidence.calibration = *calibration;
  evidence.blanks = whole_blanks(random);
  for (const BlankResponse& blank : evidence.blanks)
    evidence.predicted_noise.push_back(
        {blank.injection, blank.kind, 1.5 + 0.1 * random.uniform()});
  evidence.spikes = whole_spikes(random);
  for (const StandardPoint& point : points)
    evidence.heights.push_back(
        {point.injection, point.concentration, 0.2 * point.response});
  evidence.noise = 1.0;
  return evidence;
}

}  // namespace loqsmith::test
