#include "loqsmith/record/html.hpp"

#include <algorithm>
#include <array>
#include <charconv>
#include <cmath>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/rounding.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

constexpr std::string_view kReplacement = "\xEF\xBF\xBD";
constexpr std::string_view kDash = "\xE2\x80\x93";

// Length of the well-formed UTF-8 sequence at the front; 0 where there is none.
std::size_t character_length(std::string_view text) {
  for (std::size_t length = 1; length <= 4 && length <= text.size(); ++length) {
    if (is_utf8(text.substr(0, length))) return length;
  }
  return 0;
}

std::string_view entity(char c) {
  switch (c) {
    case '&':
      return "&amp;";
    case '<':
      return "&lt;";
    case '>':
      return "&gt;";
    case '"':
      return "&quot;";
    case '\'':
      return "&#39;";
    default:
      return {};
  }
}

bool is_control(char c) {
  const auto byte = static_cast<unsigned char>(c);
  return (byte < 0x20U && c != '\n' && c != '\t') || byte == 0x7FU;
}

}  // namespace

std::string html_text(std::string_view text) {
  std::string html;
  while (!text.empty()) {
    const char first = text.front();
    std::size_t length = 1;
    if (const std::string_view name = entity(first); !name.empty()) {
      html += name;
    } else if (is_control(first)) {
      html += kReplacement;
    } else if (length = character_length(text); length > 0) {
      html += text.substr(0, length);
    } else {
      html += kReplacement;
      length = 1;
    }
    text.remove_prefix(length);
  }
  return html;
}

std::string html_name(std::string_view name) {
  return "<bdi>" + html_text(name) + "</bdi>";
}

std::string html_id(std::string_view prefix, std::string_view name) {
  constexpr std::string_view kHex = "0123456789abcdef";
  std::string id(prefix);
  for (const char c : name) {
    const bool plain = (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') ||
                       (c >= '0' && c <= '9') || c == '-';
    if (plain) {
      id += c;
    } else {
      const auto byte = static_cast<unsigned char>(c);
      id += '_';
      id += kHex[byte >> 4U];
      id += kHex[byte & 0xFU];
    }
  }
  return id;
}

std::string power_number(double number, int digits) {
  if (number == 0.0 || !std::isfinite(number)) return "0";
  std::array<char, 64> buffer{};
  const auto end =
      std::to_chars(buffer.data(), buffer.data() + buffer.size(), number,
                    std::chars_format::scientific, std::max(digits - 1, 0));
  const std::string_view text(buffer.data(), end.ptr);
  const std::size_t e = text.find('e');
  std::string mantissa(text.substr(0, e));
  if (mantissa.find('.') != std::string::npos) {
    mantissa.resize(mantissa.find_last_not_of('0') + 1);
    if (mantissa.back() == '.') mantissa.pop_back();
  }
  std::string_view power = text.substr(e + 2);
  while (power.size() > 1 && power.front() == '0') power.remove_prefix(1);
  return mantissa + (text[e + 1] == '-' ? "e-" : "e") + std::string(power);
}

std::string short_number(double number, int digits) {
  const double size = std::abs(number);
  if (size != 0.0 && (size < 1e-4 || size >= 1e7)) {
    return power_number(number, digits);
  }
  const std::string rounded =
      round_to_significant(number, digits, RoundingRule::HalfEven);
  // 85 rather than 85.00: zeros that the number never had say nothing.
  std::string whole = shortest(number);
  const bool plain = whole.find('e') == std::string::npos;
  return plain && whole.size() <= rounded.size() ? whole : rounded;
}

std::string html_number(double number, int digits) {
  if (!std::isfinite(number)) return std::string(kDash);
  return "<data value=\"" + shortest(number) + "\">" +
         short_number(number, digits) + "</data>";
}

std::string html_number(const std::optional<double>& number, int digits) {
  return number ? html_number(*number, digits) : std::string(kDash);
}

}  // namespace loqsmith
