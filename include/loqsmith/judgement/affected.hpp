#pragma once

#include <string>
#include <vector>

#include "loqsmith/judgement/known_results.hpp"

namespace loqsmith {

/// Whose results a failed check reaches, and how that is said in checks.csv.
struct Affected {
  std::vector<int> injections;  ///< in run order
  std::string words;
};

/// Whether an injection of this role went through a sample's preparation:
/// samples and what stands for them (see ends_a_block()), and method blanks.
bool is_prepared_role(Role role);

/// Every result of the analyte.
Affected whole_analyte(const FirstResults& first);

/// The preparation batch of an injection: what was prepared (samples, method
/// blanks, controls, fortified ones, duplicates, low spikes) under the same
/// `prep`. An empty one is a batch too: that of all prepared injections of the
/// night without a name.
Affected batch_of(const FirstResults& first, const Injection& injection);

/// The results of some injections, as those of the sample named.
Affected sample_named(const std::string& name,
                      const std::vector<KnownResult>& results);

/// One effect an injection.
void affect(CheckOutcome& outcome, const Affected& affected,
            const std::string& word, CheckAction action);

}  // namespace loqsmith
