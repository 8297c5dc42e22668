#include "sheets/vocabulary_documents.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/sheets/vocabulary.hpp"

namespace loqsmith::test {
namespace {

// A number inside the range.
std::string sample_number(const ValueRange& range) {
  if (range.least && range.most) {
    return shortest((*range.least + *range.most) / 2);
  }
  return shortest(range.least.value_or(0.0) + 1.0);
}

std::string sample(const ElementRule& element, const AttributeRule& rule) {
  switch (rule.value.kind) {
    case ValueKind::Text:
      return "t";
    case ValueKind::Name:
      if (rule.name == "id") return std::string(element.name);
      if (rule.name == "trace" || rule.name == "internal-standard") {
        return std::string(rule.name);
      }
      return "n";
    case ValueKind::Number:
    case ValueKind::NumberOrChoice:
      return sample_number(rule.value.range);
    case ValueKind::Whole:
      return rule.value.zero_or_odd ? "1" : shortest(*rule.value.range.least);
    case ValueKind::Choice:
      return std::string(rule.value.choices.front().word);
    case ValueKind::NumberPair:
      return "1 2";
  }
  return {};
}

// What is put to the test. Without a value the attribute is left out.
struct Target {
  std::string_view element;
  std::string_view attribute;
  std::optional<std::string> value;
  std::string_view left_out_child;
};

class DocumentWriter {
 public:
  explicit DocumentWriter(const Target& target) : target_(target) {}

  std::string write() {
    element(method_vocabulary().front());
    return text_;
  }

  std::size_t place() const { return place_; }

 private:
  bool is_target(const ElementRule& rule) const {
    return rule.key == target_.element;
  }

  void element(const ElementRule& rule) {
    const std::size_t start = text_.size();
    text_ += '<' + std::string(rule.name);
    if (text_ == "<method") text_ += " xmlns=\"urn:loqsmith:method\"";
    if (is_target(rule)) place_ = start;
    for (const AttributeRule& one : rule.attributes) {
      if (is_target(rule) && one.name == target_.attribute) {
        if (!target_.value) continue;
        place_ = text_.size() + 1;
        attribute(one, *target_.value);
      } else if (one.required || is_needed(rule, one)) {
        attribute(one, sample(rule, one));
      }
    }
    text_ += ">\n";
    for (const ChildRule& child : rule.children) {
      if (is_written(rule, child)) element(element_rule(child.key));
    }
    if (rule.content == Content::Empty) text_.erase(text_.size() - 1);
    text_ += "</" + std::string(rule.name) + ">\n";
  }

  void attribute(const AttributeRule& rule, const std::string& value) {
    text_ += ' ' + std::string(rule.name) + "=\"" + value + '"';
  }

  // Together with the target, or as the one of several that must be there.
  bool is_needed(const ElementRule& rule, const AttributeRule& one) const {
    for (const GroupRule& group : method_groups()) {
      if (group.element != rule.key) continue;
      const auto has = [&](std::string_view name) {
        return std::find(group.attributes.begin(), group.attributes.end(),
                         name) != group.attributes.end();
      };
      const bool on_target = is_target(rule) && has(target_.attribute);
      if (group.kind == GroupRule::Kind::AllOrNone && on_target &&
          has(one.name)) {
        return true;
      }
      if (group.kind == GroupRule::Kind::AtLeastOne && !on_target &&
          group.attributes.front() == one.name) {
        return true;
      }
    }
    return false;
  }

  // An analyte only has what the method has not.
  bool is_written(const ElementRule& rule, const ChildRule& child) const {
    if (is_target(rule) && child.key == target_.left_out_child) return false;
    if (child.key == target_.element) return rule.key != "analyte" || is_own();
    return rule.key != "analyte" &&
           element_rule(child.key).availability == Availability::Now;
  }

  bool is_own() const { return target_.element == "second-trace"; }

  const Target& target_;
  std::string text_;
  std::size_t place_ = 0;
};

class DocumentMaker {
 public:
  std::vector<VocabularyDocument> make() {
    for (const ElementRule& element : method_vocabulary()) {
      element_ = &element;
      whole_element();
      for (const AttributeRule& attribute : element.attributes) {
        attribute_ = &attribute;
        attribute_values();
      }
      for (const ChildRule& child : element.children) {
        if (child.required) child_left_out(child);
      }
    }
    return std::move(documents_);
  }

