#pragma once

#include <chrono>
#include <cstddef>
#include <string>

#include "loqsmith/ledger/ledger.hpp"

namespace loqsmith {

/// Progress on standard error while it is a terminal; silent in a log.
class ProgressLine {
 public:
  explicit ProgressLine(std::string title);
  ~ProgressLine();
  ProgressLine(const ProgressLine&) = delete;
  ProgressLine& operator=(const ProgressLine&) = delete;

  void show(std::size_t done, std::size_t all);

 private:
  std::string title_;
  bool on_terminal_;
  bool shown_ = false;
  std::chrono::steady_clock::time_point begun_;
  std::chrono::steady_clock::time_point last_;
};

/// The operating system's user, the machine's name and this program.
LedgerActor current_actor(const std::string& operator_name);

}  // namespace loqsmith
