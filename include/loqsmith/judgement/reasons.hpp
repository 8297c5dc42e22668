#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// The word at the head of a reason: "trace-missing" of "trace-missing: no
/// chromatogram fits". A reason that has no word gets its own words joined by
/// hyphens ("not measured" gives "not-measured").
std::string reason_word(std::string_view reason);

/// The words without repetition, most serious first: those that withhold, then
/// what makes a number doubtful, then what merely explains the status. Words
/// unknown here (a new integration reason) stand before the explanations, in
/// the order given.
std::vector<std::string> most_serious_first(std::vector<std::string> words);

/// Each word once, where it stands first; empty ones dropped.
std::vector<std::string> without_repetition(std::vector<std::string> words);

}  // namespace loqsmith
