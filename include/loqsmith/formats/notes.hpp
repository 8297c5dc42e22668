#pragma once

#include <cstddef>
#include <string>
#include <unordered_set>
#include <utility>
#include <vector>

namespace loqsmith {

/// Warnings of a file, each said once, and not more than a person would read.
class Notes {
 public:
  void add(std::string note) {
    if (notes_.size() > kMost || !said_.insert(note).second) return;
    notes_.push_back(notes_.size() == kMost ? "further warnings left out"
                                            : std::move(note));
  }

  const std::vector<std::string>& all() const { return notes_; }

 private:
  static constexpr std::size_t kMost = 50;
  std::vector<std::string> notes_;
  std::unordered_set<std::string> said_;
};

}  // namespace loqsmith
