#include "loqsmith/record/summaries.hpp"

#include <algorithm>

#include "loqsmith/judgement/summary_inputs.hpp"
#include "loqsmith/record/reportable.hpp"

namespace loqsmith {

bool has_groups(const PublishedRun& run) {
  const std::vector<Injection>& all = run.sequence.injections;
  return std::any_of(all.begin(), all.end(), [](const Injection& one) {
    return one.role == Role::Sample && !one.group.empty();
  });
}

std::vector<SummaryRow> summaries_of(const PublishedRun& run) {
  return summarise_groups(summary_inputs(reportable_of(run)));
}

}  // namespace loqsmith
