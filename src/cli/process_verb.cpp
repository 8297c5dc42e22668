#include <algorithm>
#include <cstdio>
#include <iostream>
#include <sstream>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/base/time.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/terminal.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/night/process_sequence.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"out", "OUT", "where to publish; made where it does not exist"},
      {"as", "NAME", "the sequence's name; otherwise the folder's"},
      {"jobs", "N", "files at work side by side (1)"},
      {"wait", "SECONDS", "how long to wait for another process's lock (0)"},
      {"operator", "NAME", "who asks for the run, for the ledger"},
      {"key", "FILE", "sign published runs: PEM, Ed25519, mode 0600"},
      {"no-report", "", "publish the tables without report.html"},
      {"timings", "", "print how long each stage took"},
      {"json", "", "print the outcome as JSON, one object a sequence"},
      {"help", "", "this text"},
  };
  return kRows;
}

std::string help() {
  return verb_help(
      "loqsmith process FOLDER... --out OUT [options]",
      "loqsmith process well-water-0412 --out results --jobs 2",
      "Reads a sequence folder (sequence.csv, levels.csv, method.xml and the\n"
      "chromatogram files), judges every result, and publishes tables, report\n"
      "and record as OUT/SEQUENCE/run-0001. The folder is only read.",
      option_rows());
}

ProcessOptions process_options(const ParsedOptions& parsed,
                               const std::string& folder) {
  ProcessOptions options;
  options.folder = folder;
  options.out = *parsed.value("out");
  options.as = parsed.value("as").value_or("");
  options.jobs = static_cast<unsigned>(parsed.whole("jobs", 1, 1));
  options.wait = std::chrono::seconds(parsed.whole("wait", 0, 0));
  options.report = !parsed.has("no-report");
  if (const auto file = parsed.value("key")) {
    options.machine_key = std::make_shared<SigningKey>(SigningKey::read(*file));
  }
  options.actor = current_actor(parsed.value("operator").value_or(""));
  options.clock = now_utc;
  return options;
}

std::string counts_text(const ProcessOutcome& outcome) {
  std::string text;
  for (const auto& [status, count] : outcome.results_by_status) {
    text += (text.empty() ? "" : ", ") + std::to_string(count) + ' ' + status;
  }
  return text;
}

void print_json(const std::string& folder, const ProcessOutcome& outcome) {
  JsonWriter json(std::cout);
  json.begin_object();
  json.member("folder", folder);
  json.member("published", outcome.published.string());
  json.member("status", std::int64_t{static_cast<int>(outcome.status)});
  json.begin_object("results");
  for (const auto& [status, count] : outcome.results_by_status) {
    json.member(status, static_cast<std::int64_t>(count));
  }
  json.end_object();
  json.begin_array("messages");
  for (const std::string& message : outcome.messages) json.value(message);
  json.end_array();
  json.end_object();
  std::cout << '\n';
}

void print_text(const ProcessOutcome& outcome) {
  for (const std::string& message : outcome.messages) {
    std::cerr << message << '\n';
  }
  if (outcome.published.empty()) return;
  std::cout << outcome.published.string() << '\n'
            << "  " << counts_text(outcome) << '\n';
  if (outcome.status == ExitStatus::NeedsPerson) {
    std::cout << "  something was withheld or needs a person: see the report\n";
  }
}

void print_timings(const ProcessOutcome& outcome) {
  std::fprintf(stderr, "learn %.3f s, measure %.3f s, publish %.3f s\n",
               outcome.learn_seconds.count(), outcome.measure_seconds.count(),
               outcome.publish_seconds.count());
}

// One sequence; what is wrong with its input is told and becomes a status.
ExitStatus process_one(const ParsedOptions& parsed, const std::string& folder) {
  ProcessOptions options = process_options(parsed, folder);
  ProcessOutcome outcome;
  try {
    ProgressLine line(folder);
    options.progress = [&](std::size_t done, std::size_t all) {
      line.show(done, all);
    };
    outcome = process_sequence(options);
  } catch (const InputError& error) {
    outcome.status = ExitStatus::BadInput;
    for (const InputProblem& problem : error.problems()) {
      outcome.messages.push_back(folder + ": " + describe(problem));
    }
  }
  if (parsed.has("json")) {
    print_json(folder, outcome);
  } else {
    print_text(outcome);
  }
  if (parsed.has("timings")) print_timings(outcome);
  return outcome.status;
}

}  // namespace

ExitStatus process_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << help();
    return ExitStatus::Done;
  }
  if (parsed.positional.empty()) throw WrongUse("a sequence folder is missing");
  if (!parsed.has("out")) throw WrongUse("--out OUT is missing");
  if (parsed.has("as") && parsed.positional.size() > 1) {
    throw WrongUse("--as names one sequence, but several folders are given");
  }
  ExitStatus worst = ExitStatus::Done;
  for (const std::string& folder : parsed.positional) {
    worst = std::max(worst, process_one(parsed, folder));
  }
  return worst;
}

}  // namespace loqsmith
