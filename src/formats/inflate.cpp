#include "loqsmith/formats/inflate.hpp"

#include <libdeflate.h>

#include <memory>
#include <new>

namespace loqsmith {
namespace {

using Decompressor = std::unique_ptr<libdeflate_decompressor,
                                     decltype(&libdeflate_free_decompressor)>;

// RFC 1950: method 8 in the low half of the first byte, and both bytes together
// a multiple of 31.
bool has_zlib_header(std::string_view bytes) {
  if (bytes.size() < 2) return false;
  const auto first = static_cast<unsigned char>(bytes[0]);
  const auto second = static_cast<unsigned char>(bytes[1]);
  return (first & 0xFU) == 8 && (first * 256U + second) % 31 == 0;
}

NotApplicable wrong_size(std::string_view relation, std::size_t wanted) {
  return {"a zlib stream of " + std::string(relation) + " than " +
          std::to_string(wanted) + " bytes"};
}

}  // namespace

Outcome<std::string> inflate_zlib(std::string_view compressed,
                                  std::size_t wanted) {
  if (!has_zlib_header(compressed)) {
    return NotApplicable{"data without a zlib header"};
  }
  if (wanted / kBestDeflateRatio > compressed.size()) {
    return NotApplicable{std::to_string(compressed.size()) +
                         " compressed bytes, which cannot hold " +
                         std::to_string(wanted)};
  }
  const Decompressor decompressor(libdeflate_alloc_decompressor(),
                                  &libdeflate_free_decompressor);
  if (!decompressor) throw std::bad_alloc();
  // One byte more, so that a longer stream shows itself.
  std::string bytes(wanted + 1, '\0');
  std::size_t used = 0;
  std::size_t made = 0;
  const libdeflate_result result = libdeflate_zlib_decompress_ex(
      decompressor.get(), compressed.data(), compressed.size(), bytes.data(),
      bytes.size(), &used, &made);
  if (result == LIBDEFLATE_INSUFFICIENT_SPACE) {
    return wrong_size("more", wanted);
  }
  if (result != LIBDEFLATE_SUCCESS) {
    return NotApplicable{"a damaged zlib stream"};
  }
  if (used != compressed.size()) {
    return NotApplicable{std::to_string(compressed.size() - used) +
                         " bytes behind the zlib stream"};
  }
  if (made != wanted) {
    return wrong_size(made < wanted ? "fewer" : "more", wanted);
  }
  bytes.resize(wanted);
  return bytes;
}

}  // namespace loqsmith
