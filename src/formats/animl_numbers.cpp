#include "loqsmith/formats/animl_numbers.hpp"

#include <array>
#include <charconv>
#include <cmath>
#include <cstdint>
#include <limits>
#include <string>
#include <system_error>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

// Source: AnIML core schema, draft 0.90 (ASTM E13.15), from memory. The schema
// does not tie the element to the type; a reader must.
constexpr std::array kTypes{
    AnimlType{"Int32", "I", NumberType::Int32},
    AnimlType{"Int64", "L", NumberType::Int64},
    AnimlType{"Float32", "F", NumberType::Float32},
    AnimlType{"Float64", "D", NumberType::Float64},
    AnimlType{"String", "S", std::nullopt},
    AnimlType{"Boolean", "Boolean", std::nullopt},
    AnimlType{"DateTime", "DateTime", std::nullopt},
    AnimlType{"EmbeddedXML", "EmbeddedXML", std::nullopt},
    AnimlType{"PNG", "PNG", std::nullopt},
    AnimlType{"SVG", "SVG", std::nullopt},
};

constexpr std::int64_t kLastExact = std::int64_t{1} << 53U;

NotApplicable no_number(std::string_view text) {
  return {"the value " + in_quotes(text) + ", no plain decimal number"};
}

Outcome<double> parse_integer(std::string_view text, std::int64_t least,
                              std::int64_t most) {
  const auto value = parse_whole(text);
  if (!value) {
    return NotApplicable{"the value " + in_quotes(text) + ", no whole number"};
  }
  if (*value < least || *value > most) {
    return NotApplicable{"the integer " + std::to_string(*value) +
                         ", beyond what is held exactly"};
  }
  return static_cast<double>(*value);
}

Outcome<double> parse_float32(std::string_view text) {
  float value = 0.0F;
  const char* const end = text.data() + text.size();
  const auto result = std::from_chars(text.data(), end, value);
  // Too small for a 32-bit number is zero, too large is nothing.
  if (result.ec == std::errc::result_out_of_range) {
    const auto wide = parse_number(text);
    if (wide && std::fabs(*wide) < 1.0) return static_cast<double>(0.0F);
    return no_number(text);
  }
  if (result.ec != std::errc{} || result.ptr != end) return no_number(text);
  return static_cast<double>(value);
}

}  // namespace

const AnimlType* animl_type(std::string_view name) {
  for (const AnimlType& type : kTypes) {
    if (type.name == name) return &type;
  }
  return nullptr;
}

Outcome<double> parse_animl_number(std::string_view text, NumberType type) {
  text = trim(text);
  switch (type) {
    case NumberType::Int32:
      return parse_integer(text, std::numeric_limits<std::int32_t>::min(),
                           std::numeric_limits<std::int32_t>::max());
    case NumberType::Int64:
      return parse_integer(text, -kLastExact, kLastExact);
    case NumberType::Float32: {
      if (!parse_number(text)) return no_number(text);
      return parse_float32(text);
    }
    case NumberType::Float64: {
      const auto value = parse_number(text);
      if (!value) return no_number(text);
      return *value;
    }
  }
  return no_number(text);
}

}  // namespace loqsmith
