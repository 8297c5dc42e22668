#pragma once

#include <map>
#include <optional>
#include <string>

#include "loqsmith/calibration/settings.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

/// What a failed check does to what it affects.
enum class CheckAction { Withhold, Flag };
std::string check_action_name(CheckAction action);

struct PercentRange {
  double low = 0.0;
  double high = 0.0;
};

/// `<calibration>` of `<acceptance>`. Absent limits are not checked.
struct CalibrationAcceptance {
  CheckAction action = CheckAction::Withhold;
  int minimum_levels = 5;
  std::optional<double> minimum_r2;
  std::optional<double> maximum_relative_standard_error;  ///< percent
  std::optional<double> back_calculation_percent;         ///< of nominal
  std::optional<double> back_calculation_lowest_percent;  ///< lowest level
  double minimum_accepted_percent = 75.0;                 ///< of the levels
};

struct CheckStandardAcceptance {
  /// Both: a failed one withholds back to the last passing one and forward to
  /// the next passing one. Forward: only what follows it.
  enum class Governs { Both, Forward };

  CheckAction action = CheckAction::Withhold;
  PercentRange recovery{85.0, 115.0};
  Governs governs = Governs::Both;
};

/// Tonight's limits by one procedure against the established ones.
struct EstablishedLimitAcceptance {
  CheckAction action = CheckAction::Flag;
  std::string procedure;   ///< one of `<limits>`, not "established"
  double ratio_low = 0.5;  ///< tonight's over established
  double ratio_high = 2.0;
};

/// Low spikes at the quantitation limit. All in percent.
struct ConfirmationAcceptance {
  CheckAction action = CheckAction::Flag;
  double maximum_rsd = 20.0;
  PercentRange recovery{80.0, 120.0};    ///< of their mean
  PercentRange prediction{50.0, 150.0};  ///< of one future result
};

/// `<acceptance>`: an absent child is not checked, and checks.csv says so.
struct AcceptanceSettings {
  std::optional<CalibrationAcceptance> calibration;
  std::optional<CheckStandardAcceptance> check_standard;
  std::optional<EstablishedLimitAcceptance> established_limit;
  std::optional<ConfirmationAcceptance> confirmation;
};

/// What may be said of a result.
enum class Status { NotDetected, Estimated, Reportable, AboveRange, Withheld };
std::string status_name(Status status);

/// `<reporting>` of the method.
struct ReportingSettings {
  enum class Rounding { HalfEven, HalfUp };
  enum class BelowDetection { Limit, Quantitation };
  enum class BelowQuantitation { Estimate, Limit };

  int significant_digits = 3;
  std::optional<int> decimals;  ///< instead of significant digits
  Rounding rounding = Rounding::HalfEven;
  BelowDetection below_detection = BelowDetection::Limit;
  BelowQuantitation below_quantitation = BelowQuantitation::Estimate;
  /// Nothing below it is printed, in the sample's unit. Set where an agreement
  /// or a regulation names one; a sample's own limit counts where it is larger.
  std::optional<double> reporting_limit;
  /// The method's expanded uncertainty (95 %) from its validation, percent of
  /// the result; printed beside results from the quantitation limit up.
  std::optional<double> relative_uncertainty;
  /// Qualifier letters that replace the trade's: status name to code.
  std::map<std::string, std::string> letters;
};

/// `<units>` of the method. result = vial x dilution x final_volume /
/// sample_amount x factor.
struct UnitSettings {
  std::string concentration;
  std::string result;
  double factor = 1.0;
  std::string sample_amount;  ///< empty: preparation columns are not used
  std::string final_volume;
};

/// What of a peak the response is.
enum class ResponseKind { Area, Height, Template };

/// Everything that judging one analyte needs of the method, the analyte's own
/// settings already merged over the method's.
struct AnalyteRules {
  std::string analyte;  ///< id
  ResponseKind response = ResponseKind::Area;
  bool bounds_own = false;       ///< integrated over the feet found
  bool baseline_biased = false;  ///< asymmetric least squares or snip
  NoiseMeasure noise_measure = NoiseMeasure::HalfPeakToPeak;
  std::string internal_standard;  ///< id; empty: external calibration
  CalibrationSettings calibration;
  LimitSettings limits;
  AcceptanceSettings acceptance;
  ReportingSettings reporting;
};

}  // namespace loqsmith
