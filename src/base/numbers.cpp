#include "loqsmith/base/numbers.hpp"

#include <array>
#include <charconv>
#include <cmath>

namespace loqsmith {
namespace {

// from_chars takes "inf" and "nan", and "1." or ".5" are left to it on purpose:
// XML Schema's double allows both.
bool starts_like_a_number(std::string_view text) {
  if (!text.empty() && text.front() == '-') text.remove_prefix(1);
  return !text.empty() &&
         (text.front() == '.' || (text.front() >= '0' && text.front() <= '9'));
}

}  // namespace

std::optional<double> parse_number(std::string_view text) {
  if (!starts_like_a_number(text)) return std::nullopt;
  double value = 0.0;
  const char* end = text.data() + text.size();
  const auto [stop, error] = std::from_chars(text.data(), end, value);
  if (error != std::errc{} || stop != end || !std::isfinite(value)) {
    return std::nullopt;
  }
  return value;
}

std::optional<std::int64_t> parse_whole(std::string_view text) {
  std::int64_t value = 0;
  const char* end = text.data() + text.size();
  const auto [stop, error] = std::from_chars(text.data(), end, value);
  if (error != std::errc{} || stop != end || text.empty()) return std::nullopt;
  return value;
}

std::string shortest(double value) {
  if (value == 0.0) return "0";
  std::array<char, 64> buffer{};
  const auto result =
      std::to_chars(buffer.data(), buffer.data() + buffer.size(), value);
  return {buffer.data(), result.ptr};
}

std::string shortest(const std::optional<double>& value) {
  return value ? shortest(*value) : std::string{};
}

}  // namespace loqsmith
