#pragma once

#include <cstddef>
#include <string>
#include <string_view>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Bytes of a base64 text and how many characters it has, padding included,
/// white space not.
struct DecodedBase64 {
  std::string bytes;
  std::size_t characters = 0;
};

/// Base64 as RFC 4648 section 4 has it, with blanks, tabs and line ends
/// anywhere, as XML Schema allows. Nothing else is mended: a foreign character,
/// padding before the end, a length that is no multiple of four, or spare bits
/// that are not zero give the reason why there is no result.
Outcome<DecodedBase64> decode_base64(std::string_view text);

}  // namespace loqsmith
