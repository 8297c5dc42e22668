#include "loqsmith/numerics/erfcx.hpp"

#include <gtest/gtest.h>

#include <cmath>

#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;

struct Known {
  double z;
  double value;
};

// To 50 digits by mpmath, rounded to doubles.
constexpr Known kKnown[] = {
    {0.0, 1.0},
    {0.1, 0.8964569799691268},
    {0.5, 0.6156903441929258},
    {1.0, 0.427583576155807},
    {2.0, 0.2553956763105058},
    {5.0, 0.1107046377330686},
    {10.0, 0.05614099274382259},
    {25.0, 0.02254957243264136},
    {30.0, 0.01879588886141675},
    {1e3, 5.641893014533876e-4},
    {1e8, 5.641895835477563e-9},
    {-1.0, 5.008980080762283},
    {-3.0, 16205.98885399959},
};

TEST(Erfcx, AgreesWithValuesOfHighPrecision) {
  for (const Known& known : kKnown) {
    EXPECT_TRUE(agrees_to_digits(erfcx(known.z), known.value, 14)) << known.z;
  }
}

TEST(Erfcx, SeriesAndProductMeet) {
  // erfcx' = 2 z erfcx - 2/sqrt(pi): from 25 to the next double upwards the
  // value falls by less than a unit in the last digit.
  EXPECT_TRUE(
      agrees_to_digits(erfcx(std::nextafter(25.0, 26.0)), erfcx(25.0), 14));
}

TEST(Erfcx, FallsAlwaysAndStaysFinite) {
  double before = erfcx(-26.0);
  EXPECT_TRUE(std::isfinite(before));
  for (double z = -25.9; z < 60.0; z += 0.1) {
    const double here = erfcx(z);
    EXPECT_LT(here, before) << z;
    before = here;
  }
  EXPECT_GT(erfcx(1e300), 0.0);
}

}  // namespace
}  // namespace loqsmith
