#include "loqsmith/night/automatic_results.hpp"

#include <algorithm>
#include <utility>

#include "loqsmith/judgement/amended_results.hpp"
#include "loqsmith/night/judge_sequence.hpp"
#include "loqsmith/sheets/amendments_sheet.hpp"

namespace loqsmith {
namespace {

using What = Amendment::What;

// What is excluded or invalid does not teach, and feet set by hand are other
// feet: peaks then have to be measured again.
bool touches_peaks(const Amendment& amendment) {
  return amendment.in_force && amendment.what != What::CalibrationModel &&
         amendment.what != What::OverrideStatus;
}

std::vector<AnalyteJudgement> judge_again(const SequenceFolder& folder,
                                          const Measured& before,
                                          unsigned jobs) {
  Learned learned = learn_sequence(folder, jobs);
  // A file that has changed since is refused.
  for (const InputFile& input : before.inputs) {
    learned.hashes.insert_or_assign(input.path, input.sha256);
  }
  return judge_sequence(folder, learned,
                        measure_sequence(folder, learned, jobs, {}));
}

}  // namespace

SequenceFolder with_amendments(SequenceFolder folder) {
  folder.sheets.method =
      amended(std::move(folder.sheets.method), folder.sheets.amendments);
  return folder;
}

void mark_automatic_results(const SequenceFolder& folder,
                            const Learned& learned, const Measured& measured,
                            unsigned jobs,
                            std::vector<AnalyteJudgement>& amended) {
  const std::vector<Amendment>& amendments = folder.sheets.amendments;
  if (amendments.empty()) return;
  const bool again =
      std::any_of(amendments.begin(), amendments.end(), touches_peaks);
  const std::vector<AnalyteJudgement> automatic =
      again ? judge_again(folder, measured, jobs)
            : judge_sequence(folder, learned, measured);
  for (std::size_t i = 0; i < amended.size(); ++i) {
    mark_amended(amended[i].results, automatic[i].results, amendments,
                 folder.sheets.method.analytes[i].internal_standard);
  }
}

}  // namespace loqsmith
