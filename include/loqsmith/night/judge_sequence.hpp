#pragma once

#include <vector>

#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/night/learn_sequence.hpp"
#include "loqsmith/night/measure_sequence.hpp"
#include "loqsmith/night/sequence_folder.hpp"

namespace loqsmith {

/// All that is said of each analyte, in the method's order, from what was
/// learned and measured of the folder.
std::vector<AnalyteJudgement> judge_sequence(const SequenceFolder& folder,
                                             const Learned& learned,
                                             const Measured& measured);

}  // namespace loqsmith
