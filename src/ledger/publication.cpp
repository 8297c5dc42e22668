#include "loqsmith/ledger/publication.hpp"

#include <algorithm>
#include <optional>
#include <thread>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/file_ops.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/manifest.hpp"
#include "loqsmith/ledger/method_seen.hpp"
#include "loqsmith/ledger/open_ledger.hpp"
#include "loqsmith/ledger/recovery.hpp"
#include "loqsmith/ledger/run_history.hpp"
#include "loqsmith/ledger/signatures.hpp"
#include "loqsmith/ledger/system_failures.hpp"

// Crash points of a publication, and what the next start makes of each.
//
//   line run-begun                 no staging: abandoned
//   staging-N, owner, its lock     owner not held: abandoned
//   files, manifest.json, flushes  the same
//   owner removed, flushed         staging without owner: nobody holds it, the
//                                  same. It goes before the line, so that from
//                                  the line on staging-N holds exactly what is
//                                  published, and nothing has to be taken away
//                                  from a published folder. The lock itself
//                                  lives on the open file; nobody looks for it
//                                  here, as whoever looks holds the ledger's.
//   line run-published             staging with that manifest: moved into place
//   SEQUENCE created               the same
//   rename                         done
//   flushes                        where the rename did not reach the disk, the
//                                  line and the staging did: moved into place

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using std::chrono::seconds;

// The ledger's lock is held for some file operations only: so short a wait is
// no reason to give up, least of all with a finished run in hand.
constexpr seconds kLeastPatience{2};
constexpr seconds kPatienceToPublish{60};

using Detail = std::vector<std::pair<std::string, std::string>>;
using Consider = std::function<void(const std::vector<RunEvents>&)>;

void refuse(const std::string& shown, const std::string& found,
            const std::string& expected, const std::string& mend) {
  InputProblem problem;
  problem.file = shown;
  problem.found = found;
  problem.expected = expected;
  problem.mend = mend;
  throw InputError(problem);
}

void check_name(const std::string& sequence) {
  const std::string why = unfit_sequence_name(sequence);
  if (why.empty()) return;
  refuse("", "the sequence name " + in_quotes(sequence) + ": " + why,
         "a name that can stand as a folder below OUT",
         "give another one with --as NAME");
}

// Where the folder lies, whichever way it was named.
std::string resolved(const std::string& folder) {
  return as_ledger_text(
      halt_on_failure([&] { return fs::weakly_canonical(folder).string(); }));
}

void check_folder(const RunHistory& history, const std::string& sequence,
                  const std::string& folder) {
  for (const RunEvents& run : history.runs) {
    if (run.sequence == sequence && run.abandoned == 0 &&
        run.folder != folder) {
      refuse(folder,
             "the sequence name " + in_quotes(sequence) +
                 ", already used for " + in_quotes(run.folder),
             "one name for one folder", "give another one with --as NAME");
    }
  }
}

const RunEvents* pending_run(const RunHistory& history,
                             const std::string& sequence) {
  for (const RunEvents& run : history.runs) {
    if (run.sequence == sequence && run.pending()) return &run;
  }
  return nullptr;
}

std::vector<RunEvents> published_runs(const RunHistory& history,
                                      const std::string& sequence) {
  std::vector<RunEvents> runs;
  for (const RunEvents& run : history.runs) {
    if (run.sequence == sequence && run.published != 0) runs.push_back(run);
  }
  return runs;
}

int next_number(const RunHistory& history, const std::string& sequence) {
  int number = 1;
  for (const RunEvents& run : history.runs) {
    if (run.sequence == sequence) number = std::max(number, run.number + 1);
  }
  return number;
}

// Looked at before a line announces the folder: a line that cannot be carried
// out would be damage.
void check_target(const OutLayout& layout, const std::string& run) {
  if (!unsafe_path(layout.out, run).empty()) {
    throw Halt(
        ExitStatus::IoFailed,
        "a symbolic link leads " + (layout.out / run).string() + " out of OUT");
  }
  if (is_there(layout.out / run)) {
    throw Halt(ExitStatus::IoFailed, (layout.out / run).string() +
                                         " is there, and the ledger does not "
                                         "know it");
  }
}

void append_all(std::vector<std::string>& to,
                const std::vector<std::string>& more) {
  for (const std::string& text : more) {
    if (std::find(to.begin(), to.end(), text) == to.end()) to.push_back(text);
  }
}

}  // namespace

struct RunAtWork::State {
  PublicationPlace place;
  OutLayout layout;
  std::string run;  // "well-water-0412/run-0001"
  int number = 0;
  LedgerPlace begun;
  fs::path staging;
  FileLock owner;
  std::vector<std::string> recovered;
  std::string signed_before;
  bool published = false;