 private:
  VocabularyDocument& add(const Target& target, const std::string& name) {
    DocumentWriter writer(target);
    VocabularyDocument document;
    document.name = std::string(element_->key) + ' ' + name;
    document.text = writer.write();
    document.fault = writer.place();
    document.in_later_element = element_->availability == Availability::Later;
    documents_.push_back(document);
    return documents_.back();
  }

  void good(const std::string& value) {
    VocabularyDocument& document = with(value);
    document.fault.reset();
    if (attribute_->availability == Availability::Later) unavailable(document);
  }

  void bad(const std::string& value) { with(value).schema_accepts = false; }

  void unavailable(VocabularyDocument& document) {
    document.fault = place_;
    document.words = "not available in this version";
  }

  VocabularyDocument& with(const std::string& value) {
    VocabularyDocument& document =
        add({element_->key, attribute_->name, value, {}},
            std::string(attribute_->name) + "=\"" + value + '"');
    place_ = *document.fault;
    return document;
  }

  void whole_element() {
    VocabularyDocument& document = add({element_->key, {}, {}, {}}, "");
    document.words = "not available in this version";
    if (element_->availability == Availability::Now) document.fault.reset();
    document.in_later_element = false;
  }

  void child_left_out(const ChildRule& child) {
    VocabularyDocument& document = add({element_->key, {}, {}, child.key},
                                       "without " + std::string(child.key));
    document.words = "expected <";
    document.schema_accepts = false;
  }

  void attribute_values() {
    const AttributeRule& rule = *attribute_;
    good(sample(*element_, rule));
    if (!rule.default_text.empty()) good(std::string(rule.default_text));
    bad("");
    if (rule.required) {
      VocabularyDocument& document =
          add({element_->key, rule.name, std::nullopt, {}},
              "without " + std::string(rule.name));
      document.words = "the attribute " + std::string(rule.name);
      document.schema_accepts = false;
    }
    words();
    numbers();
  }

  void words() {
    for (const Choice& choice : attribute_->value.choices) {
      // Needs a procedure that this version does not have.
      if (choice.word == "critical-value") continue;
      VocabularyDocument& document = with(std::string(choice.word));
      if (choice.availability == Availability::Later) {
        unavailable(document);
      } else {
        document.fault.reset();
      }
    }
    const ValueKind kind = attribute_->value.kind;
    if (kind != ValueKind::Text && kind != ValueKind::Name) bad("nonsense");
  }

  void numbers() {
    const ValueRange& range = attribute_->value.range;
    const ValueKind kind = attribute_->value.kind;
    if (kind == ValueKind::NumberPair) {
      bad("1");
      bad("1 2 3");
      bad(shortest(*range.least - 1.0) + " 2");
      return;
    }
    if (kind != ValueKind::Number && kind != ValueKind::Whole &&
        kind != ValueKind::NumberOrChoice) {
      return;
    }
    const double step = kind == ValueKind::Whole ? 1.0 : 1e-9;
    if (range.least) bound(*range.least, range.open_least, -step);
    if (range.most) bound(*range.most, range.open_most, step);
    for (const char* text : {"NaN", "INF", "-INF", "+1", "1,5", "1 2", "0x1"}) {
      bad(text);
    }
    if (kind == ValueKind::Whole) bad("1.0");
    if (attribute_->value.zero_or_odd) bad("2");
  }

  // The value at the bound, and one step beyond it or before it.
  void bound(double value, bool open, double outwards) {
    if (open) {
      good(shortest(value - outwards));
      bad(shortest(value));
    } else {
      good(shortest(value));
      bad(shortest(value + outwards));
    }
  }

  const ElementRule* element_ = nullptr;
  const AttributeRule* attribute_ = nullptr;
  std::size_t place_ = 0;
  std::vector<VocabularyDocument> documents_;
};

}  // namespace

std::vector<VocabularyDocument> vocabulary_documents() {
  return DocumentMaker().make();
}

}  // namespace loqsmith::test
