#include "loqsmith/base/xml_scan.hpp"

#include <algorithm>

#include "loqsmith/base/xml_characters.hpp"
#include "loqsmith/base/xml_cursor.hpp"
#include "loqsmith/base/xml_declaration.hpp"
#include "loqsmith/base/xml_tags.hpp"

namespace loqsmith {
namespace {

class Scan {
 public:
  Scan(std::string_view bytes, const std::string& name, const XmlLimits& limits,
       XmlHandler& handler)
      : cursor_(bytes, name, limits), handler_(handler) {}

  void run() {
    const XmlDeclaration declaration = take_xml_declaration(cursor_);
    if (declaration.encoding == XmlEncoding::Latin1) {
      cursor_.fail(declaration.encoding_begin, "ISO-8859-1",
                   "the document converted to UTF-8");
    }
    while (!cursor_.at_end() && !handler_.finished()) {
      if (cursor_.peek() == '<') {
        take_markup();
      } else {
        take_text();
      }
    }
    if (handler_.finished()) return;
    if (tags_.depth() > 0) {
      cursor_.fail_incomplete("</" + std::string(tags_.innermost()) + ">");
    }
    if (!rooted_) cursor_.fail_incomplete("a root element");
  }

 private:
  void take_markup() {
    if (cursor_.looking_at("</")) {
      tags_.take_end(cursor_, handler_);
    } else if (cursor_.looking_at("<?")) {
      take_instruction();
    } else if (cursor_.looking_at("<!")) {
      take_declared();
    } else {
      take_start();
    }
  }

  void take_start() {
    if (rooted_ && tags_.depth() == 0) {
      cursor_.fail(cursor_.offset(), "an element behind the root's end",
                   "nothing more", "remove what was appended to the file");
    }
    rooted_ = true;
    tags_.take_start(cursor_, handler_);
  }

  void take_text() {
    const std::size_t start = cursor_.offset();
    if (tags_.depth() > 0) {
      cursor_.take_text();
      handler_.text(start, cursor_.offset(), false);
      return;
    }
    cursor_.skip_blanks();
    if (!cursor_.at_end() && cursor_.peek() != '<') {
      cursor_.fail_here(rooted_ ? "nothing behind the root's end"
                                : "an XML document");
    }
  }

  void take_instruction() {
    const std::size_t start = cursor_.offset();
    cursor_.advance(2);
    const std::string_view target = cursor_.take_name("a target");
    const bool reserved = target.size() == 3 &&
                          (target[0] == 'x' || target[0] == 'X') &&
                          (target[1] == 'm' || target[1] == 'M') &&
                          (target[2] == 'l' || target[2] == 'L');
    if (reserved || target.find(':') != std::string_view::npos) {
      cursor_.fail(start, "\"<?" + std::string(target) + "\"",
                   reserved ? "the XML declaration at the very beginning only"
                            : "a target without a colon");
    }
    if (!is_xml_blank(cursor_.peek())) {
      cursor_.require("?>", "\"?>\"");
    } else {
      cursor_.take_until("?>", "\"?>\"");
    }
  }

  void take_declared() {
    if (cursor_.skip("<!--")) {
      take_comment();
    } else if (tags_.depth() > 0 && cursor_.skip("<![CDATA[")) {
      const std::size_t start = cursor_.offset();
      const std::size_t size = cursor_.take_until("]]>", "\"]]>\"").size();
      handler_.text(start, start + size, true);
    } else if (cursor_.looking_at("<!DOCTYPE")) {
      cursor_.fail(cursor_.offset(), "a DOCTYPE", "a document without DOCTYPE",
                   "remove the declaration; no entities are needed");
    } else {
      // Cut short or wrong: both have their own message.
      cursor_.require(tags_.depth() > 0 ? "<![CDATA[" : "<!--",
                      "a comment, a tag or text");
    }
  }

  void take_comment() {
    const std::size_t start = cursor_.offset();
    const std::string_view text = cursor_.take_until("--", "\"-->\"");
    if (cursor_.at_end()) cursor_.fail_incomplete("\"-->\"");
    if (!cursor_.skip(">")) {
      cursor_.fail(start + text.size(), "\"--\" inside a comment",
                   "\"-->\" at its end");
    }
  }

  XmlCursor cursor_;
  XmlTags tags_;
  XmlHandler& handler_;
  bool rooted_ = false;
};

}  // namespace

void scan_xml(std::string_view bytes, const std::string& name,
              const XmlLimits& limits, XmlHandler& handler) {
  Scan(bytes, name, limits, handler).run();
}

void check_xml(std::string_view bytes, const std::string& name,
               const XmlLimits& limits) {
  XmlHandler nobody;
  std::string storage;
  scan_xml(xml_as_utf8(bytes, name, storage), name, limits, nobody);
}

TextPlace line_column(std::string_view bytes, std::size_t offset) {
  constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";
  const std::string_view before =
      bytes.substr(0, std::min(offset, bytes.size()));
  const auto lines = std::count(before.begin(), before.end(), '\n');
  const std::size_t last = before.rfind('\n');
  TextPlace place;
  place.line = static_cast<std::size_t>(lines) + 1;
  place.column = before.size() - (last + 1) + 1;  // npos + 1 is 0
  if (lines == 0 && before.starts_with(kByteOrderMark)) {
    place.column -= kByteOrderMark.size();
  }
  return place;
}

}  // namespace loqsmith