  void begin(OpenLedger& ledger, const Detail& detail);
  void check_still_ours(const OpenLedger& ledger) const;
};

std::vector<std::string> recover(const PublicationPlace& place) {
  return halt_on_failure([&] {
    OpenLedger ledger(place, std::max(place.wait, kLeastPatience));
    recover_runs(ledger);
    return ledger.found();
  });
}

void RunAtWork::State::begin(OpenLedger& ledger, const Detail& detail) {
  check_target(layout, run);
  Detail all = detail;
  if (!signed_before.empty()) all.emplace_back("signed_before", signed_before);
  begun = ledger.append({"run-begun", run, "", "", all});
  staging = layout.staging(begun.number);
  if (!file_ops::make_folder(staging) ||
      !owner.try_lock(staging / OutLayout::kOwner)) {
    throw Halt(ExitStatus::IoFailed, staging.string() + " is there already");
  }
}

RunAtWork RunAtWork::begin(const PublicationPlace& place,
                           const std::string& sequence,
                           const std::string& folder, const Detail& detail,
                           const MethodSeen* method, const Consider& consider) {
  check_name(sequence);
  const auto deadline = std::chrono::steady_clock::now() + place.wait;
  auto state = std::make_unique<State>();
  state->place = place;
  state->layout = OutLayout{place.out};
  Detail all{{"folder", resolved(folder)}};
  all.insert(all.end(), detail.begin(), detail.end());
  while (true) {
    const bool begun = halt_on_failure([&] {
      OpenLedger ledger(place, std::max(place.wait, kLeastPatience));
      recover_runs(ledger);
      append_all(state->recovered, ledger.found());
      const RunHistory history = collect_runs(ledger.lines());
      check_folder(history, sequence, all.front().second);
      if (pending_run(history, sequence) != nullptr) return false;
      if (consider) consider(published_runs(history, sequence));
      state->number = next_number(history, sequence);
      state->run = sequence + '/' + run_folder_name(state->number);
      state->signed_before = describe_signed_runs(ledger.lines(), sequence);
      state->begin(ledger, all);
      if (method != nullptr) note_method(ledger, state->run, *method);
      return true;
    });
    if (begun) return RunAtWork(std::move(state));
    if (std::chrono::steady_clock::now() >= deadline) {
      throw Halt(ExitStatus::Locked, "the sequence " + in_quotes(sequence) +
                                         " is at work elsewhere");
    }
    std::this_thread::sleep_for(std::chrono::milliseconds(100));
  }
}

RunAtWork::RunAtWork(std::unique_ptr<State> state) : state_(std::move(state)) {}
RunAtWork::RunAtWork(RunAtWork&&) noexcept = default;
RunAtWork& RunAtWork::operator=(RunAtWork&&) noexcept = default;
RunAtWork::~RunAtWork() = default;

int RunAtWork::run_number() const { return state_->number; }
const LedgerPlace& RunAtWork::begun() const { return state_->begun; }
const fs::path& RunAtWork::staging() const { return state_->staging; }
const std::vector<std::string>& RunAtWork::recovered() const {
  return state_->recovered;
}

const std::string& RunAtWork::signed_before() const {
  return state_->signed_before;
}

// Somebody may have emptied OUT/.work, and a writer then recorded the run as
// abandoned.
void RunAtWork::State::check_still_ours(const OpenLedger& ledger) const {
  const RunHistory history = collect_runs(ledger.lines());
  const bool pending = std::any_of(
      history.runs.begin(), history.runs.end(), [&](const RunEvents& event) {
        return event.begun == begun.number && event.object == run &&
               event.pending();
      });
  if (!pending || published) {
    throw Halt(ExitStatus::IoFailed, run + " is not at work any more");
  }
}

fs::path RunAtWork::publish(const Detail& detail,
                            const SigningKey* machine_key) {
  State& state = *state_;
  halt_on_failure([&] {
    const std::string manifest =
        manifest_text(make_manifest(state.staging, state.run));
    write_new_file(state.staging / OutLayout::kManifest, manifest);
    flush_tree(state.staging);
    flush_folder(state.layout.work());

    OpenLedger ledger(state.place,
                      std::max(state.place.wait, kPatienceToPublish));
    recover_runs(ledger);
    append_all(state.recovered, ledger.found());
    state.check_still_ours(ledger);
    check_target(state.layout, state.run);
    remove_file(state.staging / OutLayout::kOwner);
    flush_folder(state.staging);
    Detail all = detail;
    if (machine_key != nullptr) {
      all.emplace_back("machine_key", machine_key->public_key());
    }
    ledger.append({"run-published", state.run, sha256_hex(manifest), "", all},
                  machine_key);
    state.published = true;
    move_into_place(state.layout, state.begun.number, state.run);
    state.owner.release();
  });
  return state.layout.out / state.run;
}

}  // namespace loqsmith
