#pragma once

#include <cstddef>
#include <string_view>
#include <vector>

#include "loqsmith/base/xml_cursor.hpp"
#include "loqsmith/base/xml_namespaces.hpp"

namespace loqsmith {

/// Reads tags and keeps what is open: names and namespaces.
class XmlTags {
 public:
  /// Takes a start tag, the cursor on its '<'; the handler hears of it, and of
  /// its end where the tag is an empty element.
  void take_start(XmlCursor& cursor, XmlHandler& handler);
  /// Takes an end tag, the cursor on its '<'.
  void take_end(XmlCursor& cursor, XmlHandler& handler);

  std::size_t depth() const { return open_.size(); }
  std::string_view innermost() const { return open_.back(); }

 private:
  void take_attributes(XmlCursor& cursor);
  void declare_namespaces(const XmlCursor& cursor);
  void declare(const XmlCursor& cursor, const XmlAttribute& attribute,
               std::string_view prefix);
  void resolve_attributes(const XmlCursor& cursor);
  void refuse_twins(const XmlCursor& cursor);

  std::vector<std::string_view> open_;
  XmlNamespaces namespaces_;
  std::vector<XmlAttribute> attributes_;  ///< of the tag in hand
};

}  // namespace loqsmith
