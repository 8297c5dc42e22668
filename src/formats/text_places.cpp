#include "loqsmith/formats/text_places.hpp"

namespace loqsmith {
namespace {

// The place `between` behind the place `start`.
TextPlace step(TextPlace start, std::string_view between) {
  const TextPlace relative = line_column(between, between.size());
  if (relative.line == 1) {
    return {start.line, start.column + relative.column - 1};
  }
  return {start.line + relative.line - 1, relative.column};
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
