#include "loqsmith/limits/spike_replicates.hpp"

#include <algorithm>
#include <cmath>
#include <optional>
#include <set>
#include <string>
#include <vector>

#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/drawn_truth.hpp"
#include "loqsmith/limits/low_spikes.hpp"
#include "loqsmith/limits/method_blank_limit.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kWantedSpikes = 7;
constexpr double kNearZero = 3.0;  // standard errors of the blanks' mean

Outcome<MethodBlankLimit> limit_of_blanks(const BlankSample& sample,
                                          const Calibration& calibration,
                                          double confidence) {
  std::vector<std::optional<double>> results;
  for (const BlankResponse& blank : sample.blanks)
    results.push_back((blank.response - calibration.intercept) /
                      calibration.slope);
  return method_blank_limit(results, confidence);
}

void add_terms(LimitEstimate& estimate, const SpikeSample& spikes,
               const MethodBlankLimit& blanks, double of_spikes) {
  estimate.n = spikes.level.n() + blanks.n;
  estimate.terms = {
      {"number of spikes", static_cast<double>(spikes.level.n()), ""},
      {"spike level", spikes.level.nominal, kConcentration},
      {"mean of the spikes", spikes.mean, kConcentration},
      {"standard deviation of the spikes", spikes.sd, kConcentration},
      {"limit of the spikes", of_spikes, kConcentration},
      {"number of blanks", static_cast<double>(blanks.n), ""},
      {"mean of the blanks, at least zero", blanks.mean, kConcentration},
      {"standard deviation of the blanks", blanks.sd, kConcentration},
      {"limit of the blanks", blanks.value, kConcentration}};
}

void judge_batches(LimitEstimate& estimate, const SpikeLevel& level) {
  std::set<std::string> batches;
  for (const SpikeResult& spike : level.spikes) batches.insert(spike.prep);
  estimate.findings.push_back(
      {Grade::Caution, "one-night",
       "spikes of one night (" + counted(batches.size(), "preparation") +
           "); the rule asks for 3 batches, prepared and measured on 3 dates"});
}

// The limit is that of the blanks, whose spread and mean both moved it.
void let_blanks_decide(LimitEstimate& estimate, const MethodBlankLimit& blanks,
                       double of_spikes, double confidence) {
  const double df = static_cast<double>(blanks.n) - 1.0;
  const double t = student_t_quantile(confidence, df);
  estimate.detection = blanks.value;
  estimate.detection_lower.reset();
  estimate.detection_upper.reset();
  estimate.degrees_of_freedom = df;
  const double chance = blanks.sd / std::sqrt(static_cast<double>(blanks.n));
  const bool near_zero = blanks.mean_found < kNearZero * chance;
  set_detection_bounds(
      estimate, "spike-replicates",
      [&](RandomStream& random) {
        const NormalPopulation truth =
            drawn_population(random, blanks.mean_found, blanks.sd, blanks.n);
        return std::optional<double>(std::max(truth.mean, 0.0) + t * truth.sd);
      },
      near_zero ? "0.93 where the true mean of 7 blanks is zero" : "");
  estimate.findings.push_back(
      {Grade::Note, "blanks-decide",
       "the blanks' limit is larger than that of the spikes (" +
           figure(of_spikes) + ")"});
}

}  // namespace

Outcome<LimitEstimate> spike_replicates(const LimitEvidence& evidence,
                                        const LimitSettings& settings,
                                        const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: a limit needs the slope"};
  if (!(evidence.calibration->slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising curve"};
  const Outcome<SpikeSample> spikes = usable_spikes(evidence, kWantedSpikes);
  if (!spikes) return NotApplicable{spikes.reason()};
  const Outcome<BlankSample> sample =
      usable_blanks(evidence, procedure.blanks.value_or(BlankKind::Method));
  if (!sample) return NotApplicable{sample.reason()};
  const Outcome<MethodBlankLimit> blanks =
      limit_of_blanks(*sample, *evidence.calibration, procedure.confidence);
  if (!blanks) return NotApplicable{blanks.reason()};

  const double t =
      student_t_quantile(procedure.confidence, spikes->degrees_of_freedom());
  const double of_spikes = t * spikes->sd;
  LimitEstimate estimate;
  add_terms(estimate, *spikes, *blanks, of_spikes);
  estimate.terms.push_back({"Student's t of the spikes", t, ""});
  ProcedureSettings factors = procedure;
  factors.detection_factor = t;
  set_spread_limits(estimate, {spikes->sd, spikes->degrees_of_freedom()}, 1.0,
                    factors);
  if (blanks->value > of_spikes)
    let_blanks_decide(estimate, *blanks, of_spikes, procedure.confidence);

  judge_batches(estimate, spikes->level);
  judge_spike_number(estimate, *spikes, kWantedSpikes);
  judge_spikes_seen(estimate, spikes->level);
  judge_spike_level(estimate, spikes->level.nominal, procedure.spike_ratio_low,
                    procedure.spike_ratio_high);
  judge_blanks(estimate, *sample, evidence, settings);
  return estimate;
}

}  // namespace loqsmith
