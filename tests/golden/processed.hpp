#pragma once

#include <filesystem>
#include <map>
#include <string>
#include <vector>

#include "support/run_program.hpp"

namespace loqsmith::test {

inline const std::string kWellWater = "well-water-herbicides";
inline const std::string kTabletCoating = "tablet-coating-solvents";

/// The folder of a sample run in the checkout.
std::filesystem::path sample_run(const std::string& name);

/// A copy that may be spoilt, named as the original.
std::filesystem::path copy_of_sample_run(const std::string& name,
                                         const std::filesystem::path& where);

/// `loqsmith process FOLDER --out OUT` and more arguments.
ProgramRun process(const std::filesystem::path& folder,
                   const std::filesystem::path& out,
                   const std::vector<std::string>& more = {},
                   const std::vector<std::string>& environment = {},
                   const std::string& working_folder = "");

/// The bytes of every CSV table of a published run, by file name.
std::map<std::string, std::string> tables_of(const std::filesystem::path& run);

/// The tables that every run publishes, by name.
const std::vector<std::string>& table_names();
std::vector<std::string> names_of(
    const std::map<std::string, std::string>& tables);

bool holds(const std::string& text, const std::string& part);

}  // namespace loqsmith::test
