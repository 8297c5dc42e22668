#pragma once

#include <optional>
#include <string>
#include <vector>

namespace loqsmith {

/// What one analyte's window of one trace gave. Every injection of every role
/// is measured over the same window, so the area of a clean blank is a signed
/// number around zero.
struct Peak {
  bool found = false;              ///< a peak was seen in the window
  double retention_minutes = 0.0;  ///< apex; the expected time if none found
  double start_minutes = 0.0;      ///< feet of the window
  double end_minutes = 0.0;
  double area = 0.0;    ///< signal unit x minute, above the baseline, signed
  double height = 0.0;  ///< signal unit, above the baseline, signed
  std::optional<double> template_response;  ///< signal unit x minute
  std::optional<double> width_half_minutes;
  std::optional<double> tailing;     ///< at 5 % of the height
  std::optional<double> asymmetry;   ///< at 10 % of the height
  std::optional<double> plates;      ///< from the width at half height
  std::optional<double> resolution;  ///< to the nearest neighbour
  std::optional<double> signal_to_noise;  ///< as the method's measure says
  std::optional<double> noise;            ///< as the method's measure says
  std::string noise_source;  ///< "blank 3", "same trace"; empty: none
  std::optional<double> response_noise;  ///< predicted sd at zero amount
  std::string baseline = "valley";
  /// "drop", "skim" or "model": how a neighbour that bounds the window was
  /// parted from it; empty where none does.
  std::string overlap;
  bool manual = false;
  std::vector<std::string> reasons;  ///< words that say what to be careful of
};

}  // namespace loqsmith
