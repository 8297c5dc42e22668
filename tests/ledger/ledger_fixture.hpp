#pragma once

#include <memory>
#include <string>

#include "loqsmith/base/files.hpp"
#include "loqsmith/base/time.hpp"
#include "loqsmith/ledger/publication.hpp"
#include "loqsmith/ledger/verify.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {

/// A clock that starts on an evening in 2026 and goes on by one second a call.
inline Clock ticking_clock() {
  auto moment =
      std::make_shared<std::int64_t>(std::int64_t{1'772'352'900} * 1'000'000);
  return [moment] { return format_utc(*moment += 1'000'000); };
}

inline PublicationPlace place_at(const std::filesystem::path& out) {
  return {out,
          {"night", "Ada Quill", "bench-3", "loqsmith 0.1.0"},
          ticking_clock(),
          std::chrono::seconds{0}};
}

/// Two small files, one of them in a folder.
inline void write_run(const RunAtWork& run, const std::string& text) {
  write_new_file(run.staging() / "results.csv", "injection\n" + text + "\n");
  make_folders(run.staging() / "inputs");
  write_new_file(run.staging() / "inputs/method.xml", "<method/>\n");
}

/// Begins, writes and publishes one run of a sequence lying in /in/NAME.
inline std::filesystem::path publish_run(const PublicationPlace& place,
                                         const std::string& sequence,
                                         const std::string& text = "1") {
  RunAtWork run = RunAtWork::begin(place, sequence, "/in/" + sequence, {});
  write_run(run, text);
  return run.publish({{"status", "done"}});
}

/// All deviations, one a line, for messages and comparisons.
inline std::string deviations_of(const VerifyReport& report) {
  std::string text;
  for (const Deviation& deviation : report.deviations) {
    text += deviation.place + ": " + deviation.what + '\n';
  }
  return text;
}

}  // namespace loqsmith::test
