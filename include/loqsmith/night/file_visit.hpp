#pragma once

#include <cstddef>
#include <filesystem>
#include <functional>
#include <string>
#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "loqsmith/night/sequence_folder.hpp"
#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// One chromatogram file and the injections that lie in it: the unit of work.
struct FileTask {
  std::string file;  ///< relative to the folder
  std::vector<const Injection*> injections;
};

/// The files of a sequence in order of their first injection.
std::vector<FileTask> file_tasks(const Sequence& sequence);

/// A file as read: the bytes that were hashed are the bytes that were decoded.
struct FileVisit {
  InputFile input;  ///< without a hash where the file could not be read
  FileContents contents;
  std::vector<InputProblem> problems;  ///< why it was refused; empty: read
};

/// Reads, hashes and decodes one file; only traces that the method names. What
/// is wrong with the file, or what the operating system refuses, becomes a
/// problem: one bad file never costs the night.
FileVisit visit_file(const SequenceFolder& folder, const std::string& file);

/// The run of the file that an injection means; nothing where it is not there.
const FileRun* run_of(const FileContents& contents, const Injection& injection);

}  // namespace loqsmith
