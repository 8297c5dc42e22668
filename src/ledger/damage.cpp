#include "loqsmith/ledger/damage.hpp"

#include "loqsmith/base/files.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/ledger/manifest.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

[[noreturn]] void halt_as_damaged(const Deviation& deviation) {
  throw Halt(ExitStatus::IoFailed,
             "OUT is damaged, nothing in it is changed: " + deviation.place +
                 ": " + deviation.what);
}

// A staging folder is complete when every file that the manifest names is there
// and nothing else is.
void check_staging(const fs::path& staging, const RunEvents& run) {
  if (!is_there(staging)) {
    halt_as_damaged({run.object,
                     "it was published, and neither its folder nor its staging "
                     "is there"});
  }
  const RunCheck check = check_run_folder(staging, run.object, run.manifest);
  if (!check.deviations.empty()) {
    const Deviation& first = check.deviations.front();
    halt_as_damaged({first.place,
                     "in OUT/.work, where the published run was "
                     "left: " +
                         first.what});
  }
  if (files_below(staging).size() != check.files.size() + 1) {
    halt_as_damaged({run.object,
                     "its staging holds files that its manifest does not "
                     "name"});
  }
}

}  // namespace

bool is_out_of_place(const OutLayout& layout, const RunEvents& run) {
  return run.published != 0 && !is_there(layout.out / run.object);
}

void halt_if_damaged(const OutLayout& layout, const Chain& chain,
                     const HeadCheck& head) {
  if (!chain.deviations.empty()) halt_as_damaged(chain.deviations.front());
  if (head.damage) halt_as_damaged(*head.damage);
  const RunHistory history = collect_runs(chain.lines);
  if (!history.deviations.empty()) halt_as_damaged(history.deviations.front());
  const SignerRegister signers = collect_signers(chain.lines);
  if (!signers.deviations().empty()) {
    halt_as_damaged(signers.deviations().front());
  }
  if (register_file(layout, signers) == RegisterFile::Damaged) {
    halt_as_damaged(
        {OutLayout::kSigners, "it is not what the ledger's lines make it"});
  }
  for (const RunEvents& run : history.runs) {
    if (is_out_of_place(layout, run)) {
      check_staging(layout.staging(run.begun), run);
    }
  }
}

}  // namespace loqsmith
