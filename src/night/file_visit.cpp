#include "loqsmith/night/file_visit.hpp"

#include <map>
#include <string_view>
#include <system_error>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"

namespace loqsmith {

std::vector<FileTask> file_tasks(const Sequence& sequence) {
  std::vector<FileTask> tasks;
  std::map<std::string, std::size_t, std::less<>> place;
  for (const Injection& injection : sequence.injections) {
    const auto [entry, is_new] =
        place.try_emplace(injection.file, tasks.size());
    if (is_new) tasks.push_back({injection.file, {}});
    tasks[entry->second].injections.push_back(&injection);
  }
  return tasks;
}

FileVisit visit_file(const SequenceFolder& folder, const std::string& file) {
  const Method& method = folder.sheets.method;
  FileVisit visit;
  visit.input.path = file;
  try {
    const std::string bytes = read_input_file(folder.path / file, file);
    visit.input.bytes = bytes.size();
    visit.input.sha256 = sha256_hex(bytes);
    const ReadPolicy policy{.time_unit_if_none = method.time_unit_if_none,
                            .checksum_required = method.checksum_required};
    visit.contents =
        read_chromatogram_file(bytes, file, policy, &method.traces);
    visit.input.format = visit.contents.format;
    visit.input.warnings = visit.contents.warnings;
  } catch (const InputError& error) {
    visit.problems = error.problems();
  } catch (const std::system_error& error) {
    visit.problems.push_back(
        {.file = file,
         .found = error.code().message(),
         .expected = "a readable chromatogram file",
         .mend = "put the file in its place and allow reading it"});
  }
  return visit;
}

const FileRun* run_of(const FileContents& contents,
                      const Injection& injection) {
  const std::vector<MeantRun> runs = find_runs(contents, injection.run);
  return runs.size() == 1 ? runs.front().run : nullptr;
}

}  // namespace loqsmith
