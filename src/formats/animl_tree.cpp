#include "loqsmith/formats/animl_tree.hpp"

#include <algorithm>

#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_characters.hpp"
#include "loqsmith/formats/animl_schema.hpp"

namespace loqsmith {
namespace {

// Some 150 bytes each; values and what is stepped over do not count.
constexpr std::size_t kMostNodes = 2'000'000;

std::string tag(std::string_view name) { return "<" + std::string(name) + ">"; }

}  // namespace

std::string collapsed(std::string_view text) {
  std::string result;
  for (const char c : text) {
    if (!is_xml_blank(c)) {
      result += c;
    } else if (!result.empty() && result.back() != ' ') {
      result += ' ';
    }
  }
  if (!result.empty() && result.back() == ' ') result.pop_back();
  return result;
}

const std::string* AnimlNode::attribute(std::string_view wanted) const {
  for (const auto& [known, value] : attributes) {
    if (known == wanted) return &value;
  }
  return nullptr;
}

std::string AnimlNode::text_of(std::string_view wanted) const {
  const std::string* value = attribute(wanted);
  return value == nullptr ? std::string() : *value;
}

const AnimlNode* AnimlNode::child(std::string_view wanted) const {
  for (const AnimlNode& node : children) {
    if (node.name == wanted) return &node;
  }
  return nullptr;
}

const InputProblem* AnimlTree::fault_of(const AnimlNode& node) const {
  const auto it = faults_.find(node.offset);
  return it == faults_.end() ? nullptr : &it->second;
}

void AnimlTree::start_element(const XmlStart& start) {
  if (frames_.empty()) {
    check_root(start);
    begin_frame(*animl_rule("AnIML"), start);
    return;
  }
  // Ids are unique in the whole document, in what is stepped over too.
  if (start.namespace_uri == kAnimlNamespace) check_id(start);
  if (skipped_depth_ > 0) {
    ++skipped_depth_;
    return;
  }
  const SchemaElement* rule = rule_of_child(start);
  if (rule == nullptr || is_stepped_over(start.local_name)) {
    skipped_depth_ = 1;
    if (start.local_name == "SignatureSet") {
      notes_.add("signature present, not verified");
    }
    return;
  }
  begin_frame(*rule, start);
}

void AnimlTree::begin_frame(const SchemaElement& rule, const XmlStart& start) {
  AnimlNode* node = nullptr;
  if (frames_.empty()) {
    node = &root_;
  } else if (AnimlNode& parent = *frames_.back().node;
             parent.name == "IndividualValueSet") {
    parent.values.push_back({rule.name, start.end, start.end});
  } else {
    if (++node_count_ > kMostNodes) {
      refuse(start.offset,
             "more than " + std::to_string(kMostNodes) + " elements",
             "fewer elements");
    }
    node = &parent.children.emplace_back();
  }
  if (node != nullptr) {
    node->name = rule.name;
    node->offset = start.offset;
  }
  frames_.push_back({&rule, node});
  take_attributes(node, rule, start);
}

void AnimlTree::end_element(const XmlEnd& end) {
  if (skipped_depth_ > 0) {
    --skipped_depth_;
    return;
  }
  const bool is_value = frames_.back().node == nullptr;
  frames_.pop_back();
  if (is_value) frames_.back().node->values.back().end = end.offset;
}

void AnimlTree::text(std::size_t begin, std::size_t end, bool verbatim) {
  if (skipped_depth_ > 0 || frames_.empty()) return;
  const Frame& frame = frames_.back();
  if (frame.node == nullptr) return;  // a value knows where it begins and ends
  if (frame.rule->holds_text) {
    frame.node->text.push_back({begin, end, verbatim});
    return;
  }
  const std::string_view piece = source_.bytes.substr(begin, end - begin);
  if (!std::all_of(piece.begin(), piece.end(), is_xml_blank)) {
    fault(begin, "text inside " + tag(frame.rule->name), "elements only");
  }
}

void AnimlTree::check_root(const XmlStart& start) {
  const std::string mend = "export the file as AnIML 0.90 or mzML 1.1";
  if (start.namespace_uri != kAnimlNamespace) {
    refuse(start.offset,
           start.namespace_uri.empty()
               ? "a root element without namespace"
               : "the namespace " + in_quotes(start.namespace_uri),
           "the namespace of AnIML 0.90, " + in_quotes(kAnimlNamespace), mend);
  }
  if (start.local_name != "AnIML") {
    refuse(start.offset, tag(start.local_name), "<AnIML>", mend);
  }
  for (const XmlAttribute& attribute : start.attributes) {
    if (attribute.name != "version") continue;
    const std::string version = collapsed(xml_value(attribute.raw_value));
    if (version == kAnimlVersion) return;
    refuse(attribute.offset, "AnIML version " + in_quotes(version),
           in_quotes(kAnimlVersion), mend);
  }
  refuse(start.offset, "no version", "version " + in_quotes(kAnimlVersion),
         mend);
}

const SchemaElement* AnimlTree::rule_of_child(const XmlStart& start) {
  const SchemaElement& parent = *frames_.back().rule;
  const std::size_t place = start.namespace_uri == kAnimlNamespace
                                ? parent.place_of(start.local_name)
                                : parent.children.size();
  if (place == parent.children.size()) {
    fault(start.offset, tag(start.name) + " inside " + tag(parent.name),
          "only elements of AnIML 0.90");
    return nullptr;
  }
  check_order(place, start);
  return animl_rule(start.local_name);
}

void AnimlTree::check_order(std::size_t place, const XmlStart& start) {
  Frame& parent = frames_.back();
  const std::string_view name = start.local_name;
  // The values of a set may come in any order. Kinds of value sets must not be
  // mixed at all, which their decoder says; only the Unit must come last.
  const bool ordered = parent.rule->name != "IndividualValueSet" &&
                       (parent.rule->name != "Series" ||
                        parent.place + 1 == parent.rule->children.size());
  if (ordered && parent.has_children && place < parent.place) {
    fault(start.offset,
          tag(name) + " too late inside " + tag(parent.rule->name),
          "the order of the schema");
  } else if (parent.has_children && place == parent.place &&
             !parent.rule->children[place].many) {
    if (frames_.size() == 1) {
      refuse(start.offset, "a second " + tag(name), "only one");
    }
    fault(start.offset, "a second " + tag(name), "only one");
  }
  parent.has_children = true;
  parent.place = std::max(parent.place, place);
}

void AnimlTree::check_id(const XmlStart& start) {
  for (const XmlAttribute& attribute : start.attributes) {
    if (attribute.name != "id") continue;
    const std::string id = collapsed(xml_value(attribute.raw_value));
    if (ids_.insert(id).second) continue;
    refuse(attribute.offset, "a second element with the id " + in_quotes(id),
           "each id once");
  }
}

void AnimlTree::take_attributes(AnimlNode* node, const SchemaElement& rule,
                                const XmlStart& start) {
  for (const XmlAttribute& attribute : start.attributes) {
    // Those of other namespaces (schemaLocation, xml:lang) belong to nobody
    // here, and nothing is ever fetched from where they point.
    if (!attribute.namespace_uri.empty()) continue;
    if (!rule.allows_attribute(attribute.local_name)) {
      fault(attribute.offset,
            "the attribute " + in_quotes(attribute.name) + " on " +
                tag(rule.name),
            "only attributes of AnIML 0.90");
    } else if (node != nullptr) {
      node->attributes.emplace_back(attribute.local_name,
                                    collapsed(xml_value(attribute.raw_value)));
    }
  }
}

void AnimlTree::fault(std::size_t offset, const std::string& found,
                      const std::string& expected) {
  for (auto frame = frames_.rbegin(); frame != frames_.rend(); ++frame) {
    const std::string_view name = frame->rule->name;
    if (name != "Series" && name != "SeriesSet") continue;
    if (faults_.contains(frame->node->offset)) return;
    source_.places.pass(offset);
    faults_.emplace(frame->node->offset,
                    source_.problem(offset, found, expected));
    return;
  }
  notes_.add(found + ", expected " + expected);
}

void AnimlTree::refuse(std::size_t offset, std::string found,
                       std::string expected, std::string mend) {
  throw InputError(source_.problem(offset, std::move(found),
                                   std::move(expected), std::move(mend)));
}

}  // namespace loqsmith
