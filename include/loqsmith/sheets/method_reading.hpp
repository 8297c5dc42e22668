#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "loqsmith/sheets/method.hpp"
#include "loqsmith/sheets/method_tree.hpp"

namespace loqsmith {

/// What was made of method.xml: the document with its problems, and the method
/// where there are none. The other sheets are held against the document, so
/// that one mistake in it does not hide theirs.
struct MethodReading {
  MethodDocument document;
  std::optional<Method> method;
};

MethodReading read_method_sheet(std::string_view xml, const std::string& file);

}  // namespace loqsmith
