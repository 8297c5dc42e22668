#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <vector>

#include "loqsmith/numerics/random.hpp"
#include "loqsmith/signal/baseline_asymmetric.hpp"
#include "loqsmith/signal/baseline_snip.hpp"
#include "loqsmith/signal/baseline_whittaker.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::within_condition;

// A made-up signal and its baselines, computed by dense solves elsewhere. They
// are given to 8 decimals; 8 digits are within 1e-6 of each.
constexpr int kDigits = 8;
const std::vector<double> kSignal = {10.0, 10.5, 11.2, 11.4, 12.1, 14.0, 22.0,
                                     45.0, 60.0, 44.0, 23.5, 16.0, 14.6, 14.9,
                                     15.2, 15.8, 16.1, 16.4, 17.1, 17.3};

std::vector<double> even_times(std::size_t n) {
  std::vector<double> times;
  for (std::size_t i = 0; i < n; ++i) times.push_back(static_cast<double>(i));
  return times;
}

void expect_baseline(const std::vector<double>& found,
                     const std::vector<double>& wanted) {
  ASSERT_EQ(found.size(), wanted.size());
  for (std::size_t i = 0; i < wanted.size(); ++i) {
    EXPECT_TRUE(agrees_to_digits(found[i], wanted[i], kDigits))
        << "point " << i;
  }
}

// The same numbers must come out whatever the unit of time.
class Baselines : public testing::TestWithParam<double> {
 protected:
  std::vector<double> minutes() const {
    std::vector<double> times = even_times(kSignal.size());
    for (double& t : times) t = 3.0 + GetParam() * t;
    return times;
  }
};

TEST_P(Baselines, Whittaker) {
  const std::vector<double> weights(kSignal.size(), 1.0);
  expect_baseline(
      WhittakerSmoother(minutes(), 100.0).smooth(kSignal, weights),
      {9.01100073,  11.86994394, 14.73877715, 17.61369090, 20.45548798,
       23.16283426, 25.55084074, 27.34299006, 28.22725647, 28.06818430,
       27.04804535, 25.50842954, 23.75544635, 22.00012097, 20.36192412,
       18.88932532, 17.57917484, 16.39742969, 15.29525514, 14.22384218});
}

TEST_P(Baselines, AsymmetricLeastSquares) {
  const AsymmetricBaseline found =
      asymmetric_baseline(minutes(), kSignal, 100.0, 0.01);
  EXPECT_TRUE(found.settled);
  EXPECT_EQ(found.solves, 5);
  expect_baseline(
      found.signal,
      {10.19093077, 10.66287533, 11.13292968, 11.59759113, 12.05336371,
       12.49479530, 12.91643843, 13.31299616, 13.68007991, 14.01646979,
       14.32557792, 14.61381474, 14.88850816, 15.15712471, 15.42427466,
       15.69202279, 15.96021352, 16.22870209, 16.49735771, 16.76606672});
}

TEST_P(Baselines, ReweightedLeastSquares) {
  const AsymmetricBaseline found =
      reweighted_baseline(minutes(), kSignal, 1000.0, 1e-6);
  EXPECT_TRUE(found.settled);
  EXPECT_EQ(found.solves, 15);
  expect_baseline(
      found.signal,
      {10.04882347, 10.42546925, 10.80206621, 11.17863853, 11.55521039,
       11.93180995, 12.30846538, 12.68520487, 13.06205658, 13.43904868,
       13.81620935, 14.19356675, 14.57114906, 14.94898445, 15.32712989,
       15.70559336, 16.08425573, 16.46308685, 16.84207230, 17.22113458});
}

TEST_P(Baselines, Snip) {
  expect_baseline(
      snip_baseline(minutes(), kSignal, 6),
      {10,      10.39375, 10.7875, 11.15, 11.528125, 11.90625, 12.284375,
       12.6625, 13.025,   13.3875, 13.75, 14.1125,   14.475,   14.8375,
       15.2,    15.65,    16.025,  16.4,  16.85,     17.3});
}

TEST_P(Baselines, SnipOfCounts) {
  expect_baseline(
      snip_baseline_of_counts(minutes(), kSignal, 6),
      {10,          10.33869118, 10.68825549, 10.99775911, 11.34370359,
       11.70007996, 12.06722748, 12.44212192, 12.79927480, 13.16282373,
       13.54899262, 13.93511261, 14.32225369, 14.71996505, 15.12655595,
       15.53837947, 15.96130649, 16.39566100, 16.84177722, 17.3});
}

TEST_P(Baselines, SnipFromTheNarrowestUp) {
  expect_baseline(snip_baseline(minutes(), kSignal, 6, SnipOrder::Increasing),
                  {10,   10.5,   10.95,  11.4,    12.1,     13.7875, 12.3,
                   12.7, 13.075, 13.525, 14.0625, 15.09375, 14.6,    14.9,
                   15.2, 15.65,  16.025, 16.4,    16.85,    17.3});
}

INSTANTIATE_TEST_SUITE_P(Steps, Baselines,
                         testing::Values(1.0, 0.01, 1.0 / 300.0));

