#pragma once

#include <map>
#include <string>
#include <utility>

#include "loqsmith/sheets/read_sheets.hpp"

namespace loqsmith {

/// Which injections are drawn for which analyte: the first standard at its
/// lowest level and the first solvent blank (else method blank).
class FigureChoice {
 public:
  explicit FigureChoice(const Sheets& sheets);

  /// What the figure shows; empty where none is wanted.
  std::string caption(const std::string& analyte, int injection) const;

 private:
  std::map<std::pair<std::string, int>, std::string> captions_;
};

}  // namespace loqsmith
