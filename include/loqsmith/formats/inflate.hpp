#pragma once

#include <cstddef>
#include <string>
#include <string_view>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Deflate cannot make data smaller than one 1032nd: a stored pair of bits
/// stands for at most 258 bytes (RFC 1951, section 3.2.5; ratio from memory).
inline constexpr std::size_t kBestDeflateRatio = 1032;

/// Undoes one zlib stream (RFC 1950: header, deflate, Adler-32) that must hold
/// exactly `wanted` bytes and fill `compressed` to its end. The reason why
/// there is no result says: no zlib header, damaged, ends early, bytes behind
/// the stream, more or fewer bytes than wanted, or more wanted than such a
/// stream can hold (found before any memory is taken).
Outcome<std::string> inflate_zlib(std::string_view compressed,
                                  std::size_t wanted);

}  // namespace loqsmith
