#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/trace.hpp"
#include "loqsmith/chromatogram/trace_selector.hpp"

namespace loqsmith {

/// What the method says about reading files (`<traces>` of the method).
struct ReadPolicy {
  /// Unit for files that state none: "minute", "second", or empty (refuse).
  std::string time_unit_if_none;
  /// A wrong checksum inside a file refuses it; otherwise it is a warning.
  bool checksum_required = true;
};

/// An experiment step inside another one (AnIML).
struct FileStep {
  std::string id;
  std::string name;
  std::vector<std::string> traces;  ///< header ids of what lies below it
};

/// One run (mzML) or outermost experiment step (AnIML) of a file.
struct FileRun {
  std::string id;
  std::string name;
  std::string sample_name;        ///< empty: the file does not say
  std::string start_time;         ///< as written in the file; empty: not stated
  std::vector<FileStep> steps{};  ///< those inside it, at any depth
};

/// What a chromatogram file holds.
struct FileContents {
  std::string format;  ///< "mzML 1.1", "indexed mzML 1.1", "AnIML 0.90"
  std::vector<FileRun> runs;
  std::vector<Trace> traces;
  std::vector<RefusedTrace> refused;
  std::vector<TraceHeader> left_out;  ///< sound headers nobody asked for
  std::vector<std::string> skipped;   ///< series that are no trace, and why
  std::vector<std::string> warnings;  ///< of the file as a whole
};

/// Reads an mzML or AnIML document; the root element decides which.
///
/// @param bytes   the whole file
/// @param name    for messages
/// @param wanted  nothing: every trace is decoded; otherwise only traces that
///                one of these selectors matches (of the rest only headers
///                stand in `left_out`)
/// @throws InputError where the file as a whole must be refused. A trace that
///         must be refused alone stands in `refused`.
FileContents read_chromatogram_file(
    std::string_view bytes, const std::string& name, const ReadPolicy& policy,
    const std::vector<TraceSelector>* wanted = nullptr);

/// What a text of the sequence's `run` column means in a file.
struct MeantRun {
  const FileRun* run = nullptr;
  const FileStep* step = nullptr;  ///< nothing: the whole run

  bool holds(const TraceHeader& header) const;
};

/// The runs that `run` means: those with this id, otherwise those with a step
/// of this id, otherwise with this name, otherwise with a step of this name.
/// Empty text means every run.
std::vector<MeantRun> find_runs(const FileContents& contents,
                                const std::string& run);

/// The one trace of the file (of its run `run`, when not empty: find_runs) that
/// the selector means.
/// @throws InputError for none (lists what there is), several (lists the
///         candidates), or one that was refused (with its own problem).
const Trace& select_trace(const FileContents& contents,
                          const TraceSelector& selector, const std::string& run,
                          const std::string& name);

}  // namespace loqsmith
