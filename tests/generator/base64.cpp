#include "generator/base64.hpp"

#include <bit>
#include <cstddef>
#include <cstdint>

namespace loqsmith::test {
namespace {

constexpr std::string_view kDigits =
    "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";

void append_little_endian(std::string& out, std::uint64_t bits, int width) {
  for (int i = 0; i < width; ++i) {
    out += static_cast<char>(bits >> (8 * i) & 0xFFU);
  }
}

}  // namespace

std::string base64_text(std::string_view bytes) {
  std::string out;
  for (std::size_t i = 0; i < bytes.size(); i += 3) {
    std::uint32_t group = 0;
    for (std::size_t k = 0; k < 3; ++k) {
      const bool there = i + k < bytes.size();
      group =
          group << 8U | (there ? static_cast<unsigned char>(bytes[i + k]) : 0U);
    }
    for (std::size_t k = 0; k < 4; ++k) {
      const bool there = i + k <= bytes.size();
      out += there ? kDigits[group >> (18 - 6 * k) & 63U] : '=';
    }
  }
  return out;
}

std::string packed_doubles(const std::vector<double>& values) {
  std::string out;
  for (const double value : values) {
    append_little_endian(out, std::bit_cast<std::uint64_t>(value), 8);
  }
  return out;
}

std::string packed_floats(const std::vector<double>& values) {
  std::string out;
  for (const double value : values) {
    append_little_endian(
        out, std::bit_cast<std::uint32_t>(static_cast<float>(value)), 4);
  }
  return out;
}

}  // namespace loqsmith::test
