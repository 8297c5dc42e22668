#include "loqsmith/sheets/vocabulary.hpp"

#include <iterator>
#include <stdexcept>
#include <string>

#include "loqsmith/sheets/vocabulary_rows.hpp"

namespace loqsmith {
namespace {

using Kind = IdentityRule::Kind;

std::vector<ElementRule> whole_table() {
  std::vector<ElementRule> table;
  for (auto* piece :
       {vocabulary::method_elements, vocabulary::trace_elements,
        vocabulary::signal_elements, vocabulary::analyte_elements,
        vocabulary::limit_elements, vocabulary::acceptance_elements,
        vocabulary::reporting_elements}) {
    std::vector<ElementRule> rows = piece();
    table.insert(table.end(), std::make_move_iterator(rows.begin()),
                 std::make_move_iterator(rows.end()));
  }
  return table;
}

}  // namespace

const AttributeRule* ElementRule::attribute(
    std::string_view attribute_name) const {
  for (const AttributeRule& rule : attributes) {
    if (rule.name == attribute_name) return &rule;
  }
  return nullptr;
}

const std::vector<ElementRule>& method_vocabulary() {
  static const std::vector<ElementRule> table = whole_table();
  return table;
}

const ElementRule& element_rule(std::string_view key) {
  for (const ElementRule& rule : method_vocabulary()) {
    if (rule.key == key) return rule;
  }
  throw std::logic_error("no such element: " + std::string(key));
}

const std::vector<IdentityRule>& method_identities() {
  static const std::vector<IdentityRule> rules{
      {"trace-id", Kind::Unique, "method", {"traces/trace"}, "id", {}},
      // Analytes and internal standards share a column of peaks.csv.
      {"target-id",
       Kind::Unique,
       "method",
       {"analytes/analyte", "internal-standards/internal-standard"},
       "id",
       {}},
      {"internal-standard-id",
       Kind::Unique,
       "method",
       {"internal-standards/internal-standard"},
       "id",
       {}},
      {"trace-of-target",
       Kind::Reference,
       "method",
       {"analytes/analyte", "internal-standards/internal-standard",
        "analytes/analyte/second-trace"},
       "trace",
       "trace-id"},
      {"internal-standard-of-analyte",
       Kind::Reference,
       "method",
       {"analytes/analyte"},
       "internal-standard",
       "internal-standard-id"},
      {"letter-status", Kind::Unique, "reporting", {"letter"}, "status", {}},
  };
  return rules;
}

const std::vector<GroupRule>& method_groups() {
  using Group = GroupRule::Kind;
  static const std::vector<GroupRule> rules{
      {"trace", Group::AtMostOne, {"tolerance", "tolerance-ppm"}},
      {"units", Group::AllOrNone, {"sample-amount", "final-volume"}},
      {"reporting", Group::AtMostOne, {"significant-digits", "decimals"}},
      {"acceptance/fortified",
       Group::AtLeastOne,
       {"recovery", "relative-difference"}},
      {"acceptance/suitability",
       Group::AtLeastOne,
       {"tailing", "plates", "resolution", "area-rsd", "signal-to-noise"}},
  };
  return rules;
}

}  // namespace loqsmith
