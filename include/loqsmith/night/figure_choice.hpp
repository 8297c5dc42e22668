#pragma once

#include <map>
#include <mutex>
#include <string>
#include <utility>

#include "loqsmith/sheets/read_sheets.hpp"

namespace loqsmith {

/// Which injections are drawn for which analyte: the first standard at its
/// lowest level and the first solvent blank (else method blank); and, once it
/// is measured, the first whose peak is parted from a neighbour by a skimming
/// line or a model.
class FigureChoice {
 public:
  explicit FigureChoice(const Sheets& sheets);

  /// What the figure shows; empty where none is wanted.
  std::string caption(const std::string& analyte, int injection) const;

  /// What the figure of a parted peak shows; empty where an earlier injection
  /// of the analyte has claimed it. Injections come in any order and from any
  /// thread: of those that claim it the earliest is to be kept.
  std::string claim_parted(const std::string& analyte, int injection,
                           const std::string& overlap);

 private:
  std::mutex mutex_;
  std::map<std::string, int> parted_;
  std::map<std::pair<std::string, int>, std::string> captions_;
};

}  // namespace loqsmith
