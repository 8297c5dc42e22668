#include "loqsmith/judgement/confirmation_check.hpp"

#include <cmath>
#include <utility>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/limits/low_spikes.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastSpikes = 4;
constexpr double kNear = 2.0;        // factor
constexpr double kTwoSided = 0.995;  // 99 %

Outcome<SpikeLevel> nearest_level(const CalibrationSet& set) {
  if (!set.calibration) return NotApplicable{"no calibration"};
  if (!set.limits.governing) return NotApplicable{"no valid limit governs"};
  const double limit = set.limits.governing->quantitation;
  const SpikeLevel* nearest = nullptr;
  double least = std::log(kNear) * (1.0 + 1e-12);
  bool near_but_few = false;
  const std::vector<SpikeLevel> levels = spike_levels(set.low_spikes);
  for (const SpikeLevel& level : levels) {
    const double distance = std::abs(std::log(level.nominal / limit));
    if (!(distance <= least)) continue;
    if (level.n() < kLeastSpikes) {
      near_but_few = true;
      continue;
    }
    if (nearest != nullptr && distance == least) continue;
    nearest = &level;
    least = distance;
  }
  if (nearest != nullptr) return *nearest;
  return NotApplicable{
      near_but_few ? "fewer than 4 low spikes at a level near the "
                     "quantitation limit"
                   : "no low spikes within a factor of 2 of the quantitation "
                     "limit (" +
                         figure(limit) + " in the vial)"};
}

class Confirmation {
 public:
  Confirmation(const AnalyteRules& settings, const CalibrationSet& set)
      : analyte_(settings.analyte),
        accept_(*settings.acceptance.confirmation),
        set_(set) {}

  LimitCheck check() {
    const Outcome<SpikeLevel> level = nearest_level(set_);
    if (!level) {
      found_.rows.push_back(row("not checked: " + level.reason()));
      return std::move(found_);
    }
    about_ = " of " + counted(level->n(), "low spike") + " at " +
             figure(level->nominal) + ", " +
             figure(level->nominal / set_.limits.governing->quantitation) +
             " times the quantitation limit";
    judge_level(*level);
    return std::move(found_);
  }

 private:
  CheckRow row(std::string note) const {
    CheckRow row;
    row.check = "confirmation";
    row.analyte = analyte_;
    row.unit = "%";
    row.action = check_action_name(accept_.action);
    row.affects = "all results of the analyte";
    row.note = std::move(note);
    return row;
  }

  void judge(const std::string& criterion, std::optional<double> value,
             std::optional<double> low, std::optional<double> high) {
    CheckRow one = row(criterion + about_);
    one.value = value;
    one.low = low;
    one.high = high;
    one.passed =
        value && (!low || *value >= *low) && (!high || *value <= *high);
    found_.failed = found_.failed || !*one.passed;
    found_.rows.push_back(std::move(one));
  }

  void judge_level(const SpikeLevel& level) {
    const double average = mean(level.found);
    const double sd = standard_deviation(level.found);
    const double percent = 100.0 / level.nominal;
    // Of a mean at or below zero there is no relative standard deviation.
    const std::optional<double> rsd =
        average > 0.0 ? std::optional<double>(100.0 * sd / average)
                      : std::nullopt;
    judge("precision: relative standard deviation", rsd, std::nullopt,
          accept_.maximum_rsd);
    judge("recovery: mean", percent * average, accept_.recovery.low,
          accept_.recovery.high);
    const PredictionInterval interval =
        half_range_interval(average, sd, half_range_factor(level.n()));
    judge("prediction: lower end for one more", percent * interval.lower,
          accept_.prediction.low, std::nullopt);
    judge("prediction: upper end for one more", percent * interval.upper,
          std::nullopt, accept_.prediction.high);
  }

  std::string analyte_;
  const ConfirmationAcceptance& accept_;
  const CalibrationSet& set_;
  std::string about_;
  LimitCheck found_;
};

}  // namespace

double half_range_factor(std::size_t n) {
  const double count = static_cast<double>(n);
  return student_t_quantile(kTwoSided, count - 1.0) *
         std::sqrt(1.0 + 1.0 / count);
}

PredictionInterval half_range_interval(double mean, double sd, double factor) {
  return {mean - factor * sd, mean + factor * sd};
}

LimitCheck check_confirmation(const AnalyteRules& settings,
                              const CalibrationSet& set) {
  if (!settings.acceptance.confirmation) return {};
  return Confirmation(settings, set).check();
}

}  // namespace loqsmith
