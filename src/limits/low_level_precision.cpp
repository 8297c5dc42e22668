#include "loqsmith/limits/low_level_precision.hpp"

#include <cmath>
#include <string>

#include "loqsmith/limits/blank_offset.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/low_spikes.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kWantedResults = 6;
constexpr std::size_t kAdvisedResults = 10;
constexpr double kFarAbove = 10.0;

// s0' over s0.
double averaging_factor(const ProcedureSettings& procedure) {
  const double blanks =
      procedure.blank_replicates > 0 ? 1.0 / procedure.blank_replicates : 0.0;
  return std::sqrt(1.0 / procedure.replicates + blanks);
}

LimitEstimate estimate_from(double sd, std::size_t n, const std::string& of,
                            const ProcedureSettings& procedure) {
  const double factor = averaging_factor(procedure);
  LimitEstimate estimate;
  estimate.n = n;
  estimate.terms = {
      {"number of results (" + of + ")", static_cast<double>(n), ""},
      {"standard deviation of single results", sd, kConcentration},
      {"results averaged", static_cast<double>(procedure.replicates), ""},
      {"blanks averaged for correction",
       static_cast<double>(procedure.blank_replicates), ""},
      {"standard deviation of what is reported", factor * sd, kConcentration},
      {"detection factor", procedure.detection_factor, ""},
      {"quantitation factor", procedure.quantitation_factor, ""}};
  set_spread_limits(estimate, {factor * sd, static_cast<double>(n) - 1.0}, 1.0,
                    procedure);
  return estimate;
}

void judge_number(LimitEstimate& estimate) {
  if (estimate.n >= kAdvisedResults) return;
  const bool few = estimate.n < kWantedResults;
  estimate.findings.push_back(
      {few ? Grade::NotValid : Grade::Note, "few-results",
       counted(estimate.n, "result") +
           (few ? ", at least 6 are needed" : ", 10 or more are advised")});
}

LimitEstimate from_spikes(const SpikeSample& spikes,
                          const LimitEvidence& evidence,
                          const ProcedureSettings& procedure) {
  LimitEstimate estimate =
      estimate_from(spikes.sd, spikes.level.n(), "low spikes", procedure);
  estimate.terms.push_back(
      {"spike level", spikes.level.nominal, kConcentration});
  judge_number(estimate);
  judge_spike_bounds(estimate, evidence);
  judge_spike_level(estimate, spikes.level.nominal, 0.0, kFarAbove);
  return estimate;
}

LimitEstimate from_blanks(const BlankSample& blanks,
                          const LimitEvidence& evidence,
                          const LimitSettings& settings,
                          const ProcedureSettings& procedure) {
  const Calibration& calibration = *evidence.calibration;
  LimitEstimate estimate = estimate_from(blanks.sd / calibration.slope,
                                         blanks.n(), "blanks", procedure);
  judge_number(estimate);
  judge_blanks(estimate, blanks, evidence, settings);
  // What is averaged or corrected is not compared one by one.
  if (procedure.replicates == 1 && procedure.blank_replicates == 0)
    judge_blank_offset(estimate, blanks, calibration);
  if (procedure.blank_replicates == 0)
    judge_baseline_without_offset(estimate, evidence);
  judge_distance_from_standards(estimate, calibration.lowest);
  return estimate;
}

}  // namespace

Outcome<LimitEstimate> low_level_precision(const LimitEvidence& evidence,
                                           const LimitSettings& settings,
                                           const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: a limit needs the slope"};
  if (!(evidence.calibration->slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising curve"};
  const Outcome<SpikeSample> spikes = usable_spikes(evidence, kWantedResults);
  const bool enough = spikes && spikes->level.n() >= kWantedResults;
  if (enough && !procedure.blanks)
    return from_spikes(*spikes, evidence, procedure);
  const Outcome<BlankSample> blanks =
      usable_blanks(evidence, blank_kind_of(settings, procedure));
  if (blanks) return from_blanks(*blanks, evidence, settings, procedure);
  if (procedure.blanks) return NotApplicable{blanks.reason()};
  if (spikes) return from_spikes(*spikes, evidence, procedure);
  return NotApplicable{spikes.reason() + "; " + blanks.reason()};
}

}  // namespace loqsmith
