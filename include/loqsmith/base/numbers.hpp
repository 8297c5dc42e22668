#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

namespace loqsmith {

/// A finite decimal number, read whole and without any locale: digits with an
/// optional leading '-', point and exponent. Nothing for "1,5", "+5", " 5",
/// "5 mg", "0x1p3", "nan", "inf", "1e999" and the empty text.
std::optional<double> parse_number(std::string_view text);

/// A whole number within 64 bits, same strictness.
std::optional<std::int64_t> parse_whole(std::string_view text);

/// The shortest decimal text that reads back as the same double; "0" for -0.0.
/// Only for finite values.
std::string shortest(double value);

/// Empty text for no value, otherwise shortest().
std::string shortest(const std::optional<double>& value);

}  // namespace loqsmith
