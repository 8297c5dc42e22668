#include <utility>

#include "loqsmith/judgement/sequence_checks.hpp"

namespace loqsmith {

CheckRow Findings::blank_row() const {
  CheckRow row;
  row.check = check_;
  row.action = check_action_name(CheckAction::Flag);
  return row;
}

void Findings::add(std::optional<int> injection, std::string note,
                   std::string affects) {
  CheckRow row = blank_row();
  row.injection = injection;
  row.passed = false;
  row.note = std::move(note);
  row.affects = std::move(affects);
  failed_.push_back(std::move(row));
}

void Findings::not_compared(const std::string& note) {
  CheckRow row = blank_row();
  row.note = "not checked: " + note;
  unchecked_.push_back(std::move(row));
}

std::vector<CheckRow> Findings::rows() const {
  std::vector<CheckRow> rows = failed_;
  if (failed_.empty() && unchecked_.empty()) {
    CheckRow row = blank_row();
    row.passed = true;
    rows.push_back(std::move(row));
  }
  rows.insert(rows.end(), unchecked_.begin(), unchecked_.end());
  return rows;
}

}  // namespace loqsmith
