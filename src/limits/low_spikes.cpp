#include "loqsmith/limits/low_spikes.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastSpikes = 3;
// The amount in the sample is the level's own number, but comes here as a
// quotient times its divisor.
constexpr double kSameAmount = 1e-9;

double amount_in_sample(const SpikeResult& spike) {
  return spike.nominal_vial * spike.sample_factor;
}

bool same_amount(const SpikeResult& one, const SpikeResult& other) {
  return std::abs(amount_in_sample(one) - amount_in_sample(other)) <=
         kSameAmount * amount_in_sample(other);
}

SpikeLevel bring_together(std::vector<SpikeResult> spikes) {
  SpikeLevel level;
  std::vector<double> factors;
  for (const SpikeResult& spike : spikes)
    factors.push_back(spike.sample_factor);
  level.mean_factor = mean(factors);
  for (const SpikeResult& spike : spikes)
    level.found.push_back(spike.found_vial *
                          (spike.sample_factor / level.mean_factor));
  level.nominal = spikes.front().nominal_vial *
                  (spikes.front().sample_factor / level.mean_factor);
  level.spikes = std::move(spikes);
  return level;
}

bool all_equal(const std::vector<double>& values) {
  return std::all_of(values.begin(), values.end(),
                     [&](double value) { return value == values.front(); });
}

const SpikeLevel* choose_level(const std::vector<SpikeLevel>& levels,
                               std::size_t wanted) {
  const SpikeLevel* most = nullptr;
  for (const SpikeLevel& level : levels) {
    if (level.n() >= wanted) return &level;
    if (most == nullptr || level.n() > most->n()) most = &level;
  }
  return most;
}

}  // namespace

std::vector<SpikeLevel> spike_levels(const std::vector<SpikeResult>& spikes) {
  std::vector<std::vector<SpikeResult>> groups;
  for (const SpikeResult& spike : spikes) {
    if (!(spike.nominal_vial > 0.0) || !(spike.sample_factor > 0.0)) continue;
    const auto group = std::find_if(
        groups.begin(), groups.end(),
        [&](const auto& one) { return same_amount(spike, one.front()); });
    if (group == groups.end())
      groups.push_back({spike});
    else
      group->push_back(spike);
  }
  std::stable_sort(
      groups.begin(), groups.end(), [](const auto& a, const auto& b) {
        return amount_in_sample(a.front()) < amount_in_sample(b.front());
      });
  std::vector<SpikeLevel> levels;
  for (std::vector<SpikeResult>& group : groups)
    levels.push_back(bring_together(std::move(group)));
  return levels;
}

Outcome<SpikeSample> usable_spikes(const LimitEvidence& evidence,
                                   std::size_t wanted) {
  const std::vector<SpikeLevel> levels = spike_levels(evidence.spikes);
  const SpikeLevel* level = choose_level(levels, wanted);
  const std::size_t n = level == nullptr ? 0 : level->n();
  if (n < kLeastSpikes)
    return NotApplicable{"few-spikes: " + counted(n, "low spike") +
                         " of one level, at least 3 are needed"};
  if (all_equal(level->found))
    return NotApplicable{
        "spikes-all-equal: " + counted(n, "low spike") +
        " gave the same concentration: a thresholded or rounded signal has no "
        "spread to rest a limit on"};
  SpikeSample sample;
  sample.level = *level;
  sample.mean = mean(level->found);
  sample.sd = standard_deviation(level->found);
  return sample;
}

void judge_spike_number(LimitEstimate& estimate, const SpikeSample& sample,
                        std::size_t wanted) {
  if (sample.level.n() >= wanted) return;
  estimate.findings.push_back(
      {Grade::NotValid, "few-spikes",
       counted(sample.level.n(), "low spike") +
           " of one level, the procedure asks for at least " +
           std::to_string(wanted)});
}

void judge_spike_level(LimitEstimate& estimate, double nominal, double low,
                       double high) {
  if (!estimate.detection) return;
  const double ratio = nominal / *estimate.detection;
  estimate.terms.push_back({"spike level over the detection limit", ratio, ""});
  if (ratio >= low && ratio <= high) return;
  const std::string wanted = low > 0.0 ? figure(low) + " to " + figure(high)
                                       : "at most " + figure(high);
  const std::string why =
      ratio < 1.0    ? ": what was added could not have been detected"
      : ratio > high ? ": the spread at the limit may be smaller"
                     : "";
  estimate.findings.push_back({ratio < 1.0 ? Grade::NotValid : Grade::Caution,
                               "spike-level",
                               "the spike level is " + figure(ratio) +
                                   " times the detection limit; it should be " +
                                   wanted + " times it" + why});
}

void judge_spikes_seen(LimitEstimate& estimate, const SpikeLevel& level) {
  std::size_t unseen = 0;
  for (const SpikeResult& spike : level.spikes)
    if (!spike.identified || !(spike.found_vial > 0.0)) ++unseen;
  if (unseen == 0) return;
  estimate.findings.push_back(
      {Grade::NotValid, "spike-not-seen",
       std::to_string(unseen) + " of " + counted(level.n(), "low spike") +
           " without a peak or not above zero: to be repeated at a higher "
           "level"});
}

void judge_spike_bounds(LimitEstimate& estimate,
                        const LimitEvidence& evidence) {
  if (!evidence.bounds_own) return;
  estimate.findings.push_back(
      {Grade::Caution, "own-bounds",
       "peaks are integrated between their found feet, which noise moves most "
       "where the peak is lowest"});
}

}  // namespace loqsmith
