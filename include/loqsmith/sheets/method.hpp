#pragma once

#include <map>
#include <optional>
#include <set>
#include <string>
#include <vector>

#include "loqsmith/chromatogram/trace_selector.hpp"
#include "loqsmith/judgement/settings.hpp"
#include "loqsmith/signal/manual_bounds.hpp"
#include "loqsmith/signal/settings.hpp"

namespace loqsmith {

/// A default that was used because the method leaves the attribute out.
struct DefaultUsed {
  std::string element;    ///< "integration", "analyte[atrazine]/calibration"
  std::string attribute;  ///< "baseline"
  std::string value;      ///< "valley"
};

struct InternalStandardSettings {
  TargetSettings target;
  double concentration = 0.0;  ///< in the undiluted vial, > 0
};

/// Everything the method says of one analyte: how it is measured and how it is
/// judged, its own settings already merged over the method's.
struct AnalyteSettings : AnalyteRules {
  TargetSettings target;
  /// The same peak in the second trace; there with `second_trace`.
  std::optional<TargetSettings> second_target;
};

/// What people decided about one target's peaks.
struct TargetDecisions {
  std::set<int> never_teach;           ///< injections
  std::map<int, ManualBounds> bounds;  ///< by injection
};

/// method.xml, whole and merged.
struct Method {
  std::string id;
  std::string revision;
  std::string title;
  UnitSettings units;
  std::string time_unit_if_none;  ///< "minute", "second", empty: refuse
  bool checksum_required = true;
  std::vector<TraceSelector> traces;
  std::vector<InternalStandardSettings> internal_standards;
  std::vector<AnalyteSettings> analytes;  ///< in the method's order
  std::vector<DefaultUsed> defaults_used;
  bool unsigned_amendments_accepted = false;
  /// Of analytes and internal standards, by id; none before amended().
  std::map<std::string, TargetDecisions> decisions = {};

  const TraceSelector* trace(const std::string& trace_id) const;
  const InternalStandardSettings* internal_standard(
      const std::string& standard_id) const;
};

}  // namespace loqsmith
