#pragma once

#include <string>
#include <vector>

#include "loqsmith/ledger/open_ledger.hpp"

namespace loqsmith {

/// The method that a run is about to use.
struct MethodSeen {
  std::string id;
  std::string revision;
  std::string text;  ///< method.xml, verbatim
};

/// Appends a line `method-first-seen` where OUT has no run of a method of this
/// id yet, `method-changed` where its text is another one than that of the last
/// such line, and nothing where it is the same. The difference is taken from
/// the sheet that a published run keeps in inputs/method.xml.
/// @param run  "well-water-0412/run-0001", the run that uses it
void note_method(OpenLedger& ledger, const std::string& run,
                 const MethodSeen& method);

/// What differs between two texts, line by line, for people: "-12 old line" and
/// "+12 new line" with the line's number in its own text, as few as possible;
/// shortened where there are too many, with their number.
std::string line_difference(const std::string& before,
                            const std::string& after);

}  // namespace loqsmith
