#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <utility>

#include "loqsmith/sheets/vocabulary.hpp"

namespace loqsmith {

/// What is wrong with a value.
struct ValueFault {
  std::string found;     ///< behind the value: ", not available in ..."
  std::string expected;  ///< "a number above 0"
  std::string mend;
};

/// Holds a value against its rule; nothing where it fits.
std::optional<ValueFault> check_value(const ValueRule& rule,
                                      std::string_view text);

/// What a rule allows in this version, in words.
std::string describe_values(const ValueRule& rule);

// The values of texts that passed the check. White space at the ends counts
// for nothing, as in XML Schema's numbers.
double number_of(std::string_view text);
int whole_of(std::string_view text);
std::pair<double, double> pair_of(std::string_view text);

}  // namespace loqsmith
