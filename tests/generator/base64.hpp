#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace loqsmith::test {

/// RFC 4648 base64 with padding, on one line.
std::string base64_text(std::string_view bytes);

/// The numbers as packed little-endian IEEE 754.
std::string packed_doubles(const std::vector<double>& values);
std::string packed_floats(const std::vector<double>& values);

}  // namespace loqsmith::test
