#include "loqsmith/ledger/sign_run.hpp"

#include <algorithm>

#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/manifest.hpp"
#include "loqsmith/ledger/open_ledger.hpp"
#include "loqsmith/ledger/recovery.hpp"
#include "loqsmith/ledger/run_history.hpp"
#include "loqsmith/ledger/signers.hpp"
#include "loqsmith/ledger/system_failures.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

constexpr std::chrono::seconds kLeastPatience{2};

[[noreturn]] void refuse(const std::string& found, const std::string& expected,
                         const std::string& mend) {
  InputProblem problem;
  problem.found = found;
  problem.expected = expected;
  problem.mend = mend;
  throw InputError(problem);
}

void check_meaning(const SigningRequest& request) {
  const auto& meanings = signature_meanings();
  if (std::find(meanings.begin(), meanings.end(), request.meaning) ==
      meanings.end()) {
    refuse("the meaning " + in_quotes(request.meaning), join(meanings, ", "),
           "");
  }
  if (request.meaning == "rejected" && trim(request.reason).empty()) {
    refuse("a rejection without a reason", "what is wrong with the run",
           "say it with --reason");
  }
}

RunEvents published_run(const OpenLedger& ledger, const std::string& name) {
  for (const RunEvents& run : collect_runs(ledger.lines()).runs) {
    if (run.object == name && run.published != 0) return run;
  }
  refuse(in_quotes(name) + ", which was never published here",
         "the folder of a published run", "");
}

void check_unchanged(const OpenLedger& ledger, const RunEvents& run) {
  const RunCheck check = check_run_folder(ledger.layout().out / run.object,
                                          run.object, run.manifest);
  if (check.deviations.empty()) return;
  const Deviation& first = check.deviations.front();
  throw Halt(ExitStatus::IoFailed, "what has changed is not signed: " +
                                       first.place + ": " + first.what);
}

}  // namespace

RunSignature sign_run(const PublicationPlace& place,
                      const SigningRequest& request, const SigningKey& key) {
  check_meaning(request);
  return halt_on_failure([&] {
    OpenLedger ledger(place, std::max(place.wait, kLeastPatience));
    recover_runs(ledger);
    const RunEvents run = published_run(ledger, request.run);
    const SignerRegister signers = collect_signers(ledger.lines());
    const Signer* signer = signers.with_key(key.public_key());
    if (signer == nullptr) {
      refuse("a key that is registered for nobody", "a registered signer's key",
             "register it with loqsmith signers add");
    }
    check_unchanged(ledger, run);
    ledger.append({"signature",
                   run.object,
                   run.manifest,
                   request.reason,
                   {{"signer", signer->name}, {"meaning", request.meaning}}},
                  &key);
    return collect_signatures(ledger.lines()).back();
  });
}

RunPlace find_run_place(const fs::path& folder) {
  const fs::path real =
      halt_on_failure([&] { return fs::weakly_canonical(folder); });
  for (fs::path above = real.parent_path();; above = above.parent_path()) {
    if (fs::is_regular_file(OutLayout{above}.ledger())) {
      return {above, real.lexically_relative(above).generic_string()};
    }
    if (above == above.parent_path()) break;
  }
  refuse(in_quotes(folder.string()) + ", below no folder with a ledger",
         "a published run, OUT/SEQUENCE/run-N", "");
}

}  // namespace loqsmith
