#include "loqsmith/limits/method_blank_limit.hpp"

#include <algorithm>
#include <cmath>
#include <vector>

#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kManyBlanks = 100;

Outcome<MethodBlankLimit> from_moments(const std::vector<double>& numbers,
                                       double confidence) {
  if (numbers.size() < 2)
    return NotApplicable{"few-blanks: 1 blank has no spread"};
  MethodBlankLimit limit;
  limit.n = numbers.size();
  limit.mean_found = mean(numbers);
  limit.mean = std::max(limit.mean_found, 0.0);
  limit.sd = standard_deviation(numbers);
  const double df = static_cast<double>(limit.n) - 1.0;
  limit.value = limit.mean + student_t_quantile(confidence, df) * limit.sd;
  return limit;
}

// Blanks without a number count and sort at the bottom.
Outcome<MethodBlankLimit> from_ranks(std::vector<double> numbers, std::size_t n,
                                     double confidence) {
  std::sort(numbers.begin(), numbers.end());
  MethodBlankLimit limit;
  limit.n = n;
  limit.rule = MethodBlankLimit::Rule::Highest;
  limit.value = numbers.back();
  if (n < kManyBlanks) return limit;
  limit.rule = MethodBlankLimit::Rule::Percentile;
  const auto rank = static_cast<std::size_t>(
      std::llround(confidence * static_cast<double>(n)));
  const std::size_t from_the_top = n - std::min(rank, n);
  if (from_the_top >= numbers.size())
    return NotApplicable{
        "blanks-without-number: so few gave one that the rule's rank falls on "
        "a blank without"};
  limit.value = numbers[numbers.size() - 1 - from_the_top];
  return limit;
}

}  // namespace

Outcome<MethodBlankLimit> method_blank_limit(
    std::span<const std::optional<double>> results, double confidence) {
  std::vector<double> numbers;
  for (const std::optional<double>& result : results)
    if (result) numbers.push_back(*result);
  if (numbers.empty())
    return NotApplicable{"blanks-without-number: the rule does not apply"};
  if (numbers.size() == results.size())
    return from_moments(numbers, confidence);
  return from_ranks(std::move(numbers), results.size(), confidence);
}

}  // namespace loqsmith
