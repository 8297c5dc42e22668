#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/peak.hpp"
#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/judgement/amendment.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/sheets/method.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/peak_curve.hpp"

namespace loqsmith {

/// One row of peaks.csv: an analyte or internal standard in one injection.
struct PeakRow {
  int injection = 0;
  std::string target;
  Outcome<Peak> peak = NotApplicable{"not measured"};
};

/// An input as it was read.
struct InputFile {
  std::string path;    ///< relative to the folder
  std::string sha256;  ///< lower-case hex; empty where it could not be read
  std::uint64_t bytes = 0;
  std::string format;  ///< "mzML 1.1", ...
  std::vector<std::string> warnings;
};

/// What was learned of one analyte or internal standard.
struct TargetRecord {
  std::string target;
  Outcome<WindowTemplate> window = NotApplicable{"not learned"};
  /// Of the solvent blanks that noise is taken from, by injection.
  std::vector<std::pair<int, NoiseEstimate>> blank_noise = {};
};

/// A stretch of trace for the report's figures.
struct FigureCurve {
  std::string analyte;
  int injection = 0;
  std::string caption;  ///< "lowest standard", "blank"
  Peak peak;
  PeakCurve curve;
  std::string signal_unit = {};  ///< empty: not stated
};

/// An earlier published run of the same sequence.
struct EarlierRun {
  std::string run;    ///< "well-water-0412/run-0001"
  std::string begun;  ///< RFC 3339 UTC
  bool amended = false;
};

/// A result that is reported otherwise than in the last run. Empty: none.
struct ReportedChange {
  int injection = 0;
  std::string analyte;
  std::string was;
  std::string is;
};

/// Everything one published run says.
struct PublishedRun {
  Sequence sequence;
  Method method;
  int run_number = 0;
  std::string program_version;
  std::string build;            ///< compiler, libraries
  std::string processor_class;  ///< e.g. "x86-64 avx2 fma"
  std::string begun;            ///< RFC 3339 UTC
  std::string finished;
  std::string ledger_head;        ///< "12:sha256" of this run's run-begun line
  std::string signed_before;      ///< earlier runs that persons signed
  std::vector<InputFile> inputs;  ///< sheets first, then files by path
  std::vector<std::pair<int, InputProblem>> problems;  ///< injection, problem
  std::vector<TargetRecord> targets;
  std::vector<PeakRow> peaks;  ///< by injection, then in the method's order
  std::vector<AnalyteJudgement> analytes;
  std::vector<CheckRow> sequence_checks;
  std::vector<FigureCurve> curves;
  std::vector<Amendment> amendments;  ///< as the sheet has them
  std::vector<EarlierRun> earlier_runs;
  std::vector<ReportedChange> reported_changes;  ///< since the last of them
  std::string
      not_compared;  ///< why there are no changes known; empty: they are
};

/// True where something was withheld or needs a person (exit status 1).
bool needs_a_person(const PublishedRun& run);

}  // namespace loqsmith
