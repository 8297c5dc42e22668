#pragma once

#include <cstdint>
#include <iosfwd>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// Writes one JSON document as a stream (RFC 8259): nothing is kept but the
/// nesting. Keys come in the order written; numbers in shortest round-trip
/// form; texts that are no UTF-8 have their bad bytes replaced by U+FFFD.
class JsonWriter {
 public:
  /// @param indent  spaces a level; 0: everything on one line
  explicit JsonWriter(std::ostream& out, int indent = 0);

  void begin_object();
  void begin_object(std::string_view key);
  void end_object();
  void begin_array();
  void begin_array(std::string_view key);
  void end_array();

  void member(std::string_view key, std::string_view text);
  void member(std::string_view key, const char* text);
  void member(std::string_view key, double number);
  void member(std::string_view key, std::int64_t number);
  void member(std::string_view key, bool value);
  void member(std::string_view key, const std::optional<double>& number);
  void member_null(std::string_view key);

  void value(std::string_view text);
  void value(const char* text);
  void value(double number);
  void value(std::int64_t number);
  void value(bool value);

 private:
  void before_value();
  void key(std::string_view name);
  void text(std::string_view value);
  void new_line();

  std::ostream& out_;
  int indent_;
  bool after_key_ = false;
  std::vector<bool> has_items_;  ///< one an open object or array
};

/// The text as a JSON string, quotes included.
std::string json_text(std::string_view text);

}  // namespace loqsmith
