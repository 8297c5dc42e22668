#include "loqsmith/night/figure_choice.hpp"

namespace loqsmith {
namespace {

// The first standard at the lowest level above zero that holds the analyte.
const Injection* lowest_standard(const Sequence& sequence,
                                 const std::string& analyte) {
  const Injection* lowest = nullptr;
  double least = 0.0;
  for (const Injection& injection : sequence.injections) {
    if (injection.role != Role::Standard) continue;
    const LevelEntry* entry = sequence.level_entry(injection.level, analyte);
    if (entry == nullptr || !(entry->concentration > 0.0)) continue;
    if (lowest == nullptr || entry->concentration < least) {
      lowest = &injection;
      least = entry->concentration;
    }
  }
  return lowest;
}

const Injection* first_with(const Sequence& sequence, Role role) {
  for (const Injection& injection : sequence.injections) {
    if (injection.role == role) return &injection;
  }
  return nullptr;
}

}  // namespace

FigureChoice::FigureChoice(const Sheets& sheets) {
  const Sequence& sequence = sheets.sequence;
  const Injection* blank = first_with(sequence, Role::SolventBlank);
  if (blank == nullptr) blank = first_with(sequence, Role::MethodBlank);
  for (const AnalyteSettings& analyte : sheets.method.analytes) {
    const std::string& id = analyte.target.id;
    if (const Injection* low = lowest_standard(sequence, id)) {
      captions_[{id, low->number}] = "lowest standard";
    }
    if (blank != nullptr) captions_[{id, blank->number}] = "blank";
  }
}

std::string FigureChoice::caption(const std::string& analyte,
                                  int injection) const {
  const auto found = captions_.find({analyte, injection});
  return found == captions_.end() ? std::string{} : found->second;
}

std::string FigureChoice::claim_parted(const std::string& analyte,
                                       int injection,
                                       const std::string& overlap) {
  if (overlap != "model" && overlap != "skim") return {};
  const std::lock_guard<std::mutex> guard(mutex_);
  const auto [known, first] = parted_.emplace(analyte, injection);
  if (!first && known->second < injection) return {};
  known->second = injection;
  return "the first peak that is parted from a neighbour";
}

}  // namespace loqsmith
