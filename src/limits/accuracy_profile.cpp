#include "loqsmith/limits/accuracy_profile.hpp"

#include <algorithm>
#include <map>
#include <string>
#include <utility>

#include "loqsmith/limits/low_spikes.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/tolerance_interval.hpp"
#include "loqsmith/limits/words.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastRuns = 3;

struct ProfiledLevel {
  ProfilePoint point;
  ToleranceInterval interval;
  std::size_t results = 0;
  std::size_t runs = 0;
};

struct Profile {
  std::vector<ProfiledLevel> levels;  ///< ascending, at least 1
  std::size_t left_out = 0;           ///< levels
};

bool passes(const ProfilePoint& point, double low, double high) {
  return point.lower_percent >= low && point.upper_percent <= high;
}

// Where the line through two values meets a limit that lies between them.
double crossing(double limit, double from, double value_from, double to,
                double value_to) {
  return from + (limit - value_from) / (value_to - value_from) * (to - from);
}

std::vector<std::vector<double>> runs_of(const SpikeLevel& level) {
  std::map<std::string, std::vector<double>> by_prep;
  for (std::size_t i = 0; i < level.n(); ++i)
    by_prep[level.spikes[i].prep].push_back(level.found[i]);
  std::vector<std::vector<double>> runs;
  for (auto& [prep, results] : by_prep) runs.push_back(std::move(results));
  return runs;
}

Outcome<Profile> profile_of(const LimitEvidence& evidence, double beta) {
  Profile profile;
  for (const SpikeLevel& level : spike_levels(evidence.spikes)) {
    const std::vector<std::vector<double>> runs = runs_of(level);
    if (runs.size() < kLeastRuns || level.n() == runs.size()) {
      ++profile.left_out;
      continue;
    }
    const auto interval = beta_expectation_interval(runs, beta);
    if (!interval)
      return NotApplicable{interval.reason() + ", at level " +
                           figure(level.nominal)};
    const double percent = 100.0 / level.nominal;
    profile.levels.push_back(
        {{level.nominal, percent * interval->lower, percent * interval->upper},
         *interval,
         level.n(),
         runs.size()});
  }
  if (profile.levels.empty())
    return NotApplicable{
        "few-spikes: no level has low spikes in 3 preparations, at least one "
        "of them with two"};
  return profile;
}

void add_terms(LimitEstimate& estimate, const Profile& profile,
               const ProcedureSettings& procedure) {
  estimate.terms = {
      {"part of future results", procedure.beta, ""},
      {"acceptable recovery, low", procedure.acceptance_low, "%"},
      {"acceptable recovery, high", procedure.acceptance_high, "%"}};
  for (const ProfiledLevel& level : profile.levels) {
    estimate.n += level.results;
    const std::string at = " at level " + figure(level.point.concentration);
    estimate.terms.push_back(
        {"recovery" + at,
         0.5 * (level.point.lower_percent + level.point.upper_percent), "%"});
    estimate.terms.push_back({"intermediate standard deviation" + at,
                              level.interval.intermediate_sd, kConcentration});
    estimate.terms.push_back(
        {"lower bound of recovery" + at, level.point.lower_percent, "%"});
    estimate.terms.push_back(
        {"upper bound of recovery" + at, level.point.upper_percent, "%"});
  }
}

void judge_design(LimitEstimate& estimate, const Profile& profile) {
  estimate.findings.push_back(
      {Grade::Caution, "one-night",
       "the runs are preparations of one night: what differs between days "
       "does not enter"});
  if (profile.left_out > 0)
    estimate.findings.push_back(
        {Grade::Note, "levels-left-out",
         counted(profile.left_out, "level") +
             " without 3 preparations, one of them with two results"});
  const bool unequal = std::any_of(
      profile.levels.begin(), profile.levels.end(),
      [](const ProfiledLevel& level) { return !level.interval.balanced; });
  if (unequal)
    estimate.findings.push_back(
        {Grade::Note, "unequal-runs",
         "preparations with unequal numbers of results: the intervals are "
         "approximate"});
}

// The level whose interval decided: the first that passes with all above it.
const ProfiledLevel& deciding(const Profile& profile, double limit) {
  for (const ProfiledLevel& level : profile.levels)
    if (level.point.concentration >= limit) return level;
  return profile.levels.back();
}

}  // namespace

std::optional<double> profile_limit(const std::vector<ProfilePoint>& profile,
                                    double low, double high) {
  std::size_t first = profile.size();
  while (first > 0 && passes(profile[first - 1], low, high)) --first;
  if (first == profile.size()) return std::nullopt;
  if (first == 0) return profile.front().concentration;
  const ProfilePoint& fails = profile[first - 1];
  const ProfilePoint& good = profile[first];
  double limit = fails.concentration;
  if (fails.lower_percent < low)
    limit =
        std::max(limit, crossing(low, fails.concentration, fails.lower_percent,
                                 good.concentration, good.lower_percent));
  if (fails.upper_percent > high)
    limit =
        std::max(limit, crossing(high, fails.concentration, fails.upper_percent,
                                 good.concentration, good.upper_percent));
  return limit;
}

Outcome<LimitEstimate> accuracy_profile(const LimitEvidence& evidence,
                                        const LimitSettings&,
                                        const ProcedureSettings& procedure) {
  if (!evidence.calibration)
    return NotApplicable{"no-calibration: nothing was found without one"};
  if (!(evidence.calibration->slope > 0.0))
    return NotApplicable{"slope-not-positive: a limit needs a rising curve"};
  const Outcome<Profile> profile = profile_of(evidence, procedure.beta);
  if (!profile) return NotApplicable{profile.reason()};
  std::vector<ProfilePoint> points;
  for (const ProfiledLevel& level : profile->levels)
    points.push_back(level.point);
  const auto limit = profile_limit(points, procedure.acceptance_low,
                                   procedure.acceptance_high);
  if (!limit)
    return NotApplicable{
        "highest-level-fails: at " + figure(points.back().concentration) +
        " results are expected between " + figure(points.back().lower_percent) +
        " and " + figure(points.back().upper_percent) + " %"};

  LimitEstimate estimate;
  estimate.quantitation = *limit;
  estimate.degrees_of_freedom =
      deciding(*profile, *limit).interval.degrees_of_freedom;
  add_terms(estimate, *profile, procedure);
  judge_design(estimate, *profile);
  if (*limit == points.front().concentration)
    estimate.findings.push_back(
        {Grade::Note, "at-lowest-level",
         "the lowest level passes: the limit lies at or below it"});
  judge_spike_bounds(estimate, evidence);
  judge_distance_from_standards(estimate, evidence.calibration->lowest);
  return estimate;
}

}  // namespace loqsmith
