#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/formats/animl_numbers.hpp"
#include "loqsmith/formats/animl_tree.hpp"

namespace loqsmith {

/// A numeric Series of a trace.
struct AnimlSeries {
  const AnimlNode* node = nullptr;
  std::string_view word;  ///< "time series", "signal series"
  NumberType type = NumberType::Float64;
  bool is_time = false;
};

/// Most signal values of one file that AutoIncrementedValueSets generate: a few
/// bytes must not ask for all the memory. (Times are as many as signal values.)
inline constexpr std::size_t kMostGenerated = std::size_t{1} << 20U;

/// The numbers of a Series: its value sets, all of one kind, put side by side.
/// `length` points must be there, none missing and none given twice. Memory is
/// taken for generated numbers only once the indices have been found sound.
///
/// @param generated_left  of kMostGenerated; a generated signal takes from it
/// @throws InputError
std::vector<double> decode_animl_series(const AnimlSeries& series,
                                        std::size_t length,
                                        std::size_t& generated_left,
                                        DocumentSource& source);

/// "encoded", "individual values", "auto-incremented", "no values".
std::string animl_encoding(const AnimlNode& series);

}  // namespace loqsmith
