#include <csignal>
#include <iostream>
#include <memory>
#include <string>

#include "loqsmith/base/time.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/terminal.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/night/nightly.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"out", "OUT", "where to publish; made where it does not exist"},
      {"settle", "SECONDS", "wait until no file has changed for so long (300)"},
      {"give-up", "SECONDS",
       "after so long process without what is missing (43200)"},
      {"rehash", "", "look at the files' contents, whatever their times say"},
      {"jobs", "N", "files at work side by side (1)"},
      {"wait", "SECONDS", "how long to wait for another process's lock (0)"},
      {"operator", "NAME", "who asks for the runs, for the ledger"},
      {"key", "FILE", "sign published runs: PEM, Ed25519, mode 0600"},
      {"no-report", "", "publish the tables without report.html"},
      {"help", "", "this text"},
  };
  return kRows;
}

std::string help() {
  return verb_help(
      "loqsmith nightly ROOT --out OUT [options]",
      "loqsmith nightly /srv/sequences --out /srv/results --jobs 2",
      "Processes every settled sequence folder below ROOT that has not been\n"
      "processed in its present state, one line each. Ends cleanly after the\n"
      "sequence in hand when it is interrupted. OUT/.work/last-night.json\n"
      "tells a monitor what became of each.",
      option_rows());
}

volatile std::sig_atomic_t stop_asked = 0;

void ask_to_stop(int) { stop_asked = 1; }

NightlyOptions nightly_options(const ParsedOptions& parsed) {
  NightlyOptions options;
  options.root = parsed.positional.front();
  options.out = *parsed.value("out");
  options.settle = std::chrono::seconds(parsed.whole("settle", 0, 300));
  options.give_up = std::chrono::seconds(parsed.whole("give-up", 0, 43200));
  options.rehash = parsed.has("rehash");
  options.jobs = static_cast<unsigned>(parsed.whole("jobs", 1, 1));
  options.wait = std::chrono::seconds(parsed.whole("wait", 0, 0));
  options.report = !parsed.has("no-report");
  if (const auto file = parsed.value("key")) {
    options.machine_key = std::make_shared<SigningKey>(SigningKey::read(*file));
  }
  options.actor = current_actor(parsed.value("operator").value_or(""));
  options.clock = now_utc;
  options.interrupted = [] { return stop_asked != 0; };
  return options;
}

void print_line(const NightlyLine& line) {
  for (const std::string& message : line.messages) {
    std::cerr << line.sequence << ": " << message << '\n';
  }
  std::cout << line.sequence << ": " << outcome_name(line.outcome);
  if (!line.published.empty()) {
    std::cout << " as " << line.published.filename().string();
  }
  std::cout << ", " << line.why;
  if (line.status == ExitStatus::NeedsPerson) {
    std::cout << "; something was withheld or needs a person";
  }
  std::cout << std::endl;
}

}  // namespace

ExitStatus nightly_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << help();
    return ExitStatus::Done;
  }
  if (parsed.positional.size() != 1) {
    throw WrongUse("one folder of sequence folders is to be named");
  }
  if (!parsed.has("out")) throw WrongUse("--out OUT is missing");
  std::signal(SIGTERM, ask_to_stop);
  std::signal(SIGINT, ask_to_stop);
  NightlyOptions options = nightly_options(parsed);
  std::unique_ptr<ProgressLine> shown;
  std::string at_work;
  options.progress = [&](const std::string& sequence, std::size_t done,
                         std::size_t all) {
    if (at_work != sequence) {
      at_work = sequence;
      shown = std::make_unique<ProgressLine>(sequence);
    }
    shown->show(done, all);
  };
  const NightlyOutcome outcome =
      process_night(options, [&](const NightlyLine& line) {
        shown.reset();
        print_line(line);
      });
  if (outcome.interrupted) std::cout << "interrupted: the rest waits\n";
  if (outcome.lines.empty() && !outcome.interrupted) {
    std::cout << "no sequence folder below " << options.root.string() << '\n';
  }
  return outcome.status;
}

}  // namespace loqsmith
