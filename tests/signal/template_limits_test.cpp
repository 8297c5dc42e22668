#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "support/tolerance.hpp"
#include "template_night.hpp"

namespace loqsmith {
namespace {

using test::area_of_height;
using test::SimulatedTrace;
using test::template_detector;
using test::TemplateNight;
using test::within_sampling_error;

using Values = std::vector<double>;
using Rows = std::vector<Values>;

// Solves A x = b for several right sides by plain elimination, A symmetric and
// positive definite: the bound shares no code with what it is held against.
Rows eliminate(Rows a, Rows rhs) {
  const std::size_t n = a.size();
  for (std::size_t k = 0; k < n; ++k) {
    for (std::size_t i = k + 1; i < n; ++i) {
      const double factor = a[i][k] / a[k][k];
      for (std::size_t j = k; j < n; ++j) a[i][j] -= factor * a[k][j];
      for (Values& b : rhs) b[i] -= factor * b[k];
    }
  }
  for (std::size_t i = n; i-- > 0;) {
    for (Values& b : rhs) {
      for (std::size_t j = i + 1; j < n; ++j) b[i] -= a[i][j] * b[j];
      b[i] /= a[i][i];
    }
  }
  return rhs;
}

// Cramer-Rao bound of the amplitude of a peak of known shape and place with an
// unknown straight baseline: root of the first element of (X' G^-1 X)^-1, over
// the points from half a width at half height before the left foot to half a
// width behind the right one.
double bound(const TemplateNight& night, const Peak& peak) {
  const SimulatedTrace& detector = night.detector();
  const double beside = 0.5 * night.window().width_half_minutes;
  Rows x(3);
  for (double t = detector.start_minutes; t < detector.end_minutes;
       t += detector.step_minutes) {
    if (t < peak.start_minutes - beside || t > peak.end_minutes + beside) {
      continue;
    }
    x[0].push_back(
        test::modified_gaussian(t, 5.0, TemplateNight::kSigma, night.tau()));
    x[1].push_back(1.0);
    x[2].push_back(t - 5.0);
  }
  const std::size_t n = x[0].size();
  const double white = detector.white_noise * detector.white_noise;
  const double creeping = detector.creeping_noise * detector.creeping_noise;
  Rows g(n, Values(n));
  for (std::size_t i = 0; i < n; ++i) {
    for (std::size_t j = 0; j < n; ++j) {
      const double apart =
          std::abs(static_cast<double>(i) - static_cast<double>(j));
      g[i][j] =
          creeping * std::pow(detector.creep, apart) + (i == j ? white : 0.0);
    }
  }
  const Rows solved = eliminate(g, x);
  Rows information(3, Values(3, 0.0));
  for (std::size_t a = 0; a < 3; ++a) {
    for (std::size_t b = 0; b < 3; ++b) {
      for (std::size_t i = 0; i < n; ++i) {
        information[a][b] += x[a][i] * solved[b][i];
      }
    }
  }
  return std::sqrt(eliminate(information, {{1.0, 0.0, 0.0}})[0][0]);
}

struct Case {
  const char* name;
  double white;
  double creeping;
  double tau;
};

class Limits : public testing::TestWithParam<Case> {
 protected:
  TemplateNight night(const std::string& what) const {
    const Case& c = GetParam();
    return TemplateNight(template_detector(c.white, c.creeping),
                         what + " " + c.name, c.tau);
  }
};

void record(const std::string& key, double value) {
  testing::Test::RecordProperty(key, std::to_string(value));
  std::printf("  %s = %.4f\n", key.c_str(), value);
}

TEST_P(Limits, BlanksComeWithinATenthOfTheBound) {
  TemplateNight seen = night("blanks");
  Values responses;
  Values areas;
  Values predicted;
  int differs = 0;
  int unfitted = 0;
  Peak last;
  for (int i = 0; i < 1000; ++i) {
    last = seen.measure(0.0);
    differs += test::has_reason(last, "shape-differs") ? 1 : 0;
    unfitted += test::has_reason(last, "template-not-fitted") ? 1 : 0;
    if (!last.template_response) continue;
    responses.push_back(*last.template_response);
    areas.push_back(last.area);
    predicted.push_back(*last.response_noise);
  }
  const double sd = standard_deviation(responses);
  const double least = bound(seen, last);
  record("sd_over_bound", sd / least);
  record("mean_over_sd", mean(responses) / sd);
  record("area_sd_over_template_sd", standard_deviation(areas) / sd);
  record("predicted_over_seen", mean(predicted) / sd);
  record("shape_differs", differs);
  record("template_not_fitted", unfitted);
  EXPECT_LE(sd, 1.10 * least);
  // No estimate is better than the bound; 1000 values know it to 2.2 %.
  EXPECT_GE(sd, 0.93 * least);
  EXPECT_LE(std::abs(mean(responses)), 0.1 * sd);
  // Over the same evidence the area is 1.4 to 2.7 times as noisy.
  EXPECT_GE(standard_deviation(areas), 1.4 * sd);
  EXPECT_LE(standard_deviation(areas), 2.7 * sd);
  EXPECT_LE(std::abs(mean(predicted) - sd), 0.10 * sd);
  // Noise looks like another shape to one in ten thousand, and like a neighbour
  // that bounds the window to one in two hundred.
  EXPECT_LE(differs, 1);
  EXPECT_LE(unfitted, 5);
}

TEST_P(Limits, PeaksComeOutUnbiased) {
  const double noise = std::hypot(GetParam().white, GetParam().creeping);
  struct Wanted {
    double ratio;
    double bias;
    int count;
  };
  for (const Wanted& wanted :
       {Wanted{50.0, 0.003, 400}, Wanted{10.0, 0.010, 400}}) {
    TemplateNight seen = night("bias " + std::to_string(wanted.ratio));
    const double area = area_of_height(wanted.ratio * noise);
    const Peak clean = seen.measure_clean(area);
    ASSERT_TRUE(clean.template_response);
    Values found;
    for (int i = 0; i < wanted.count; ++i) {
      const Peak peak = seen.measure(area);
      EXPECT_TRUE(peak.found);
      if (peak.template_response) {
        found.push_back(*peak.template_response / *clean.template_response);
      }
    }
    record("bias_percent_at_" + std::to_string(std::lround(wanted.ratio)),
           100.0 * (mean(found) - 1.0));
    EXPECT_GE(found.size(), 0.99 * wanted.count);
    EXPECT_LE(std::abs(mean(found) - 1.0), wanted.bias);
  }
}

// Currie's case: a response of 3.29 standard deviations lies at or above 1.645
// of them in 95 % of the samples.
TEST_P(Limits, TheDetectionLimitIsSeenInNinetyFivePercent) {
  TemplateNight seen = night("detection");
  const double sd = bound(seen, seen.measure(0.0));
  const double scale = *seen.measure_clean(1000.0).template_response / 1000.0;
  Values above;
  for (int i = 0; i < 1000; ++i) {
    const Peak peak = seen.measure(3.29 * sd / scale);
    const double response = peak.template_response.value_or(peak.area);
    above.push_back(response >= 1.645 * sd ? 1.0 : 0.0);
  }
  record("share_above", mean(above));
  EXPECT_TRUE(within_sampling_error(mean(above), std::sqrt(0.95 * 0.05),
                                    above.size(), 0.95));
}

INSTANTIATE_TEST_SUITE_P(Template, Limits,
                         testing::Values(Case{"white", 1.0, 0.0, 0.0},
                                         Case{"white tailing", 1.0, 0.0, 0.05},
                                         Case{"coloured", 0.5, 0.87, 0.0}),
                         [](const testing::TestParamInfo<Case>& one) {
                           std::string name = one.param.name;
                           std::replace(name.begin(), name.end(), ' ', '_');
                           return name;
                         });

}  // namespace
}  // namespace loqsmith
