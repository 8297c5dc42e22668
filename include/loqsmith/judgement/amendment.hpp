#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/calibration/settings.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// One row of amendments.csv: a person decides otherwise than the program.
struct Amendment {
  /// The words of the sheet.
  enum class What {
    ExcludeStandard,    ///< "exclude-standard": not in the fit, never teaches
    IntegrationBounds,  ///< "integration-bounds": feet set by hand
    InvalidInjection,   ///< "invalid-injection": none of its peaks counts
    CalibrationModel,   ///< "calibration-model": of one analyte
    OverrideStatus,     ///< "override-status": of one result
    Withdraw,           ///< "withdraw": an earlier row holds no longer
  };

  std::string when;  ///< RFC 3339 with zone
  std::string who;
  std::string why;  ///< at least two words
  What what = What::ExcludeStandard;
  std::optional<int> injection;  ///< nothing: the row means none
  std::string analyte;           ///< or internal standard; empty: all
  std::string value;             ///< as written
  std::size_t line = 0;          ///< of amendments.csv
  /// False where a later row replaced or withdrew it, and for withdrawals.
  bool in_force = true;

  // What `value` says, for the kinds that have one.
  double start_minutes = 0.0;
  double end_minutes = 0.0;
  CalibrationSettings calibration;  ///< `sets` means nothing
  /// Nothing: the model's intercept is the method's.
  std::optional<CalibrationSettings::Intercept> intercept;
  Status status = Status::Withheld;
  What withdrawn = What::Withdraw;
};

std::string amendment_name(Amendment::What what);
std::optional<Amendment::What> amendment_from_name(std::string_view name);
std::vector<std::string> amendment_names();

/// "exclude-standard, injection 7, atrazine": what a row is known by.
std::string describe(const Amendment& amendment);

/// True for two rows that say the same, wherever they stand.
bool is_same_row(const Amendment& a, const Amendment& b);

}  // namespace loqsmith
