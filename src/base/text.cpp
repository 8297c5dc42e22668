#include "loqsmith/base/text.hpp"

#include <algorithm>
#include <numeric>

namespace loqsmith {
namespace {

bool is_blank(char c) {
  return c == ' ' || c == '\t' || c == '\r' || c == '\n';
}

std::size_t edit_distance(std::string_view a, std::string_view b) {
  std::vector<std::size_t> row(b.size() + 1);
  std::iota(row.begin(), row.end(), std::size_t{0});
  for (std::size_t i = 1; i <= a.size(); ++i) {
    std::size_t diagonal = row[0];
    row[0] = i;
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const std::size_t change = diagonal + (a[i - 1] == b[j - 1] ? 0 : 1);
      diagonal = row[j];
      row[j] = std::min({row[j] + 1, row[j - 1] + 1, change});
    }
  }
  return row.back();
}

// Bytes of the well-formed UTF-8 sequence at the front; 0 where there is none
// (table 3-7 of the Unicode Standard).
std::size_t utf8_length(std::string_view text) {
  const auto byte = [&](std::size_t i) {
    return i < text.size() ? static_cast<unsigned char>(text[i]) : 0U;
  };
  const auto tail = [&](std::size_t i) { return (byte(i) & 0xC0U) == 0x80U; };
  const unsigned first = byte(0);
  if (first < 0x80U) return 1;
  if (first >= 0xC2U && first <= 0xDFU) return tail(1) ? 2 : 0;
  if (first >= 0xE0U && first <= 0xEFU) {
    const bool second = tail(1) && !(first == 0xE0U && byte(1) < 0xA0U) &&
                        !(first == 0xEDU && byte(1) > 0x9FU);
    return second && tail(2) ? 3 : 0;
  }
  if (first >= 0xF0U && first <= 0xF4U) {
    const bool second = tail(1) && !(first == 0xF0U && byte(1) < 0x90U) &&
                        !(first == 0xF4U && byte(1) > 0x8FU);
    return second && tail(2) && tail(3) ? 4 : 0;
  }
  return 0;
}

}  // namespace

std::string_view trim(std::string_view text) {
  while (!text.empty() && is_blank(text.front())) text.remove_prefix(1);
  while (!text.empty() && is_blank(text.back())) text.remove_suffix(1);
  return text;
}

std::vector<std::string> split(std::string_view text, char separator) {
  std::vector<std::string> parts;
  std::size_t start = 0;
  while (true) {
    const std::size_t end = text.find(separator, start);
    parts.emplace_back(text.substr(start, end - start));
    if (end == std::string_view::npos) return parts;
    start = end + 1;
  }
}

std::string join(const std::vector<std::string>& parts,
                 std::string_view separator) {
  std::string text;
  for (std::size_t i = 0; i < parts.size(); ++i) {
    if (i > 0) text += separator;
    text += parts[i];
  }
  return text;
}

std::string nearest_name(std::string_view name,
                         const std::vector<std::string>& known) {
  std::string best;
  std::size_t least = name.size() / 3 + 2;
  for (const std::string& candidate : known) {
    const std::size_t distance = edit_distance(name, candidate);
    if (distance < least) {
      least = distance;
      best = candidate;
    }
  }
  return best;
}

std::string in_quotes(std::string_view text) {
  constexpr std::size_t kMost = 80;
  constexpr std::string_view kHex = "0123456789ABCDEF";
  std::string result = "\"";
  std::size_t shown = 0;
  while (!text.empty() && shown < kMost) {
    const std::size_t length = utf8_length(text);
    const auto first = static_cast<unsigned char>(text.front());
    if (length == 0 || first < 0x20U || first == 0x7FU) {
      result += "\\x";
      result += kHex[first >> 4U];
      result += kHex[first & 0xFU];
      text.remove_prefix(1);
    } else {
      result += text.substr(0, length);
      text.remove_prefix(length);
    }
    ++shown;
  }
  if (!text.empty()) result += "...";
  return result + '"';
}

bool is_utf8(std::string_view text) {
  while (!text.empty()) {
    const std::size_t length = utf8_length(text);
    if (length == 0) return false;
    text.remove_prefix(length);
  }
  return true;
}

}  // namespace loqsmith
