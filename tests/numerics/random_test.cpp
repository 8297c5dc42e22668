#include "loqsmith/numerics/random.hpp"

#include <gtest/gtest.h>

#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::within_sampling_error;

TEST(Random, SeedsFromTextByFowlerNollVo) {
  // Offset basis and the published hash of "a" (FNV-1a, 64 bits).
  EXPECT_EQ(seed_from_text(""), 0xcbf29ce484222325u);
  EXPECT_EQ(seed_from_text("a"), 0xaf63dc4c8601ec8cu);
}

TEST(Random, TheSameNameGivesTheSameStream) {
  RandomStream one("blank 1");
  RandomStream same("blank 1");
  RandomStream other("blank 2");
  const double first = one.uniform();
  EXPECT_EQ(first, same.uniform());
  EXPECT_NE(first, other.uniform());
}

TEST(Random, NormalStreamHasMeanZeroAndVarianceOne) {
  RandomStream stream("moments");
  std::vector<double> values;
  std::vector<double> squares;
  for (int i = 0; i < 20000; ++i) {
    values.push_back(stream.normal());
    squares.push_back(values.back() * values.back());
  }
  EXPECT_TRUE(within_sampling_error(mean(values), 1.0, values.size(), 0.0));
  // The square of a standard normal has variance 2.
  EXPECT_TRUE(within_sampling_error(mean(squares), 1.4142135623730951,
                                    squares.size(), 1.0));
}

TEST(Random, UniformNeverReachesItsEnds) {
  RandomStream stream("ends");
  double least = 1.0;
  double most = 0.0;
  for (int i = 0; i < 20000; ++i) {
    const double value = stream.uniform();
    least = value < least ? value : least;
    most = value > most ? value : most;
  }
  EXPECT_GT(least, 0.0);
  EXPECT_LT(least, 0.001);
  EXPECT_LT(most, 1.0);
  EXPECT_GT(most, 0.999);
}

}  // namespace
}  // namespace loqsmith
