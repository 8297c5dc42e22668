#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "loqsmith/record/published_run.hpp"
#include "loqsmith/sheets/read_sheets.hpp"

namespace loqsmith {

/// A sequence folder whose sheets have been read and may be processed.
struct SequenceFolder {
  std::filesystem::path path;  ///< absolute, symbolic links resolved
  SheetTexts texts;
  Sheets sheets;
  std::vector<InputFile> sheet_files;
  std::vector<std::string> unlisted_files;  ///< in no row, no sheet; sorted
};

/// Reads sequence.csv, levels.csv, method.xml and, where it is there,
/// amendments.csv (not yet worked into the method) and checks that no path of
/// the sequence sheet leaves the folder.
///
/// @throws InputError with all problems of all sheets: the sequence cannot be
///         processed.
SequenceFolder open_sequence_folder(const std::filesystem::path& folder,
                                    const std::string& name);

}  // namespace loqsmith
