#pragma once

#include <cstdint>
#include <filesystem>
#include <optional>
#include <string>

namespace loqsmith {

/// Where things lie in OUT.
struct OutLayout {
  std::filesystem::path out;

  std::filesystem::path ledger() const { return out / "ledger.jsonl"; }
  std::filesystem::path head() const { return out / "ledger.head"; }
  /// The register of signers; there is none before the first is added.
  std::filesystem::path signers() const { return out / kSigners; }
  std::filesystem::path work() const { return out / kWork; }
  std::filesystem::path lock() const { return work() / "lock"; }
  /// The staging folder of the run whose `run-begun` line has this number: such
  /// a number is never given twice.
  std::filesystem::path staging(std::uint64_t begun) const;
  /// The number in a staging folder's name; nothing for other names.
  static std::optional<std::uint64_t> staging_number(const std::string& name);

  static constexpr const char* kSigners = "signers.jsonl";
  static constexpr const char* kWork = ".work";
  static constexpr const char* kOwner = "owner";
  static constexpr const char* kManifest = "manifest.json";
};

/// "run-0001".
std::string run_folder_name(int number);

/// The number in "run-0001"; nothing for any other text.
std::optional<int> run_folder_number(const std::string& name);

/// Why a sequence name may not stand as a path below OUT; empty where it may.
/// Its parts, separated by '/', are UTF-8 without control characters, do not
/// begin with a dot, are at most 200 bytes long and no names of our own.
std::string unfit_sequence_name(const std::string& sequence);

}  // namespace loqsmith
