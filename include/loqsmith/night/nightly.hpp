#pragma once

#include <chrono>
#include <cstddef>
#include <filesystem>
#include <functional>
#include <memory>
#include <string>
#include <vector>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/ledger/ledger.hpp"

namespace loqsmith {

struct NightlyOptions {
  std::filesystem::path root;
  std::filesystem::path out;
  /// A folder waits until none of its files has changed for so long ...
  std::chrono::seconds settle{300};
  /// ... and none is missing; after so long it is processed with what is there.
  std::chrono::seconds give_up{std::chrono::hours(12)};
  bool rehash = false;  ///< look at the contents, whatever the times say
  unsigned jobs = 1;
  std::chrono::seconds wait{0};
  bool report = true;
  std::shared_ptr<const SigningKey> machine_key;  ///< as in ProcessOptions
  LedgerActor actor;
  Clock clock;
  /// Asked before each sequence; true: end here.
  std::function<bool()> interrupted;
  std::function<void(const std::string&, std::size_t, std::size_t)> progress;
};

/// What became of one sequence folder.
struct NightlyLine {
  enum class Outcome { Published, Refused, Unchanged, Waiting, Elsewhere };

  std::filesystem::path folder;
  std::string sequence;  ///< name in OUT
  Outcome outcome = Outcome::Unchanged;
  std::string why;                  ///< one sentence's worth
  std::filesystem::path published;  ///< empty: nothing was
  ExitStatus status = ExitStatus::Done;
  std::vector<std::string> messages;
};
std::string outcome_name(NightlyLine::Outcome outcome);

struct NightlyOutcome {
  ExitStatus status = ExitStatus::Done;  ///< the worst of the sequences
  bool interrupted = false;
  std::string begun;
  std::string finished;
  std::vector<NightlyLine> lines;
};

/// Every settled sequence folder below a root that has not been processed in
/// its present state (folder_state.hpp). The state is that of the ledger's last
/// run or refusal of the folder, whoever asked for it; where it differs, the
/// contents decide. A refused folder is not tried again until it changes.
/// Writes the line `night` and .work/last-night.json.
///
/// @param said  called for each folder as soon as it is done with
/// @throws Halt as process_sequence does, but for a sequence that another
///         process has at work
NightlyOutcome process_night(
    const NightlyOptions& options,
    const std::function<void(const NightlyLine&)>& said);

}  // namespace loqsmith
