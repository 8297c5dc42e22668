#pragma once

#include <cstddef>
#include <map>
#include <optional>
#include <set>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/formats/document_source.hpp"
#include "loqsmith/formats/notes.hpp"
#include "loqsmith/formats/schema_element.hpp"
#include "loqsmith/formats/text_pieces.hpp"

namespace loqsmith {

/// One element of an IndividualValueSet: <D>1.5</D>.
struct AnimlValue {
  std::string_view element;
  std::size_t begin = 0;  ///< of what stands between its tags
  std::size_t end = 0;
};

/// One AnIML element with what is below it. Views point into the document.
struct AnimlNode {
  std::string_view name;  ///< local name; its namespace is AnIML's
  std::size_t offset = 0;
  std::vector<std::pair<std::string_view, std::string>> attributes;
  std::vector<AnimlNode> children;
  std::vector<TextPiece> text;
  std::vector<AnimlValue> values;  ///< of an IndividualValueSet, no children

  /// The attribute's value, blanks collapsed; nullptr where it is not written.
  const std::string* attribute(std::string_view wanted) const;
  /// The same; empty where it is not written.
  std::string text_of(std::string_view wanted) const;
  /// The first child of that name; nullptr where there is none.
  const AnimlNode* child(std::string_view wanted) const;
};

/// Listens to the scan of an AnIML document and keeps its elements, templates,
/// audit trail and signatures left out. Holds the document against the schema's
/// elements, attributes and order: a fault inside a SeriesSet is kept for it,
/// one elsewhere is a warning, and what makes the document ambiguous (another
/// version, a second set of samples or steps, an id given twice) refuses it.
class AnimlTree : public XmlHandler {
 public:
  explicit AnimlTree(DocumentSource& source) : source_(source) {}

  void start_element(const XmlStart& start) override;
  void end_element(const XmlEnd& end) override;
  void text(std::size_t begin, std::size_t end, bool verbatim) override;

  const AnimlNode& root() const { return root_; }
  /// What is wrong inside this Series, or inside this SeriesSet but outside
  /// its Series; nullptr where nothing is.
  const InputProblem* fault_of(const AnimlNode& node) const;
  Notes& notes() { return notes_; }

 private:
  struct Frame {
    const SchemaElement* rule = nullptr;
    AnimlNode* node = nullptr;  ///< none: one of the values
    std::size_t place = 0;      ///< of the last child
    bool has_children = false;
  };

  void check_root(const XmlStart& start);
  const SchemaElement* rule_of_child(const XmlStart& start);
  void check_order(std::size_t place, const XmlStart& start);
  void check_id(const XmlStart& start);
  void begin_frame(const SchemaElement& rule, const XmlStart& start);
  void take_attributes(AnimlNode* node, const SchemaElement& rule,
                       const XmlStart& start);
  /// Kept for the Series or SeriesSet in hand, or a warning.
  void fault(std::size_t offset, const std::string& found,
             const std::string& expected);
  [[noreturn]] void refuse(std::size_t offset, std::string found,
                           std::string expected, std::string mend = {});

  DocumentSource& source_;
  Notes notes_;
  AnimlNode root_;
  std::vector<Frame> frames_;
  std::size_t node_count_ = 0;
  std::size_t skipped_depth_ = 0;  ///< open elements that are stepped over
  std::set<std::string, std::less<>> ids_;
  std::map<std::size_t, InputProblem> faults_;  ///< by the node's offset
};

/// The text without blanks at its ends, and one blank for each run of them.
std::string collapsed(std::string_view text);

}  // namespace loqsmith
