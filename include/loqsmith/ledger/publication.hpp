#pragma once

#include <chrono>
#include <filesystem>
#include <functional>
#include <memory>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/ledger/ledger.hpp"
#include "loqsmith/ledger/run_history.hpp"

namespace loqsmith {

struct MethodSeen;

/// OUT, opened for writing: creates the folder where needed (Halt 73), takes
/// the lock for each step, runs recovery first. All failures are Halt: 74 for
/// input, output and a damaged ledger, 75 for locks not to be had in time.
struct PublicationPlace {
  std::filesystem::path out;
  LedgerActor actor;
  Clock clock;
  std::chrono::seconds wait{0};
};

/// Creates OUT and mends what an interrupted run left, as the architecture
/// says. @return what was found, one sentence each, for the terminal; empty
/// where there was nothing.
std::vector<std::string> recover(const PublicationPlace& place);

/// A run at work. Holds the owner lock of its staging folder until destroyed;
/// destroyed without publish(), the next writer records it as abandoned.
class RunAtWork {
 public:
  /// Step 1: recovery, run number, line `run-begun`, staging folder.
  /// `sequence` may hold '/' (a path below ROOT).
  /// @param folder  where the sequence lies; a name already used for another
  ///                folder is refused: InputError.
  /// @param method  noted after the run-begun line where it is new to OUT or
  ///                has changed (method_seen.hpp); null: nothing is noted
  /// @param consider  called before anything is written, with the published
  ///                  runs of the sequence; what it throws ends the matter.
  /// @throws Halt 75 when the same sequence is at work elsewhere.
  static RunAtWork begin(
      const PublicationPlace& place, const std::string& sequence,
      const std::string& folder,
      const std::vector<std::pair<std::string, std::string>>& detail,
      const MethodSeen* method = nullptr,
      const std::function<void(const std::vector<RunEvents>&)>& consider = {});

  RunAtWork(RunAtWork&&) noexcept;
  RunAtWork& operator=(RunAtWork&&) noexcept;
  RunAtWork(const RunAtWork&) = delete;
  RunAtWork& operator=(const RunAtWork&) = delete;
  ~RunAtWork();

  int run_number() const;
  const LedgerPlace& begun() const;  ///< its run-begun line
  const std::filesystem::path& staging() const;
  const std::vector<std::string>& recovered() const;
  /// Which earlier runs of the sequence persons have signed
  /// (describe_signed_runs()); empty: none. Its run-begun line says it too.
  const std::string& signed_before() const;

  /// Steps 3 and 4: writes manifest.json over everything in staging, flushes
  /// all files and folders, appends `run-published`, renames into place.
  /// @param machine_key  signs the line; null: it is not signed
  /// @return the published folder.
  std::filesystem::path publish(
      const std::vector<std::pair<std::string, std::string>>& detail,
      const SigningKey* machine_key = nullptr);

 private:
  struct State;
  explicit RunAtWork(std::unique_ptr<State> state);
  std::unique_ptr<State> state_;
};

}  // namespace loqsmith
