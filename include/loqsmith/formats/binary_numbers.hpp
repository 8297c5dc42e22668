#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// How a number is stored, always little-endian.
enum class NumberType { Float32, Float64, Int32, Int64 };

std::size_t width_of(NumberType type);  ///< bytes, 4 or 8
std::string number_type_name(NumberType type);

/// The numbers as doubles, each exactly. `bytes` must be a whole number of
/// widths. No result where an integer lies beyond +/- 2^53, the last one up to
/// which a double holds every integer.
Outcome<std::vector<double>> widen(std::string_view bytes, NumberType type);

}  // namespace loqsmith
