#include "loqsmith/judgement/calibration_checks.hpp"

#include <set>

#include "loqsmith/base/numbers.hpp"

namespace loqsmith {
namespace {

class Criteria {
 public:
  Criteria(const AnalyteRules& settings, const CalibrationSet& set)
      : analyte_(settings.analyte),
        accept_(*settings.acceptance.calibration),
        set_(set) {}

  CalibrationVerdict check() {
    if (!set_.calibration) {
      CheckRow row = whole("no calibration: " + set_.calibration.reason());
      row.passed = false;
      verdict_.failed = true;
      verdict_.rows.push_back(std::move(row));
      return std::move(verdict_);
    }
    check_levels();
    check_fit();
    check_back_calculation();
    check_accepted();
    return std::move(verdict_);
  }

 private:
  /// A row about the whole analyte.
  CheckRow whole(std::string note) const {
    CheckRow row;
    row.check = "calibration";
    row.analyte = analyte_;
    row.action = check_action_name(accept_.action);
    row.affects = set_.alone ? std::string("all results of the analyte")
                             : "all results of the set " + set_.set;
    row.note = std::move(note);
    return row;
  }

  void judge(CheckRow row) {
    row.passed = row.value && (!row.low || *row.value >= *row.low) &&
                 (!row.high || *row.value <= *row.high);
    verdict_.failed = verdict_.failed || !*row.passed;
    verdict_.rows.push_back(std::move(row));
  }

  void check_levels() {
    CheckRow row = whole("minimum-levels: levels in the fit");
    row.value = static_cast<double>(set_.calibration->used_levels());
    row.low = accept_.minimum_levels;
    row.unit = "levels";
    judge(std::move(row));
  }

  void check_fit() {
    if (accept_.minimum_r2) {
      CheckRow row = whole("minimum-r2");
      row.value = set_.calibration->r2;
      row.low = accept_.minimum_r2;
      judge(std::move(row));
    }
    if (accept_.maximum_relative_standard_error) {
      CheckRow row = whole("maximum-relative-standard-error");
      row.value = set_.calibration->relative_standard_error;
      row.high = accept_.maximum_relative_standard_error;
      row.unit = "%";
      judge(std::move(row));
    }
  }

  void check_back_calculation() {
    for (const CalibrationLevel& level : set_.calibration->levels) {
      if (level.points == 0) continue;
      const bool lowest = level.concentration == set_.calibration->lowest;
      const std::optional<double> limit =
          lowest && accept_.back_calculation_lowest_percent
              ? accept_.back_calculation_lowest_percent
              : accept_.back_calculation_percent;
      if (!limit) continue;
      CheckRow row =
          whole(std::string("back-calculation") + (lowest ? "-lowest" : "") +
                ": level at " + shortest(level.concentration));
      row.value = level.mean_deviation_percent;
      row.low = -*limit;
      row.high = limit;
      row.unit = "%";
      row.passed = level.accepted;
      row.action.clear();
      row.affects = "the accepted range";
      verdict_.rows.push_back(std::move(row));
    }
  }

  void check_accepted() {
    std::set<double> levels;
    for (const CalibrationLevel& level : set_.calibration->levels) {
      levels.insert(level.concentration);
    }
    for (const UnmeasuredStandard& standard : set_.unmeasured) {
      if (standard.concentration > 0.0) levels.insert(standard.concentration);
    }
    const auto accepted =
        static_cast<double>(set_.calibration->accepted_levels());
    CheckRow row = whole("minimum-accepted: accepted levels of all levels");
    row.value = 100.0 * accepted / static_cast<double>(levels.size());
    row.low = accept_.minimum_accepted_percent;
    row.unit = "%";
    judge(std::move(row));
  }

  std::string analyte_;
  const CalibrationAcceptance& accept_;
  const CalibrationSet& set_;
  CalibrationVerdict verdict_;
};

}  // namespace

CalibrationVerdict check_calibration(const AnalyteRules& settings,
                                     const CalibrationSet& set) {
  if (!settings.acceptance.calibration) return {};
  return Criteria(settings, set).check();
}

}  // namespace loqsmith
