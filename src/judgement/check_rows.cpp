#include "loqsmith/judgement/check_rows.hpp"

#include <utility>

#include "loqsmith/base/reading_figures.hpp"

namespace loqsmith {

CheckRow row_of_check(const std::string& check, const FirstResults& first,
                      CheckAction action) {
  CheckRow row;
  row.check = check;
  row.analyte = first.night.settings->analyte;
  row.action = check_action_name(action);
  return row;
}

CheckOutcome not_checked(CheckRow row, const std::string& why) {
  row.note = "not checked: " + why;
  CheckOutcome outcome;
  outcome.rows.push_back(std::move(row));
  return outcome;
}

void append(CheckOutcome& all, CheckOutcome more) {
  for (CheckRow& row : more.rows) all.rows.push_back(std::move(row));
  for (CheckEffect& effect : more.effects) {
    all.effects.push_back(std::move(effect));
  }
}

void name_set(CheckRow& row, const CalibrationSet& set) {
  if (!set.alone) row.set = set.set;
}

bool is_detected(const ResultRow& result) {
  if (result.status == Status::NotDetected) return false;
  if (!result.result) return result.status == Status::AboveRange;
  return !result.detection_limit || *result.result >= *result.detection_limit;
}

void InjectionRows::passed(int injection, double value, double distance) {
  ++count_;
  if (nearest_ && !(distance > distance_)) return;
  distance_ = distance;
  nearest_ = pattern_;
  nearest_->injection = injection;
  nearest_->value = value;
  nearest_->passed = true;
}

void InjectionRows::failed(int injection, std::optional<double> value,
                           const std::string& affects,
                           const std::string& note) {
  CheckRow row = pattern_;
  row.injection = injection;
  row.value = value;
  row.passed = false;
  row.affects = affects;
  row.note = note;
  failures_.push_back(std::move(row));
}

std::vector<CheckRow> InjectionRows::rows(const std::string& nothing) const {
  std::vector<CheckRow> rows;
  if (nearest_) {
    rows.push_back(*nearest_);
    rows.back().note =
        "nearest to failing of " + counted(count_, "injection") + " that pass";
  }
  rows.insert(rows.end(), failures_.begin(), failures_.end());
  if (!rows.empty()) return rows;
  rows.push_back(pattern_);
  rows.back().note = "not checked: " + nothing;
  return rows;
}

}  // namespace loqsmith
