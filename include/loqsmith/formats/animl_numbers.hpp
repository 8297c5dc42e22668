#pragma once

#include <optional>
#include <string_view>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/formats/binary_numbers.hpp"

namespace loqsmith {

/// A seriesType of AnIML.
struct AnimlType {
  std::string_view name;             ///< "Float64"
  std::string_view element;          ///< of one value: "D"
  std::optional<NumberType> number;  ///< nothing for types that are no number
};

/// nullptr for a word that is no type of AnIML.
const AnimlType* animl_type(std::string_view name);

/// One value as its element has it, exactly what the type can hold: a Float32
/// is the nearest 32-bit number. The reason why there is no result: not a plain
/// decimal number, outside the type's range, beyond +/- 2^53.
Outcome<double> parse_animl_number(std::string_view text, NumberType type);

}  // namespace loqsmith
