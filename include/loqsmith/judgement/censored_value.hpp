#pragma once

#include <array>
#include <cstddef>
#include <optional>
#include <span>
#include <string>
#include <vector>

namespace loqsmith {

/// What is known of one result.
enum class Censoring {
  Measured,  ///< it is the value
  Below,     ///< it lies below the value, a limit ("< 0.12")
  Above,     ///< it lies above the value, the end of the range ("> 500")
};

struct CensoredValue {
  double value = 0.0;  ///< finite
  Censoring censoring = Censoring::Measured;
};

struct CensoredCounts {
  std::size_t measured = 0;
  std::size_t below = 0;
  std::size_t above = 0;

  std::size_t all() const { return measured + below + above; }
};
CensoredCounts count_censored(std::span<const CensoredValue> values);

/// The measured values in ascending order.
std::vector<double> measured_values(std::span<const CensoredValue> values);

/// Lower-tail probabilities whose percentiles a summary gives.
inline constexpr std::array<double, 6> kSummaryPercentiles = {0.10, 0.25, 0.50,
                                                              0.75, 0.90, 0.95};
inline constexpr std::size_t kMedianPlace = 2;  ///< of 0.50 among them

/// Confidence of the upper limit of the mean, one-sided.
inline constexpr double kUpperMeanConfidence = 0.95;

/// What one method says of a group of results, in their unit. A member without
/// value does not follow from the data; `notes` say why.
struct CensoredEstimate {
  std::optional<double> mean;
  std::optional<double> upper_mean;          ///< 95 % upper confidence limit
  std::optional<double> standard_error;      ///< of the mean
  std::optional<double> standard_deviation;  ///< of the values
  /// Of kSummaryPercentiles, in their order.
  std::array<std::optional<double>, kSummaryPercentiles.size()> percentiles;
  std::vector<std::string> notes;  ///< words

  std::optional<double> median() const { return percentiles[kMedianPlace]; }
};

}  // namespace loqsmith
