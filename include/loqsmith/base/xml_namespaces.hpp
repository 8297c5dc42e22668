#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// The namespace declarations in force while a document is scanned.
class XmlNamespaces {
 public:
  /// @param prefix  empty for the default namespace; must outlive the scope
  /// @param uri     empty takes the default namespace back
  void declare(std::string_view prefix, std::string uri, std::size_t depth);

  /// Forgets what elements deeper than or at `depth` declared.
  void leave(std::size_t depth);

  /// The prefix's namespace; empty text for no prefix without a default;
  /// nothing where the prefix is not declared.
  std::optional<std::string_view> find(std::string_view prefix) const;

  std::size_t size() const { return declarations_.size(); }

 private:
  struct Declaration {
    std::string_view prefix;
    std::string uri;
    std::size_t depth = 0;
  };
  std::vector<Declaration> declarations_;
};

}  // namespace loqsmith
