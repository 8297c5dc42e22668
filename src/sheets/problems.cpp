#include "loqsmith/sheets/problems.hpp"

#include <algorithm>
#include <tuple>

namespace loqsmith {

void SheetProblems::add(std::size_t line, std::size_t column, std::string found,
                        std::string expected, std::string mend) {
  if (full()) return;
  problems_.push_back({file_, line, column, std::move(found),
                       std::move(expected), std::move(mend)});
}

void SheetProblems::add(const InputError& error) {
  for (const InputProblem& problem : error.problems()) {
    if (!full()) problems_.push_back(problem);
  }
}

std::vector<InputProblem> SheetProblems::sorted() const {
  std::vector<InputProblem> sorted = problems_;
  std::stable_sort(sorted.begin(), sorted.end(),
                   [](const InputProblem& a, const InputProblem& b) {
                     return std::tie(a.line, a.column) <
                            std::tie(b.line, b.column);
                   });
  return sorted;
}

}  // namespace loqsmith
