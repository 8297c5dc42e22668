#pragma once

#include <vector>

#include "loqsmith/signal/noise_model.hpp"

namespace loqsmith {

/// One noise model that stands for several traces of a sequence: the median
/// variance, the median share of creeping noise in it, and the median
/// correlation of those that creep. Medians, because the model of a single
/// trace is known to some tens of percent only. Of models that are all zero:
/// zero.
NoiseModel typical_noise(const std::vector<NoiseModel>& models);

}  // namespace loqsmith
