#pragma once

#include <filesystem>

#include "loqsmith/night/sequence_folder.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// Writes everything that a run publishes (but the manifest) into a staging
/// folder: the tables, record.json, report.html where wanted, and the sheets
/// verbatim in inputs/.
/// @throws Halt 74 when a file cannot be written whole.
void stage_run(const std::filesystem::path& staging,
               const SequenceFolder& folder, const PublishedRun& run,
               bool with_report);

}  // namespace loqsmith
