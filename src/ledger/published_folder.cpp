#include "loqsmith/ledger/published_folder.hpp"

#include "loqsmith/base/files.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/manifest.hpp"
#include "loqsmith/ledger/out_layout.hpp"
#include "loqsmith/ledger/run_history.hpp"
#include "loqsmith/ledger/system_failures.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

// The nearest folder above that has a ledger; empty where none has.
fs::path out_above(const fs::path& folder) {
  for (fs::path above = folder.parent_path();; above = above.parent_path()) {
    if (is_there(OutLayout{above}.ledger())) return above;
    if (above == above.root_path()) return {};
  }
}

Outcome<std::string> check(const fs::path& named) {
  if (!fs::is_directory(named)) return NotApplicable{"no such folder"};
  const fs::path folder = fs::canonical(named);
  const fs::path out = out_above(folder);
  if (out.empty()) {
    return NotApplicable{"not a published run: no ledger.jsonl above it"};
  }
  const std::string run = folder.lexically_relative(out).generic_string();
  const Chain chain = read_chain(read_file(OutLayout{out}.ledger()));
  for (const RunEvents& one : collect_runs(chain.lines).runs) {
    if (one.object != run || one.published == 0) continue;
    const RunCheck found = check_run_folder(folder, run, one.manifest);
    if (found.deviations.empty()) return run;
    const Deviation& first = found.deviations.front();
    return NotApplicable{"damaged: " + first.place + ": " + first.what};
  }
  return NotApplicable{"not a published run: the ledger does not name it"};
}

}  // namespace

Outcome<std::string> check_published_folder(const fs::path& folder) {
  return halt_on_failure([&] { return check(folder); });
}

}  // namespace loqsmith
