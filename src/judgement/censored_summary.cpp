#include "loqsmith/judgement/censored_summary.hpp"

#include <utility>

#include "loqsmith/judgement/lognormal_likelihood.hpp"
#include "loqsmith/judgement/order_statistics_regression.hpp"

namespace loqsmith {
namespace {

Outcome<CensoredEstimate> estimate_by(SummaryMethod method,
                                      std::span<const CensoredValue> values,
                                      const Outcome<ProductLimit>& steps) {
  switch (method) {
    case SummaryMethod::KaplanMeier:
      if (!steps) return NotApplicable{steps.reason()};
      return kaplan_meier_estimate(*steps);
    case SummaryMethod::OrderStatistics:
      return order_statistics_estimate(values);
    case SummaryMethod::Lognormal: {
      const Outcome<LognormalFit> fit = fit_lognormal(values);
      if (!fit) return NotApplicable{fit.reason()};
      return lognormal_estimate(*fit, values.size());
    }
  }
  return NotApplicable{"no such method"};
}

/// Why only the count is due; empty where more is.
std::string only_the_count(const CensoredCounts& counts) {
  const std::size_t censored = counts.below + counts.above;
  if (counts.measured == 0) return "nothing-measured";
  if (censored == 0) return {};
  if (static_cast<double>(censored) >
      kMostCensored * static_cast<double>(counts.all())) {
    return "too-many-censored";
  }
  return counts.measured < kLeastMeasuredForSummary ? "too-few-measured" : "";
}

std::pair<SummaryMethod, std::string> by_number_and_fraction(
    const CensoredCounts& counts) {
  if (counts.measured >= counts.below + counts.above) {
    return {SummaryMethod::KaplanMeier, "half-or-more-measured"};
  }
  if (counts.all() < kManyResults) {
    return {SummaryMethod::OrderStatistics, "most-censored-few"};
  }
  return {SummaryMethod::Lognormal, "most-censored-many"};
}

bool gives_mean(const CensoredSummary& summary, SummaryMethod method) {
  const auto& estimate =
      summary.methods[static_cast<std::size_t>(method)].estimate;
  return estimate && estimate->mean;
}

void advise(CensoredSummary& summary) {
  const auto [first, why] = by_number_and_fraction(summary.counts);
  if (gives_mean(summary, first)) {
    summary.advised = first;
    summary.advice = why;
    return;
  }
  for (const SummaryMethod other :
       {SummaryMethod::Lognormal, SummaryMethod::KaplanMeier,
        SummaryMethod::OrderStatistics}) {
    if (!gives_mean(summary, other)) continue;
    summary.advised = other;
    summary.advice = "instead-of-" + summary_method_name(first);
    return;
  }
  summary.advice = "no-method-gives-a-mean";
}

}  // namespace

std::string summary_method_name(SummaryMethod method) {
  switch (method) {
    case SummaryMethod::KaplanMeier:
      return "kaplan-meier";
    case SummaryMethod::OrderStatistics:
      return "order-statistics";
    case SummaryMethod::Lognormal:
      return "lognormal";
  }
  return {};
}

const CensoredEstimate* CensoredSummary::advised_estimate() const {
  if (!advised) return nullptr;
  return &*methods[static_cast<std::size_t>(*advised)].estimate;
}

CensoredSummary summarise_censored(std::span<const CensoredValue> values) {
  CensoredSummary summary;
  summary.counts = count_censored(values);
  summary.distribution = product_limit(values);
  summary.advice = only_the_count(summary.counts);
  if (!summary.advice.empty()) return summary;
  for (const SummaryMethod method :
       {SummaryMethod::KaplanMeier, SummaryMethod::OrderStatistics,
        SummaryMethod::Lognormal}) {
    summary.methods.push_back(
        {method, estimate_by(method, values, summary.distribution)});
  }
  advise(summary);
  return summary;
}

}  // namespace loqsmith
