#include <algorithm>
#include <string>
#include <vector>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kMostListed = 20;

std::string shown(const TraceHeader& header) {
  std::string text = in_quotes(header.id) + " (" + trace_kind_name(header.kind);
  if (header.precursor_mz) text += " " + shortest(*header.precursor_mz);
  if (header.product_mz) text += " > " + shortest(*header.product_mz);
  if (!header.run.empty()) text += ", run " + in_quotes(header.run);
  return text + ")";
}

std::string listed(const std::vector<std::string>& items) {
  if (items.empty()) return "no chromatogram";
  if (items.size() <= kMostListed) return join(items, ", ");
  const std::vector<std::string> first(items.begin(),
                                       items.begin() + kMostListed);
  return join(first, ", ") + " and " +
         std::to_string(items.size() - kMostListed) + " more";
}

std::string wanted_text(const TraceSelector& selector, const std::string& run) {
  std::string text = "one chromatogram of " + describe(selector);
  if (!selector.id.empty()) text += " for trace " + in_quotes(selector.id);
  if (!run.empty()) text += " in run " + in_quotes(run);
  return text;
}

std::string everything(const FileContents& contents) {
  std::vector<std::string> items;
  for (const Trace& trace : contents.traces) {
    items.push_back(shown(trace.header));
  }
  for (const TraceHeader& header : contents.left_out) {
    items.push_back(shown(header));
  }
  for (const RefusedTrace& refused : contents.refused) {
    items.push_back(shown(refused.header) + " refused");
  }
  if (contents.skipped.empty()) return listed(items);
  return listed(items) + "; skipped: " + listed(contents.skipped);
}

std::vector<MeantRun> require_runs(const FileContents& contents,
                                   const std::string& run,
                                   const std::string& name) {
  std::vector<MeantRun> found = find_runs(contents, run);
  if (!found.empty() || run.empty()) return found;
  std::vector<std::string> ids;
  for (const FileRun& known : contents.runs) ids.push_back(in_quotes(known.id));
  throw InputError(InputProblem{
      name, 0, 0, ids.empty() ? "no run" : join(ids, ", "),
      "the run " + in_quotes(run), "correct the run in the sequence sheet"});
}

}  // namespace

const Trace& select_trace(const FileContents& contents,
                          const TraceSelector& selector, const std::string& run,
                          const std::string& name) {
  const std::vector<MeantRun> runs = require_runs(contents, run, name);
  if (selector.kind == TraceSelector::Kind::Extracted) {
    throw InputError(InputProblem{
        name, 0, 0, "kind extracted, which is not available in this version",
        "a chromatogram of the file", "choose another kind"});
  }
  const auto meant = [&](const TraceHeader& header) {
    return matches(selector, header) &&
           (run.empty() || std::any_of(runs.begin(), runs.end(),
                                       [&](const MeantRun& meant_run) {
                                         return meant_run.holds(header);
                                       }));
  };
  std::vector<const Trace*> traces;
  std::vector<const RefusedTrace*> refused;
  std::vector<std::string> candidates;
  for (const Trace& trace : contents.traces) {
    if (!meant(trace.header)) continue;
    traces.push_back(&trace);
    candidates.push_back(shown(trace.header));
  }
  for (const RefusedTrace& trace : contents.refused) {
    if (!meant(trace.header)) continue;
    refused.push_back(&trace);
    candidates.push_back(shown(trace.header) + " refused");
  }
  if (candidates.empty()) {
    throw InputError(InputProblem{name, 0, 0, everything(contents),
                                  wanted_text(selector, run),
                                  "correct the trace in the method"});
  }
  if (candidates.size() > 1) {
    throw InputError(InputProblem{name, 0, 0, listed(candidates),
                                  wanted_text(selector, run),
                                  "state more in the method's trace"});
  }
  if (traces.empty()) throw InputError(refused.front()->problem);
  return *traces.front();
}

}  // namespace loqsmith
