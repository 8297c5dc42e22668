#pragma once

#include <cstddef>
#include <map>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "loqsmith/formats/text_pieces.hpp"

namespace loqsmith {

/// One mzML element with what is below it, as long as it is needed. Views point
/// into the document.
struct MzmlNode {
  std::string_view name;  ///< local name; its namespace is mzML's
  std::size_t offset = 0;
  std::vector<std::pair<std::string_view, std::string>> attributes;
  std::vector<MzmlNode> children;
  std::vector<TextPiece> text;

  /// The attribute's value; nullptr where it is not written.
  const std::string* attribute(std::string_view wanted) const;
  /// The first child of that name; nullptr where there is none.
  const MzmlNode* child(std::string_view wanted) const;
};

/// A cvParam as written; empty where an attribute is missing.
struct CvParam {
  std::string accession;
  std::string value;
  std::string unit_accession;
  std::string unit_name;
  std::string unit_cv;
  std::size_t offset = 0;
};

CvParam cv_param(const MzmlNode& node);

/// The groups of parameters met so far, by id.
using ParamGroups = std::map<std::string, std::vector<CvParam>, std::less<>>;

}  // namespace loqsmith
