#pragma once

#include <filesystem>
#include <string>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// Whether a folder is a published run that is as the ledger above it says:
/// the run's name ("well-water-0412/run-0001"), or why it is none (no such
/// folder, no ledger, never published, a file changed or missing). Reads only,
/// without a lock. The chain itself is what verify_out() looks at.
/// @throws Halt 74 where something cannot be read
Outcome<std::string> check_published_folder(
    const std::filesystem::path& folder);

}  // namespace loqsmith
