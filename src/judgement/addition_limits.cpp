#include <algorithm>
#include <deque>

#include "loqsmith/judgement/addition_sets.hpp"
#include "loqsmith/judgement/limit_evidence.hpp"

namespace loqsmith {
namespace {

// What was found in the sample; a negative amount is none.
double own_amount(const CalibrationSet& set) {
  return std::max(0.0, set.addition->amount);
}

// The same line over totals: its origin moved by the sample's own amount.
Calibration over_totals(const CalibrationSet& set) {
  const double own = own_amount(set);
  Calibration line = *set.calibration;
  line.intercept -= own * line.slope;
  auto& covariance = line.covariance;
  covariance[0][0] += own * (own * covariance[1][1] - 2.0 * covariance[0][1]);
  covariance[0][1] -= own * covariance[1][1];
  covariance[1][0] = covariance[0][1];
  CalibrationLevel sample{own, 0, std::nullopt, true};
  for (StandardPoint& point : line.points) {
    if (point.used && point.concentration == 0.0) ++sample.points;
    point.concentration += own;
  }
  for (CalibrationLevel& level : line.levels) level.concentration += own;
  if (own > 0.0) {
    line.levels.insert(line.levels.begin(), sample);
    line.lowest = own;
  }
  line.highest += own;
  // The floor goes by what was added, not by what the sample happens to hold.
  line.accepted_lowest = set.calibration->lowest;
  line.accepted_highest = line.highest;
  return line;
}

// Heights and noise of the line's own points, as standards at their totals.
LimitEvidence evidence_of_points(const AdditionMembers& members,
                                 const CalibrationSet& set,
                                 const Calibration& line) {
  const double own = own_amount(set);
  std::deque<Injection> as_standards;
  MeasuredAnalyte points = members.analyte;
  for (InjectionResponse& one : points.injections) {
    as_standards.push_back(*one.injection);
    as_standards.back().role = Role::Standard;
    one.injection = &as_standards.back();
    one.nominal = *one.nominal + own;
  }
  return gather_limit_evidence(points, line);
}

}  // namespace

LimitEvidence addition_evidence(const MeasuredAnalyte& night,
                                const AdditionMembers& members,
                                const CalibrationSet& set,
                                const std::vector<SpikeResult>& spikes) {
  const Calibration line = over_totals(set);
  LimitEvidence evidence = gather_limit_evidence(night, line);
  LimitEvidence points = evidence_of_points(members, set, line);
  evidence.heights = std::move(points.heights);
  evidence.noise = points.noise;
  evidence.spikes = spikes;
  return evidence;
}

}  // namespace loqsmith
