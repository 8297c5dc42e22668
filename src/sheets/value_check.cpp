#include "loqsmith/sheets/value_check.hpp"

#include <algorithm>
#include <cstdint>
#include <stdexcept>
#include <vector>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

constexpr std::string_view kNotAvailable = ", not available in this version";

bool is_within(const ValueRange& range, double value) {
  if (range.least && !(value >= *range.least)) return false;
  if (range.least && range.open_least && value == *range.least) return false;
  if (range.most && !(value <= *range.most)) return false;
  return !(range.most && range.open_most && value == *range.most);
}

std::string describe_range(const ValueRange& range) {
  std::string text;
  if (range.least) {
    text += (range.open_least ? " above " : " from ") + shortest(*range.least);
  }
  if (range.most) {
    text += (range.open_most ? " below " : " to ") + shortest(*range.most);
  } else if (range.least && !range.open_least) {
    text += " up";
  }
  return text;
}

std::string describe_words(const std::vector<Choice>& choices) {
  std::vector<std::string> words;
  for (const Choice& choice : choices) {
    if (choice.availability == Availability::Later) continue;
    words.push_back('"' + std::string(choice.word) + '"');
  }
  return join(words, " or ");
}

std::vector<std::string> words_of(std::string_view text) {
  std::vector<std::string> words;
  std::string word;
  for (const char c : text) {
    if (!trim(std::string_view(&c, 1)).empty()) {
      word += c;
    } else if (!word.empty()) {
      words.push_back(std::move(word));
      word.clear();
    }
  }
  if (!word.empty()) words.push_back(std::move(word));
  return words;
}

const Choice* find_choice(const ValueRule& rule, std::string_view text) {
  for (const Choice& choice : rule.choices) {
    if (choice.word == text) return &choice;
  }
  return nullptr;
}

std::string nearest_choice(const ValueRule& rule, std::string_view text) {
  std::vector<std::string> words;
  for (const Choice& choice : rule.choices) words.emplace_back(choice.word);
  const std::string near = nearest_name(text, words);
  return near.empty() ? std::string{} : "did you mean \"" + near + "\"?";
}

std::string number_mend(std::string_view text) {
  if (text.find(',') != std::string_view::npos) {
    return "write a decimal point, not a comma";
  }
  return text.starts_with('+') ? "leave out the plus sign" : "";
}

std::optional<ValueFault> check_name(std::string_view text) {
  if (text.empty()) return ValueFault{"", "a name", "write one"};
  if (text.find_first_of("\t\r\n") != std::string_view::npos) {
    return ValueFault{"", "one line without tabs", "write it in one line"};
  }
  if (trim(text).size() != text.size()) {
    return ValueFault{"", "no blanks at the ends", "remove them"};
  }
  return std::nullopt;
}

std::optional<ValueFault> check_number(const ValueRule& rule,
                                       std::string_view text) {
  const auto value = parse_number(trim(text));
  if (value && is_within(rule.range, *value)) return std::nullopt;
  return ValueFault{"", describe_values(rule), number_mend(text)};
}

std::optional<ValueFault> check_whole(const ValueRule& rule,
                                      std::string_view text) {
  const auto value = parse_whole(trim(text));
  if (value && is_within(rule.range, static_cast<double>(*value)) &&
      !(rule.zero_or_odd && *value != 0 && *value % 2 == 0)) {
    return std::nullopt;
  }
  return ValueFault{"", describe_values(rule), ""};
}

std::optional<ValueFault> check_choice(const ValueRule& rule,
                                       std::string_view text) {
  const Choice* choice = find_choice(rule, text);
  if (choice == nullptr) {
    return ValueFault{"", describe_values(rule), nearest_choice(rule, text)};
  }
  if (choice->availability == Availability::Now) return std::nullopt;
  return ValueFault{std::string(kNotAvailable), describe_values(rule), ""};
}

std::optional<ValueFault> check_pair(const ValueRule& rule,
                                     std::string_view text) {
  const ValueFault fault{"", describe_values(rule), number_mend(text)};
  const std::vector<std::string> words = words_of(text);
  if (words.size() != 2) return fault;
  const auto low = parse_number(words[0]);
  const auto high = parse_number(words[1]);
  if (!low || !high || !is_within(rule.range, *low) ||
      !is_within(rule.range, *high) || !(*low < *high)) {
    return fault;
  }
  return std::nullopt;
}

}  // namespace

std::optional<ValueFault> check_value(const ValueRule& rule,
                                      std::string_view text) {
  switch (rule.kind) {
    case ValueKind::Text:
      if (!text.empty()) return std::nullopt;
      return ValueFault{"", "a text", "write one or leave the attribute out"};
    case ValueKind::Name:
      return check_name(text);
    case ValueKind::Number:
      return check_number(rule, text);
    case ValueKind::Whole:
      return check_whole(rule, text);
    case ValueKind::Choice:
      return check_choice(rule, text);
    case ValueKind::NumberOrChoice:
      return find_choice(rule, trim(text)) != nullptr
                 ? check_choice(rule, trim(text))
                 : check_number(rule, text);
    case ValueKind::NumberPair:
      return check_pair(rule, text);
  }
  return std::nullopt;
}

std::string describe_values(const ValueRule& rule) {
  switch (rule.kind) {
    case ValueKind::Text:
      return "a text";
    case ValueKind::Name:
      return "a name";
    case ValueKind::Number:
      return "a number" + describe_range(rule.range);
    case ValueKind::Whole:
      return (rule.zero_or_odd ? "0 or an odd number" : "a whole number") +
             describe_range(rule.range);
    case ValueKind::Choice:
      return describe_words(rule.choices);
    case ValueKind::NumberOrChoice:
      return describe_words(rule.choices) + " or a number" +
             describe_range(rule.range);
    case ValueKind::NumberPair:
      return "two numbers" + describe_range(rule.range) +
             ", the lower one first, as in \"85 115\"";
  }
  return {};
}

double number_of(std::string_view text) {
  const auto value = parse_number(trim(text));
  if (!value) throw std::logic_error("unchecked number");
  return *value;
}

int whole_of(std::string_view text) {
  const auto value = parse_whole(trim(text));
  if (!value) throw std::logic_error("unchecked whole number");
  return static_cast<int>(*value);
}

std::pair<double, double> pair_of(std::string_view text) {
  const std::vector<std::string> words = words_of(text);
  if (words.size() != 2) throw std::logic_error("unchecked pair of numbers");
  return {number_of(words[0]), number_of(words[1])};
}

}  // namespace loqsmith
