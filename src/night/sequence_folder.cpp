#include "loqsmith/night/sequence_folder.hpp"

#include <algorithm>
#include <set>
#include <system_error>
#include <utility>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

constexpr const char* kAmendments = "amendments.csv";
constexpr const char* kSignature = "amendments.csv.sig";
constexpr std::uint64_t kMostSheetBytes = std::uint64_t{64} << 20U;

fs::path real_folder(const fs::path& folder) {
  std::error_code error;
  if (!fs::is_directory(folder, error)) {
    throw InputError({.file = folder.string(),
                      .found = "no such folder",
                      .expected = "a sequence folder",
                      .mend = "name the folder that holds sequence.csv"});
  }
  return fs::canonical(folder);
}

// Collects the problems of several steps, so that all are listed at once.
class Problems {
 public:
  template <class Step>
  void collect(Step&& step) {
    try {
      step();
    } catch (const InputError& error) {
      all_.insert(all_.end(), error.problems().begin(), error.problems().end());
    }
  }

  void add(InputProblem problem) { all_.push_back(std::move(problem)); }

  void throw_any() {
    if (!all_.empty()) throw InputError(std::move(all_));
  }

 private:
  std::vector<InputProblem> all_;
};

std::string read_sheet(const fs::path& folder, const std::string& name,
                       std::vector<InputFile>& files) {
  std::string text;
  try {
    text = read_input_file(folder / name, name, kMostSheetBytes);
  } catch (const std::system_error& error) {
    throw InputError({.file = name,
                      .found = error.code().message(),
                      .expected = "a readable sheet",
                      .mend = "put " + name + " into the sequence folder"});
  }
  files.push_back({.path = name,
                   .sha256 = sha256_hex(text),
                   .bytes = text.size(),
                   .format = "sheet",
                   .warnings = {}});
  return text;
}

void check_paths(const SequenceFolder& folder, Problems& problems) {
  for (const Injection& injection : folder.sheets.sequence.injections) {
    const std::string why = unsafe_path(folder.path, injection.file);
    if (why.empty()) continue;
    problems.add(
        {.file = "sequence.csv",
         .line = injection.line,
         .found = in_quotes(injection.file) + " (" + why + ")",
         .expected = "a path below the sequence folder",
         .mend = "put the file into the folder and name it from there"});
  }
}

std::vector<std::string> unlisted(const SequenceFolder& folder) {
  std::set<std::string> known{"sequence.csv", "levels.csv", "method.xml",
                              kAmendments};
  for (const Injection& injection : folder.sheets.sequence.injections) {
    known.insert(fs::path(injection.file).lexically_normal().generic_string());
  }
  std::vector<std::string> files = files_below(folder.path);
  std::erase_if(files,
                [&](const std::string& file) { return known.contains(file); });
  return files;
}

}  // namespace

SequenceFolder open_sequence_folder(const fs::path& folder,
                                    const std::string& name) {
  SequenceFolder opened;
  opened.path = real_folder(folder);
  Problems problems;
  const auto read = [&](const char* sheet, std::string& text) {
    problems.collect(
        [&] { text = read_sheet(opened.path, sheet, opened.sheet_files); });
  };
  read("sequence.csv", opened.texts.sequence_csv);
  read("levels.csv", opened.texts.levels_csv);
  read("method.xml", opened.texts.method_xml);
  if (is_there(opened.path / kAmendments)) {
    read(kAmendments, opened.texts.amendments_csv.emplace());
  }
  if (is_there(opened.path / kSignature)) {
    problems.add({.file = kSignature,
                  .found = "a signature",
                  .expected = "none: signatures are not available in this "
                              "version",
                  .mend = "take it out of the folder"});
  }
  problems.throw_any();
  opened.sheets = read_sheets(opened.texts, name);
  check_paths(opened, problems);
  problems.throw_any();
  opened.unlisted_files = unlisted(opened);
  return opened;
}

}  // namespace loqsmith
