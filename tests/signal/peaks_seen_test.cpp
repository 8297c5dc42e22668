#include <gtest/gtest.h>

#include <cmath>
#include <iostream>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "simulated_night.hpp"

// How often a peak is seen, default threshold, 24 points across half width.

namespace loqsmith {
namespace {

using test::SimulatedNight;

constexpr int kBlanks = 4000;
constexpr int kSamples = 1000;

// Three standard errors of a share p of n.
double sampling_error(double p, int n) {
  return 3.0 * std::sqrt(p * (1.0 - p) / n);
}

struct Case {
  const char* name;
  test::SimulatedTrace detector;
  double most_blanks;  // share of blank windows that may show a peak
};

void PrintTo(const Case& shown, std::ostream* out) { *out << shown.name; }

class PeaksSeen : public testing::TestWithParam<Case> {
 protected:
  // Share of so many windows in which a peak of these units is seen.
  static double seen(SimulatedNight& night, double units, int count) {
    int found = 0;
    for (int i = 0; i < count; ++i) found += night.measure(units).found ? 1 : 0;
    return static_cast<double>(found) / count;
  }

  static SimulatedNight night_of(const Case& wanted) {
    return {wanted.detector, test::gaussian_of_height(5.0, 0.05, 1.0),
            std::string("peaks seen, ") + wanted.name};
  }
};

TEST_P(PeaksSeen, BlankWindowsHardlyEverShowOne) {
  SimulatedNight night = night_of(GetParam());
  const double most = GetParam().most_blanks;
  const double share = seen(night, 0.0, kBlanks);
  RecordProperty("share", std::to_string(share));
  EXPECT_LE(share, most + sampling_error(most, kBlanks));
}

// The blanks' standard deviation is known to 1.6 % from 2,000 of them; a share
// of 0.7 moves by some 0.015 with that, a third of its own sampling error.
TEST_P(PeaksSeen, PeaksAtThreeBlankDeviationsOfAreaAreSeen) {
  SimulatedNight night = night_of(GetParam());
  std::vector<double> areas;
  for (int i = 0; i < kBlanks / 2; ++i)
    areas.push_back(night.measure(0.0).area);
  const double three = 3.0 * standard_deviation(areas) / night.unit_area();
  const double at_three = seen(night, three, kSamples);
  const double above = seen(night, 1.3 * three, kSamples);
  RecordProperty("at_three", std::to_string(at_three));
  RecordProperty("at_3.9", std::to_string(above));
  EXPECT_GE(at_three, 0.70 - sampling_error(0.70, kSamples));
  EXPECT_GE(above, 0.97 - sampling_error(0.97, kSamples));
}

INSTANTIATE_TEST_SUITE_P(
    Signal, PeaksSeen,
    testing::Values(Case{"white noise", test::white_detector(), 0.005},
                    Case{"Markov noise", test::markov_detector(), 0.01},
                    Case{"flicker noise", test::flicker_detector(), 0.01}));

}  // namespace
}  // namespace loqsmith
