#include "loqsmith/base/input_error.hpp"

#include <utility>

namespace loqsmith {
namespace {

std::string describe_all(const std::vector<InputProblem>& problems) {
  std::string text;
  for (const InputProblem& problem : problems) {
    if (!text.empty()) text += '\n';
    text += describe(problem);
  }
  return text;
}

}  // namespace

std::string describe(const InputProblem& problem) {
  std::string text = problem.file;
  if (problem.line > 0) text += ':' + std::to_string(problem.line);
  if (problem.line > 0 && problem.column > 0) {
    text += ':' + std::to_string(problem.column);
  }
  if (!text.empty()) text += ": ";
  if (!problem.expected.empty()) text += "expected " + problem.expected;
  if (!problem.found.empty()) {
    if (!problem.expected.empty()) text += ", ";
    text += "found " + problem.found;
  }
  if (!problem.mend.empty()) text += "; " + problem.mend;
  return text;
}

InputError::InputError(InputProblem problem)
    : InputError(std::vector<InputProblem>{std::move(problem)}) {}

InputError::InputError(std::vector<InputProblem> problems)
    : std::runtime_error(describe_all(problems)),
      problems_(std::move(problems)) {}

}  // namespace loqsmith
