#pragma once

#include <filesystem>
#include <map>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/record/read_published.hpp"

namespace loqsmith {

// The published tables read back; each throws InputError where a file is no
// such table.

/// By injection and analyte; without derivations.
using ResultTable = std::map<std::pair<int, std::string>, PublishedResult>;

ResultTable read_result_table(const std::filesystem::path& path);
std::vector<PublishedPeak> read_peaks_table(const std::filesystem::path& path);
std::vector<CheckRow> read_checks_table(const std::filesystem::path& path);

}  // namespace loqsmith
