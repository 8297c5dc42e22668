#include "loqsmith/formats/mzml_index.hpp"

#include <algorithm>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_characters.hpp"
#include "loqsmith/base/xml_scan.hpp"

namespace loqsmith {
namespace {

// A start tag is looked at no further than this.
constexpr std::size_t kMostOfATag = 8192;

// What stands behind "<element" or "<p:element"; empty where another tag or no
// tag stands.
std::string_view behind_name(std::string_view tag, std::string_view element) {
  if (!tag.starts_with('<')) return {};
  tag.remove_prefix(1);
  const std::size_t end = tag.find_first_of(" \t\r\n/>");
  const std::string_view name = tag.substr(0, end);
  const std::size_t colon = name.find(':');
  const std::string_view local =
      colon == std::string_view::npos ? name : name.substr(colon + 1);
  if (local != element || end == std::string_view::npos) return {};
  return tag.substr(end);
}

// The raw value of the attribute `id` in what stands behind a tag's name.
std::string_view id_value(std::string_view rest) {
  while (true) {
    while (!rest.empty() && is_xml_blank(rest.front())) rest.remove_prefix(1);
    const std::size_t equals = rest.find('=');
    const std::size_t quote = rest.find_first_of("\"'");
    if (quote == std::string_view::npos || equals > quote) return {};
    const std::size_t close = rest.find(rest[quote], quote + 1);
    if (close == std::string_view::npos) return {};
    if (trim(rest.substr(0, equals)) == "id") {
      return rest.substr(quote + 1, close - quote - 1);
    }
    rest.remove_prefix(close + 1);
  }
}

bool is_ascii(std::string_view text) {
  return std::all_of(text.begin(), text.end(), [](char c) {
    return static_cast<unsigned char>(c) < 0x80U;
  });
}

}  // namespace

bool MzmlIndexCheck::points_at(std::string_view position,
                               std::string_view element,
                               const std::string* id) const {
  const auto at = parse_whole(trim(position));
  if (!at || *at < 0 || static_cast<std::size_t>(*at) >= original_.size()) {
    return false;
  }
  const std::string_view rest = behind_name(
      original_.substr(static_cast<std::size_t>(*at), kMostOfATag), element);
  if (rest.empty()) return false;
  if (id == nullptr) return true;
  const std::string_view raw = id_value(rest);
  return (converted_ && !is_ascii(raw)) || xml_value(raw) == *id;
}

void MzmlIndexCheck::check_entry(std::string_view index, const std::string* id,
                                 std::string_view position) {
  ++entries_;
  const bool known = index == "spectrum" || index == "chromatogram";
  if (!known || id == nullptr || !points_at(position, index, id)) ++wrong_;
}

void MzmlIndexCheck::check_list(std::string_view position) {
  if (trim(position).empty()) return;  // nil: the file states none
  list_wrong_ = !points_at(position, "indexList", nullptr);
}

std::vector<std::string> MzmlIndexCheck::warnings() const {
  std::vector<std::string> found;
  if (wrong_ > 0) {
    found.push_back("index: " + std::to_string(wrong_) + " of " +
                    std::to_string(entries_) +
                    " offsets do not point at their elements (not used)");
  }
  if (list_wrong_) {
    found.emplace_back(
        "indexListOffset does not point at the index (not used)");
  }
  return found;
}

}  // namespace loqsmith
