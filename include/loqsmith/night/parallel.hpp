#pragma once

#include <cstddef>
#include <functional>

namespace loqsmith {

/// Calls `work(i)` once for each i below `count`, spread over `jobs` threads
/// (at least 1). The order is not fixed: results go to slot i. The first
/// exception stops the rest and is thrown again here.
void for_each_index(std::size_t count, unsigned jobs,
                    const std::function<void(std::size_t)>& work);

}  // namespace loqsmith
