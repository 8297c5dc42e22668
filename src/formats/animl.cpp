#include "loqsmith/formats/animl.hpp"

#include <utility>

#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/formats/animl_steps.hpp"
#include "loqsmith/formats/trace_checks.hpp"

namespace loqsmith {
namespace {

struct Reading {
  DocumentSource source;
  std::size_t generated_left = kMostGenerated;
};

// The signal comes first: its numbers are stored, so that no more times are
// generated than there are values.
Trace decode(const AnimlTrace& described, Reading& reading) {
  DocumentSource& source = reading.source;
  source.places.pass(described.time.node->offset);
  Trace trace;
  trace.header = described.header;
  trace.warnings = described.warnings;
  trace.signal = decode_animl_series(described.signal, trace.header.points,
                                     reading.generated_left, source);
  trace.minutes = decode_animl_series(described.time, trace.header.points,
                                      reading.generated_left, source);
  for (double& time : trace.minutes) {
    time = time * described.unit.numerator / described.unit.denominator;
  }
  if (auto fault = find_point_fault(trace.minutes, trace.signal)) {
    throw InputError(source.problem(described.time.node->offset,
                                    std::move(fault->found),
                                    std::move(fault->expected)));
  }
  for (std::string& warning : point_warnings(trace)) {
    trace.warnings.push_back(std::move(warning));
  }
  return trace;
}

void take(AnimlTrace& described, const std::vector<TraceSelector>* wanted,
          Reading& reading, FileContents& contents) {
  TraceHeader& header = described.header;
  if (described.fault) {
    contents.refused.push_back(
        {std::move(header), std::move(*described.fault)});
    return;
  }
  if (!is_wanted(wanted, header)) {
    contents.left_out.push_back(std::move(header));
    return;
  }
  try {
    contents.traces.push_back(decode(described, reading));
  } catch (const InputError& error) {
    InputProblem problem = error.problems().front();
    problem.found += " (trace " + in_quotes(header.id) + ")";
    contents.refused.push_back({std::move(header), std::move(problem)});
  }
}

}  // namespace

FileContents read_animl(std::string_view bytes, const std::string& name,
                        const ReadPolicy& policy,
                        const std::vector<TraceSelector>* wanted) {
  Reading reading{{bytes, name, policy, TextPlaces(bytes)}};
  DocumentSource& source = reading.source;
  AnimlTree tree(source);
  scan_xml(bytes, name, XmlLimits{}, tree);
  source.places = TextPlaces(bytes);  // from the beginning again
  AnimlSteps steps(tree, source);
  steps.walk();
  FileContents contents;
  contents.format = "AnIML 0.90";
  contents.runs = std::move(steps.runs());
  contents.skipped = std::move(steps.skipped());
  contents.warnings = tree.notes().all();
  source.places = TextPlaces(bytes);
  for (AnimlTrace& trace : steps.traces()) {
    take(trace, wanted, reading, contents);
  }
  return contents;
}

}  // namespace loqsmith
