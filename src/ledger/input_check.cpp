#include "loqsmith/ledger/input_check.hpp"

#include <nlohmann/json.hpp>
#include <optional>
#include <system_error>
#include <vector>

#include "loqsmith/base/files.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using Json = nlohmann::json;

struct UsedFile {
  std::string path;
  std::string sha256;  // empty: it could not be read then
};

std::optional<std::vector<UsedFile>> used_files(const fs::path& record) {
  try {
    std::vector<UsedFile> files;
    const Json json = Json::parse(read_file(record));
    for (const Json& input : json.at("inputs")) {
      const Json& hash = input.at("sha256");
      files.push_back({input.at("path").get<std::string>(),
                       hash.is_null() ? "" : hash.get<std::string>()});
    }
    return files;
  } catch (const Json::exception&) {
    return std::nullopt;
  }
}

}  // namespace

// A link that stays in the folder is followed, as it was when the run was made.
const InputCheck::Found& InputCheck::find(const fs::path& folder,
                                          const std::string& file) {
  const std::string key = (folder / file).string();
  const auto known = found_.find(key);
  if (known != found_.end()) return known->second;
  Found found;
  try {
    if (!fs::exists(folder / file)) {
      found.why = "it is not there any more";
    } else if (!unsafe_path(folder, file).empty()) {
      found.why = "its path leads out of the folder";
    } else {
      found.sha256 = digest_file(fs::canonical(folder / file)).sha256;
    }
  } catch (const std::system_error& error) {
    found.why = "it cannot be read: " + error.code().message();
  }
  return found_.emplace(key, std::move(found)).first->second;
}

void InputCheck::check_run(const fs::path& folder, const RunEvents& run,
                           VerifyReport& report) {
  const fs::path record = folder / "record.json";
  const auto files = is_there(record) ? used_files(record) : std::nullopt;
  if (!files) {
    report.notes.push_back(run.object +
                           " has no record.json that names its inputs");
    return;
  }
  for (const UsedFile& used : *files) {
    const std::string place = (fs::path(run.folder) / used.path).string();
    const Found& now = find(run.folder, used.path);
    if (used.sha256.empty()) {
      report.notes.push_back(place + ", an input of " + run.object +
                             ", could not be read when the run was made");
    } else if (now.sha256.empty()) {
      report.notes.push_back(place + ", an input of " + run.object + ": " +
                             now.why);
    } else if (now.sha256 != used.sha256) {
      report.deviations.push_back(
          {place, "it was changed: " + run.object +
                      " was computed from other bytes, of SHA-256 " +
                      used.sha256});
    } else {
      ++report.inputs;
    }
  }
}

}  // namespace loqsmith
