#pragma once

#include <string>
#include <vector>

namespace loqsmith::test {

/// What a pocket calculator makes of numbers, + - x / ( ) and sqrt( ).
/// Throws where the text is anything else.
double calculate(const std::string& expression);

/// The numbers of an expression in order; one in parentheses may be negative.
std::vector<double> numbers_in(const std::string& expression);

}  // namespace loqsmith::test
