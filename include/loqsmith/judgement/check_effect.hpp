#pragma once

#include <string>

#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// What a failed check does to one injection's result.
struct CheckEffect {
  int injection = 0;
  std::string word;  ///< reason, "control-failed"
  CheckAction action = CheckAction::Flag;
  /// Every analyte's result of that injection, not only this one's.
  bool whole_injection = false;
};

}  // namespace loqsmith
