#include "loqsmith/ledger/verify.hpp"

#include <algorithm>
#include <chrono>
#include <optional>
#include <set>
#include <system_error>
#include <thread>

#include "loqsmith/base/files.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/input_check.hpp"
#include "loqsmith/ledger/manifest.hpp"
#include "loqsmith/ledger/out_layout.hpp"
#include "loqsmith/ledger/run_history.hpp"
#include "loqsmith/ledger/signatures.hpp"
#include "loqsmith/ledger/signers.hpp"
#include "loqsmith/ledger/system_failures.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

using SteadyClock = std::chrono::steady_clock;

// Looks again until it is settled or the time is up: a writer at work needs
// some milliseconds between a line and its head, or a line and its folder.
template <class Look>
void look_until(SteadyClock::time_point deadline, Look is_settled) {
  while (!is_settled() && SteadyClock::now() < deadline) {
    std::this_thread::sleep_for(std::chrono::milliseconds(25));
  }
}

// Everything below OUT that is no folder; .work is left out, as files come and
// go there while a run is at work.
std::vector<std::string> files_of(const fs::path& out) {
  std::vector<std::string> files;
  for (const auto& entry : fs::directory_iterator(out)) {
    const std::string name = entry.path().filename().string();
    if (name == OutLayout::kWork) continue;
    if (!fs::is_directory(entry.symlink_status())) {
      files.push_back(name);
      continue;
    }
    for (const std::string& below : files_below(entry.path())) {
      files.push_back(name + '/' + below);
    }
  }
  std::sort(files.begin(), files.end());
  return files;
}

class Verification {
 public:
  Verification(const fs::path& out, const VerifyRequest& request)
      : layout_{out},
        request_(request),
        deadline_(SteadyClock::now() + request.patience) {}

  VerifyReport take() {
    // The list comes first: a run published from here on is then in the ledger
    // that is read afterwards, and no file of it looks unknown.
    const auto files = files_of(layout_.out);
    const Chain chain = read_ledger();
    report_.lines = chain.hashes.size();
    report_.head = chain.last();
    const RunHistory history = collect_runs(chain.lines);
    add(chain.deviations);
    add(history.deviations);
    judge_register();
    judge_signatures(chain, history);
    if (request_.since) {
      const auto deviation = check_extends(chain, *request_.since);
      if (deviation) add({*deviation});
    }
    for (const RunEvents& run : history.runs) check_run(run);
    name_unknown(files);
    note_work(history);
    return std::move(report_);
  }

 private:
  Chain read_ledger();
  void judge_ends(const Chain& chain, const HeadCheck& check);
  std::optional<std::string> read(const fs::path& path,
                                  const std::string& name);
  void judge_register();
  void judge_signatures(const Chain& chain, const RunHistory& history);
  void check_run(const RunEvents& run);
  fs::path find_run(const RunEvents& run);
  void name_unknown(const std::vector<std::string>& files);
  void note_work(const RunHistory& history);

  void add(const std::vector<Deviation>& more) {
    report_.deviations.insert(report_.deviations.end(), more.begin(),
                              more.end());
  }

  OutLayout layout_;
  VerifyRequest request_;
  InputCheck inputs_;
  SignerRegister signers_;
  RegisterFile register_file_ = RegisterFile::Current;
  SteadyClock::time_point deadline_;
  VerifyReport report_;
  std::set<std::string> known_{"ledger.jsonl", "ledger.head"};
  std::set<std::string> unchecked_;  // runs whose manifest cannot be trusted
};

std::optional<std::string> Verification::read(const fs::path& path,
                                              const std::string& name) {
  try {
    if (!is_there(path)) return std::nullopt;
    return read_file(path);
  } catch (const std::system_error& error) {
    add({{name, std::string("it cannot be read: ") + error.what()}});
    return std::nullopt;
  }
}

// A ledger that is read while a line is appended may end in the middle of it,
// or its head or the register may be behind: both are read first, so that they
// are never ahead.
Chain Verification::read_ledger() {
  Chain chain;
  HeadCheck check;
  look_until(deadline_, [&] {
    report_.deviations.clear();
    const auto signers = read(layout_.signers(), OutLayout::kSigners);
    const auto head = read(layout_.head(), "ledger.head");
    const auto bytes = read(layout_.ledger(), "ledger.jsonl");
    if (!bytes && report_.deviations.empty()) {
      add({{"ledger.jsonl", "it is missing"}});
    }
    chain = read_chain(bytes.value_or(""));
    check = check_head(chain, head);
    signers_ = collect_signers(chain.lines);
    register_file_ = register_file(signers, signers_);
    return chain.torn.empty() && !check.behind &&
           register_file_ == RegisterFile::Current;
  });
  judge_ends(chain, check);
  return chain;
}

