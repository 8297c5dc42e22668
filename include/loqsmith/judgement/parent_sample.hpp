#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/known_results.hpp"

namespace loqsmith {

/// Results of the sample that a duplicate or a fortified sample names as its
/// parent: of role sample or control, or where no such one has the name, of
/// role fortified. In run order.
std::vector<KnownResult> parent_results(const FirstResults& first,
                                        const std::string& name);

/// Those of the sample to which something was added. A fortified duplicate may
/// name the fortified sample that it repeats instead: then those of that one's
/// own parent.
std::vector<KnownResult> native_results(const FirstResults& first,
                                        const Injection& fortified);

/// What several injections of one sample say of it.
struct SampleValue {
  double result = 0.0;  ///< signed, in the sample
  /// The largest of those averaged; nothing where no valid limit governs.
  std::optional<double> quantitation_limit;
};

/// The mean of the least diluted results that are not above the range.
///
/// @return not applicable: "not checked: above-range" where all of them are;
///         the first one's own reason where none has a number.
Outcome<SampleValue> value_of_sample(const std::vector<KnownResult>& results);

}  // namespace loqsmith
