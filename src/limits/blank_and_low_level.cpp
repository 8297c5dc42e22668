#include "loqsmith/limits/blank_and_low_level.hpp"

#include <algorithm>
#include <map>
#include <string>
#include <vector>

#include "loqsmith/calibration/cochran_test.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "loqsmith/limits/drawn_truth.hpp"
#include "loqsmith/limits/limit_of_blank.hpp"
#include "loqsmith/limits/low_level_precision.hpp"
#include "loqsmith/limits/low_spikes.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {
namespace {

constexpr double kLowLevels = 4.0;  // times the lowest
constexpr double kFarAbove = 10.0;
constexpr double kNotTheSame = 0.01;
constexpr std::size_t kAdvisedResults = 60;
constexpr std::size_t kLeastResults = 20;
constexpr std::size_t kLeastOfOneLevel = 3;

/// What both ways rest on.
struct Evidence {
  BlankSample blanks;
  std::vector<double> blank_results;  ///< concentrations
  std::size_t blank_samples = 1;
  std::vector<SpikeLevel> levels;  ///< ascending, at least 3 spikes each
};

std::size_t count_samples(const BlankSample& blanks) {
  std::map<std::string, int> of_prep;
  for (const BlankResponse& blank : blanks.blanks) ++of_prep[blank.prep];
  std::size_t samples = 0;
  bool single = false;
  for (const auto& [prep, count] : of_prep) {
    if (count > 1)
      ++samples;
    else
      single = true;
  }
  return samples + (single ? 1 : 0);
}

Outcome<Evidence> gather(const LimitEvidence& evidence,
                         const LimitSettings& settings,
                         const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: a limit needs the slope"};
  const Calibration& line = *evidence.calibration;
  if (!(line.slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising curve"};
  const Outcome<BlankSample> blanks =
      usable_blanks(evidence, blank_kind_of(settings, procedure));
  if (!blanks) return NotApplicable{blanks.reason()};
  Evidence gathered;
  gathered.blanks = *blanks;
  for (const BlankResponse& blank : blanks->blanks)
    gathered.blank_results.push_back((blank.response - line.intercept) /
                                     line.slope);
  gathered.blank_samples = count_samples(*blanks);
  for (SpikeLevel& level : spike_levels(evidence.spikes))
    if (level.n() >= kLeastOfOneLevel)
      gathered.levels.push_back(std::move(level));
  if (gathered.levels.empty())
    return NotApplicable{"few-spikes: no level with 3 low spikes"};
  return gathered;
}

void add_terms(LimitEstimate& estimate, const Evidence& from,
               std::size_t low_results) {
  estimate.n = from.blanks.n() + low_results;
  estimate.terms = {
      {"blank results", static_cast<double>(from.blanks.n()), ""},
      {"blank samples", static_cast<double>(from.blank_samples), ""},
      {"mean of the blanks", mean(from.blank_results), kConcentration},
      {"standard deviation of the blanks",
       standard_deviation(from.blank_results), kConcentration},
      {"low results", static_cast<double>(low_results), ""}};
}

void judge_numbers(LimitEstimate& estimate, std::size_t blanks,
                   std::size_t low) {
  const std::size_t fewer = std::min(blanks, low);
  if (fewer >= kAdvisedResults) return;
  const bool few = fewer < kLeastResults;
  estimate.findings.push_back(
      {few ? Grade::NotValid : Grade::Caution, "few-results",
       counted(blanks, "blank result") + " and " + counted(low, "low result") +
           (few ? ", at least 20 of each are needed"
                : ", 60 of each are asked for")});
}

Outcome<LimitEstimate> above_zero(LimitEstimate estimate) {
  if (!(*estimate.critical_value > 0.0) || !(*estimate.detection > 0.0))
    return NotApplicable{
        "limit-not-positive: the blanks' mean lies so far below the intercept "
        "that the limit of blank would be at or below zero"};
  return estimate;
}

// The true limits are those with the quantiles of the normal distribution.
void set_bounds(LimitEstimate& estimate, const Evidence& from,
                const PooledSpread& low, const ProcedureSettings& procedure) {
  const double blank_mean = mean(from.blank_results);
  const double blank_sd = standard_deviation(from.blank_results);
  const double z_alpha = normal_quantile(1.0 - procedure.alpha);
  const double z_beta = normal_quantile(1.0 - procedure.beta);
  set_detection_bounds(
      estimate, "blank-and-low-level", [&](RandomStream& random) {
        const NormalPopulation blank = drawn_population(
            random, blank_mean, blank_sd, from.blank_results.size());
        const double low_sd =
            drawn_spread(random, low.sd, low.degrees_of_freedom());
        return std::optional<double>(blank.mean + z_alpha * blank.sd +
                                     z_beta * low_sd);
      });
}

// Pooling wants one spread in all low samples.
void judge_spread(LimitEstimate& estimate,
                  const std::vector<std::vector<double>>& low_samples) {
  std::vector<ReplicateGroup> groups;
  for (const std::vector<double>& sample : low_samples)
    groups.push_back({static_cast<double>(groups.size()), sample, {}});
  const Outcome<DiagnosticTest> test = cochran_test(groups);
  if (!test || !test->p || test->passed) return;
  estimate.findings.push_back(
      {*test->p < kNotTheSame ? Grade::NotValid : Grade::Caution,
       "spread-differs",
       "one low sample scatters more than the others (Cochran, C " +
           figure(test->statistic) + ", critical value " +
           figure(test->critical) + "): their spread should not be pooled"});
}

Outcome<LimitEstimate> from_moments(const Evidence& from,
                                    const ProcedureSettings& procedure) {
  std::vector<std::vector<double>> low_samples;
  for (const SpikeLevel& level : from.levels)
    if (level.nominal <= kLowLevels * from.levels.front().nominal)
      low_samples.push_back(level.found);
  const PooledSpread low = pooled_spread(low_samples);
  if (!(low.sd > 0.0))
    return NotApplicable{
        "spikes-all-equal: the low spikes of each level gave the same "
        "concentration"};
  LimitEstimate estimate;
  add_terms(estimate, from, low.results);
  estimate.critical_value =
      limit_of_blank(from.blank_results, from.blank_samples, procedure.alpha);
  estimate.detection =
      limit_of_detection(*estimate.critical_value, low, procedure.beta);
  const std::size_t blank_df = from.blanks.n() - from.blank_samples;
  estimate.degrees_of_freedom =
      static_cast<double>(std::min(blank_df, low.degrees_of_freedom()));
  estimate.terms.push_back(
      {"low samples", static_cast<double>(low.samples), ""});
  estimate.terms.push_back(
      {"pooled standard deviation of the low samples", low.sd, kConcentration});
  judge_numbers(estimate, from.blanks.n(), low.results);
  judge_spread(estimate, low_samples);
  Outcome<LimitEstimate> found = above_zero(std::move(estimate));
  if (found) set_bounds(found.value(), from, low, procedure);
  return found;
}

double share_below(const std::vector<double>& values, double limit) {
  const auto below = std::count_if(values.begin(), values.end(),
                                   [&](double value) { return value < limit; });
  return static_cast<double>(below) / static_cast<double>(values.size());
}

Outcome<LimitEstimate> from_ranks(const Evidence& from,
                                  const ProcedureSettings& procedure) {
  const Outcome<double> of_blank =
      limit_of_blank_by_rank(from.blank_results, procedure.alpha);
  if (!of_blank) return NotApplicable{of_blank.reason()};
  const auto level = std::find_if(
      from.levels.begin(), from.levels.end(), [&](const SpikeLevel& one) {
        return share_below(one.found, *of_blank) <= procedure.beta;
      });
  if (level == from.levels.end())
    return NotApplicable{
        "levels-too-low: of every level too many low spikes lie below the "
        "limit of blank"};
  LimitEstimate estimate;
  add_terms(estimate, from, level->n());
  estimate.critical_value = *of_blank;
  estimate.detection = median(level->found);
  estimate.terms.push_back({"low level", level->nominal, kConcentration});
  estimate.terms.push_back({"part of its results below the limit of blank",
                            share_below(level->found, *of_blank), ""});
  judge_numbers(estimate, from.blanks.n(), level->n());
  return above_zero(std::move(estimate));
}

ProcedureSettings precision_settings(const LimitSettings& settings) {
  for (const ProcedureSettings& one : settings.procedures)
    if (one.name == "low-level-precision") return one;
  return {};
}

void take_quantitation(LimitEstimate& estimate, const LimitEvidence& evidence,
                       const LimitSettings& settings) {
  const Outcome<LimitEstimate> precision =
      low_level_precision(evidence, settings, precision_settings(settings));
  if (!precision) {
    estimate.findings.push_back(
        {Grade::Note, "no-quantitation", precision.reason()});
    return;
  }
  estimate.quantitation = precision->quantitation;
  estimate.quantitation_lower = precision->quantitation_lower;
  estimate.quantitation_upper = precision->quantitation_upper;
  estimate.terms.push_back({"quantitation limit of low-level-precision",
                            *precision->quantitation, kConcentration});
}

}  // namespace

Outcome<LimitEstimate> blank_and_low_level(const LimitEvidence& evidence,
                                           const LimitSettings& settings,
                                           const ProcedureSettings& procedure) {
  const Outcome<Evidence> from = gather(evidence, settings, procedure);
  if (!from) return NotApplicable{from.reason()};
  Outcome<LimitEstimate> found = procedure.ranks
                                     ? from_ranks(*from, procedure)
                                     : from_moments(*from, procedure);
  if (!found) return found;
  LimitEstimate& estimate = found.value();
  take_quantitation(estimate, evidence, settings);
  judge_spike_bounds(estimate, evidence);
  judge_spike_level(estimate, from->levels.front().nominal, 0.0, kFarAbove);
  judge_blanks(estimate, from->blanks, evidence, settings);
  return found;
}

}  // namespace loqsmith
