#pragma once

#include <cstddef>
#include <string>

namespace loqsmith {

// Numbers inside sentences; tables hold shortest() instead.

/// A figure for reading: four significant digits, "0.01234", "1.5e+07".
std::string figure(double value);

/// A fraction as percent for reading: 0.0286 gives "2.9 %".
std::string percent_figure(double fraction);

/// "1 level", "3 levels".
std::string counted(std::size_t count, const std::string& noun);

}  // namespace loqsmith
