#include "loqsmith/limits/noise_model_limit.hpp"

#include <algorithm>
#include <cmath>
#include <vector>

#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"

namespace loqsmith {
namespace {

std::vector<double> predictions(const LimitEvidence& evidence, BlankKind kind) {
  std::vector<double> found;
  for (const PredictedNoise& one : evidence.predicted_noise) {
    if (kind == BlankKind::All || one.kind == kind) found.push_back(one.sd);
  }
  return found;
}

double root_mean_square(const std::vector<double>& values) {
  double squares = 0.0;
  for (const double value : values) squares += value * value;
  return std::sqrt(squares / static_cast<double>(values.size()));
}

NotApplicable nothing_predicted(const LimitEvidence& evidence, BlankKind kind) {
  const bool blank_there =
      std::any_of(evidence.blanks.begin(), evidence.blanks.end(),
                  [&](const BlankResponse& blank) {
                    return kind == BlankKind::All || blank.kind == kind;
                  });
  if (blank_there && !evidence.predicted_noise_absent.empty()) {
    return NotApplicable{evidence.predicted_noise_absent};
  }
  if (blank_there) return NotApplicable{"no-noise: it was not measured"};
  return NotApplicable{"few-blanks: no " + blank_kind_words(kind) +
                       ", at least 1 is needed"};
}

void add_terms(LimitEstimate& estimate, const std::vector<double>& predicted,
               double sd, double slope, const ProcedureSettings& procedure) {
  const auto [low, high] =
      std::minmax_element(predicted.begin(), predicted.end());
  estimate.n = predicted.size();
  estimate.terms = {
      {"number of blanks", static_cast<double>(predicted.size()), ""},
      {"predicted response noise (root mean square)", sd, kResponse},
      {"smallest of the blanks' predictions", *low, kResponse},
      {"largest of the blanks' predictions", *high, kResponse},
      {"slope at zero", slope, kResponsePerConcentration},
      {"detection factor", procedure.detection_factor, ""},
      {"quantitation factor", procedure.quantitation_factor, ""}};
}

}  // namespace

Outcome<LimitEstimate> noise_model_limit(const LimitEvidence& evidence,
                                         const LimitSettings& settings,
                                         const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: a limit needs the slope"};
  const double slope = evidence.calibration->slope;
  if (!(slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising curve"};
  if (evidence.baseline_biased)
    return NotApplicable{
        "baseline-not-linear: with this baseline the response is no weighted "
        "sum of points, so that its noise cannot be predicted"};
  const BlankKind kind = blank_kind_of(settings, procedure);
  const std::vector<double> predicted = predictions(evidence, kind);
  if (predicted.empty()) return nothing_predicted(evidence, kind);
  const double sd = root_mean_square(predicted);
  if (!(sd > 0.0))
    return NotApplicable{"noise-zero: the signal shows no noise"};

  LimitEstimate estimate;
  add_terms(estimate, predicted, sd, slope, procedure);
  estimate.detection = procedure.detection_factor * sd / slope;
  estimate.quantitation = procedure.quantitation_factor * sd / slope;
  estimate.findings.push_back(
      {Grade::Caution, "instrument-noise-only",
       "predicted from the baseline's noise alone: injection, preparation and "
       "what blanks contain do not enter; no method limit"});
  judge_distance_from_standards(estimate, evidence.calibration->lowest);
  return estimate;
}

}  // namespace loqsmith
