#include "loqsmith/judgement/suitability_check.hpp"

#include <algorithm>
#include <map>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/judgement/check_rows.hpp"
#include "loqsmith/judgement/repeatability.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr double kShapeShows = 10.0;  // signal-to-noise ratio
constexpr std::size_t kLeastRepeats = 3;

using Measure = std::optional<double> Peak::*;
using Standards = std::vector<const InjectionResponse*>;

bool is_saturated(const Peak& peak) {
  return std::find(peak.reasons.begin(), peak.reasons.end(), "saturated") !=
         peak.reasons.end();
}

Standards standards_of(const FirstResults& first, const CalibrationSet& set) {
  Standards standards;
  for (const InjectionResponse& one : first.night.injections) {
    const bool member =
        std::any_of(set.standards.begin(), set.standards.end(),
                    [&](const StandardPoint& point) {
                      return point.injection == one.injection->number &&
                             point.concentration > 0.0;
                    });
    if (!member || !one.peak || !one.peak->found || is_saturated(*one.peak)) {
      continue;
    }
    standards.push_back(&one);
  }
  return standards;
}

Standards with_a_shape(Standards standards) {
  std::erase_if(standards, [](const InjectionResponse* one) {
    const std::optional<double>& ratio = one->peak->signal_to_noise;
    return ratio && *ratio < kShapeShows;
  });
  return standards;
}

// The level of which most standards are in the fit; of several the highest.
std::pair<double, std::vector<double>> most_repeated(
    const CalibrationSet& set) {
  std::map<double, std::vector<double>> levels;
  for (const StandardPoint& point : set.standards) {
    if (!point.used || !(point.concentration > 0.0)) continue;
    levels[point.concentration].push_back(point.response);
  }
  std::pair<double, std::vector<double>> most;
  for (const auto& [level, responses] : levels) {
    if (responses.size() >= most.second.size()) most = {level, responses};
  }
  return most;
}

class Suitability {
 public:
  Suitability(const FirstResults& first, const CalibrationSet& set)
      : first_(first),
        set_(set),
        accept_(*first.night.settings->acceptance.suitability),
        pattern_(row_of_check("suitability", first, accept_.action)) {
    name_set(pattern_, set);
  }

  CheckOutcome check() {
    const Standards all = standards_of(first_, set_);
    const Standards shaped = with_a_shape(all);
    at_most("tailing", accept_.maximum_tailing, &Peak::tailing, shaped);
    at_least("plates", accept_.minimum_plates, &Peak::plates, shaped);
    at_least("resolution", accept_.minimum_resolution, &Peak::resolution,
             shaped);
    repeatability();
    at_least("signal-to-noise", accept_.minimum_signal_to_noise,
             &Peak::signal_to_noise, all);
    if (outcome_.rows.empty()) {
      return not_checked(pattern_, "the method states no limit for it");
    }
    if (failed_) affect();
    return std::move(outcome_);
  }

 private:
  void at_most(const char* name, std::optional<double> limit, Measure measure,
               const Standards& standards) {
    if (!limit) return;
    CheckRow row = pattern_;
    row.high = limit;
    worst(name, std::move(row), measure, standards, 1.0);
  }

  void at_least(const char* name, std::optional<double> limit, Measure measure,
                const Standards& standards) {
    if (!limit) return;
    CheckRow row = pattern_;
    row.low = limit;
    worst(name, std::move(row), measure, standards, -1.0);
  }

  // Sign 1: the largest is the worst; -1: the smallest.
  void worst(const char* name, CheckRow row, Measure measure,
             const Standards& standards, double sign) {
    std::size_t n = 0;
    for (const InjectionResponse* one : standards) {
      const std::optional<double>& value = one->peak.value().*measure;
      if (!value) continue;
      ++n;
      if (row.value && !(sign * *value > sign * *row.value)) continue;
      row.value = value;
      row.injection = one->injection->number;
    }
    if (n == 0) {
      row.note =
          std::string("not checked: no standard shows a value of ") + name;
      outcome_.rows.push_back(std::move(row));
      return;
    }
    row.note = std::string(name) + ": the worst of " + counted(n, "standard");
    judge(std::move(row));
  }

  void repeatability() {
    if (!accept_.maximum_area_rsd) return;
    CheckRow row = pattern_;
    row.unit = "%";
    const auto [level, responses] = most_repeated(set_);
    const std::size_t n = responses.size();
    const double average = n == 0 ? 0.0 : mean(responses);
    if (n < kLeastRepeats || !(average > 0.0)) {
      row.high = accept_.maximum_area_rsd;
      row.note = "not checked: area-rsd: no level has 3 standards in the fit";
      outcome_.rows.push_back(std::move(row));
      return;
    }
    row.value = 100.0 * standard_deviation(responses) / average;
    row.high = repeatability_of(*accept_.maximum_area_rsd, n);
    row.note = "area-rsd: " + counted(n, "standard") + " at " +
               shortest(level) + "; " + shortest(*accept_.maximum_area_rsd) +
               " % is stated for " +
               std::to_string(
                   injections_for_repeatability(*accept_.maximum_area_rsd)) +
               " or more";
    judge(std::move(row));
  }

  void judge(CheckRow row) {
    row.passed = (!row.low || *row.value >= *row.low) &&
                 (!row.high || *row.value <= *row.high);
    row.affects = "all results of the analyte";
    failed_ = failed_ || !*row.passed;
    outcome_.rows.push_back(std::move(row));
  }

  void affect() {
    for (const ResultRow& result : first_.results) {
      if (result.set != set_.set) continue;
      outcome_.effects.push_back(
          {result.injection, "suitability-failed", accept_.action});
    }
  }

  const FirstResults& first_;
  const CalibrationSet& set_;
  const SuitabilityAcceptance& accept_;
  CheckRow pattern_;
  bool failed_ = false;
  CheckOutcome outcome_;
};

}  // namespace

CheckOutcome check_suitability(const FirstResults& first) {
  CheckOutcome all;
  if (!first.night.settings->acceptance.suitability) return all;
  for (const CalibrationSet& set : first.sets) {
    append(all, Suitability(first, set).check());
  }
  return all;
}

}  // namespace loqsmith
