#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/halt.hpp"

namespace loqsmith {

/// One verb of the command line.
struct Verb {
  std::string_view name;
  std::string_view arguments;  ///< "FOLDER... --out OUT"
  std::string_view summary;    ///< one line
  ExitStatus (*run)(const std::vector<std::string>& arguments);
};

/// The verbs that this version has, in the order of the help.
const std::vector<Verb>& verbs();

ExitStatus process_verb(const std::vector<std::string>& arguments);
ExitStatus nightly_verb(const std::vector<std::string>& arguments);
ExitStatus inspect_verb(const std::vector<std::string>& arguments);
ExitStatus sign_verb(const std::vector<std::string>& arguments);
ExitStatus signers_verb(const std::vector<std::string>& arguments);
ExitStatus explain_verb(const std::vector<std::string>& arguments);
ExitStatus verify_verb(const std::vector<std::string>& arguments);

}  // namespace loqsmith
