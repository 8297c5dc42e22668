#pragma once

#include <cstddef>
#include <string>
#include <string_view>

#include "loqsmith/base/xml_scan.hpp"

namespace loqsmith {

/// Where a strict scan stands in its document, and the smallest steps that it
/// takes. Every step throws InputError where the document breaks a rule.
class XmlCursor {
 public:
  XmlCursor(std::string_view bytes, const std::string& file,
            const XmlLimits& limits)
      : bytes_(bytes), file_(file), limits_(limits) {}

  std::size_t offset() const { return offset_; }
  std::string_view bytes() const { return bytes_; }
  const XmlLimits& limits() const { return limits_; }
  bool at_end() const { return offset_ >= bytes_.size(); }
  char peek() const { return at_end() ? '\0' : bytes_[offset_]; }
  bool looking_at(std::string_view text) const {
    return bytes_.substr(offset_, text.size()) == text;
  }
  std::string_view since(std::size_t start) const {
    return bytes_.substr(start, offset_ - start);
  }
  void only_ascii() { ascii_ = true; }  ///< as the declaration says

  void advance(std::size_t bytes) { offset_ += bytes; }
  void rewind(std::size_t offset) { offset_ = offset; }
  bool skip(std::string_view text);  ///< true when it stood here
  bool skip_blanks();                ///< true when there was one

  /// @param what  "a blank" and so on, for the message
  void require(std::string_view text, const std::string& what);
  /// A Name; colons are looked at by split_name.
  std::string_view take_name(const std::string& what);
  /// "&lt;" and its like; the cursor stands on the ampersand.
  void take_reference();
  /// Text up to the next '<': no "]]>", references as they should be.
  void take_text();
  /// Legal characters up to and with the mark; the text before the mark.
  std::string_view take_until(std::string_view mark, const std::string& what);
  /// A quoted attribute value, quotes left out.
  std::string_view take_attribute_value();

  [[noreturn]] void fail(std::size_t offset, const std::string& found,
                         const std::string& expected,
                         const std::string& mend = {}) const;
  /// The document ends too early.
  [[noreturn]] void fail_incomplete(const std::string& expected) const;
  /// The next character is not what should stand here.
  [[noreturn]] void fail_here(const std::string& expected) const;

 private:
  void take_character();  ///< one legal character
  void require_legal(std::string_view text, std::size_t offset);

  std::string_view bytes_;
  const std::string& file_;
  const XmlLimits& limits_;
  std::size_t offset_ = 0;
  bool ascii_ = false;
};

}  // namespace loqsmith
