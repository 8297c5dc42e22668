#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/formats/animl_tree.hpp"
#include "loqsmith/formats/mzml_terms.hpp"

namespace loqsmith {

/// What the Unit of an independent Series says.
struct AnimlTimeUnit {
  bool stated = false;
  bool is_time = false;  ///< false: the Series is no time at all
  std::string label;
  TimeUnit unit;
};

/// A unit is a time where its label is min, s, ms or h, its quantity Time, or
/// its SIUnit s with exponent 1. Then it must be exactly one SIUnit s with a
/// factor above 0, exponent 1 and offset 0 (seconds = value * factor), or one
/// of these labels without SIUnit; where both stand, they must agree.
/// @throws InputError where it means a time and breaks this rule
AnimlTimeUnit read_animl_time_unit(const AnimlNode& series,
                                   DocumentSource& source);

/// The label of the Series' Unit; empty where there is none.
std::string animl_unit_label(const AnimlNode& series);

}  // namespace loqsmith
