#include "loqsmith/judgement/result_checks.hpp"

#include <utility>

#include "loqsmith/judgement/carry_over_check.hpp"
#include "loqsmith/judgement/control_check.hpp"
#include "loqsmith/judgement/duplicate_check.hpp"
#include "loqsmith/judgement/fortified_check.hpp"
#include "loqsmith/judgement/internal_standard_check.hpp"
#include "loqsmith/judgement/method_blank_check.hpp"
#include "loqsmith/judgement/retention_time_check.hpp"
#include "loqsmith/judgement/second_source_check.hpp"
#include "loqsmith/judgement/second_trace_check.hpp"
#include "loqsmith/judgement/solvent_blank_check.hpp"
#include "loqsmith/judgement/suitability_check.hpp"
#include "loqsmith/judgement/surrogate_check.hpp"

namespace loqsmith {

const std::vector<ResultCheck>& result_checks() {
  static const std::vector<ResultCheck> checks{
      // clang-format off
      check_second_source,
      check_solvent_blanks,
      check_method_blanks,
      check_controls,
      check_fortified,
      check_duplicates,
      check_surrogate,
      check_internal_standard,
      check_retention_times,
      check_suitability,
      check_carry_over,
      check_second_trace,
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
