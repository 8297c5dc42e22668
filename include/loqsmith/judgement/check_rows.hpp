#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/judgement/result_checks.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// A row of a check of the analyte that says nothing yet.
CheckRow row_of_check(const std::string& check, const FirstResults& first,
                      CheckAction action);

/// One row that says why a check was not made.
CheckOutcome not_checked(CheckRow row, const std::string& why);

/// Appends what another check, or the same one of another set, says.
void append(CheckOutcome& all, CheckOutcome more);

/// Names the calibration set in a row, where the analyte has others.
void name_set(CheckRow& row, const CalibrationSet& set);

/// Whether a result says that something is there: a number that is not below
/// the detection limit (where none governs, any), or a response beyond the
/// curve. Of an injection that gave no number nothing is said.
bool is_detected(const ResultRow& result);

/// Rows of a check that looks at every injection: one for each failure, and
/// one for all that passed, which names the one nearest to failing.
class InjectionRows {
 public:
  /// @param pattern  what all rows have in common
  explicit InjectionRows(CheckRow pattern) : pattern_(std::move(pattern)) {}

  /// @param distance  from the ideal, of those that pass
  void passed(int injection, double value, double distance);
  void failed(int injection, std::optional<double> value,
              const std::string& affects, const std::string& note = {});

  /// In run order, what passed first; where nothing was looked at one row that
  /// was not checked, with `nothing` as the reason.
  std::vector<CheckRow> rows(const std::string& nothing) const;

 private:
  CheckRow pattern_;
  std::optional<CheckRow> nearest_;
  double distance_ = 0.0;
  std::size_t count_ = 0;
  std::vector<CheckRow> failures_;
};

}  // namespace loqsmith
