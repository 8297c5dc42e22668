#pragma once

#include <cstddef>
#include <span>

namespace loqsmith {

// Places in increasing times: by halving, but even times, as detectors have
// them, are found where they must lie.

/// Index of the first time at or after `at`; their number where there is none.
std::size_t first_at_or_after(std::span<const double> minutes, double at);

/// Index of the first time after `at`; their number where there is none.
std::size_t first_after(std::span<const double> minutes, double at);

}  // namespace loqsmith
