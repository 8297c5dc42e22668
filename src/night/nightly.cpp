#include "loqsmith/night/nightly.hpp"

#include <algorithm>
#include <map>
#include <sstream>
#include <utility>

#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/ledger/open_ledger.hpp"
#include "loqsmith/night/find_sequences.hpp"
#include "loqsmith/night/folder_history.hpp"
#include "loqsmith/night/folder_state.hpp"
#include "loqsmith/night/process_sequence.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

constexpr std::chrono::seconds kLedgerPatience{60};

constexpr auto kUnchanged = NightlyLine::Outcome::Unchanged;

// Whether a folder is to be processed, and why or why not.
struct Decision {
  NightlyLine::Outcome otherwise = kUnchanged;
  bool due = false;
  std::string why;
};

Decision decide_by_history(const fs::path& folder, const FolderState& state,
                           const FolderHistory& history, bool rehash) {
  using Last = FolderHistory::Last;
  switch (history.last) {
    case Last::Nothing:
      return {kUnchanged, true, "new"};
    case Last::AtWork:
    case Last::Abandoned:
      return {kUnchanged, true, "an earlier run of it did not come to its end"};
    case Last::Published:
    case Last::Refused:
      break;
  }
  const bool refused = history.last == Last::Refused;
  const std::string seen = refused ? "refused before, " : "processed before, ";
  if (!rehash && history.state == state.listing) {
    return {kUnchanged, false, seen + "unchanged since"};
  }
  if (hash_contents(folder, state) == history.contents) {
    return {kUnchanged, false, seen + "the same contents"};
  }
  return {kUnchanged, true,
          refused ? "changed since it was refused" : "files changed"};
}

std::string counted_files(std::size_t count) {
  return std::to_string(count) + (count == 1 ? " file" : " files");
}

// A due folder whose files are still coming waits.
Decision wait_for_files(Decision decision, const FolderState& state,
                        const NightlyOptions& options) {
  const auto age = fs::file_time_type::clock::now() - state.newest;
  const bool quiet = age >= options.settle;
  if (quiet && state.missing.empty()) return decision;
  if (age >= options.give_up) {
    decision.why += ", " + counted_files(state.missing.size()) +
                    " still missing after the time to wait";
    return decision;
  }
  const std::string what = quiet ? counted_files(state.missing.size()) +
                                       " missing, the first " +
                                       state.missing.front()
                                 : "files changed a short while ago";
  return {NightlyLine::Outcome::Waiting, false, what};
}

std::string name_below(const fs::path& root, const fs::path& folder) {
  const fs::path below = folder.lexically_relative(fs::canonical(root));
  return below == "." ? folder.filename().string() : below.generic_string();
}

class Night {
 public:
  explicit Night(const NightlyOptions& options) : options_(options) {}

  NightlyLine handle(const fs::path& folder) {
    NightlyLine line;
    line.folder = folder;
    const FolderHistory history =
        history_of_folder(ledger_lines(options_.out), folder);
    line.sequence = history.sequence.empty() ? name_below(options_.root, folder)
                                             : history.sequence;
    const FolderState state = look_at_folder(folder);
    Decision decision =
        decide_by_history(folder, state, history, options_.rehash);
    if (decision.due) decision = wait_for_files(decision, state, options_);
    line.why = decision.why;
    line.outcome = decision.otherwise;
    if (decision.due) process(line, state);
    return line;
  }

  void close(const NightlyOutcome& outcome) const {
    std::map<std::string, std::size_t> counts;
    for (const NightlyLine& line : outcome.lines) {
      ++counts[outcome_name(line.outcome)];
    }
    LedgerEntry entry;
    entry.action = "night";
    entry.detail.emplace_back("root", fs::canonical(options_.root).string());
    for (const auto& [name, count] : counts) {
      entry.detail.emplace_back(name, std::to_string(count));
    }
    entry.detail.emplace_back("interrupted",
                              outcome.interrupted ? "yes" : "no");
    OpenLedger ledger(place(), kLedgerPatience);
    ledger.append(entry);
    replace_file(ledger.layout().work() / "last-night.json", as_json(outcome));
  }

 private:
  PublicationPlace place() const {
    return {options_.out, options_.actor, options_.clock, options_.wait};
  }

