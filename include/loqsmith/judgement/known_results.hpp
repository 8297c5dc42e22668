#pragma once

#include <initializer_list>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

// What checks of samples that contain a known amount, or repeat another one,
// have in common.

/// A result with the injection that it was computed from.
struct KnownResult {
  const ResultRow* row = nullptr;
  const InjectionResponse* measured = nullptr;
  bool calibrated = false;  ///< its set has a curve

  const Injection& injection() const { return *measured->injection; }
};

/// All results, in run order.
std::vector<KnownResult> all_results(const FirstResults& first);

/// Those of the roles.
std::vector<KnownResult> results_of_roles(const FirstResults& first,
                                          std::initializer_list<Role> roles);

/// Those whose level states an amount of the analyte above zero.
std::vector<KnownResult> with_known_amount(std::vector<KnownResult> results);

/// The result in the sample. Not applicable, as a note for checks.csv: why the
/// response is missing; "beyond-curve"; "not checked: no calibration", for then
/// every result of the set is withheld already.
Outcome<double> found_in_sample(const KnownResult& one);

/// Likewise the concentration in the vial.
Outcome<double> found_in_vial(const KnownResult& one);

/// Whether the vial lies beyond the calibration's range: its number is an
/// extrapolation and no measure of anything.
bool above_range(const ResultRow& row);

/// A row of checks.csv about one injection, in percent, with nothing said yet.
CheckRow check_row(const std::string& check, const KnownResult& of,
                   CheckAction action);

/// A row about the analyte: "not checked: " and why.
CheckRow unchecked_row(const std::string& check, const FirstResults& first,
                       CheckAction action, const std::string& why);

/// No value: the check failed, unless the reason begins with "not checked".
void say_why_not(CheckRow& row, const std::string& reason);

}  // namespace loqsmith
