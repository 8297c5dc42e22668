#pragma once

#include <string_view>
#include <utility>
#include <vector>

#include "loqsmith/sheets/vocabulary.hpp"

// How the rows of the vocabulary are written, and the pieces of the table.

namespace loqsmith::vocabulary {

inline constexpr Availability kNow = Availability::Now;
inline constexpr Availability kLater = Availability::Later;

inline ValueRange above(double least) { return {least, true, {}, false}; }
inline ValueRange at_least(double least) { return {least, false, {}, false}; }
inline ValueRange from_to(double least, double most) {
  return {least, false, most, false};
}
inline ValueRange between(double least, double most) {
  return {least, true, most, true};
}

inline ValueRule text() { return {ValueKind::Text, {}, {}}; }
inline ValueRule name() { return {ValueKind::Name, {}, {}}; }
inline ValueRule number(ValueRange range) {
  return {ValueKind::Number, range, {}};
}
inline ValueRule whole(double least, double most) {
  return {ValueKind::Whole, from_to(least, most), {}};
}
inline ValueRule choice(std::vector<Choice> choices) {
  return {ValueKind::Choice, {}, std::move(choices)};
}
inline ValueRule number_or(ValueRange range, std::vector<Choice> choices) {
  return {ValueKind::NumberOrChoice, range, std::move(choices)};
}
inline ValueRule pair(ValueRange range) {
  return {ValueKind::NumberPair, range, {}};
}

inline AttributeRule required(std::string_view attribute, ValueRule value,
                              std::string_view meaning,
                              Availability availability = kNow) {
  return {attribute, std::move(value), true, {}, meaning, availability};
}

/// An attribute that may be left out and has no default then.
inline AttributeRule optional(std::string_view attribute, ValueRule value,
                              std::string_view meaning,
                              Availability availability = kNow) {
  return {attribute, std::move(value), false, {}, meaning, availability};
}

inline AttributeRule defaulted(std::string_view attribute, ValueRule value,
                               std::string_view default_text,
                               std::string_view meaning,
                               Availability availability = kNow) {
  return {attribute,    std::move(value), false,
          default_text, meaning,          availability};
}

// The pieces, in the order of the table.
std::vector<ElementRule> method_elements();
std::vector<ElementRule> trace_elements();
std::vector<ElementRule> signal_elements();
std::vector<ElementRule> analyte_elements();
std::vector<ElementRule> limit_elements();
std::vector<ElementRule> acceptance_elements();
std::vector<ElementRule> reporting_elements();

/// The limit procedures' names, each as available as its element.
std::vector<Choice> procedure_choices();

}  // namespace loqsmith::vocabulary
