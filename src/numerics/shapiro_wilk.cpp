#include "loqsmith/numerics/shapiro_wilk.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <numbers>
#include <vector>

#include "loqsmith/numerics/mean.hpp"
#include "loqsmith/numerics/normal.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kFewest = 3;
constexpr std::size_t kMost = 5000;
constexpr double kRoundingShare = 1e-12;

template <std::size_t N>
double polynomial(const std::array<double, N>& coefficients, double x) {
  double sum = 0.0;
  for (std::size_t i = N; i-- > 0;) sum = sum * x + coefficients[i];
  return sum;
}

// Expected normal order statistics of the upper half, largest first (Blom).
std::vector<double> upper_scores(std::size_t n) {
  std::vector<double> scores;
  const auto count = static_cast<double>(n);
  for (std::size_t i = 0; i < n / 2; ++i)
    scores.push_back(-normal_quantile((static_cast<double>(i) + 0.625) /
                                      (count + 0.25)));
  return scores;
}

// Weights of the upper half, largest value first; the lower half has the same
// with the other sign. Their squares sum to 1/2.
std::vector<double> upper_weights(std::size_t n) {
  if (n == 3) return {std::numbers::sqrt2 / 2.0};
  std::vector<double> a = upper_scores(n);
  double squares = 0.0;
  for (double score : a) squares += 2.0 * score * score;
  const double u = 1.0 / std::sqrt(static_cast<double>(n));
  const double length = std::sqrt(squares);
  const double first =
      a[0] / length + polynomial<6>({0.0, 0.221157, -0.147981, -2.07119,
                                     4.434685, -2.706056},
                                    u);
  double left = squares - 2.0 * a[0] * a[0];
  double share = 1.0 - 2.0 * first * first;
  std::size_t kept = 1;
  if (n > 5) {
    const double second =
        a[1] / length + polynomial<6>({0.0, 0.042981, -0.293762, -1.752461,
                                       5.682633, -3.582633},
                                      u);
    left -= 2.0 * a[1] * a[1];
    share -= 2.0 * second * second;
    a[1] = second;
    kept = 2;
  }
  a[0] = first;
  for (std::size_t i = kept; i < a.size(); ++i) a[i] /= std::sqrt(left / share);
  return a;
}

// What makes -log(gamma - log(1 - W)) or log(1 - W) normal.
struct Normalising {
  double mean = 0.0;
  double sd = 1.0;
  double gamma = 0.0;
  bool small = false;  ///< n of at most 11, with gamma
};

Normalising normalising(std::size_t count) {
  const auto n = static_cast<double>(count);
  Normalising to;
  to.small = count <= 11;
  if (to.small) {
    to.gamma = -2.273 + 0.459 * n;
    to.mean = polynomial<4>({0.544, -0.39978, 0.025054, -6.714e-4}, n);
    to.sd =
        std::exp(polynomial<4>({1.3822, -0.77857, 0.062767, -0.0020322}, n));
  } else {
    const double log_n = std::log(n);
    to.mean = polynomial<4>({-1.5861, -0.31082, -0.083751, 0.0038915}, log_n);
    to.sd = std::exp(polynomial<3>({-0.4803, -0.082676, 0.0030302}, log_n));
  }
  return to;
}

// The distribution for three values is known: (6/pi) (asin sqrt W - pi/3).
double p_of_three(double w) {
  const double angle = std::asin(std::sqrt(w)) - std::numbers::pi / 3.0;
  return std::clamp(6.0 / std::numbers::pi * angle, 0.0, 1.0);
}

double p_of(double one_less_w, std::size_t n) {
  if (n == 3) return p_of_three(1.0 - one_less_w);
  if (!(one_less_w > 0.0)) return 1.0;
  const Normalising to = normalising(n);
  double y = std::log(one_less_w);
  if (to.small) {
    if (!(y < to.gamma)) return 0.0;
    y = -std::log(to.gamma - y);
  }
  return normal_cdf(-(y - to.mean) / to.sd);
}

}  // namespace

Outcome<ShapiroWilk> shapiro_wilk(std::span<const double> values) {
  const std::size_t n = values.size();
  if (n < kFewest || n > kMost)
    return NotApplicable{"few-points: the test needs 3 to 5000 values"};
  std::vector<double> sorted(values.begin(), values.end());
  std::sort(sorted.begin(), sorted.end());
  const double largest =
      std::max(std::abs(sorted.front()), std::abs(sorted.back()));
  if (!(sorted.back() - sorted.front() > kRoundingShare * largest))
    return NotApplicable{"not-defined: all values are equal"};

  const std::vector<double> a = upper_weights(n);
  const double centre = mean(sorted);
  double squares = 0.0;
  for (double value : sorted) squares += (value - centre) * (value - centre);
  double slope = 0.0;
  for (std::size_t i = 0; i < a.size(); ++i)
    slope += a[i] * (sorted[n - 1 - i] - sorted[i]);
  // 1 - W as a product: W itself may be 1 but for rounding.
  const double length = std::sqrt(squares);
  const double one_less_w =
      std::max(0.0, (length - slope) * (length + slope) / squares);
  return ShapiroWilk{1.0 - one_less_w, p_of(one_less_w, n)};
}

double shapiro_wilk_critical(std::size_t n, double significance) {
  if (n == 3) {
    const double root = std::sin(std::numbers::pi / 6.0 * significance +
                                 std::numbers::pi / 3.0);
    return root * root;
  }
  const Normalising to = normalising(n);
  const double y = to.mean - to.sd * normal_quantile(significance);
  return 1.0 - std::exp(to.small ? to.gamma - std::exp(-y) : y);
}

}  // namespace loqsmith
