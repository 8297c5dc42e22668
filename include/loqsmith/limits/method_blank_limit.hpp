#pragma once

#include <cstddef>
#include <optional>
#include <span>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// What blanks alone say of the detection limit.
struct MethodBlankLimit {
  enum class Rule {
    Highest,       ///< some gave no number: the highest that did
    Percentile,    ///< the same, 100 blanks and more: a rank
    MeanAndSpread  ///< all gave one: mean + t s
  };
  Rule rule = Rule::MeanAndSpread;
  double value = 0.0;
  double mean = 0.0;  ///< as it was used: never below zero; MeanAndSpread only
  double mean_found = 0.0;  ///< signed; MeanAndSpread only
  double sd = 0.0;    ///< MeanAndSpread only
  std::size_t n = 0;
};

/// Detection limit of the method blanks, in the unit of their results:
///
///     all gave a number:   max(mean, 0) + t_{c, n-1} s
///     some did:            the highest; from 100 blanks on the one of rank
///                          round(c n), ascending, those without a number first
///
/// A number may be negative or below the limit. The document says "more than
/// 100" in one place and "100 or more" in another; here it is 100 or more.
/// Where all gave a number, ranks would be allowed too; they are not used.
///
/// @param results     nothing: the blank gave no number
/// @param confidence  c, above 0.5 and below 1: 0.99
/// @return not applicable: none gave a number, or so few that the rank falls on
///         one without ("blanks-without-number"); all did but there are fewer
///         than 2.
///
/// Source: US EPA 40 CFR 136 Appendix B, Revision 2 (2016), II 2 d; from
/// memory.
Outcome<MethodBlankLimit> method_blank_limit(
    std::span<const std::optional<double>> results, double confidence);

}  // namespace loqsmith
