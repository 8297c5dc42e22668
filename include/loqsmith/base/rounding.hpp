#pragma once

#include <string>

namespace loqsmith {

/// What happens to the digits that are dropped. Directions go by magnitude, so
/// a value and its negative print the same digits.
enum class RoundingRule {
  HalfEven,  ///< nearest; a tie to the even digit (ISO 80000-1 B, rule A)
  HalfUp,    ///< nearest; a tie away from zero (ISO 80000-1 B, rule B)
  Up,        ///< away from zero, unless nothing is dropped
  Down,      ///< towards zero
};

/// The value as plain decimal text with `decimals` (>= 0) digits after the
/// point. Trailing zeros are kept; there is no exponent, no locale and never a
/// "-0". Only for finite values.
///
/// What is rounded is the shortest decimal text that reads back as the same
/// double, for that is the number people saw: 2.675 with two decimals gives
/// 2.68, although the double lies below 2.675. It is rounded once, never in
/// steps.
///
/// Source: ISO 80000-1:2009, annex B; ASTM E29, rounding method; from memory.
std::string round_to_decimals(double value, int decimals, RoundingRule rule);

/// The same with `digits` (>= 1) significant digits: 99.95 with three gives
/// "100", 12350 gives "12400", 9.995 gives "10.0". Zero has no significant
/// digit and prints as "0".
std::string round_to_significant(double value, int digits, RoundingRule rule);

/// Weight of the last digit that round_to_significant() keeps, as a power of
/// ten, a carry included: 0.239754 with two digits gives -2 (0.24), 0.0996 also
/// -2 (0.10), 1540 gives 2 (1500). Only for values other than zero.
int place_of_last_digit(double value, int digits, RoundingRule rule);

/// The value rounded to a multiple of 10^place, which may lie before the point:
/// 1234.5 at place 1 gives "1230", at -2 "1234.50".
///
/// Use: a result beside its uncertainty, which is rounded first and gives the
/// place (JCGM 100:2008, 7.2.6; from memory).
std::string round_to_place(double value, int place, RoundingRule rule);

}  // namespace loqsmith
