#include <algorithm>

#include "record/example_night.hpp"

namespace loqsmith::test {
namespace {

LimitRow limit_row(const std::string& procedure, double detection,
                   double quantitation, std::vector<LimitTerm> terms) {
  LimitEstimate estimate;
  estimate.detection = detection;
  estimate.quantitation = quantitation;
  estimate.n = 8;
  estimate.terms = std::move(terms);
  return {procedure, estimate, false, false};
}

void with_bounds(LimitRow& row) {
  LimitEstimate& estimate = row.estimate.value();
  estimate.detection_lower = 0.66 * *estimate.detection;
  estimate.detection_upper = 2.04 * *estimate.detection;
  estimate.quantitation_lower = 0.66 * *estimate.quantitation;
  estimate.quantitation_upper = 2.04 * *estimate.quantitation;
  estimate.degrees_of_freedom = 7;
}

}  // namespace

Calibration calibration_of(const Compound& compound) {
  Calibration line;
  line.settings.weight = CalibrationSettings::Weight::InverseX;
  line.intercept = 0.03;
  line.slope = compound.slope;
  line.residual_sd = 0.05 + compound.scatter;
  line.r2 = 0.99987;
  line.relative_standard_error = 100 * compound.scatter;
  line.degrees_of_freedom = 5;
  line.covariance[0] = {4e-4, -2e-5, 0};
  line.covariance[1] = {-2e-5, 3e-5, 0};
  for (std::size_t i = 0; i < kLevels.size(); ++i) {
    const int number = kFirstStandard + static_cast<int>(i);
    StandardPoint point;
    point.injection = number;
    point.level = "L" + std::to_string(i + 1);
    point.concentration = kLevels[i];
    point.response = response_of(compound, kLevels[i], number);
    point.weight = 1 / kLevels[i];
    point.back_calculated = (point.response - line.intercept) / line.slope;
    point.deviation_percent =
        100 * (*point.back_calculated - kLevels[i]) / kLevels[i];
    line.points.push_back(point);
    line.levels.push_back({kLevels[i], 1, point.deviation_percent, true});
  }
  line.points[4].used = false;
  line.points[4].note = "saturated";
  line.levels[4].accepted = false;
  line.lowest = kLevels.front();
  line.highest = kLevels.back();
  line.accepted_lowest = line.lowest;
  line.accepted_highest = line.highest;
  return line;
}

LimitsOfAnalyte limits_of(const Compound& compound) {
  LimitsOfAnalyte limits;
  const double detection = 0.3 / compound.slope;
  LimitRow blank =
      limit_row("blank-deviation", detection, detection / 0.3,
                {{"standard deviation of the blanks",
                  detection * compound.slope / 3, "response"},
                 {"slope", compound.slope, "response/concentration"}});
  with_bounds(blank);
  blank.governs_detection = true;
  LimitRow residual =
      limit_row("calibration-residual", 1.7 * detection, 5.7 * detection,
                {{"s(y/x)", 0.094, "response"}});
  residual.estimate.value().findings.push_back(
      {Grade::NotValid, "variance-grows",
       "the scatter of the standards grows with the amount (p = 0.004)"});
  LimitRow noise = limit_row("signal-to-noise", 0.6 * detection,
                             2.1 * detection, {{"noise h", 0.9, "height"}});
  noise.estimate.value().findings.push_back(
      {Grade::Note, "instrument-noise-only", "H/h is 1.5 at the limit"});
  limits.rows = {
      blank,
      residual,
      noise,
      {"spike-replicates", NotApplicable{"no low spikes in the sequence"},
       false, false}};
  GoverningLimits governing;
  governing.detection = detection;
  governing.quantitation = std::max(detection / 0.3, kLevels.front());
  governing.decision_threshold = detection;
  governing.detection_procedure = "blank-deviation";
  governing.quantitation_procedure = "blank-deviation";
  if (governing.quantitation == kLevels.front()) {
    governing.quantitation_procedure = "lowest-standard";
  } else {
    limits.rows[0].governs_quantitation = true;
  }
  limits.governing = governing;
  return limits;
}

}  // namespace loqsmith::test
