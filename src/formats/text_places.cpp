#include "loqsmith/formats/text_places.hpp"

#include <algorithm>

namespace loqsmith {
namespace {

// The place `between` behind the place `start`.
TextPlace step(TextPlace start, std::string_view between) {
  const std::size_t last = between.rfind('\n');
  if (last == std::string_view::npos) {
    return {start.line, start.column + between.size()};
  }
  const auto lines = std::count(between.begin(), between.end(), '\n');
  return {start.line + static_cast<std::size_t>(lines), between.size() - last};
}

}  // namespace

TextPlace TextPlaces::at(std::size_t offset) {
  if (next_mark_ > mark_) {
    at_mark_ = mark_ == 0
                   ? line_column(text_, next_mark_)
                   : step(at_mark_, text_.substr(mark_, next_mark_ - mark_));
    mark_ = next_mark_;
  }
  if (mark_ == 0 || offset < mark_) return line_column(text_, offset);
  return step(at_mark_, text_.substr(mark_, offset - mark_));
}

}  // namespace loqsmith
