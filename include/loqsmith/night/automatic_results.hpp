#pragma once

#include <vector>

#include "loqsmith/night/learn_sequence.hpp"
#include "loqsmith/night/measure_sequence.hpp"
#include "loqsmith/night/sequence_folder.hpp"

namespace loqsmith {

/// The folder with its amendments worked into the method.
SequenceFolder with_amendments(SequenceFolder folder);

/// Computes the night once more without any amendment and marks in `amended`
/// every result that an amendment touched. Does nothing without amendments.
///
/// @param folder    as opened, without the amendments
/// @param learned, measured  of the amended night: taken again where no
///                  amendment touches a peak
void mark_automatic_results(const SequenceFolder& folder,
                            const Learned& learned, const Measured& measured,
                            unsigned jobs,
                            std::vector<AnalyteJudgement>& amended);

}  // namespace loqsmith
