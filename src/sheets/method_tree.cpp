#include "loqsmith/sheets/method_tree.hpp"

#include <optional>
#include <utility>

#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/sheets/value_check.hpp"

namespace loqsmith {
namespace {

constexpr std::string_view kNamespace = "urn:loqsmith:method";
constexpr std::size_t kMostBytes = std::size_t{4} << 20U;

std::string tag(std::string_view name) { return '<' + std::string(name) + '>'; }

std::string did_you_mean(std::string_view name,
                         const std::vector<std::string>& known) {
  const std::string near = nearest_name(name, known);
  return near.empty() ? "remove it" : "did you mean \"" + near + "\"?";
}

// Follows the scan and keeps the elements that are open.
class TreeBuilder : public XmlHandler {
 public:
  explicit TreeBuilder(MethodDocument& document) : document_(document) {}

  void start_element(const XmlStart& start) override {
    if (skipped_depth_ > 0) {
      ++skipped_depth_;
      return;
    }
    MethodElement* element = open_.empty() ? root(start) : child(start);
    if (element == nullptr) {
      skipped_depth_ = 1;
      return;
    }
    open_.push_back(element);
    read_attributes(*element, start);
  }

  void end_element(const XmlEnd&) override {
    if (skipped_depth_ > 0) {
      --skipped_depth_;
      return;
    }
    check_children(*open_.back());
    open_.pop_back();
  }

  void text(std::size_t begin, std::size_t end, bool verbatim) override {
    if (skipped_depth_ > 0 || open_.empty()) return;
    const std::string_view raw = document_.xml.substr(begin, end - begin);
    MethodElement& element = *open_.back();
    if (element.rule->content == Content::Text) {
      element.text += verbatim ? std::string(raw) : xml_text(raw);
    } else if (!trim(raw).empty()) {
      const std::size_t blanks = raw.find_first_not_of(" \t\r\n");
      document_.add(begin + blanks, "text " + in_quotes(trim(raw)),
                    "no text in " + tag(element.rule->name), "remove it");
    }
  }

 private:
  MethodElement* root(const XmlStart& start) {
    const ElementRule& rule = method_vocabulary().front();
    if (start.local_name != rule.name || start.namespace_uri != kNamespace) {
      document_.add(start.offset,
                    tag(start.name) + " of the namespace " +
                        in_quotes(start.namespace_uri),
                    "<method xmlns=\"" + std::string(kNamespace) + "\">", "");
      return nullptr;
    }
    document_.has_root = true;
    document_.root.rule = &rule;
    document_.root.offset = start.offset;
    return &document_.root;
  }

  MethodElement* child(const XmlStart& start) {
    MethodElement& parent = *open_.back();
    const ElementRule* rule = child_rule(parent, start);
    if (rule == nullptr) return nullptr;
    if (parent.rule->content == Content::EachOnce) {
      if (const MethodElement* first = parent.child(rule->name)) {
        const TextPlace place = line_column(document_.xml, first->offset);
        document_.add(start.offset, "a second " + tag(rule->name),
                      "at most one",
                      "the first stands in line " + std::to_string(place.line));
      }
    }
    if (rule->availability == Availability::Later) {
      document_.add(start.offset,
                    tag(rule->name) + ", not available in this version", "",
                    "leave it out");
    }
    parent.children.emplace_back();
    parent.children.back().rule = rule;
    parent.children.back().offset = start.offset;
    return &parent.children.back();
  }

  const ElementRule* child_rule(const MethodElement& parent,
                                const XmlStart& start) {
    std::vector<std::string> known;
    for (const ChildRule& allowed : parent.rule->children) {
      const ElementRule& rule = element_rule(allowed.key);
      if (rule.name == start.local_name && start.namespace_uri == kNamespace) {
        return &rule;
      }
      known.emplace_back(rule.name);
    }
    if (start.namespace_uri != kNamespace) {
      document_.add(start.offset,
                    tag(start.name) + " of the namespace " +
                        in_quotes(start.namespace_uri),
                    "elements of " + in_quotes(kNamespace), "remove it");
    } else {
      document_.add(start.offset, tag(start.name),
                    known.empty() ? "nothing in " + tag(parent.rule->name)
                                  : "one of " + join(known, ", ") + " in " +
                                        tag(parent.rule->name),
                    did_you_mean(start.local_name, known));
    }
    return nullptr;
  }

