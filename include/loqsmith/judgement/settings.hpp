#pragma once

#include <map>
#include <optional>
#include <set>
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

/// What is recovered of a known amount, percent.
struct RecoveryAcceptance {
  CheckAction action = CheckAction::Withhold;
  PercentRange recovery{};
};

/// Fortified samples. What is absent is not judged.
struct FortifiedAcceptance {
  CheckAction action = CheckAction::Flag;
  std::optional<PercentRange> recovery;
  std::optional<double> relative_difference;  ///< percent
  double native_ratio = 4.0;  ///< largest native over added amount
};

struct DuplicateAcceptance {
  CheckAction action = CheckAction::Flag;
  double relative_difference = 0.0;  ///< percent, largest
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

/// The most that a blank may contain. A blank at the limit reaches it and
/// fails; a number is itself allowed.
struct BlankMaximum {
  enum class Kind { DetectionLimit, QuantitationLimit, Number };
  Kind kind = Kind::DetectionLimit;
  double number = 0.0;  ///< in the unit of the blank's own result
};

struct SolventBlankAcceptance {
  CheckAction action = CheckAction::Flag;
  BlankMaximum maximum;
};

struct MethodBlankAcceptance {
  CheckAction action = CheckAction::Flag;
  BlankMaximum maximum;
  /// Results above this many times the blank's are not affected.
  double sample_ratio = 10.0;
};

struct InternalStandardAcceptance {
  CheckAction action = CheckAction::Withhold;
  PercentRange area{50.0, 200.0};  ///< of the calibration's mean
};

struct RetentionTimeAcceptance {
  CheckAction action = CheckAction::Flag;
  double shift_minutes = 0.0;  ///< largest, either way, > 0
};

/// Peaks of the standards. Absent limits are not checked.
struct SuitabilityAcceptance {
  CheckAction action = CheckAction::Flag;
  std::optional<double> maximum_tailing;
  std::optional<double> minimum_plates;
  std::optional<double> minimum_resolution;
  std::optional<double> maximum_area_rsd;  ///< percent, see repeatability.hpp
  std::optional<double> minimum_signal_to_noise;
};

struct CarryOverAcceptance {
  CheckAction action = CheckAction::Flag;
  double maximum_percent = 20.0;  ///< of the lowest standard's response
};

/// Repeat injections and dilutions of one sample.
struct ClosenessAcceptance {
  CheckAction action = CheckAction::Withhold;
  double replicates = 20.0;  ///< largest difference in range, percent
};

struct SecondTraceAcceptance {
  CheckAction action = CheckAction::Withhold;
};

/// `<second-trace>` of an analyte.
struct SecondTraceRule {
  double ratio = 0.0;              ///< second over first response, > 0
  double tolerance_percent = 0.0;  ///< of the ratio, > 0
};

/// `<acceptance>`: an absent child is not checked, and checks.csv says so.
struct AcceptanceSettings {
  std::optional<CalibrationAcceptance> calibration;
  std::optional<RecoveryAcceptance> second_source;
  std::optional<CheckStandardAcceptance> check_standard;
  std::optional<RecoveryAcceptance> control;
  std::optional<FortifiedAcceptance> fortified;
  std::optional<DuplicateAcceptance> duplicate;
  std::optional<RecoveryAcceptance> surrogate;
  std::optional<SolventBlankAcceptance> solvent_blank;
  std::optional<MethodBlankAcceptance> method_blank;
  std::optional<InternalStandardAcceptance> internal_standard;
  std::optional<SecondTraceAcceptance> second_trace;
  std::optional<RetentionTimeAcceptance> retention_time;
  std::optional<SuitabilityAcceptance> suitability;
  std::optional<CarryOverAcceptance> carry_over;
  std::optional<EstablishedLimitAcceptance> established_limit;
  std::optional<ConfirmationAcceptance> confirmation;
  std::optional<ClosenessAcceptance> closeness;
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

/// What people decided about one analyte's results, otherwise than the method
/// and the program would have. By injection.
struct ManualDecisions {
  std::set<int> excluded_standards;  ///< not in the fit
  std::set<int> invalid_injections;  ///< as if they had not been measured
  std::map<int, Status> statuses;
};

/// Everything that judging one analyte needs of the method, the analyte's own
/// settings already merged over the method's.
struct AnalyteRules {
  std::string analyte;  ///< id
  ResponseKind response = ResponseKind::Area;
  bool bounds_own = false;       ///< integrated over the feet found
  bool baseline_biased = false;  ///< asymmetric least squares or snip
  NoiseMeasure noise_measure = NoiseMeasure::HalfPeakToPeak;
  std::string internal_standard;  ///< id; empty: external calibration
  std::optional<SecondTraceRule> second_trace;
  /// Makes it a surrogate: added to every prepared vial, this concentration in
  /// the undiluted one.
  std::optional<double> surrogate_concentration;
  CalibrationSettings calibration;
  LimitSettings limits;
  AcceptanceSettings acceptance;
  ReportingSettings reporting;
  ManualDecisions decisions = {};
};

}  // namespace loqsmith