  void process(NightlyLine& line, const FolderState& state) const {
    ProcessOptions options;
    options.folder = line.folder;
    options.out = options_.out;
    options.as = line.sequence;
    options.cause = line.why;
    options.jobs = options_.jobs;
    options.wait = options_.wait;
    options.report = options_.report;
    options.machine_key = options_.machine_key;
    options.actor = options_.actor;
    options.clock = options_.clock;
    options.progress = [&](std::size_t done, std::size_t all) {
      if (options_.progress) options_.progress(line.sequence, done, all);
    };
    try {
      ProcessOutcome outcome = process_sequence(options);
      line.outcome = NightlyLine::Outcome::Published;
      line.published = outcome.published;
      line.status = outcome.status;
      line.messages = std::move(outcome.messages);
    } catch (const InputError& error) {
      refuse(line, state, error);
    } catch (const Halt& halt) {
      if (!at_work_elsewhere(halt, line.folder)) throw;
      line.outcome = NightlyLine::Outcome::Elsewhere;
      line.why = "another process has it at work";
    }
  }

  bool at_work_elsewhere(const Halt& halt, const fs::path& folder) const {
    return halt.status() == ExitStatus::Locked &&
           history_of_folder(ledger_lines(options_.out), folder).last ==
               FolderHistory::Last::AtWork;
  }

  void refuse(NightlyLine& line, const FolderState& state,
              const InputError& error) const {
    line.outcome = NightlyLine::Outcome::Refused;
    line.status = ExitStatus::BadInput;
    for (const InputProblem& problem : error.problems()) {
      line.messages.push_back(describe(problem));
    }
    LedgerEntry entry;
    entry.action = "sequence-refused";
    entry.object = line.sequence;
    entry.reason = line.messages.empty() ? "" : line.messages.front();
    entry.detail = {{"folder", line.folder.string()},
                    {"problems", std::to_string(line.messages.size())},
                    {"cause", line.why},
                    {"state", state.listing},
                    {"contents", hash_contents(line.folder, state)}};
    OpenLedger(place(), kLedgerPatience).append(entry);
  }

  static std::string as_json(const NightlyOutcome& outcome) {
    std::ostringstream text;
    JsonWriter json(text, 2);
    json.begin_object();
    json.member("begun", outcome.begun);
    json.member("finished", outcome.finished);
    json.member("interrupted", outcome.interrupted);
    json.member("status", std::int64_t{static_cast<int>(outcome.status)});
    json.begin_array("sequences");
    for (const NightlyLine& line : outcome.lines) {
      json.begin_object();
      json.member("folder", line.folder.string());
      json.member("sequence", line.sequence);
      json.member("outcome", outcome_name(line.outcome));
      json.member("why", line.why);
      json.member("status", std::int64_t{static_cast<int>(line.status)});
      json.member("published", line.published.string());
      json.begin_array("messages");
      for (const std::string& message : line.messages) json.value(message);
      json.end_array();
      json.end_object();
    }
    json.end_array();
    json.end_object();
    text << '\n';
    return text.str();
  }

  const NightlyOptions& options_;
};

}  // namespace

std::string outcome_name(NightlyLine::Outcome outcome) {
  using Outcome = NightlyLine::Outcome;
  switch (outcome) {
    case Outcome::Published:
      return "published";
    case Outcome::Refused:
      return "refused";
    case Outcome::Unchanged:
      return "unchanged";
    case Outcome::Waiting:
      return "waiting";
    case Outcome::Elsewhere:
      return "elsewhere";
  }
  return {};
}

NightlyOutcome process_night(
    const NightlyOptions& options,
    const std::function<void(const NightlyLine&)>& said) {
  NightlyOutcome outcome;
  outcome.begun = options.clock();
  Night night(options);
  for (const fs::path& folder : find_sequences(options.root, options.out)) {
    if (options.interrupted && options.interrupted()) {
      outcome.interrupted = true;
      break;
    }
    NightlyLine line = night.handle(folder);
    said(line);
    outcome.status = std::max(outcome.status, line.status);
    outcome.lines.push_back(std::move(line));
  }
  outcome.finished = options.clock();
  night.close(outcome);
  return outcome;
}

}  // namespace loqsmith
