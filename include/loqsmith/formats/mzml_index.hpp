#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// Holds a file's own index against the file. The index is never used to find
/// anything, so whatever is wrong with it is a warning.
class MzmlIndexCheck {
 public:
  /// @param original   the file's bytes as they are on disk; positions count
  ///                   from the first of them, byte order mark included
  /// @param converted  true where ids were converted to UTF-8, so that those
  ///                   with other than ASCII characters cannot be compared
  MzmlIndexCheck(std::string_view original, bool converted)
      : original_(original), converted_(converted) {}

  /// One <offset> of an <index> of this name.
  void check_entry(std::string_view index, const std::string* id,
                   std::string_view position);
  /// The text of <indexListOffset>.
  void check_list(std::string_view position);

  /// What is wrong, in a sentence or two; nothing where all is well.
  std::vector<std::string> warnings() const;

 private:
  bool points_at(std::string_view position, std::string_view element,
                 const std::string* id) const;

  std::string_view original_;
  bool converted_;
  std::size_t entries_ = 0;
  std::size_t wrong_ = 0;
  bool list_wrong_ = false;
};

}  // namespace loqsmith
