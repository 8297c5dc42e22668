#include "calibration/inverse_coverage.hpp"

namespace loqsmith::test {
namespace {

// Two components, weight 1/x2, seven blanks: from the lowest standard up
// between 0.93 and 0.97, whether the additive part at the lowest standard is a
// fifth of the proportional one or four times as large (the lowest standard
// then lies at half the concentration that ten standard deviations of blanks
// give). The share itself is good for 0.002.
TEST(InverseCoverage, TwoComponentsFromTheLowestStandardUp) {
  const int nights = 6000;
  const std::vector<double> levels{1, 2, 5, 10, 20, 50, 100};
  const std::vector<double> at{1.0, 1.5, 3.0, 10.0, 100.0};
  for (int replicates : {1, 2}) {
    for (double additive : {0.1, 0.5, 1.0, 2.0}) {
      const Design design{levels,
                          replicates,
                          {.weight = Weight::InverseXSquared},
                          {additive, 0.05},
                          7};
      for (double share : coverage("two components", design, at, nights)) {
        EXPECT_GT(share, 0.93) << additive << " x " << replicates;
        EXPECT_LT(share, 0.97) << additive << " x " << replicates;
      }
    }
  }
}

}  // namespace
}  // namespace loqsmith::test
