#include <array>
#include <cmath>
#include <cstdint>
#include <cstdio>
#include <cstdlib>
#include <random>
#include <string>

#include "loqsmith/base/rounding.hpp"

// Rounding against exact decimal arithmetic, a million values. The twin below
// shares nothing with the code: it works on decimals of any length as texts of
// digits, by comparing what is dropped with a half.

namespace loqsmith {
namespace {

constexpr std::array kRules{RoundingRule::HalfEven, RoundingRule::HalfUp,
                            RoundingRule::Up, RoundingRule::Down};

/// digits x 10^exponent, exactly; `digits` without leading zeros, or "0".
struct BigDecimal {
  bool negative = false;
  std::string digits;
  int exponent = 0;
};

std::string without_leading_zeros(const std::string& digits) {
  const std::size_t first = digits.find_first_not_of('0');
  return first == std::string::npos ? "0" : digits.substr(first);
}

std::string plus_one(std::string digits) {
  for (std::size_t i = digits.size(); i-- > 0;) {
    if (digits[i] < '9') {
      ++digits[i];
      return digits;
    }
    digits[i] = '0';
  }
  return '1' + digits;
}

/// -1, 0, 1: the dropped digits below, at, above half a unit of the kept place.
int against_half(const std::string& dropped) {
  const std::string half = '5' + std::string(dropped.size() - 1, '0');
  return dropped < half ? -1 : dropped == half ? 0 : 1;
}

/// The whole number of units of 10^place.
std::string whole_units(const BigDecimal& exact, int place, RoundingRule rule) {
  if (exact.exponent >= place) {
    const auto zeros = static_cast<std::size_t>(exact.exponent - place);
    return without_leading_zeros(exact.digits + std::string(zeros, '0'));
  }
  const auto drop = static_cast<std::size_t>(place - exact.exponent);
  std::string all = exact.digits;
  if (all.size() <= drop) all.insert(0, drop + 1 - all.size(), '0');
  const std::string kept =
      without_leading_zeros(all.substr(0, all.size() - drop));
  const std::string dropped = all.substr(all.size() - drop);
  const int half = against_half(dropped);
  const bool exactly = without_leading_zeros(dropped) == "0";
  bool more = false;
  switch (rule) {
    case RoundingRule::HalfEven:
      more = half > 0 || (half == 0 && (kept.back() - '0') % 2 == 1);
      break;
    case RoundingRule::HalfUp:
      more = half >= 0;
      break;
    case RoundingRule::Up:
      more = !exactly;
      break;
    case RoundingRule::Down:
      break;
  }
  return more ? plus_one(kept) : kept;
}

std::string written(const BigDecimal& exact, int place, RoundingRule rule) {
  std::string text = whole_units(exact, place, rule);
  const bool zero = text == "0";
  if (place > 0 && !zero) text.append(static_cast<std::size_t>(place), '0');
  if (place < 0) {
    const auto decimals = static_cast<std::size_t>(-place);
    if (text.size() <= decimals)
      text.insert(0, decimals + 1 - text.size(), '0');
    text.insert(text.size() - decimals, ".");
  }
  return (exact.negative && !zero ? "-" : "") + text;
}

/// With `count` significant digits; a carry lengthens the number, and then its
/// place is one further up.
std::string significant(const BigDecimal& exact, int count, RoundingRule rule) {
  if (exact.digits == "0") return "0";
  const int place =
      exact.exponent + static_cast<int>(exact.digits.size()) - count;
  const bool carried =
      static_cast<int>(whole_units(exact, place, rule).size()) > count;
  return written(exact, carried ? place + 1 : place, rule);
}

double double_of(const BigDecimal& exact) {
  const std::string text = (exact.negative ? "-" : "") + exact.digits + 'e' +
                           std::to_string(exact.exponent);
  return std::strtod(text.c_str(), nullptr);
}

/// Empty where all agree.
std::string difference(const BigDecimal& exact, std::mt19937_64& random) {
  const double value = double_of(exact);
  const RoundingRule rule = kRules[random() % kRules.size()];
  // Around the number's own digits, where something happens.
  const int place = exact.exponent + static_cast<int>(random() % 20) - 2;
  const int count = 1 + static_cast<int>(random() % 17);
  const int decimals = static_cast<int>(random() % 12);
  const std::array<std::array<std::string, 2>, 3> pairs{
      {{round_to_place(value, place, rule), written(exact, place, rule)},
       {round_to_significant(value, count, rule),
        significant(exact, count, rule)},
       {round_to_decimals(value, decimals, rule),
        written(exact, -decimals, rule)}}};
  for (const auto& [found, wanted] : pairs) {
    if (found == wanted) continue;
    return exact.digits + 'e' + std::to_string(exact.exponent) + ": " + found +
           ", wanted " + wanted;
  }
  return {};
}

// A double holds every decimal of at most 15 digits: it is the shortest one
// that reads back. Half of them end in 5, so that ties are common.
TEST(RoundingMillion, DecimalsOfUpToFifteenDigits) {
  std::mt19937_64 random(20260101);
  for (int i = 0; i < 800000; ++i) {
    BigDecimal exact;
    exact.negative = random() % 2 == 0;
    const std::size_t length = 1 + random() % 15;
    for (std::size_t k = 0; k < length; ++k) {
      // Nines in a row make carries.
      exact.digits +=
          random() % 3 == 0 ? '9' : static_cast<char>('0' + random() % 10);
    }
    if (random() % 2 == 0) exact.digits.back() = '5';
    exact.digits = without_leading_zeros(exact.digits);
    // Mostly figures of a laboratory, sometimes the ends of the range.
    exact.exponent = random() % 50 == 0 ? static_cast<int>(random() % 560) - 290
                                        : static_cast<int>(random() % 24) - 16;
    if (exact.digits == "0") exact.exponent = 0;
    ASSERT_EQ(difference(exact, random), "");
  }
}

/// The fewest digits that read back as the same double. Numbers that are no
/// power of two have their nearest decimal of that length as the shortest.
BigDecimal shortest_of(double value) {
  std::array<char, 64> text{};
  for (int digits = 15; digits <= 17; ++digits) {
    std::snprintf(text.data(), text.size(), "%.*e", digits - 1,
                  std::abs(value));
    if (std::strtod(text.data(), nullptr) == std::abs(value)) break;
  }
  const std::string found(text.data());
  const std::size_t e = found.find('e');
  BigDecimal exact{std::signbit(value), found.substr(0, e),
                   std::atoi(found.c_str() + e + 1)};
  exact.exponent -= static_cast<int>(exact.digits.size()) - 2;
  exact.digits.erase(1, 1);
  while (exact.digits.size() > 1 && exact.digits.back() == '0') {
    exact.digits.pop_back();
    ++exact.exponent;
  }
  return exact;
}

TEST(RoundingMillion, RandomDoubles) {
  std::mt19937_64 random(20260102);
  for (int i = 0; i < 200000; ++i) {
    const double unit = static_cast<double>((random() >> 11U) | 1U) * 0x1p-53;
    const int power = random() % 50 == 0
                          ? static_cast<int>(random() % 560) - 290
                          : static_cast<int>(random() % 16) - 9;
    const double value = (unit - 0.5) * std::pow(10.0, power);
    if (value == 0.0) continue;
    ASSERT_EQ(difference(shortest_of(value), random), "");
  }
}

}  // namespace
}  // namespace loqsmith