  void read_attributes(MethodElement& element, const XmlStart& start) {
    for (const XmlAttribute& written : start.attributes) {
      const AttributeRule* rule = written.namespace_uri.empty()
                                      ? element.rule->attribute(written.name)
                                      : nullptr;
      if (rule == nullptr) {
        refuse_attribute(*element.rule, written);
      } else {
        element.attributes.push_back(read_attribute(*rule, written));
      }
    }
    for (const AttributeRule& rule : element.rule->attributes) {
      if (rule.required && element.attribute(rule.name) == nullptr) {
        document_.add(start.offset, tag(element.rule->name) + " without it",
                      "the attribute " + std::string(rule.name), "add it");
      }
    }
  }

  void refuse_attribute(const ElementRule& rule, const XmlAttribute& written) {
    std::vector<std::string> known;
    for (const AttributeRule& one : rule.attributes) {
      known.emplace_back(one.name);
    }
    document_.add(written.offset, "the attribute " + in_quotes(written.name),
                  known.empty()
                      ? "no attributes of " + tag(rule.name)
                      : "one of " + join(known, ", ") + " in " + tag(rule.name),
                  did_you_mean(written.local_name, known));
  }

  MethodAttribute read_attribute(const AttributeRule& rule,
                                 const XmlAttribute& written) {
    MethodAttribute attribute{&rule, xml_value(written.raw_value),
                              written.offset, false};
    const std::string shown =
        std::string(rule.name) + '=' + in_quotes(attribute.text);
    if (const auto fault = check_value(rule.value, attribute.text)) {
      document_.add(written.offset, shown + fault->found, fault->expected,
                    fault->mend);
    } else if (rule.availability == Availability::Later) {
      document_.add(written.offset, shown + ", not available in this version",
                    "", "leave it out");
    } else {
      attribute.valid = true;
    }
    return attribute;
  }

  void check_children(const MethodElement& element) {
    for (const ChildRule& wanted : element.rule->children) {
      const std::string_view name = element_rule(wanted.key).name;
      if (wanted.required && element.child(name) == nullptr) {
        document_.add(element.offset, tag(element.rule->name) + " without it",
                      tag(name), "add it");
      }
    }
  }

  MethodDocument& document_;
  std::vector<MethodElement*> open_;  // a parent outlives its open children
  std::size_t skipped_depth_ = 0;
};

}  // namespace

const MethodAttribute* MethodElement::attribute(std::string_view name) const {
  for (const MethodAttribute& attribute : attributes) {
    if (attribute.rule->name == name) return &attribute;
  }
  return nullptr;
}

const MethodElement* MethodElement::child(std::string_view name) const {
  for (const MethodElement& element : children) {
    if (element.rule->name == name) return &element;
  }
  return nullptr;
}

std::vector<const MethodElement*> MethodElement::at_path(
    std::string_view path) const {
  std::vector<const MethodElement*> found{this};
  for (const std::string& name : split(path, '/')) {
    std::vector<const MethodElement*> below;
    for (const MethodElement* element : found) {
      for (const MethodElement& one : element->children) {
        if (one.rule->name == name) below.push_back(&one);
      }
    }
    found = std::move(below);
  }
  return found;
}

void MethodDocument::add(std::size_t offset, std::string found,
                         std::string expected, std::string mend) {
  if (problems.full()) return;
  const TextPlace place = line_column(xml, offset);
  problems.add(place.line, place.column, std::move(found), std::move(expected),
               std::move(mend));
}

MethodDocument read_method_tree(std::string_view xml, const std::string& file) {
  MethodDocument document{xml, SheetProblems(file), false, {}};
  if (xml.size() > kMostBytes) {
    document.problems.add(0, 0, std::to_string(xml.size()) + " bytes",
                          "at most 4 MiB", "shorten the method");
    return document;
  }
  TreeBuilder builder(document);
  try {
    scan_xml(xml, file, XmlLimits{}, builder);
  } catch (const InputError& error) {
    document.problems.add(error);
    document.has_root = false;
  }
  return document;
}

}  // namespace loqsmith
