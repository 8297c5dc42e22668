#pragma once

#include <stdexcept>
#include <string>

namespace loqsmith {

/// How the program ends; the numbers from 64 up follow sysexits.h.
enum class ExitStatus : int {
  Done = 0,
  NeedsPerson = 1,    ///< done, but something was withheld or needs a person
  WrongUse = 64,      ///< wrong use of the command line
  BadInput = 65,      ///< the sequence could not be processed
  ProgramFault = 70,  ///< a fault of the program
  CannotCreate = 73,  ///< OUT cannot be created
  IoFailed = 74,      ///< input or output failed, or the ledger is damaged
  Locked = 75,        ///< another process holds OUT or the sequence
};

/// The night cannot go on: stop at once, nothing half written. Thrown only by
/// ledger, history, night and cli.
class Halt : public std::runtime_error {
 public:
  Halt(ExitStatus status, const std::string& message)
      : std::runtime_error(message), status_(status) {}

  ExitStatus status() const { return status_; }

 private:
  ExitStatus status_;
};

}  // namespace loqsmith
