#include "loqsmith/chromatogram/sequence.hpp"

namespace loqsmith {

const LevelEntry* Sequence::level_entry(std::string_view level,
                                        std::string_view analyte) const {
  for (const LevelEntry& entry : levels) {
    if (entry.level == level && entry.analyte == analyte) return &entry;
  }
  return nullptr;
}

}  // namespace loqsmith
