#include "loqsmith/judgement/affected.hpp"

#include "loqsmith/judgement/calibration_sets.hpp"

namespace loqsmith {

bool is_prepared_role(Role role) {
  return ends_a_block(role) || role == Role::MethodBlank;
}

Affected whole_analyte(const FirstResults& first) {
  Affected affected;
  affected.words = "all results of the analyte";
  for (const ResultRow& row : first.results) {
    affected.injections.push_back(row.injection);
  }
  return affected;
}

Affected batch_of(const FirstResults& first, const Injection& injection) {
  Affected affected;
  affected.words = injection.prep.empty()
                       ? "all prepared injections without a batch"
                       : "batch " + injection.prep;
  for (const KnownResult& one : all_results(first)) {
    const Injection& member = one.injection();
    if (is_prepared_role(member.role) && member.prep == injection.prep) {
      affected.injections.push_back(member.number);
    }
  }
  return affected;
}

Affected sample_named(const std::string& name,
                      const std::vector<KnownResult>& results) {
  Affected affected;
  affected.words = "sample " + name;
  for (const KnownResult& one : results) {
    affected.injections.push_back(one.row->injection);
  }
  return affected;
}

void affect(CheckOutcome& outcome, const Affected& affected,
            const std::string& word, CheckAction action) {
  for (const int injection : affected.injections) {
    outcome.effects.push_back({injection, word, action});
  }
}

}  // namespace loqsmith
