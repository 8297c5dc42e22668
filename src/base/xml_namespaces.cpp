#include "loqsmith/base/xml_namespaces.hpp"

#include <utility>

namespace loqsmith {

void XmlNamespaces::declare(std::string_view prefix, std::string uri,
                            std::size_t depth) {
  declarations_.push_back({prefix, std::move(uri), depth});
}

void XmlNamespaces::leave(std::size_t depth) {
  while (!declarations_.empty() && declarations_.back().depth >= depth) {
    declarations_.pop_back();
  }
}

std::optional<std::string_view> XmlNamespaces::find(
    std::string_view prefix) const {
  for (auto it = declarations_.rbegin(); it != declarations_.rend(); ++it) {
    if (it->prefix == prefix) return std::string_view(it->uri);
  }
  if (prefix.empty()) return std::string_view();
  if (prefix == "xml") return "http://www.w3.org/XML/1998/namespace";
  return std::nullopt;
}

}  // namespace loqsmith
