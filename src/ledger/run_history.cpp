#include "loqsmith/ledger/run_history.hpp"

#include <map>

#include "loqsmith/ledger/out_layout.hpp"

namespace loqsmith {
namespace {

class Collector {
 public:
  void add(const LedgerLine& line) {
    if (line.action == "run-begun") begin(line);
    if (line.action == "run-published") end(line, &RunEvents::published);
    if (line.action == "run-abandoned") end(line, &RunEvents::abandoned);
  }

  RunHistory take() { return std::move(history_); }

 private:
  void begin(const LedgerLine& line) {
    RunEvents run;
    run.object = line.object;
    const std::size_t slash = line.object.rfind('/');
    run.sequence = line.object.substr(0, slash);
    const auto number = slash == std::string::npos
                            ? std::nullopt
                            : run_folder_number(line.object.substr(slash + 1));
    if (!number || !unfit_sequence_name(run.sequence).empty()) {
      deviate(line, "its object is no run");
      return;
    }
    run.number = *number;
    run.folder = detail_of(line, "folder");
    run.amendments_sha256 = detail_of(line, "amendments_sha256");
    run.host = line.host;
    run.begun_time = line.time;
    run.begun = line.number;
    int& highest = highest_[run.sequence];
    if (run.number <= highest) {
      deviate(line, line.object + " has a number that was used before");
      return;
    }
    highest = run.number;
    index_[run.object] = history_.runs.size();
    history_.runs.push_back(std::move(run));
  }

  void end(const LedgerLine& line, std::uint64_t RunEvents::*how) {
    const auto found = index_.find(line.object);
    if (found == index_.end()) {
      deviate(line, line.object + " ends without having begun");
      return;
    }
    RunEvents& run = history_.runs[found->second];
    if (!run.pending()) {
      deviate(line, line.object + " ends a second time");
      return;
    }
    run.*how = line.number;
    run.manifest = line.manifest;
    if (run.published != 0 && run.manifest.empty()) {
      deviate(line, line.object + " is published without a manifest");
    }
  }

  void deviate(const LedgerLine& line, std::string what) {
    history_.deviations.push_back(
        {"ledger.jsonl line " + std::to_string(line.number), std::move(what)});
  }

  RunHistory history_;
  std::map<std::string, std::size_t> index_;
  std::map<std::string, int> highest_;
};

}  // namespace

RunHistory collect_runs(const std::vector<LedgerLine>& lines) {
  Collector collector;
  for (const LedgerLine& line : lines) collector.add(line);
  return collector.take();
}

}  // namespace loqsmith
