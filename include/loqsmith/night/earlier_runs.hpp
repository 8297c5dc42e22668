#pragma once

#include <filesystem>
#include <vector>

#include "loqsmith/judgement/amendment.hpp"
#include "loqsmith/ledger/run_history.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// Decisions are not forgotten: each row that a published run of the sequence
/// had must stand in the sheet of today, whatever else does.
///
/// @param earlier  published runs of the sequence
/// @throws InputError that names each row that is missing; Halt 74 where the
///         sheet of an earlier run is not the one that the ledger means.
void require_earlier_amendments(const std::filesystem::path& out,
                                const std::vector<RunEvents>& earlier,
                                const std::vector<Amendment>& amendments);

/// Lists the earlier runs and what is reported otherwise than in the last one.
void compare_with_earlier(const std::filesystem::path& out,
                          const std::vector<RunEvents>& earlier,
                          PublishedRun& run);

}  // namespace loqsmith
