#pragma once

#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

// The sections of record.json, each one or more members of the object that is
// open. A number that does not exist is null, or its object holds one member
// `not_applicable` with the reason.

/// `amendments`: what people decided, each row of the sheet.
void record_amendments(JsonWriter& json, const PublishedRun& run);

/// `earlier_runs`, `reported_changes`, and `not_compared` where those could not
/// be found.
void record_earlier_runs(JsonWriter& json, const PublishedRun& run);

/// `program`, `sequence`, `run`, `begun`, `finished`, `ledger_head`, `method`,
/// `inputs`, `problems`.
void record_provenance(JsonWriter& json, const PublishedRun& run);

/// `templates`: where each target was looked for, over what window, and which
/// injections taught it.
void record_templates(JsonWriter& json, const PublishedRun& run);

/// `noise`: of each blank at each target's time, in signal units, with the
/// segment noise and drift of its whole trace and the noise model from which
/// the spread of responses is predicted.
void record_noise(JsonWriter& json, const PublishedRun& run);

/// `analytes`: calibration, limits with all their terms, and the decision on
/// each result with its reasons.
void record_analytes(JsonWriter& json, const PublishedRun& run);

/// `diagnostics` of one calibration set: tests, influence of each standard,
/// sums of errors by weight, suggested exclusions with the fit without.
void record_diagnostics(JsonWriter& json,
                        const Outcome<CalibrationDiagnostics>& diagnostics);

/// `checks`: how often each passed and failed, and those that failed.
void record_checks(JsonWriter& json, const PublishedRun& run);

void member_words(JsonWriter& json, std::string_view key,
                  const std::vector<std::string>& words);
void member_whole(JsonWriter& json, std::string_view key, std::int64_t number);
void member_count(JsonWriter& json, std::string_view key, std::size_t count);

}  // namespace loqsmith
