#include "loqsmith/judgement/result_checks.hpp"

#include <utility>

#include "loqsmith/judgement/control_check.hpp"
#include "loqsmith/judgement/duplicate_check.hpp"
#include "loqsmith/judgement/fortified_check.hpp"
#include "loqsmith/judgement/second_source_check.hpp"
#include "loqsmith/judgement/surrogate_check.hpp"

namespace loqsmith {

const std::vector<ResultCheck>& result_checks() {
  static const std::vector<ResultCheck> checks{
      // clang-format off
      check_second_source,
      check_controls,
      check_fortified,
      check_duplicates,
      check_surrogate,
      // clang-format on
  };
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
