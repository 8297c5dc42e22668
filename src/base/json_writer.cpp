#include "loqsmith/base/json_writer.hpp"

#include <cmath>
#include <ostream>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

// Length of the well-formed UTF-8 sequence at the front of the text; 0 where
// there is none.
std::size_t character_length(std::string_view text) {
  for (std::size_t length = 1; length <= 4 && length <= text.size(); ++length) {
    if (is_utf8(text.substr(0, length))) return length;
  }
  return 0;
}

std::string control_escape(unsigned char byte) {
  constexpr std::string_view kHex = "0123456789abcdef";
  switch (byte) {
    case '\b':
      return "\\b";
    case '\f':
      return "\\f";
    case '\n':
      return "\\n";
    case '\r':
      return "\\r";
    case '\t':
      return "\\t";
    default:
      return std::string("\\u00") + kHex[byte >> 4U] + kHex[byte & 0xFU];
  }
}

std::string json_number(double number) {
  // JSON has no text for what is not finite: no value.
  return std::isfinite(number) ? shortest(number) : std::string("null");
}

}  // namespace

std::string json_text(std::string_view text) {
  std::string json = "\"";
  while (!text.empty()) {
    const auto first = static_cast<unsigned char>(text.front());
    std::size_t length = 1;
    if (first == '"' || first == '\\') {
      json += '\\';
      json += text.front();
    } else if (first < 0x20U || first == 0x7FU) {
      json += control_escape(first);
    } else if (length = character_length(text); length > 0) {
      json += text.substr(0, length);
    } else {
      json += "\xEF\xBF\xBD";
      length = 1;
    }
    text.remove_prefix(length);
  }
  return json + '"';
}

JsonWriter::JsonWriter(std::ostream& out, int indent)
    : out_(out), indent_(indent) {}

void JsonWriter::new_line() {
  if (indent_ <= 0) return;
  out_ << '\n'
       << std::string(has_items_.size() * static_cast<std::size_t>(indent_),
                      ' ');
}

void JsonWriter::before_value() {
  if (after_key_) {
    after_key_ = false;
    return;
  }
  if (has_items_.empty()) return;
  if (has_items_.back()) out_ << ',';
  has_items_.back() = true;
  new_line();
}

void JsonWriter::key(std::string_view name) {
  before_value();
  text(name);
  out_ << (indent_ > 0 ? ": " : ":");
  after_key_ = true;
}

void JsonWriter::text(std::string_view value) { out_ << json_text(value); }

void JsonWriter::begin_object() {
  before_value();
  out_ << '{';
  has_items_.push_back(false);
}

void JsonWriter::begin_object(std::string_view name) {
  key(name);
  begin_object();
}

void JsonWriter::end_object() {
  const bool had_items = has_items_.back();
  has_items_.pop_back();
  if (had_items) new_line();
  out_ << '}';
}

void JsonWriter::begin_array() {
  before_value();
  out_ << '[';
  has_items_.push_back(false);
}

void JsonWriter::begin_array(std::string_view name) {
  key(name);
  begin_array();
}

void JsonWriter::end_array() {
  const bool had_items = has_items_.back();
  has_items_.pop_back();
  if (had_items) new_line();
  out_ << ']';
}

void JsonWriter::member(std::string_view name, std::string_view text_value) {
  key(name);
  value(text_value);
}

void JsonWriter::member(std::string_view name, const char* text_value) {
  member(name, std::string_view(text_value));
}

void JsonWriter::member(std::string_view name, double number) {
  key(name);
  value(number);
}

void JsonWriter::member(std::string_view name, std::int64_t number) {
  key(name);
  value(number);
}

void JsonWriter::member(std::string_view name, bool truth) {
  key(name);
  value(truth);
}

void JsonWriter::member(std::string_view name,
                        const std::optional<double>& number) {
  if (number) {
    member(name, *number);
  } else {
    member_null(name);
  }
}

void JsonWriter::member_null(std::string_view name) {
  key(name);
  before_value();
  out_ << "null";
}

void JsonWriter::value(std::string_view text_value) {
  before_value();
  text(text_value);
}

void JsonWriter::value(const char* text_value) {
  value(std::string_view(text_value));
}

void JsonWriter::value(double number) {
  before_value();
  out_ << json_number(number);
}

void JsonWriter::value(std::int64_t number) {
  before_value();
  // Not by operator<<: a stream's locale may group digits.
  out_ << std::to_string(number);
}

void JsonWriter::value(bool truth) {
  before_value();
  out_ << (truth ? "true" : "false");
}

}  // namespace loqsmith
