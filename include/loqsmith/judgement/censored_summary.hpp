#pragma once

#include <optional>
#include <span>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/censored_value.hpp"
#include "loqsmith/judgement/kaplan_meier.hpp"

namespace loqsmith {

enum class SummaryMethod { KaplanMeier, OrderStatistics, Lognormal };

/// "kaplan-meier", "order-statistics", "lognormal".
std::string summary_method_name(SummaryMethod method);

struct MethodSummary {
  SummaryMethod method = SummaryMethod::KaplanMeier;
  Outcome<CensoredEstimate> estimate = NotApplicable{"not computed"};
};

/// A group of results, of which some are only known to lie below a limit or
/// above the range. Nothing is ever put in the place of such a result.
struct CensoredSummary {
  CensoredCounts counts;
  /// Each method, in the order of the enum; empty where only the count is due.
  std::vector<MethodSummary> methods;
  /// Which one fits the number and the fraction at hand.
  std::optional<SummaryMethod> advised;
  std::string advice;  ///< why, one word: "half-or-more-measured", ...
  Outcome<ProductLimit> distribution = NotApplicable{"no results"};

  /// The advised one's; nothing where none is.
  const CensoredEstimate* advised_estimate() const;
};

/// More than this fraction censored: nothing but the count.
inline constexpr double kMostCensored = 0.80;
/// Fewer measured values among censored ones: nothing but the count.
inline constexpr std::size_t kLeastMeasuredForSummary = 5;
/// From so many results on the likelihood bears over half of them censored.
inline constexpr std::size_t kManyResults = 50;

/// All methods, and the one advised:
///
/// - over 80 % censored, or some censored and fewer than 5 measured: none, only
///   the count ("too-many-censored", "too-few-measured");
/// - at most half censored: Kaplan-Meier, which assumes no shape
///   ("half-or-more-measured");
/// - more: with fewer than 50 results regression on order statistics
///   ("most-censored-few"), from 50 on maximum likelihood
///   ("most-censored-many").
///
/// Where that one gives no mean (results above the range at the top), the first
/// of the others that does, maximum likelihood before the rest: "instead-of-"
/// and the method stands in `advice`.
///
/// Source: D. R. Helsel, Statistics for Censored Environmental Data, 2nd
/// edition (2012), recommendations by number and fraction; from memory.
CensoredSummary summarise_censored(std::span<const CensoredValue> values);

}  // namespace loqsmith
