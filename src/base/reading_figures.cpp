#include "loqsmith/base/reading_figures.hpp"

#include <array>
#include <charconv>

namespace loqsmith {
namespace {

std::string digits(double value, int precision) {
  std::array<char, 64> buffer{};
  const auto end = std::to_chars(buffer.data(), buffer.data() + buffer.size(),
                                 value, std::chars_format::general, precision);
  return std::string(buffer.data(), end.ptr);
}

}  // namespace

std::string figure(double value) { return digits(value, 4); }

std::string percent_figure(double fraction) {
  return digits(100.0 * fraction, 2) + " %";
}

std::string counted(std::size_t count, const std::string& noun) {
  return std::to_string(count) + " " + noun + (count == 1 ? "" : "s");
}

}  // namespace loqsmith
