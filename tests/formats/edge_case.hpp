#pragma once

#include <gtest/gtest.h>

#include <iosfwd>
#include <string>
#include <vector>

#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/mzml_builder.hpp"

namespace loqsmith::test {

/// What a strict reader does with a document.
enum class Behaviour { RefuseFile, RefuseTrace, Warn, Accept };

/// A document that breaks or bends one rule, and what shall come of it.
struct EdgeCase {
  std::string words;  ///< letters and digits only: it names the test
  std::string document;
  Behaviour behaviour = Behaviour::Accept;
  std::string says{};  ///< part of the refusal or warning
  ReadPolicy policy{};
  std::string file = "a.mzML";
};

/// Names a test by its case.
std::string case_words(const testing::TestParamInfo<EdgeCase>& info);
void PrintTo(const EdgeCase& edge, std::ostream* out);

/// Reads the document and holds the outcome against the wanted behaviour.
void expect_behaviour(const EdgeCase& edge);

}  // namespace loqsmith::test