void Verification::judge_ends(const Chain& chain, const HeadCheck& check) {
  if (!chain.torn.empty()) {
    add({{"ledger.jsonl",
          "it ends in the middle of a line (" +
              std::to_string(chain.torn.size()) +
              " bytes without line feed): a writer was interrupted, or bytes "
              "were added or cut off"}});
  }
  if (check.one_behind) {
    add({{"ledger.jsonl and ledger.head",
          "the head does not name the last line, number " +
              std::to_string(chain.last().number) +
              ": a writer was interrupted, or a line was added"}});
  }
  if (check.damage) add({*check.damage});
}

void Verification::judge_register() {
  known_.insert(OutLayout::kSigners);
  add(signers_.deviations());
  if (register_file_ == RegisterFile::Current) return;
  add({{OutLayout::kSigners,
        register_file_ == RegisterFile::OneBehind
            ? "the last change that the ledger knows is missing: its writer "
              "was interrupted, the next start renews it"
            : "it is not what the lines of the ledger make it"}});
}

void Verification::judge_signatures(const Chain& chain,
                                    const RunHistory& history) {
  add(check_signatures(chain.lines, history));
  report_.signatures = collect_signatures(chain.lines).size();
  if (request_.machine_key.empty()) return;
  std::uint64_t not_signed = 0;
  add(check_machine_key(chain.lines, request_.machine_key, not_signed));
  if (not_signed == 0) return;
  report_.notes.push_back(std::to_string(not_signed) +
                          (not_signed == 1 ? " run was" : " runs were") +
                          " published before the first signed one");
}

// The folder that holds a published run: staging between the two last steps of
// its publication, empty where there is neither.
fs::path Verification::find_run(const RunEvents& run) {
  const fs::path folder = layout_.out / run.object;
  const fs::path staging = layout_.staging(run.begun);
  bool staged = false;
  look_until(deadline_, [&] {
    staged = is_there(staging);
    return is_there(folder) || !staged;
  });
  if (is_there(folder)) return folder;
  return staged ? staging : fs::path{};
}

void Verification::check_run(const RunEvents& run) {
  if (run.published == 0) return;
  ++report_.runs;
  const fs::path folder = find_run(run);
  if (folder.empty()) {
    add({{run.object, "the folder of this published run is missing"}});
    return;
  }
  if (folder != layout_.out / run.object) {
    add({{run.object,
          "it is published but not in place: its writer was interrupted, the "
          "next start moves it there"}});
  }
  const RunCheck check = check_run_folder(folder, run.object, run.manifest);
  add(check.deviations);
  known_.insert(run.object + '/' + OutLayout::kManifest);
  for (const std::string& file : check.files) {
    known_.insert(run.object + '/' + file);
  }
  if (!check.manifest_trusted) unchecked_.insert(run.object + '/');
  report_.files += check.files.size() + (check.manifest_trusted ? 1 : 0);
  // A changed record is named above; what it says of the inputs is worthless.
  if (request_.inputs && check.deviations.empty()) {
    inputs_.check_run(folder, run, report_);
  }
}

void Verification::name_unknown(const std::vector<std::string>& files) {
  for (const std::string& file : files) {
    const bool excused =
        known_.count(file) > 0 ||
        std::any_of(unchecked_.begin(), unchecked_.end(),
                    [&](const std::string& run) {
                      return file.compare(0, run.size(), run) == 0;
                    });
    if (excused) continue;
    // The names under which head and register are written before a rename.
    if (file == "ledger.head.new" || file == "signers.jsonl.new") {
      report_.notes.push_back(file +
                              ": a writer is at work or was interrupted");
      continue;
    }
    add({{file, "no manifest names this file"}});
  }
}

void Verification::note_work(const RunHistory& history) {
  std::set<std::string> explained;
  for (const RunEvents& run : history.runs) {
    explained.insert(layout_.staging(run.begun).filename().string());
    if (!run.pending()) continue;
    report_.notes.push_back(run.object + " began at " + run.begun_time +
                            " on " + run.host +
                            " and has not ended: it is at work or was "
                            "interrupted");
  }
  for (const RunEvents& run : history.runs) {
    if (run.abandoned == 0 || !is_there(layout_.staging(run.begun))) continue;
    report_.notes.push_back(run.object + " was abandoned and left OUT/.work/" +
                            layout_.staging(run.begun).filename().string());
  }
  if (!fs::is_directory(layout_.work())) return;
  for (const auto& entry : fs::directory_iterator(layout_.work())) {
    const std::string name = entry.path().filename().string();
    if (!OutLayout::staging_number(name) || explained.count(name) > 0) continue;
    report_.notes.push_back("OUT/.work/" + name + " belongs to no run");
  }
}

}  // namespace

VerifyReport verify_out(const fs::path& out, const VerifyRequest& request) {
  return halt_on_failure([&] { return Verification(out, request).take(); });
}

VerifyReport verify_out(const fs::path& out,
                        std::chrono::milliseconds patience) {
  VerifyRequest request;
  request.patience = patience;
  return verify_out(out, request);
}

}  // namespace loqsmith
