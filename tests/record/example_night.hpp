#pragma once

#include <array>
#include <cstddef>
#include <string>
#include <vector>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith::test {

// The parts from which example_run() is put together.

inline constexpr std::array kLevels = {0.5, 1.0, 2.0, 5.0, 10.0, 20.0, 50.0};
inline constexpr int kFirstBlank = 2;
inline constexpr int kFirstStandard = 10;
inline constexpr int kFirstCheck = 17;
inline constexpr int kFirstSample = 18;
inline constexpr int kLastCheck = 32;
inline constexpr int kRefused = 33;

struct Compound {
  const char* name;
  double minutes;
  double slope;
  double scatter;  ///< relative, of the standards
};
inline constexpr std::array kCompounds = {
    Compound{"simazine", 3.42, 1.84, 0.010},
    Compound{"atrazine", 4.36, 2.31, 0.016},
    Compound{"terbuthylazine", 6.02, 1.12, 0.02}};

/// A number in [-1, 1] that looks irregular and is the same everywhere.
double wobble(int i, int j);

std::vector<Injection> night_injections();
Method night_method();

/// Stated or true amount of the compound in the vial.
double amount_in(const Injection& row, std::size_t compound);
double response_of(const Compound& compound, double concentration, int number);
Peak peak_of(const Compound& compound, double concentration, int number);

Calibration calibration_of(const Compound& compound);
LimitsOfAnalyte limits_of(const Compound& compound);

}  // namespace loqsmith::test
