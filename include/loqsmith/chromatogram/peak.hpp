#pragma once

#include <optional>
#include <string>
#include <vector>

namespace loqsmith {

/// What noise alone makes of responses where the baseline is estimated below a
/// stretch, by simulation; in the unit of the response.
struct BaselineBias {
  double blank = 0.0;        ///< mean response of a blank
  double blank_error = 0.0;  ///< standard error of that mean
  double blank_sd = 0.0;
  /// Mean response minus the true one of a peak 10 standard deviations of a
  /// point high, and its standard deviation.
  double low_peak = 0.0;
  double low_peak_sd = 0.0;
};

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
  /// Signal unit x minute; nothing where the response is not `template` or the
  /// area stands in for it.
  std::optional<double> template_response;
  bool shape_passed = false;  ///< the template fits: the analyte is identified
  bool area_instead = false;  ///< no template response here: `area` stands in
  std::optional<double> width_half_minutes;
  std::optional<double> tailing;          ///< at 5 % of the height
  std::optional<double> asymmetry;        ///< at 10 % of the height
  std::optional<double> plates;           ///< from the width at half height
  std::optional<double> resolution;       ///< to the nearest neighbour
  std::optional<double> capacity_factor;  ///< with the hold-up time
  std::optional<double> signal_to_noise;  ///< as the method's measure says
  std::optional<double> noise;            ///< as the method's measure says
  std::string noise_source;  ///< "blank 3", "same trace"; empty: none
  std::optional<double> response_noise;  ///< predicted sd at zero amount
  std::string response_noise_absent;     ///< why there is none: a word, words
  std::string baseline = "valley";
  /// Only with an estimated baseline, where the noise is known.
  std::optional<BaselineBias> baseline_bias;
  /// "drop", "skim" or "model": how a neighbour that bounds the window was
  /// parted from it; empty where none does.
  std::string overlap;
  bool manual = false;
  std::vector<std::string> reasons;  ///< words that say what to be careful of

  /// The apex lies in the window, or the template's shape test passed.
  bool identified() const { return found || shape_passed; }
};

}  // namespace loqsmith
