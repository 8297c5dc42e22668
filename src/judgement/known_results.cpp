#include "loqsmith/judgement/known_results.hpp"

#include <algorithm>
#include <utility>

namespace loqsmith {
namespace {

bool is_calibrated(const FirstResults& first, const std::string& name) {
  return std::any_of(first.sets.begin(), first.sets.end(),
                     [&](const CalibrationSet& set) {
                       return set.set == name && set.calibration.has_value();
                     });
}

const InjectionResponse* injection_of(const MeasuredAnalyte& night,
                                      int number) {
  const auto found =
      std::find_if(night.injections.begin(), night.injections.end(),
                   [&](const InjectionResponse& one) {
                     return one.injection->number == number;
                   });
  return found == night.injections.end() ? nullptr : &*found;
}

Outcome<double> number_or_why(const KnownResult& one,
                              const std::optional<double>& number) {
  if (!one.calibrated) return NotApplicable{"not checked: no calibration"};
  if (number) return *number;
  if (!one.measured->response) {
    return NotApplicable{one.measured->response.reason()};
  }
  return NotApplicable{"beyond-curve"};
}

}  // namespace

std::vector<KnownResult> all_results(const FirstResults& first) {
  std::vector<KnownResult> results;
  for (const ResultRow& row : first.results) {
    const InjectionResponse* measured =
        injection_of(first.night, row.injection);
    if (measured == nullptr) continue;
    results.push_back({&row, measured, is_calibrated(first, row.set)});
  }
  return results;
}

std::vector<KnownResult> results_of_roles(const FirstResults& first,
                                          std::initializer_list<Role> roles) {
  std::vector<KnownResult> results = all_results(first);
  std::erase_if(results, [&](const KnownResult& one) {
    return std::find(roles.begin(), roles.end(), one.row->role) == roles.end();
  });
  return results;
}

std::vector<KnownResult> with_known_amount(std::vector<KnownResult> results) {
  std::erase_if(results, [](const KnownResult& one) {
    return !one.measured->nominal || !(*one.measured->nominal > 0.0);
  });
  return results;
}

Outcome<double> found_in_sample(const KnownResult& one) {
  return number_or_why(one, one.row->result);
}

Outcome<double> found_in_vial(const KnownResult& one) {
  return number_or_why(one, one.row->vial_concentration);
}

bool above_range(const ResultRow& row) {
  return std::find(row.reasons.begin(), row.reasons.end(), "above-range") !=
         row.reasons.end();
}

CheckRow check_row(const std::string& check, const KnownResult& of,
                   CheckAction action) {
  CheckRow row;
  row.check = check;
  row.analyte = of.row->analyte;
  row.injection = of.row->injection;
  row.unit = "%";
  row.action = check_action_name(action);
  return row;
}

CheckRow unchecked_row(const std::string& check, const FirstResults& first,
                       CheckAction action, const std::string& why) {
  CheckRow row;
  row.check = check;
  row.analyte = first.night.settings->analyte;
  row.action = check_action_name(action);
  row.note = "not checked: " + why;
  return row;
}

void say_why_not(CheckRow& row, const std::string& reason) {
  row.note = reason;
  if (!reason.starts_with("not checked")) row.passed = false;
}

}  // namespace loqsmith
