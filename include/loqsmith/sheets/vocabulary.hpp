#pragma once

#include <optional>
#include <string_view>
#include <vector>

namespace loqsmith {

// The vocabulary of method.xml: one table from which the reader's checks, the
// defaults, schemas/method.xsd and the reference page are made.

/// Whether this version computes it. What is Later is validated like
/// everything else and then refused, never ignored.
enum class Availability { Now, Later };

struct Choice {
  std::string_view word;
  Availability availability = Availability::Now;
};

enum class ValueKind {
  Text,            ///< anything but nothing
  Name,            ///< one line without blanks at its ends
  Number,          ///< finite decimal number
  Whole,           ///< whole number
  Choice,          ///< one of the words
  NumberOrChoice,  ///< a number, or one of the words
  NumberPair,      ///< two numbers, low then high
};

/// Bounds of a number. An open bound does not belong to the range.
struct ValueRange {
  std::optional<double> least;
  bool open_least = false;
  std::optional<double> most;
  bool open_most = false;
};

struct ValueRule {
  ValueKind kind = ValueKind::Text;
  ValueRange range;
  std::vector<Choice> choices;
  bool zero_or_odd = false;  ///< Whole: no even number but 0
};

struct AttributeRule {
  std::string_view name;
  ValueRule value;
  bool required = false;
  std::string_view default_text;  ///< empty: none
  std::string_view meaning;
  Availability availability = Availability::Now;
};

/// How an element may be filled.
enum class Content {
  Empty,
  Text,
  EachOnce,  ///< its children in any order, each at most once
  Repeated,  ///< one kind of child, any number of times
};

struct ChildRule {
  std::string_view key;   ///< of the vocabulary
  bool required = false;  ///< at least one
};

struct ElementRule {
  std::string_view key;   ///< unique: "acceptance/calibration"
  std::string_view name;  ///< as written in the method: "calibration"
  std::string_view meaning;
  Content content = Content::Empty;
  std::vector<AttributeRule> attributes;
  std::vector<ChildRule> children;
  Availability availability = Availability::Now;

  const AttributeRule* attribute(std::string_view attribute_name) const;
};

/// Values that are unique, or that name one of them, below one element.
struct IdentityRule {
  enum class Kind { Unique, Reference };

  std::string_view name;  ///< "trace-id"
  Kind kind = Kind::Unique;
  std::string_view scope;               ///< key of the element
  std::vector<std::string_view> paths;  ///< from there: "analytes/analyte"
  std::string_view attribute;
  std::string_view refers;  ///< Reference: name of the Unique rule
};

/// Attributes of one element that depend on each other; XSD 1.0 cannot say it.
struct GroupRule {
  enum class Kind { AtMostOne, AllOrNone, AtLeastOne };

  std::string_view element;  ///< key
  Kind kind = Kind::AtMostOne;
  std::vector<std::string_view> attributes;
};

/// All elements; the root, `method`, is the first.
const std::vector<ElementRule>& method_vocabulary();
const ElementRule& element_rule(std::string_view key);

const std::vector<IdentityRule>& method_identities();
const std::vector<GroupRule>& method_groups();

}  // namespace loqsmith
