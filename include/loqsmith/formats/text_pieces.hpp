#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// A run of text in the document.
struct TextPiece {
  std::size_t begin = 0;
  std::size_t end = 0;
  bool verbatim = false;  ///< no references to expand
};

/// The text of one element, which may come in pieces, around comments and CDATA
/// sections. A view into the document where that is possible, otherwise into
/// `storage`.
std::string_view joined_text(const std::vector<TextPiece>& pieces,
                             std::string_view document, std::string& storage);

}  // namespace loqsmith
