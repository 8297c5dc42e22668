#include "loqsmith/sheets/method_schema.hpp"

#include <algorithm>
#include <ostream>
#include <string>
#include <vector>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/sheets/vocabulary.hpp"

namespace loqsmith {
namespace {

constexpr std::string_view kHead =
    R"(<?xml version="1.0" encoding="UTF-8"?>
<!-- Made from the program's vocabulary: do not edit, see README.md. -->
<xs:schema xmlns:xs="http://www.w3.org/2001/XMLSchema"
           xmlns:m="urn:loqsmith:method"
           targetNamespace="urn:loqsmith:method"
           elementFormDefault="qualified">

  <xs:simpleType name="value.text">
    <xs:restriction base="xs:string">
      <xs:minLength value="1"/>
    </xs:restriction>
  </xs:simpleType>

  <xs:simpleType name="value.name">
    <xs:restriction base="xs:string">
      <xs:pattern value="\S([^\t\n\r]*\S)?"/>
    </xs:restriction>
  </xs:simpleType>

  <xs:simpleType name="value.number">
    <xs:restriction base="xs:double">
      <xs:pattern value="-?([0-9]+(\.[0-9]*)?|\.[0-9]+)([eE][+\-]?[0-9]+)?"/>
    </xs:restriction>
  </xs:simpleType>

  <xs:simpleType name="value.whole">
    <xs:restriction base="xs:integer">
      <xs:pattern value="-?[0-9]+"/>
    </xs:restriction>
  </xs:simpleType>
)";

std::string escaped(std::string_view text) {
  std::string result;
  for (const char c : text) {
    if (c == '<') {
      result += "&lt;";
    } else if (c == '&') {
      result += "&amp;";
    } else if (c == '"') {
      result += "&quot;";
    } else {
      result += c;
    }
  }
  return result;
}

std::string type_name(std::string_view key) {
  std::string name(key);
  std::replace(name.begin(), name.end(), '/', '.');
  return name;
}

class SchemaWriter {
 public:
  explicit SchemaWriter(std::ostream& out) : out_(out) {}

  void write() {
    out_ << kHead;
    ++depth_;
    const ElementRule& root = method_vocabulary().front();
    out_ << '\n';
    element(root,
            "name=\"" + std::string(root.name) +
                "\" type=\"m:" + type_name(root.key) + '"',
            "");
    for (const ElementRule& rule : method_vocabulary()) {
      out_ << '\n';
      if (!is_plain_text(rule)) complex_type(rule);
    }
    out_ << "\n</xs:schema>\n";
  }

 private:
  static bool is_plain_text(const ElementRule& rule) {
    return rule.content == Content::Text && rule.attributes.empty();
  }

  void line(const std::string& text) {
    out_ << std::string(2 * depth_, ' ') << text << '\n';
  }

  void open(const std::string& name, const std::string& rest = {}) {
    line('<' + name + (rest.empty() ? "" : ' ' + rest) + '>');
    ++depth_;
  }

  void close(const std::string& name) {
    --depth_;
    line("</" + name + '>');
  }

  void documentation(std::string_view meaning) {
    open("xs:annotation");
    line("<xs:documentation>" + escaped(meaning) + "</xs:documentation>");
    close("xs:annotation");
  }

  void complex_type(const ElementRule& rule) {
    open("xs:complexType", "name=\"" + type_name(rule.key) + '"');
    documentation(rule.meaning);
    switch (rule.content) {
      case Content::Empty:
      case Content::Text:
        break;
      case Content::EachOnce:
        children(rule, "xs:all", "1");
        break;
      case Content::Repeated:
        children(rule, "xs:sequence", "unbounded");
        break;
    }
    for (const AttributeRule& one : rule.attributes) attribute(one);
    close("xs:complexType");
  }

  void children(const ElementRule& rule, const std::string& group,
                const std::string& most) {
    open(group);
    for (const ChildRule& child : rule.children) {
      const ElementRule& child_rule = element_rule(child.key);
      const std::string type =
          is_plain_text(child_rule) ? "xs:string" : "m:" + type_name(child.key);
      element(child_rule,
              "name=\"" + std::string(child_rule.name) + "\" type=\"" + type +
                  "\" minOccurs=\"" + (child.required ? "1" : "0") +
                  "\" maxOccurs=\"" + most + '"',
              type_name(rule.key) + '.');
    }
    close(group);
  }

