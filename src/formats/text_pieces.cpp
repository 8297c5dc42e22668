#include "loqsmith/formats/text_pieces.hpp"

#include "loqsmith/base/xml_scan.hpp"

namespace loqsmith {

std::string_view joined_text(const std::vector<TextPiece>& pieces,
                             std::string_view document, std::string& storage) {
  const auto view = [&](const TextPiece& piece) {
    return document.substr(piece.begin, piece.end - piece.begin);
  };
  if (pieces.empty()) return {};
  if (pieces.size() == 1 &&
      (pieces.front().verbatim ||
       view(pieces.front()).find('&') == std::string_view::npos)) {
    return view(pieces.front());
  }
  for (const TextPiece& piece : pieces) {
    storage +=
        piece.verbatim ? std::string(view(piece)) : xml_text(view(piece));
  }
  return storage;
}

}  // namespace loqsmith
