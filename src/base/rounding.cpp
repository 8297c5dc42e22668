#include "loqsmith/base/rounding.hpp"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>
#include <cstddef>
#include <string_view>

namespace loqsmith {
namespace {

/// 0.d1d2d3... times 10^point; d1 is not '0' unless the number is zero.
struct Decimal {
  bool negative = false;
  std::string digits;
  int point = 0;
};

// Scientific form: the plain one prints large numbers with all their binary
// digits instead of the shortest ones.
Decimal shortest_decimal(double value) {
  std::array<char, 64> buffer{};
  const auto end =
      std::to_chars(buffer.data(), buffer.data() + buffer.size(),
                    std::abs(value), std::chars_format::scientific);
  const std::string_view text(buffer.data(), end.ptr);
  const std::size_t e = text.find('e');
  std::string_view exponent = text.substr(e + 1);
  if (exponent.front() == '+') exponent.remove_prefix(1);
  int power = 0;
  std::from_chars(exponent.data(), exponent.data() + exponent.size(), power);

  Decimal decimal{std::signbit(value), {}, power + 1};
  for (const char c : text.substr(0, e)) {
    if (c != '.') decimal.digits += c;
  }
  return decimal;
}

bool away_from_zero(std::string_view kept, std::string_view dropped,
                    RoundingRule rule) {
  const bool something =
      dropped.find_first_not_of('0') != std::string_view::npos;
  if (!something) return false;
  const bool tie =
      dropped.front() == '5' &&
      dropped.substr(1).find_first_not_of('0') == std::string_view::npos;
  const bool odd = !kept.empty() && (kept.back() - '0') % 2 != 0;
  switch (rule) {
    case RoundingRule::HalfEven:
      return tie ? odd : dropped.front() >= '5';
    case RoundingRule::HalfUp:
      return dropped.front() >= '5';
    case RoundingRule::Up:
      return true;
    case RoundingRule::Down:
      return false;
  }
  return false;
}

/// One more in the last place; a carry beyond the first digit lengthens it.
void add_one(Decimal& decimal) {
  for (auto digit = decimal.digits.rbegin(); digit != decimal.digits.rend();
       ++digit) {
    if (*digit != '9') {
      ++*digit;
      return;
    }
    *digit = '0';
  }
  decimal.digits.insert(decimal.digits.begin(), '1');
  ++decimal.point;
}

/// Keeps the first `count` digits (zero or negative: none of them, the place
/// that is kept lies before the first digit).
void keep_digits(Decimal& decimal, int count, RoundingRule rule) {
  const auto size = static_cast<int>(decimal.digits.size());
  if (count >= size) return;
  if (count < 0) {
    decimal.digits.insert(0, static_cast<std::size_t>(-count), '0');
    decimal.point -= count;
    count = 0;
  }
  const auto kept = static_cast<std::size_t>(count);
  const std::string dropped = decimal.digits.substr(kept);
  decimal.digits.resize(kept);
  if (away_from_zero(decimal.digits, dropped, rule)) add_one(decimal);
}

// The carry of 99.95 makes the number one digit longer: its place moves.
int keep_significant(Decimal& decimal, int digits, RoundingRule rule) {
  const int count = std::max(digits, 1);
  keep_digits(decimal, count, rule);
  return decimal.point - count;
}

std::string plain_text(const Decimal& decimal, int decimals) {
  std::string whole;
  std::string fraction;
  const auto size = static_cast<int>(decimal.digits.size());
  const auto digit = [&](int place) {
    return place >= 0 && place < size
               ? decimal.digits[static_cast<std::size_t>(place)]
               : '0';
  };
  for (int i = 0; i < decimal.point; ++i) whole += digit(i);
  for (int i = 0; i < decimals; ++i) fraction += digit(decimal.point + i);
  // "00" where a place before the point swallowed all digits.
  whole.erase(0, std::min(whole.find_first_not_of('0'), whole.size()));
  if (whole.empty()) whole = "0";

  const bool zero = whole.find_first_not_of('0') == std::string::npos &&
                    fraction.find_first_not_of('0') == std::string::npos;
  std::string text = decimal.negative && !zero ? "-" : "";
  text += whole;
  if (!fraction.empty()) text += '.' + fraction;
  return text;
}

}  // namespace

std::string round_to_place(double value, int place, RoundingRule rule) {
  Decimal decimal = shortest_decimal(value);
  keep_digits(decimal, decimal.point - place, rule);
  return plain_text(decimal, std::max(-place, 0));
}

std::string round_to_decimals(double value, int decimals, RoundingRule rule) {
  return round_to_place(value, -std::max(decimals, 0), rule);
}

int place_of_last_digit(double value, int digits, RoundingRule rule) {
  Decimal decimal = shortest_decimal(value);
  return keep_significant(decimal, digits, rule);
}

std::string round_to_significant(double value, int digits, RoundingRule rule) {
  if (value == 0.0) return "0";
  Decimal decimal = shortest_decimal(value);
  const int place = keep_significant(decimal, digits, rule);
  return plain_text(decimal, std::max(-place, 0));
}

}  // namespace loqsmith
