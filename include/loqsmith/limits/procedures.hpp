#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith {

using LimitFunction = Outcome<LimitEstimate> (*)(const LimitEvidence&,
                                                 const LimitSettings&,
                                                 const ProcedureSettings&);

/// One row of the procedures' table.
struct LimitProcedure {
  std::string_view name;    ///< element of <limits>
  std::string_view source;  ///< document, clause, year
  bool experimental = false;
  LimitFunction compute = nullptr;  ///< null: not available in this version
};

/// All procedures of the method's vocabulary, in its order.
const std::vector<LimitProcedure>& limit_procedures();
const LimitProcedure* find_limit_procedure(std::string_view name);

}  // namespace loqsmith
