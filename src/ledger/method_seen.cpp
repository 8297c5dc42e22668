#include "loqsmith/ledger/method_seen.hpp"

#include <optional>
#include <system_error>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/ledger/run_history.hpp"

namespace loqsmith {
namespace {

const LedgerLine* last_of_method(const std::vector<LedgerLine>& lines,
                                 const std::string& id) {
  const LedgerLine* last = nullptr;
  for (const LedgerLine& line : lines) {
    if ((line.action == "method-first-seen" ||
         line.action == "method-changed") &&
        line.object == id) {
      last = &line;
    }
  }
  return last;
}

struct KeptMethod {
  std::string run;
  std::string text;
};

// Any published run's copy that has this hash; the last one is the likeliest
// to be there.
std::optional<KeptMethod> find_kept(const OpenLedger& ledger,
                                    const std::string& sha256) {
  const RunHistory history = collect_runs(ledger.lines());
  for (auto run = history.runs.rbegin(); run != history.runs.rend(); ++run) {
    if (run->published == 0) continue;
    try {
      std::string text = read_file(ledger.layout().out / run->object /
                                   "inputs" / "method.xml");
      if (sha256_hex(text) == sha256) return KeptMethod{run->object, text};
    } catch (const std::system_error&) {
      // What is wrong with a published run is for verify to say.
    }
  }
  return std::nullopt;
}

}  // namespace

void note_method(OpenLedger& ledger, const std::string& run,
                 const MethodSeen& method) {
  const std::string sha256 = sha256_hex(method.text);
  const std::string id = as_ledger_text(method.id);
  const LedgerLine* last = last_of_method(ledger.lines(), id);
  if (last != nullptr && detail_of(*last, "method_sha256") == sha256) return;
  LedgerEntry entry;
  entry.action = last == nullptr ? "method-first-seen" : "method-changed";
  entry.object = id;
  entry.detail = {
      {"run", run}, {"revision", method.revision}, {"method_sha256", sha256}};
  if (last != nullptr) {
    const std::string before = detail_of(*last, "method_sha256");
    const auto kept = find_kept(ledger, before);
    entry.detail.emplace_back("revision_before", detail_of(*last, "revision"));
    entry.detail.emplace_back("method_sha256_before", before);
    entry.detail.emplace_back("kept_in", kept ? kept->run : "");
    entry.detail.emplace_back("difference",
                              kept ? line_difference(kept->text, method.text)
                                   : "no published run keeps the text before");
  }
  ledger.append(entry);
}

}  // namespace loqsmith