  // Names of identity constraints are global, so `above` tells those of two
  // declarations of the same element apart.
  void element(const ElementRule& rule, const std::string& declaration,
               const std::string& above) {
    std::vector<const IdentityRule*> identities;
    for (const IdentityRule& one : method_identities()) {
      if (one.scope == rule.key) identities.push_back(&one);
    }
    if (identities.empty()) {
      line("<xs:element " + declaration + "/>");
      return;
    }
    open("xs:element", declaration);
    for (const IdentityRule* one : identities) identity(*one, above);
    close("xs:element");
  }

  void identity(const IdentityRule& rule, const std::string& above) {
    std::vector<std::string> paths;
    for (const std::string_view path : rule.paths) {
      std::vector<std::string> steps = split(path, '/');
      for (std::string& step : steps) step.insert(0, "m:");
      paths.push_back(join(steps, "/"));
    }
    const bool is_reference = rule.kind == IdentityRule::Kind::Reference;
    const std::string tag = is_reference ? "xs:keyref" : "xs:unique";
    std::string names = "name=\"" + above + std::string(rule.name) + '"';
    if (is_reference) names += " refer=\"m:" + std::string(rule.refers) + '"';
    open(tag, names);
    line("<xs:selector xpath=\"" + join(paths, " | ") + "\"/>");
    line("<xs:field xpath=\"@" + std::string(rule.attribute) + "\"/>");
    close(tag);
  }

  void attribute(const AttributeRule& rule) {
    std::string names = "name=\"" + std::string(rule.name) + '"';
    if (rule.required) names += " use=\"required\"";
    if (!rule.default_text.empty()) {
      names += " default=\"" + escaped(rule.default_text) + '"';
    }
    const std::string base = plain_type(rule.value);
    if (!base.empty()) names += " type=\"" + base + '"';
    open("xs:attribute", names);
    documentation(rule.meaning);
    if (base.empty()) simple_type(rule.value);
    close("xs:attribute");
  }

  static std::string plain_type(const ValueRule& rule) {
    switch (rule.kind) {
      case ValueKind::Text:
        return "m:value.text";
      case ValueKind::Name:
        return "m:value.name";
      case ValueKind::Number:
      case ValueKind::Whole:
      case ValueKind::Choice:
      case ValueKind::NumberOrChoice:
      case ValueKind::NumberPair:
        return {};
    }
    return {};
  }

  void simple_type(const ValueRule& rule) {
    open("xs:simpleType");
    switch (rule.kind) {
      case ValueKind::Text:
      case ValueKind::Name:
        break;
      case ValueKind::Number:
        number(rule, "m:value.number");
        break;
      case ValueKind::Whole:
        number(rule, "m:value.whole");
        break;
      case ValueKind::Choice:
        words(rule);
        break;
      case ValueKind::NumberOrChoice:
        number_or_word(rule);
        break;
      case ValueKind::NumberPair:
        pair(rule);
        break;
    }
    close("xs:simpleType");
  }

  void words(const ValueRule& rule) {
    open("xs:restriction", "base=\"xs:string\"");
    for (const Choice& choice : rule.choices) {
      line("<xs:enumeration value=\"" + escaped(choice.word) + "\"/>");
    }
    close("xs:restriction");
  }

  void number(const ValueRule& rule, const std::string& base) {
    const ValueRange& range = rule.range;
    open("xs:restriction", "base=\"" + base + '"');
    if (rule.zero_or_odd) line("<xs:pattern value=\"0+|[0-9]*[13579]\"/>");
    if (range.least) {
      line(std::string(range.open_least ? "<xs:minExclusive"
                                        : "<xs:minInclusive") +
           " value=\"" + shortest(*range.least) + "\"/>");
    }
    if (range.most) {
      line(std::string(range.open_most ? "<xs:maxExclusive"
                                       : "<xs:maxInclusive") +
           " value=\"" + shortest(*range.most) + "\"/>");
    }
    close("xs:restriction");
  }

  void number_or_word(const ValueRule& rule) {
    open("xs:union");
    open("xs:simpleType");
    words(rule);
    close("xs:simpleType");
    open("xs:simpleType");
    number(rule, "m:value.number");
    close("xs:simpleType");
    close("xs:union");
  }

  void pair(const ValueRule& rule) {
    open("xs:restriction");
    open("xs:simpleType");
    open("xs:list");
    open("xs:simpleType");
    number(rule, "m:value.number");
    close("xs:simpleType");
    close("xs:list");
    close("xs:simpleType");
    line("<xs:length value=\"2\"/>");
    close("xs:restriction");
  }

  std::ostream& out_;
  std::size_t depth_ = 0;
};

}  // namespace

void write_method_schema(std::ostream& out) { SchemaWriter(out).write(); }

}  // namespace loqsmith
