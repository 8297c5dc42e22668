#pragma once

#include <cstddef>
#include <string>
#include <utility>
#include <vector>

#include "loqsmith/base/input_error.hpp"

namespace loqsmith {

/// The problems of one sheet. Nobody reads more than the first thousand: what
/// comes after them is left out.
class SheetProblems {
 public:
  explicit SheetProblems(std::string file) : file_(std::move(file)) {}

  void add(std::size_t line, std::size_t column, std::string found,
           std::string expected, std::string mend);
  void add(const InputError& error);

  bool empty() const { return problems_.empty(); }
  const std::string& file() const { return file_; }
  bool full() const { return problems_.size() >= kMost; }

  /// In the order of their places.
  std::vector<InputProblem> sorted() const;

 private:
  static constexpr std::size_t kMost = 1000;

  std::string file_;
  std::vector<InputProblem> problems_;
};

}  // namespace loqsmith
