#include "loqsmith/record/summaries.hpp"

#include <algorithm>

#include "loqsmith/judgement/summary_inputs.hpp"
#include "loqsmith/record/limit_text.hpp"

namespace loqsmith {

bool has_groups(const PublishedRun& run) {
  const std::vector<Injection>& all = run.sequence.injections;
  return std::any_of(all.begin(), all.end(), [](const Injection& one) {
    return one.role == Role::Sample && !one.group.empty();
  });
}

std::vector<SummaryRow> summaries_of(const PublishedRun& run) {
  std::vector<SummaryInput> inputs;
  for (const AnalyteJudgement& analyte : run.analytes) {
    const std::vector<SummaryInput> own =
        summary_inputs(analyte, run.sequence, run.method.units,
                       reporting_of(run.method, analyte.analyte));
    inputs.insert(inputs.end(), own.begin(), own.end());
  }
  return summarise_groups(inputs);
}

}  // namespace loqsmith
