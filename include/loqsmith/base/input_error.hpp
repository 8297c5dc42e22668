#pragma once

#include <cstddef>
#include <stdexcept>
#include <string>
#include <vector>

namespace loqsmith {

/// One thing wrong with what was handed in: where it stands, what is there,
/// what should be there, and what the user can do about it.
struct InputProblem {
  std::string file;        ///< as the user knows it (relative to the folder)
  std::size_t line = 0;    ///< from 1; 0 where a line means nothing
  std::size_t column = 0;  ///< from 1, in bytes; 0 where unknown
  std::string found;
  std::string expected;
  std::string mend;

  bool operator==(const InputProblem&) const = default;
};

/// "data/inj07.mzML:12:9: expected 2048 intensities, found 2047; copy the
/// file again". Empty parts are left out together with their punctuation.
std::string describe(const InputProblem& problem);

/// Bad input. Thrown by readers, caught once per injection and per sequence;
/// never thrown by computations. Carries at least one problem.
class InputError : public std::runtime_error {
 public:
  explicit InputError(InputProblem problem);
  explicit InputError(std::vector<InputProblem> problems);

  const std::vector<InputProblem>& problems() const { return problems_; }

 private:
  std::vector<InputProblem> problems_;
};

}  // namespace loqsmith
