#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/chromatogram/peak.hpp"
#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// What was measured of one analyte in one injection (conditioning ones are
/// not handed in).
struct MeasuredInjection {
  const Injection* injection = nullptr;
  /// No peak: the file or trace could not be read ("file-refused: ...",
  /// "trace-missing: ..."), or measure_peak() had no number.
  Outcome<Peak> peak = NotApplicable{"not measured"};
  /// Nothing: the analyte has no internal standard.
  std::optional<Outcome<Peak>> internal_standard;
  /// Unit of the response as the file states it; empty: not stated.
  std::string signal_unit = {};
  /// Where the peak was expected, corrected for drift; nothing: not known.
  std::optional<double> expected_minutes = {};
  /// Nothing: the analyte has no second trace.
  std::optional<Outcome<Peak>> second_trace = {};
};

/// From responses to verdicts: responses (area, height or ratio to the
/// internal standard), calibration, limits, checks, and one result for each
/// injection of every role that is quantified. A pure function.
///
/// @param template_reason  why the analyte could not be learned; empty: it was.
///                         Then every result is withheld with that reason.
/// @param from_others  failed checks of other analytes (surrogates) that
/// concern
///                     whole injections
AnalyteJudgement judge_analyte(
    const AnalyteRules& settings, const UnitSettings& units,
    const Sequence& sequence, const std::vector<MeasuredInjection>& injections,
    const std::string& template_reason,
    const std::vector<CheckEffect>& from_others = {});

/// What `night` found about the files; the checks that every run makes.
struct SequenceFacts {
  struct FileFact {
    int injection = 0;
    std::string problem;      ///< refused file or trace; empty: read
    std::string data_hash;    ///< over the trace data used; empty: none
    std::string start_time;   ///< from the file; empty: not stated
    std::string sample_name;  ///< from the file; empty: not stated
    std::vector<std::string> warnings;
  };
  std::vector<FileFact> files;              ///< in run order
  std::vector<std::string> unlisted_files;  ///< in the folder, in no row
};

/// unlisted-file, same-data-twice, order-differs, name-differs, time-differs,
/// expired-lot, file-refused, file-warning: one row for each finding, and one
/// passing row for each of these checks that found nothing.
std::vector<CheckRow> always_checked(const Sequence& sequence,
                                     const SequenceFacts& facts);

}  // namespace loqsmith
