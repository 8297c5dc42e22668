#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

namespace loqsmith::test {

/// A method made from the vocabulary, with one of its rows put to the test.
struct VocabularyDocument {
  std::string name;  ///< "integration threshold=\"-1\""
  std::string text;
  /// Where the reader must find fault, and what it says; nothing: nowhere.
  std::optional<std::size_t> fault;
  std::string words;
  /// It stands in an element that this version does not have: one problem more.
  bool in_later_element = false;
  bool schema_accepts = true;
};

/// One document for every element, attribute, word, bound and default, and for
/// values just beyond them.
std::vector<VocabularyDocument> vocabulary_documents();

}  // namespace loqsmith::test
