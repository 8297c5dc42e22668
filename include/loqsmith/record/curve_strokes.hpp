#pragma once

#include <iosfwd>
#include <string_view>
#include <vector>

#include "loqsmith/record/axis.hpp"

namespace loqsmith {

/// A curve of many points as one stroke, thinned to the lowest and highest
/// point of each of some 360 columns in their order, so that no extreme is
/// lost. Nothing where there are fewer than two points or not as many times as
/// values.
void draw_curve(std::ostream& out, std::string_view css,
                const std::vector<double>& minutes,
                const std::vector<double>& values, const Axis& x,
                const Axis& y);

}  // namespace loqsmith
