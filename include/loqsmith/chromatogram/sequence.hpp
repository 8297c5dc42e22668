#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/role.hpp"

namespace loqsmith {

/// One row of the sequence sheet.
struct Injection {
  int number = 0;      ///< run order, from 1, unique
  std::string file;    ///< relative to the folder, with '/' between parts
  std::string run;     ///< run or experiment step within the file; may be empty
  std::string sample;  ///< name as it shall be reported
  Role role = Role::Sample;
  std::string level;      ///< empty where the role contains no known amount
  double dilution = 1.0;  ///< factor by which the vial was diluted, > 0
  double internal_standard_dilution = 1.0;  ///< same, after its addition
  std::optional<double> sample_amount;      ///< in the method's unit, > 0
  std::optional<double> final_volume;       ///< in the method's unit, > 0
  std::string parent;
  std::string prep;
  std::string group;
  std::string acquired;  ///< RFC 3339, as written; empty: not stated
  std::size_t line = 0;  ///< of sequence.csv
};

/// One row of levels.csv.
struct LevelEntry {
  std::string level;
  std::string analyte;
  double concentration = 0.0;  ///< in the method's unit, >= 0
  std::string lot;
  std::string expires;  ///< RFC 3339 date or time; empty: not stated
  std::size_t line = 0;
};

/// One night's run.
struct Sequence {
  std::string name;
  std::vector<Injection> injections;  ///< in run order
  std::vector<LevelEntry> levels;

  /// What the level states for the analyte; nothing when it is not in it.
  const LevelEntry* level_entry(std::string_view level,
                                std::string_view analyte) const;
};

}  // namespace loqsmith
