#pragma once

#include <optional>
#include <string>
#include <vector>

namespace loqsmith {

/// Which blank injections a procedure rests on.
enum class BlankKind { Solvent, Method, ZeroStandard, All };

/// One procedure of `<limits>` with its attributes; each has the default of
/// its own procedure. A field that a procedure does not have is not read.
struct ProcedureSettings {
  std::string name;                 ///< element name: "blank-deviation", ...
  std::optional<BlankKind> blanks;  ///< nothing: that of <limits>
  double detection_factor = 3.0;
  double quantitation_factor = 10.0;
  bool offset_blank_mean = false;      ///< blank-deviation
  std::optional<double> up_to = 10.0;  ///< times the lowest; nothing: all
  double detection_ratio = 3.0;        ///< signal-to-noise
  double quantitation_ratio = 10.0;
  double confidence = 0.99;  ///< spike-replicates
  double spike_ratio_low = 2.0;
  double spike_ratio_high = 10.0;
  double alpha = 0.05;
  double beta = 0.05;
  double k = 3.0;
  int replicates = 1;
  int blank_replicates = 0;
  bool variance_linear = false;      ///< critical-and-detectable
  bool way_blank = false;            ///< din-32645
  bool ranks = false;                ///< blank-and-low-level
  double relative_deviation = 0.10;  ///< two-component
  double acceptance_low = 80.0;      ///< accuracy-profile, percent
  double acceptance_high = 120.0;
  std::optional<double> detection;  ///< established, vial concentration
  std::optional<double> quantitation;
  std::string source;
};

/// `<limits>` of the method.
struct LimitSettings {
  enum class Decision { DetectionLimit, CriticalValue };

  /// "first", "established", "largest" or the name of a procedure.
  std::string governing = "first";
  Decision decision = Decision::DetectionLimit;
  bool floor_at_lowest_standard = true;
  BlankKind blanks = BlankKind::Solvent;
  int minimum_blanks = 7;
  std::vector<ProcedureSettings> procedures;
};

}  // namespace loqsmith
