#pragma once

#include <string>
#include <vector>

namespace loqsmith::test {

/// Something that the reader must say of a method.
struct WantedProblem {
  std::string at;     ///< the text that the place must point to
  std::string words;  ///< contained in the message
};

/// A method, what the reader must say of it, and what the schema does.
struct MethodCase {
  std::string name;
  std::string text;
  std::vector<WantedProblem> problems;  ///< empty: a good method
  /// Empty: the schema has the reader's verdict. Otherwise it has the other one
  /// for the reason that schemas/README.md lists by this name.
  std::string beyond_schema;
};

std::vector<MethodCase> good_methods();
std::vector<MethodCase> bad_methods();

}  // namespace loqsmith::test
