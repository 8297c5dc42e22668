#include "loqsmith/ledger/recovery.hpp"

#include <algorithm>
#include <map>

#include "loqsmith/ledger/damage.hpp"
#include "loqsmith/ledger/run_history.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

// True where the program that made the staging folder still runs.
bool is_held(const fs::path& staging) {
  const fs::path owner = staging / OutLayout::kOwner;
  if (!is_there(owner)) return false;
  FileLock lock;
  return !lock.try_lock(owner);
}

bool recovery_told(const OpenLedger& ledger, const std::string& object) {
  return std::any_of(ledger.lines().begin(), ledger.lines().end(),
                     [&](const LedgerLine& line) {
                       return line.action == "recovery" &&
                              line.object == object;
                     });
}

void finish_published(OpenLedger& ledger, const RunEvents& run) {
  if (!recovery_told(ledger, run.object)) {
    ledger.append({"recovery",
                   run.object,
                   run.manifest,
                   "published run moved into place",
                   {}});
  }
  move_into_place(ledger.layout(), run.begun, run.object);
  ledger.say(run.object + " was published but not in place yet: moved there");
}

void abandon(OpenLedger& ledger, const RunEvents& run) {
  if (is_held(ledger.layout().staging(run.begun))) return;
  ledger.append({"run-abandoned",
                 run.object,
                 "",
                 "begun, not published, and nobody holds its staging",
                 {}});
  ledger.say(run.object +
             " was begun and not finished: recorded as abandoned, its number "
             "is not used again");
}

std::map<std::uint64_t, fs::path> staging_folders(const OutLayout& layout) {
  std::map<std::uint64_t, fs::path> folders;
  for (const auto& entry : fs::directory_iterator(layout.work())) {
    const auto number =
        OutLayout::staging_number(entry.path().filename().string());
    if (number) folders[*number] = entry.path();
  }
  return folders;
}

void remove_leftovers(OpenLedger& ledger) {
  auto folders = staging_folders(ledger.layout());
  for (const RunEvents& run : collect_runs(ledger.lines()).runs) {
    if (run.pending()) folders.erase(run.begun);
  }
  for (const auto& [number, path] : folders) {
    if (is_held(path)) continue;
    remove_tree(path);
    ledger.say("what was left of " + path.filename().string() +
               " in OUT/.work was removed");
  }
}

// As the head is: what it must hold stands in the ledger.
void renew_register(OpenLedger& ledger) {
  const SignerRegister signers = collect_signers(ledger.lines());
  if (register_file(ledger.layout(), signers) != RegisterFile::OneBehind) {
    return;
  }
  replace_file(ledger.layout().signers(), *signers.text());
  ledger.say("signers.jsonl was one change behind: renewed");
}

}  // namespace

void recover_runs(OpenLedger& ledger) {
  renew_register(ledger);
  for (const RunEvents& run : collect_runs(ledger.lines()).runs) {
    if (is_out_of_place(ledger.layout(), run)) finish_published(ledger, run);
    if (run.pending()) abandon(ledger, run);
  }
  remove_leftovers(ledger);
}

void move_into_place(const OutLayout& layout, std::uint64_t begun,
                     const std::string& run) {
  const fs::path target = layout.out / run;
  make_folders(target.parent_path());
  rename_new(layout.staging(begun), target);
  flush_folder(target.parent_path());
  flush_folder(layout.work());
}

}  // namespace loqsmith
