#pragma once

#include <cstddef>
#include <string_view>

#include "loqsmith/base/xml_scan.hpp"

namespace loqsmith {

/// line_column() for many places of one long text, each counted from a mark
/// that moves forward, so that a file with thousands of faults is not counted
/// from its beginning thousands of times.
class TextPlaces {
 public:
  explicit TextPlaces(std::string_view text) : text_(text) {}

  /// From now on most places lie at or behind `offset`. Costs nothing by
  /// itself.
  void pass(std::size_t offset) { next_mark_ = offset; }

  TextPlace at(std::size_t offset);

 private:
  std::string_view text_;
  std::size_t next_mark_ = 0;
  std::size_t mark_ = 0;
  TextPlace at_mark_;
};

}  // namespace loqsmith
