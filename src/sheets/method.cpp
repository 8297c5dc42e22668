#include "loqsmith/sheets/method.hpp"

namespace loqsmith {

const TraceSelector* Method::trace(const std::string& trace_id) const {
  for (const TraceSelector& selector : traces) {
    if (selector.id == trace_id) return &selector;
  }
  return nullptr;
}

const InternalStandardSettings* Method::internal_standard(
    const std::string& standard_id) const {
  for (const InternalStandardSettings& standard : internal_standards) {
    if (standard.target.id == standard_id) return &standard;
  }
  return nullptr;
}

}  // namespace loqsmith
