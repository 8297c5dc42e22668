#include "loqsmith/judgement/result_checks.hpp"

#include <utility>

namespace loqsmith {

const std::vector<ResultCheck>& result_checks() {
  static const std::vector<ResultCheck> checks{};
  return checks;
}

CheckOutcome check_results(const FirstResults& first) {
  CheckOutcome all;
  for (const ResultCheck check : result_checks()) {
    CheckOutcome one = check(first);
    for (CheckRow& row : one.rows) all.rows.push_back(std::move(row));
    for (CheckEffect& effect : one.effects) {
      all.effects.push_back(std::move(effect));
    }
  }
  return all;
}

}  // namespace loqsmith
