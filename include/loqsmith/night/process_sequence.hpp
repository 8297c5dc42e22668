#pragma once

#include <chrono>
#include <filesystem>
#include <functional>
#include <map>
#include <memory>
#include <string>
#include <vector>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/ledger/ledger.hpp"

namespace loqsmith {

struct ProcessOptions {
  std::filesystem::path folder;
  std::filesystem::path out;
  std::string as;     ///< sequence name; empty: the folder's name
  std::string cause;  ///< why now, for the ledger; empty: somebody asked
  unsigned jobs = 1;
  std::chrono::seconds wait{0};
  bool report = true;
  /// Signs the line of the published run; null: it is not signed.
  std::shared_ptr<const SigningKey> machine_key;
  LedgerActor actor;
  Clock clock;
  /// Called with files done and files in all, from any thread, one at a time.
  std::function<void(std::size_t, std::size_t)> progress;
};

struct ProcessOutcome {
  ExitStatus status = ExitStatus::Done;
  std::filesystem::path published;    ///< empty: nothing was published
  std::vector<std::string> messages;  ///< for people, one sentence each
  std::map<std::string, std::size_t> results_by_status;
  std::chrono::duration<double> learn_seconds{0};
  std::chrono::duration<double> measure_seconds{0};
  std::chrono::duration<double> publish_seconds{0};
};

/// One sequence from folder to publication.
/// @throws InputError where the sequence cannot be processed (status 65,
///         nothing is published), Halt where the night cannot go on.
ProcessOutcome process_sequence(const ProcessOptions& options);

}  // namespace loqsmith