// Times that a detector with gaps and two rates might give.
std::vector<double> uneven_times(std::size_t n) {
  RandomStream stream("uneven times");
  std::vector<double> times;
  double t = 0.0;
  for (std::size_t i = 0; i < n; ++i) {
    times.push_back(t);
    t += (i % 7 == 0 ? 4.0 : 1.0) * (0.5 + stream.uniform());
  }
  return times;
}

TEST(UnevenBaselines, AStraightLineStaysOne) {
  const std::vector<double> times = uneven_times(60);
  std::vector<double> line;
  for (const double t : times) line.push_back(100.0 - 0.25 * t);
  const std::vector<double> weights(times.size(), 0.5);
  const std::vector<double> smooth =
      WhittakerSmoother(times, 1e8).smooth(line, weights);
  const std::vector<double> snip = snip_baseline(times, line, 9);
  for (std::size_t i = 0; i < times.size(); ++i) {
    // Rounding grows with the square root of the smoothness, 1e4.
    EXPECT_TRUE(within_condition(smooth[i], line[i], 1e5));
    EXPECT_TRUE(within_condition(snip[i], line[i], 100.0));
  }
}

// Two points where there was one, each of half the weight, are no news: the
// penalty is an integral over time, not a sum over points.
TEST(UnevenBaselines, MorePointsOfLessWeightGiveTheSameCurve) {
  std::vector<double> coarse;
  std::vector<double> fine;
  const auto bump = [](double t) { return std::exp(-0.5 * t * t / 400.0); };
  for (int i = -100; i <= 100; ++i) coarse.push_back(i);
  // Twice as dense in the right half only.
  for (int i = -100; i < 0; ++i) fine.push_back(i);
  for (int i = 0; i <= 200; ++i) fine.push_back(0.5 * i);
  std::vector<double> one, two, weights;
  for (const double t : coarse) one.push_back(bump(t));
  for (const double t : fine) two.push_back(bump(t));
  for (const double t : fine) weights.push_back(t >= 0.0 ? 0.5 : 1.0);
  // Smoothness counts in middle distances to the fourth, weights in points: in
  // `fine` the middle distance is a half, so 1e5 there is 16 times, and half,
  // of 1e5.
  const std::vector<double> a =
      WhittakerSmoother(coarse, 1e5)
          .smooth(one, std::vector<double>(one.size(), 1.0));
  const std::vector<double> b =
      WhittakerSmoother(fine, 8.0 * 1e5).smooth(two, weights);
  for (const int t : {-60, -20, 0, 20, 60}) {
    const auto at = static_cast<std::size_t>(t + 100);
    const std::size_t there =
        t < 0 ? at : 100 + static_cast<std::size_t>(2 * t);
    EXPECT_TRUE(agrees_to_digits(b[there], a[at], 2)) << t;
  }
}

TEST(UnevenBaselines, SnipClipsAPeakWhateverTheSpacing) {
  const std::vector<double> times = uneven_times(200);
  const double middle = times[100];
  std::vector<double> signal;
  for (const double t : times) {
    const double z = (t - middle) / 5.0;
    signal.push_back(50.0 + 0.1 * t + 30.0 * std::exp(-0.5 * z * z));
  }
  const std::vector<double> found = snip_baseline(times, signal, 30);
  for (std::size_t i = 40; i < 160; ++i) {
    EXPECT_TRUE(within_condition(found[i], 50.0 + 0.1 * times[i], 1e10));
  }
}

// Rounding must not grow with the smoothness itself: 1e12 times 2e-16 would
// leave no more than 4 digits.
TEST(Whittaker, KeepsItsDigitsWhereItIsVerySmooth) {
  const std::vector<double> times = even_times(2000);
  std::vector<double> line;
  for (const double t : times) line.push_back(1000.0 + 0.5 * t);
  const std::vector<double> weights(times.size(), 1.0);
  const std::vector<double> found =
      WhittakerSmoother(times, 1e12).smooth(line, weights);
  for (std::size_t i = 0; i < times.size(); i += 100) {
    EXPECT_TRUE(within_condition(found[i], line[i], 1e7));
  }
}

TEST(FewOrFlat, OfFewPointsAreTheSignal) {
  const std::vector<double> two = {1.0, 5.0};
  EXPECT_EQ(snip_baseline(even_times(2), two, 3), two);
  EXPECT_EQ(asymmetric_baseline(even_times(2), two, 1e3, 0.01).signal, two);
  EXPECT_EQ(reweighted_baseline(even_times(2), two, 1e3, 1e-3).signal, two);
}

// A detector that shows nothing: no spread, no weights, no division by zero.
TEST(FewOrFlat, OfAFlatLineAreTheLine) {
  const std::vector<double> flat(50, 3.0);
  const AsymmetricBaseline found =
      reweighted_baseline(even_times(50), flat, 1e4, 1e-3);
  EXPECT_TRUE(found.settled);
  for (const double z : found.signal) {
    EXPECT_TRUE(within_condition(z, 3.0, 1e4));
  }
}

}  // namespace
}  // namespace loqsmith
