#include "loqsmith/base/xml_tags.hpp"

#include <algorithm>
#include <string>
#include <tuple>
#include <utility>

#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_characters.hpp"

namespace loqsmith {
namespace {

constexpr std::string_view kXmlUri = "http://www.w3.org/XML/1998/namespace";
constexpr std::string_view kXmlnsUri = "http://www.w3.org/2000/xmlns/";

struct QualifiedName {
  std::string_view prefix;
  std::string_view local;
};

// At most one colon, with a name on both sides (Namespaces in XML 1.0, QName).
QualifiedName split_name(const XmlCursor& cursor, std::string_view name,
                         std::size_t offset) {
  const std::size_t colon = name.find(':');
  if (colon == std::string_view::npos) return {{}, name};
  const QualifiedName parts{name.substr(0, colon), name.substr(colon + 1)};
  if (parts.prefix.empty() || parts.local.empty() ||
      parts.local.find(':') != std::string_view::npos ||
      !is_xml_name_start(decode_utf8(parts.local).value)) {
    cursor.fail(offset, "the name " + in_quotes(name),
                "a name with at most one prefix");
  }
  return parts;
}

bool is_declaration(const XmlAttribute& attribute) {
  return attribute.name == "xmlns" || attribute.name.starts_with("xmlns:");
}

std::string_view resolve(const XmlCursor& cursor,
                         const XmlNamespaces& namespaces,
                         std::string_view prefix, std::size_t offset) {
  const auto uri = namespaces.find(prefix);
  if (!uri) {
    cursor.fail(offset,
                "the prefix " + in_quotes(prefix) + " without declaration",
                "a prefix that xmlns:" + std::string(prefix) + " declares");
  }
  return *uri;
}

std::string tag_text(std::string_view opening, std::string_view name) {
  return std::string(opening) + std::string(name) + ">";
}

}  // namespace

void XmlTags::take_start(XmlCursor& cursor, XmlHandler& handler) {
  const std::size_t start = cursor.offset();
  if (open_.size() >= cursor.limits().depth) {
    cursor.fail(start,
                "more than " + std::to_string(cursor.limits().depth) +
                    " elements inside each other",
                "a shallower document");
  }
  cursor.advance(1);
  const std::string_view name = cursor.take_name("an element's name");
  const QualifiedName parts = split_name(cursor, name, start + 1);
  open_.push_back(name);
  take_attributes(cursor);
  const bool empty = cursor.skip("/");
  cursor.require(">", "\">\" at the tag's end");
  declare_namespaces(cursor);
  resolve_attributes(cursor);
  handler.start_element({name, parts.local,
                         resolve(cursor, namespaces_, parts.prefix, start + 1),
                         attributes_, start, cursor.offset(), open_.size()});
  if (!empty) return;
  handler.end_element({name, cursor.offset(), cursor.offset(), open_.size()});
  namespaces_.leave(open_.size());
  open_.pop_back();
}

void XmlTags::take_end(XmlCursor& cursor, XmlHandler& handler) {
  const std::size_t start = cursor.offset();
  cursor.advance(2);
  const std::string_view name = cursor.take_name("an element's name");
  if (open_.empty()) {
    cursor.fail(start, tag_text("</", name), "a start tag before its end tag");
  }
  if (name != open_.back()) {
    cursor.fail(start, in_quotes(tag_text("</", name)),
                in_quotes(tag_text("</", open_.back())));
  }
  cursor.skip_blanks();
  cursor.require(">", "\">\" at the end tag's end");
  handler.end_element({name, start, cursor.offset(), open_.size()});
  namespaces_.leave(open_.size());
  open_.pop_back();
}

void XmlTags::take_attributes(XmlCursor& cursor) {
  attributes_.clear();
  while (true) {
    const bool blank = cursor.skip_blanks();
    if (cursor.at_end()) cursor.fail_incomplete("the end of a tag");
    if (cursor.peek() == '>' || cursor.peek() == '/') return;
    if (!blank) cursor.fail_here("a blank, \">\" or \"/>\"");
    XmlAttribute attribute;
    attribute.offset = cursor.offset();
    if (attributes_.size() >= cursor.limits().attributes) {
      cursor.fail(attribute.offset,
                  "more than " + std::to_string(cursor.limits().attributes) +
                      " attributes",
                  "fewer attributes");
    }
    attribute.name = cursor.take_name("an attribute's name");
    cursor.skip_blanks();
    cursor.require("=", "\"=\" behind an attribute's name");
    cursor.skip_blanks();
    attribute.raw_value = cursor.take_attribute_value();
    attributes_.push_back(attribute);
  }
}

void XmlTags::declare_namespaces(const XmlCursor& cursor) {
  std::vector<std::string_view> declared;
  for (const XmlAttribute& attribute : attributes_) {
    if (!is_declaration(attribute)) continue;
    if (std::find(declared.begin(), declared.end(), attribute.name) !=
        declared.end()) {
      cursor.fail(attribute.offset,
                  "the attribute " + in_quotes(attribute.name) + " again",
                  "each attribute once");
    }
    declared.push_back(attribute.name);
    const QualifiedName parts =
        split_name(cursor, attribute.name, attribute.offset);
    declare(cursor, attribute,
            parts.prefix.empty() ? std::string_view() : parts.local);
  }
  std::erase_if(attributes_, is_declaration);
}

void XmlTags::declare(const XmlCursor& cursor, const XmlAttribute& attribute,
                      std::string_view prefix) {
  std::string uri = xml_value(attribute.raw_value);
  const bool xml = prefix == "xml" && uri == kXmlUri;
  if (!xml && (prefix == "xml" || prefix == "xmlns" || uri == kXmlUri ||
               uri == kXmlnsUri)) {
    cursor.fail(attribute.offset, "a reserved prefix or namespace declared",
                "another prefix and namespace");
  }
  if (!prefix.empty() && uri.empty()) {
    cursor.fail(attribute.offset, "a prefix declared without a namespace",
                "the namespace's name");
  }
  if (namespaces_.size() >= cursor.limits().namespaces) {
    cursor.fail(attribute.offset,
                "more than " + std::to_string(cursor.limits().namespaces) +
                    " namespace declarations in force",
                "fewer declarations");
  }
  namespaces_.declare(prefix, std::move(uri), open_.size());
}

void XmlTags::resolve_attributes(const XmlCursor& cursor) {
  for (XmlAttribute& attribute : attributes_) {
    const QualifiedName parts =
        split_name(cursor, attribute.name, attribute.offset);
    attribute.local_name = parts.local;
    if (!parts.prefix.empty()) {
      attribute.namespace_uri =
          resolve(cursor, namespaces_, parts.prefix, attribute.offset);
    }
  }
  refuse_twins(cursor);
}

// Neither the same name twice nor two prefixes that mean the same namespace;
// without a prefix there is no namespace, so one comparison covers both.
void XmlTags::refuse_twins(const XmlCursor& cursor) {
  for (std::size_t i = 1; i < attributes_.size(); ++i) {
    const XmlAttribute& one = attributes_[i];
    const auto same = [&](const XmlAttribute& other) {
      return one.local_name == other.local_name &&
             one.namespace_uri == other.namespace_uri;
    };
    const auto before = attributes_.begin() + static_cast<std::ptrdiff_t>(i);
    if (std::any_of(attributes_.begin(), before, same)) {
      cursor.fail(one.offset, "the attribute " + in_quotes(one.name) + " again",
                  "each attribute once");
    }
  }
}

}  // namespace loqsmith
