#include "loqsmith/limits/signal_to_noise_limit.hpp"

#include <algorithm>
#include <optional>
#include <vector>

#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/least_squares.hpp"

namespace loqsmith {
namespace {

using Measure = NoiseMeasure;

constexpr const char* kHeight = "height";
constexpr double kRange = 10.0 * (1.0 + 1e-9);  // times the lowest
constexpr std::size_t kLevelsForIntercept = 3;

/// Height on concentration through the low standards.
struct HeightLine {
  double intercept = 0.0;
  double slope = 0.0;
  double lowest = 0.0;
  std::size_t points = 0;
  std::size_t levels = 0;
};

std::optional<double> lowest_of(const std::vector<StandardHeight>& heights) {
  std::optional<double> lowest;
  for (const StandardHeight& one : heights)
    if (one.concentration > 0.0 && (!lowest || one.concentration < *lowest))
      lowest = one.concentration;
  return lowest;
}

std::size_t count_levels(std::vector<double> concentrations) {
  std::sort(concentrations.begin(), concentrations.end());
  const auto end = std::unique(concentrations.begin(), concentrations.end());
  return static_cast<std::size_t>(end - concentrations.begin());
}

// Through zero by hand: the fit wants more points than coefficients, and one
// standard is enough for the rule of proportion.
void fit_through_zero(HeightLine& line, const std::vector<double>& x,
                      const std::vector<double>& y) {
  double xy = 0.0;
  double xx = 0.0;
  for (std::size_t i = 0; i < x.size(); ++i) {
    xy += x[i] * y[i];
    xx += x[i] * x[i];
  }
  line.slope = xy / xx;
}

Outcome<HeightLine> fit_heights(const std::vector<StandardHeight>& heights) {
  const std::optional<double> lowest = lowest_of(heights);
  if (!lowest) return NotApplicable{"no-found-peak: no standard shows a peak"};
  std::vector<double> x, y;
  for (const StandardHeight& one : heights) {
    if (!(one.concentration > 0.0) || one.concentration > kRange * *lowest)
      continue;
    x.push_back(one.concentration);
    y.push_back(one.height);
  }
  HeightLine line;
  line.lowest = *lowest;
  line.points = x.size();
  line.levels = count_levels(x);
  if (line.levels < kLevelsForIntercept) {
    fit_through_zero(line, x, y);
  } else {
    const Outcome<LeastSquaresFit> fit = fit_polynomial(x, y, 0, 1);
    if (!fit) return NotApplicable{"no-line: " + fit.reason()};
    line.intercept = fit->coefficients[0];
    line.slope = fit->coefficients[1];
  }
  if (!(line.slope > 0.0))
    return NotApplicable{
        "slope-not-positive: the heights do not rise with the concentration"};
  return line;
}

// Height of a peak with the ratio, over the noise figure of the measure.
double height_per_noise(double ratio, Measure measure) {
  switch (measure) {
    case Measure::HalfPeakToPeak:
      return 0.5 * ratio;
    case Measure::PeakToPeak:
    case Measure::StandardDeviation:
      return ratio;
  }
  return ratio;
}

std::string noise_words(Measure measure) {
  switch (measure) {
    case Measure::HalfPeakToPeak:
    case Measure::PeakToPeak:
      return "noise h, peak to peak";
    case Measure::StandardDeviation:
      return "noise, standard deviation";
  }
  return "noise";
}

void judge_measure(LimitEstimate& estimate, const ProcedureSettings& procedure,
                   Measure measure) {
  if (measure != Measure::HalfPeakToPeak) return;
  estimate.findings.push_back({Grade::Note, "height-over-noise",
                               "S/N is 2H/h: H/h is " +
                                   figure(0.5 * procedure.detection_ratio) +
                                   " at the detection and " +
                                   figure(0.5 * procedure.quantitation_ratio) +
                                   " at the quantitation limit"});
}

void judge_line(LimitEstimate& estimate, const HeightLine& line) {
  if (line.levels >= kLevelsForIntercept) return;
  estimate.findings.push_back(
      {Grade::Note, "line-through-zero",
       "found peaks at " + counted(line.levels, "level") +
           " up to 10 times the lowest: height taken as proportional to "
           "concentration"});
}

}  // namespace

Outcome<LimitEstimate> signal_to_noise_limit(
    const LimitEvidence& evidence, const LimitSettings&,
    const ProcedureSettings& procedure) {
  if (!evidence.noise)
    return NotApplicable{"no-noise: the noise was not measured"};
  const double noise = *evidence.noise;
  if (!(noise > 0.0))
    return NotApplicable{
        "noise-zero: a thresholded baseline has no noise to compare with"};
  const Outcome<HeightLine> line = fit_heights(evidence.heights);
  if (!line) return NotApplicable{line.reason()};

  const auto limit_at = [&](double ratio) {
    const double height =
        noise * height_per_noise(ratio, evidence.noise_measure);
    return (height - line->intercept) / line->slope;
  };
  LimitEstimate estimate;
  estimate.detection = limit_at(procedure.detection_ratio);
  estimate.quantitation = limit_at(procedure.quantitation_ratio);
  if (!(*estimate.detection > 0.0) || !(*estimate.quantitation > 0.0))
    return NotApplicable{
        "limit-not-positive: the line of heights has the ratio only at or "
        "below zero concentration"};
  estimate.n = line->points;
  estimate.terms = {
      {noise_words(evidence.noise_measure), noise, kHeight},
      {"intercept of the heights", line->intercept, kHeight},
      {"slope of the heights", line->slope, "height/concentration"},
      {"lowest standard with a peak", line->lowest, kConcentration},
      {"detection ratio", procedure.detection_ratio, ""},
      {"quantitation ratio", procedure.quantitation_ratio, ""}};
  judge_measure(estimate, procedure, evidence.noise_measure);
  judge_line(estimate, *line);
  judge_distance_from_standards(estimate, line->lowest);
  return estimate;
}

}  // namespace loqsmith
