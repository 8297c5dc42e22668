#pragma once

#include <string>
#include <vector>

namespace loqsmith::test {

/// What the real program did.
struct ProgramRun {
  int status = -1;  ///< exit status; minus the signal's number when killed
  std::string out;
  std::string err;
};

/// Runs the program with these arguments and no terminal.
/// @param environment  "NAME=value" to add
/// @param folder       working directory; empty: the test's own
ProgramRun run_program(const std::string& program,
                       const std::vector<std::string>& arguments,
                       const std::vector<std::string>& environment = {},
                       const std::string& folder = "");

}  // namespace loqsmith::test
