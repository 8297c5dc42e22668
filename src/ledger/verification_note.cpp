#include "loqsmith/ledger/verification_note.hpp"

#include "loqsmith/base/files.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/ledger/open_ledger.hpp"
#include "loqsmith/ledger/recovery.hpp"
#include "loqsmith/ledger/system_failures.hpp"

namespace loqsmith {
namespace {

constexpr std::chrono::seconds kLeastPatience{2};

LedgerEntry entry_of(const VerifyRequest& request, const VerifyReport& report) {
  const std::size_t count = report.deviations.size();
  LedgerEntry entry;
  entry.action = "verification";
  entry.object = "ledger.jsonl";
  entry.reason = count == 0 ? "everything is as the ledger says"
                            : "something is not as the ledger says";
  entry.detail = {{"head", describe(report.head)},
                  {"runs", std::to_string(report.runs)},
                  {"files", std::to_string(report.files)},
                  {"since", request.since ? describe(*request.since) : ""},
                  {"inputs", request.inputs ? std::to_string(report.inputs)
                                            : "not asked for"},
                  {"deviations", std::to_string(count)}};
  if (count > 0) {
    const Deviation& first = report.deviations.front();
    entry.detail.emplace_back("first", first.place + ": " + first.what);
  }
  return entry;
}

}  // namespace

LedgerPlace note_verification(const PublicationPlace& place,
                              const VerifyRequest& request,
                              const VerifyReport& report) {
  return halt_on_failure([&] {
    if (!is_there(OutLayout{place.out}.ledger())) {
      throw Halt(ExitStatus::IoFailed,
                 place.out.string() + " has no ledger to note it in");
    }
    OpenLedger ledger(place, std::max(place.wait, kLeastPatience));
    recover_runs(ledger);
    return ledger.append(entry_of(request, report));
  });
}

}  // namespace loqsmith
