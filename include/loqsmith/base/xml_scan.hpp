#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// What a document may ask of memory and time. Anything beyond refuses it.
struct XmlLimits {
  std::size_t depth = 256;       ///< open elements
  std::size_t attributes = 256;  ///< of one element, declarations included
  std::size_t namespaces = 256;  ///< declarations in force at one place
  std::size_t name_bytes = 1024;
  std::size_t attribute_bytes = std::size_t{1} << 20U;
  std::size_t text_bytes = std::size_t{2} << 30U;  ///< one run of text
};

/// One attribute, xmlns declarations not among them.
struct XmlAttribute {
  std::string_view name;  ///< as written, prefix included
  std::string_view local_name;
  std::string_view namespace_uri;  ///< empty without a prefix
  std::string_view raw_value;      ///< references not expanded: xml_value()
  std::size_t offset = 0;          ///< of the name
};

/// One element's start tag (or empty-element tag). Valid during the call only.
struct XmlStart {
  std::string_view name;  ///< as written, prefix included
  std::string_view local_name;
  std::string_view namespace_uri;
  const std::vector<XmlAttribute>& attributes;
  std::size_t offset = 0;  ///< of '<'
  std::size_t end = 0;     ///< behind '>'
  std::size_t depth = 0;   ///< 1 for the root
};

/// One element's end; for an empty-element tag both offsets are behind '>'.
struct XmlEnd {
  std::string_view name;
  std::size_t offset = 0;  ///< of "</"
  std::size_t end = 0;     ///< behind '>'
  std::size_t depth = 0;
};

/// Receives what scan_xml meets, in document order.
class XmlHandler {
 public:
  virtual ~XmlHandler() = default;
  virtual void start_element(const XmlStart&) {}
  virtual void end_element(const XmlEnd&) {}
  /// Text inside the root, bytes [begin, end): references are not expanded;
  /// the text of a CDATA section comes without its marks, `verbatim` set.
  virtual void text(std::size_t /*begin*/, std::size_t /*end*/,
                    bool /*verbatim*/) {}
  /// True ends the scan at once: what follows is then not proved.
  virtual bool finished() const { return false; }
};

/// One strict forward scan of an XML 1.0 document in UTF-8 (byte order mark
/// allowed) or US-ASCII. It proves: one root, matching tags, well-formed
/// attributes without duplicates, declared prefixes, only the five built-in
/// entities and references to legal characters, no DOCTYPE, nothing behind the
/// root but comments, processing instructions and white space.
///
/// @param bytes  the whole document; ISO-8859-1 goes through xml_as_utf8 first
/// @param name   for messages
/// @throws InputError with line and column (in bytes) of the first fault
///
/// Source: Extensible Markup Language 1.0 (fifth edition, 2008), Namespaces in
/// XML 1.0 (third edition, 2009), both from memory. Stricter than both:
/// DOCTYPE, XML 1.1, UTF-16 and UTF-32 are refused.
void scan_xml(std::string_view bytes, const std::string& name,
              const XmlLimits& limits, XmlHandler& handler);

/// The same proof for a document in any of the three encodings, nothing more.
void check_xml(std::string_view bytes, const std::string& name,
               const XmlLimits& limits = {});

/// The document as UTF-8: `bytes` themselves, or, where the declaration says
/// ISO-8859-1, `storage` filled with the converted text whose declaration no
/// longer names an encoding (blanks stand in its place).
/// @throws InputError for a malformed declaration, another encoding, one that
///         contradicts the byte order mark, UTF-16, UTF-32, XML 1.1, no bytes
std::string_view xml_as_utf8(std::string_view bytes, const std::string& name,
                             std::string& storage);

/// An attribute's raw value as its reader means it: references expanded, line
/// ends and tabs read as blanks. Only for values that passed the scan.
std::string xml_value(std::string_view raw);

/// The same for text between tags: line ends become line feeds, tabs stay.
std::string xml_text(std::string_view raw);

/// A place in a text, counted from 1, columns in bytes.
struct TextPlace {
  std::size_t line = 1;
  std::size_t column = 1;
};

/// Where the byte at `offset` stands; lines end at line feeds; a byte order
/// mark takes no column.
TextPlace line_column(std::string_view bytes, std::size_t offset);

}  // namespace loqsmith
