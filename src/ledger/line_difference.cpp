#include <algorithm>
#include <string>
#include <vector>

#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/method_seen.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kMostLinesShown = 40;
constexpr std::size_t kMostBytesShown = 200;
// The table below has a cell for each pair of lines.
constexpr std::size_t kMostPairs = std::size_t{4} << 20U;

using Lines = std::vector<std::string>;

// Of what is left below each pair of lines: how many lines both texts share, in
// the same order (the longest common subsequence, by dynamic programming).
class Shared {
 public:
  Shared(const Lines& before, const Lines& after)
      : width_(after.size() + 1), length_((before.size() + 1) * width_, 0) {
    for (std::size_t i = before.size(); i-- > 0;) {
      for (std::size_t j = after.size(); j-- > 0;) {
        length_[i * width_ + j] = before[i] == after[j]
                                      ? at(i + 1, j + 1) + 1
                                      : std::max(at(i + 1, j), at(i, j + 1));
      }
    }
  }

  std::size_t at(std::size_t i, std::size_t j) const {
    return length_[i * width_ + j];
  }

 private:
  std::size_t width_;
  std::vector<std::size_t> length_;
};

std::string shown(char sign, std::size_t index, const std::string& line) {
  std::string text(trim(line));
  if (text.size() > kMostBytesShown) text = text.substr(0, kMostBytesShown);
  return sign + std::to_string(index + 1) + ' ' + text;
}

Lines differences(const Lines& before, const Lines& after) {
  const Shared shared(before, after);
  Lines found;
  std::size_t i = 0;
  std::size_t j = 0;
  while (i < before.size() || j < after.size()) {
    if (i < before.size() && j < after.size() && before[i] == after[j]) {
      ++i;
      ++j;
    } else if (j == after.size() ||
               (i < before.size() &&
                shared.at(i + 1, j) >= shared.at(i, j + 1))) {
      found.push_back(shown('-', i, before[i]));
      ++i;
    } else {
      found.push_back(shown('+', j, after[j]));
      ++j;
    }
  }
  return found;
}

}  // namespace

std::string line_difference(const std::string& before,
                            const std::string& after) {
  const Lines old_lines = split(before, '\n');
  const Lines new_lines = split(after, '\n');
  if (old_lines.size() * new_lines.size() > kMostPairs) {
    return "too long to be compared: " + std::to_string(old_lines.size()) +
           " lines before, " + std::to_string(new_lines.size()) + " now";
  }
  Lines found = differences(old_lines, new_lines);
  if (found.size() > kMostLinesShown) {
    const std::size_t more = found.size() - kMostLinesShown;
    found.resize(kMostLinesShown);
    found.push_back("and " + std::to_string(more) + " lines more");
  }
  return join(found, "\n");
}

}  // namespace loqsmith
