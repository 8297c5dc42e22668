#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/judgement/amendment.hpp"
#include "loqsmith/sheets/method.hpp"

namespace loqsmith {

/// The sheets' bytes, read once: what is hashed, parsed and kept verbatim.
struct SheetTexts {
  std::string sequence_csv;
  std::string levels_csv;
  std::string method_xml;
  std::optional<std::string> amendments_csv = {};  ///< nothing: no such sheet
};

struct Sheets {
  Sequence sequence;
  Method method;                           ///< without the amendments
  std::vector<Amendment> amendments = {};  ///< as the rows stand
};

/// Parses and validates all sheets against each other.
///
/// @param name  the sequence's name
/// @throws InputError with every problem of every sheet at once.
Sheets read_sheets(const SheetTexts& texts, const std::string& name);

/// The single readers behind it; each throws InputError with all its problems.
Method read_method(std::string_view xml, const std::string& file);
std::vector<Injection> read_sequence_csv(std::string_view csv,
                                         const std::string& file);
std::vector<LevelEntry> read_levels_csv(std::string_view csv,
                                        const std::string& file);

}  // namespace loqsmith
