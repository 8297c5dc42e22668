#include "loqsmith/ledger/manifest.hpp"

#include <nlohmann/json.hpp>
#include <system_error>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/line.hpp"
#include "loqsmith/ledger/out_layout.hpp"

namespace loqsmith {
namespace {

using Json = nlohmann::ordered_json;

std::string json_string(const std::string& text) { return Json(text).dump(); }

bool is_missing(const std::system_error& error) {
  return error.code() == std::errc::no_such_file_or_directory ||
         error.code() == std::errc::not_a_directory;
}

std::string why_unreadable(const std::system_error& error) {
  return is_missing(error) ? "it is missing"
                           : std::string("it cannot be read: ") + error.what();
}

// What is wrong with one published file; empty where nothing is.
std::string check_file(const std::filesystem::path& folder,
                       const ManifestFile& listed) {
  try {
    if (!unsafe_path(folder, listed.path).empty()) {
      return "its path leads out of the run's folder";
    }
    const FileDigest found = digest_file(folder / listed.path);
    if (found.bytes != listed.bytes) {
      return "it has " + std::to_string(found.bytes) +
             " bytes, the manifest says " + std::to_string(listed.bytes);
    }
    if (found.sha256 != listed.sha256) {
      return "it was changed: its SHA-256 is not the manifest's";
    }
    return {};
  } catch (const std::system_error& error) {
    return why_unreadable(error);
  }
}

Manifest manifest_of(const Json& json) {
  Manifest manifest;
  manifest.run = json.at("run").get<std::string>();
  for (const Json& file : json.at("files")) {
    manifest.files.push_back({file.at("path").get<std::string>(),
                              file.at("bytes").get<std::uint64_t>(),
                              file.at("sha256").get<std::string>()});
  }
  return manifest;
}

}  // namespace

Manifest make_manifest(const std::filesystem::path& folder,
                       const std::string& run) {
  Manifest manifest{run, {}};
  for (const std::string& path : files_below(folder)) {
    if (path == OutLayout::kOwner) continue;
    const auto status = std::filesystem::symlink_status(folder / path);
    if (!std::filesystem::is_regular_file(status) || !is_utf8(path)) {
      throw Halt(ExitStatus::ProgramFault,
                 "cannot publish " + in_quotes(path) + " of " + run);
    }
    const FileDigest digest = digest_file(folder / path);
    manifest.files.push_back({path, digest.bytes, digest.sha256});
  }
  return manifest;
}

std::string manifest_text(const Manifest& manifest) {
  std::string text =
      "{\n  \"run\": " + json_string(manifest.run) + ",\n  \"files\": [";
  const char* separator = "\n";
  for (const ManifestFile& file : manifest.files) {
    text += separator;
    text += "    {\"path\": " + json_string(file.path) +
            ", \"bytes\": " + std::to_string(file.bytes) +
            ", \"sha256\": " + json_string(file.sha256) + "}";
    separator = ",\n";
  }
  return text + "\n  ]\n}\n";
}

Outcome<Manifest> read_manifest(std::string_view text) {
  try {
    const Manifest manifest = manifest_of(Json::parse(text));
    if (manifest_text(manifest) == text) return manifest;
  } catch (const Json::exception&) {
    // Falls through: whatever is wrong with it, it is not ours.
  }
  return NotApplicable{"it is malformed"};
}

RunCheck check_run_folder(const std::filesystem::path& folder,
                          const std::string& run,
                          const std::string& manifest_sha256) {
  const std::string place = run + '/' + OutLayout::kManifest;
  RunCheck check;
  std::string text;
  try {
    text = read_file(folder / OutLayout::kManifest);
  } catch (const std::system_error& error) {
    check.deviations.push_back({place, why_unreadable(error)});
    return check;
  }
  if (sha256_hex(text) != manifest_sha256) {
    check.deviations.push_back(
        {place,
         "it was changed: its SHA-256 is not the ledger's, so the "
         "run's files cannot be held against it"});
    return check;
  }
  const auto manifest = read_manifest(text);
  if (!manifest || manifest->run != run) {
    check.deviations.push_back(
        {place, manifest ? "it belongs to another run" : manifest.reason()});
    return check;
  }
  check.manifest_trusted = true;
  for (const ManifestFile& file : manifest->files) {
    const std::string what = check_file(folder, file);
    if (!what.empty())
      check.deviations.push_back({run + '/' + file.path, what});
    check.files.push_back(file.path);
  }
  return check;
}

}  // namespace loqsmith
