#include "loqsmith/base/rounding.hpp"

#include <array>
#include <cmath>
#include <cstdint>
#include <cstdio>
#include <cstdlib>
#include <limits>
#include <random>

namespace loqsmith {
namespace {

constexpr auto kEven = RoundingRule::HalfEven;
constexpr auto kUp = RoundingRule::HalfUp;

struct NearestCase {
  double value;
  int places;
  const char* half_even;
  const char* half_up;
};

// ASTM E29 (rounding method) and ISO 80000-1:2009 annex B: half to even and
// half away from zero, ties looked for in the decimal text.
TEST(Rounding, TiesFollowTheDecimalText) {
  const std::array<NearestCase, 11> cases{{
      {2.675, 2, "2.68", "2.68"},
      {2.665, 2, "2.66", "2.67"},
      {0.125, 2, "0.12", "0.13"},
      {0.135, 2, "0.14", "0.14"},
      {1.005, 2, "1.00", "1.01"},
      {2.5, 0, "2", "3"},
      {3.5, 0, "4", "4"},
      {-2.5, 0, "-2", "-3"},
      {1234.5, 0, "1234", "1235"},
      {0.5, 0, "0", "1"},
      {-0.5, 0, "0", "-1"},
  }};
  for (const NearestCase& c : cases) {
    EXPECT_EQ(round_to_decimals(c.value, c.places, kEven), c.half_even);
    EXPECT_EQ(round_to_decimals(c.value, c.places, kUp), c.half_up);
  }
}

TEST(Rounding, SignificantDigitsCarryAndKeepZeros) {
  const std::array<NearestCase, 11> cases{{
      {0.0123450, 3, "0.0123", "0.0123"},
      {99.95, 3, "100", "100"},
      {99.85, 3, "99.8", "99.9"},
      {12350, 3, "12400", "12400"},
      {12450, 3, "12400", "12500"},
      {9.995, 3, "10.0", "10.0"},
      {0.00099950, 3, "0.00100", "0.00100"},
      {12, 3, "12.0", "12.0"},
      {-0.0995, 2, "-0.10", "-0.10"},
      {1e23, 3, "100000000000000000000000", "100000000000000000000000"},
      {5, 1, "5", "5"},
  }};
  for (const NearestCase& c : cases) {
    EXPECT_EQ(round_to_significant(c.value, c.places, kEven), c.half_even);
    EXPECT_EQ(round_to_significant(c.value, c.places, kUp), c.half_up);
  }
}

TEST(Rounding, UpAndDownGoByMagnitude) {
  constexpr auto up = RoundingRule::Up;
  constexpr auto down = RoundingRule::Down;
  EXPECT_EQ(round_to_significant(0.12, 3, up), "0.120");
  EXPECT_EQ(round_to_significant(0.1200001, 3, up), "0.121");
  EXPECT_EQ(round_to_significant(0.9991, 3, up), "1.00");
  EXPECT_EQ(round_to_significant(0.1209, 3, down), "0.120");
  EXPECT_EQ(round_to_decimals(0.0001, 2, up), "0.01");
  EXPECT_EQ(round_to_decimals(-0.0001, 2, up), "-0.01");
  EXPECT_EQ(round_to_decimals(-0.0099, 2, down), "0.00");
  EXPECT_EQ(round_to_decimals(999.999, 0, up), "1000");
  EXPECT_EQ(round_to_decimals(999.999, 0, down), "999");
}

TEST(Rounding, APlaceMayLieBeforeThePoint) {
  EXPECT_EQ(round_to_place(1234.5, 1, kEven), "1230");
  EXPECT_EQ(round_to_place(1234.5, -2, kEven), "1234.50");
  EXPECT_EQ(round_to_place(1250, 2, kEven), "1200");
  EXPECT_EQ(round_to_place(1250, 2, kUp), "1300");
  EXPECT_EQ(round_to_place(6, 1, kEven), "10");
  EXPECT_EQ(round_to_place(4, 1, kEven), "0");
  EXPECT_EQ(round_to_place(-4, 3, kEven), "0");
  EXPECT_EQ(round_to_place(4, 3, RoundingRule::Up), "1000");
  EXPECT_EQ(place_of_last_digit(0.239754, 2, kEven), -2);
  EXPECT_EQ(place_of_last_digit(0.0996, 2, kEven), -2);
  EXPECT_EQ(place_of_last_digit(0.2, 2, kEven), -2);
  EXPECT_EQ(place_of_last_digit(1540, 2, kEven), 2);
}

TEST(Rounding, ZeroNeverHasASign) {
  for (const double zero : {0.0, -0.0}) {
    EXPECT_EQ(round_to_decimals(zero, 2, kEven), "0.00");
    EXPECT_EQ(round_to_decimals(zero, 0, RoundingRule::Up), "0");
    EXPECT_EQ(round_to_significant(zero, 3, kEven), "0");
  }
  EXPECT_EQ(round_to_decimals(-0.004, 2, kEven), "0.00");
}

TEST(Rounding, ExtremesHaveNoExponent) {
  const double least = std::numeric_limits<double>::denorm_min();
  const std::string tiny = round_to_significant(least, 2, kEven);
  EXPECT_EQ(tiny, "0." + std::string(323, '0') + "50");
  const std::string huge =
      round_to_significant(std::numeric_limits<double>::max(), 2, kEven);
  EXPECT_EQ(huge, "18" + std::string(307, '0'));
}

// An independent twin: whole-number arithmetic on mantissa / 10^scale.
struct Exact {
  bool negative;
  std::uint64_t mantissa;
  int scale;
};

std::uint64_t power_of_ten(int n) {
  std::uint64_t power = 1;
  for (int i = 0; i < n; ++i) power *= 10;
  return power;
}

std::uint64_t divide(std::uint64_t n, std::uint64_t by, RoundingRule rule) {
  const std::uint64_t quotient = n / by;
  const std::uint64_t rest = n % by;
  if (rule == RoundingRule::Down || rest == 0) return quotient;
  if (rule == RoundingRule::Up) return quotient + 1;
  if (rest * 2 != by) return quotient + (rest * 2 > by ? 1 : 0);
  return quotient + (rule == kUp || quotient % 2 == 1 ? 1 : 0);
}

std::string exact_text(const Exact& exact, int places, RoundingRule rule) {
  std::string digits;
  if (exact.scale <= places) {
    digits = std::to_string(exact.mantissa);
    digits.append(static_cast<std::size_t>(places - exact.scale), '0');
  } else if (exact.scale - places > 18) {
    digits = rule == RoundingRule::Up && exact.mantissa > 0 ? "1" : "0";
  } else {
    digits = std::to_string(
        divide(exact.mantissa, power_of_ten(exact.scale - places), rule));
  }
  const auto wanted = static_cast<std::size_t>(places) + 1;
  if (digits.size() < wanted) digits.insert(0, wanted - digits.size(), '0');
  const bool zero = digits.find_first_not_of('0') == std::string::npos;
  if (places > 0) {
    digits.insert(digits.size() - static_cast<std::size_t>(places), ".");
  }
  // Cases with leading zeros from a whole number of zero mantissa.
  while (digits.size() > 1 && digits[0] == '0' && digits[1] != '.') {
    digits.erase(0, 1);
  }
  return (exact.negative && !zero ? "-" : "") + digits;
}

// The fewest digits that read back, found by trying.
Exact exact_of(double value) {
  std::array<char, 64> text{};
  for (int digits = 1; digits <= 17; ++digits) {
    std::snprintf(text.data(), text.size(), "%.*e", digits - 1,
                  std::abs(value));
    if (std::strtod(text.data(), nullptr) != std::abs(value)) continue;
    const std::string found(text.data());
    const std::size_t e = found.find('e');
    std::string mantissa = found.substr(0, e);
    if (digits > 1) mantissa.erase(1, 1);
    const int power = std::atoi(found.c_str() + e + 1);
    return {value < 0, std::strtoull(mantissa.c_str(), nullptr, 10),
            digits - 1 - power};
  }
  return {};
}

constexpr std::array kRules{RoundingRule::HalfEven, RoundingRule::HalfUp,
                            RoundingRule::Up, RoundingRule::Down};

TEST(Rounding, EqualsExactArithmeticOnShortDecimals) {
  std::mt19937_64 random(20240601);
  for (int i = 0; i < 300000; ++i) {
    // Few digits, so that a quarter of the cases are ties.
    const int scale = static_cast<int>(random() % 7);
    const std::uint64_t mantissa =
        random() % power_of_ten(1 + static_cast<int>(random() % 12));
    const Exact exact{random() % 2 == 0,
                      random() % 2 == 0 ? mantissa * 10 + 5 : mantissa, scale};
    const double value = static_cast<double>(exact.mantissa) /
                         static_cast<double>(power_of_ten(scale)) *
                         (exact.negative ? -1.0 : 1.0);
    const int places = static_cast<int>(random() % 7);
    const RoundingRule rule = kRules[random() % kRules.size()];
    ASSERT_EQ(round_to_decimals(value, places, rule),
              exact_text(exact, places, rule))
        << exact.mantissa << "e-" << scale;
  }
}

TEST(Rounding, EqualsExactArithmeticOnRandomDoubles) {
  std::mt19937_64 random(7);
  for (int i = 0; i < 60000; ++i) {
    const double unit = static_cast<double>(random() >> 11U) * 0x1p-53;
    const int power = static_cast<int>(random() % 16) - 9;
    const double value = (unit - 0.5) * std::pow(10.0, power);
    if (value == 0.0) continue;
    const int places = static_cast<int>(random() % 10);
    const RoundingRule rule = kRules[random() % kRules.size()];
    ASSERT_EQ(round_to_decimals(value, places, rule),
              exact_text(exact_of(value), places, rule))
        << value;
  }
}

TEST(Rounding, SignificantDigitsEqualTheDecimalsTheyMean) {
  std::mt19937_64 random(11);
  for (int i = 0; i < 60000; ++i) {
    const double unit = static_cast<double>(random() >> 11U) * 0x1p-53;
    const double value =
        (1.0 + 9.0 * unit) * std::pow(10.0, static_cast<int>(random() % 9) - 6);
    const int digits = 1 + static_cast<int>(random() % 6);
    const RoundingRule rule = kRules[random() % kRules.size()];
    const Exact exact = exact_of(value);
    const auto length = static_cast<int>(std::to_string(exact.mantissa).size());
    const int places = exact.scale - length + digits;  // of the last digit
    if (places < 0) continue;
    std::string wanted = exact_text(exact, places, rule);
    // A carry (9.99 to 10.00) shows one digit too many behind the point.
    const double carried = std::strtod(wanted.c_str(), nullptr);
    if (carried >= std::pow(10.0, length - exact.scale) * (1 - 1e-9)) {
      wanted = exact_text(exact, places > 0 ? places - 1 : 0, rule);
    }
    ASSERT_EQ(round_to_significant(value, digits, rule), wanted) << value;
  }
}

}  // namespace
}  // namespace loqsmith
