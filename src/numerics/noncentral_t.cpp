#include "loqsmith/numerics/noncentral_t.hpp"

#include <algorithm>
#include <boost/math/distributions/non_central_t.hpp>
#include <boost/math/tools/toms748_solve.hpp>
#include <cfenv>
#include <cmath>
#include <cstdint>
#include <limits>

#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

namespace bm = boost::math;
namespace bp = boost::math::policies;

using Quiet = bp::policy<
    bp::domain_error<bp::ignore_error>, bp::pole_error<bp::ignore_error>,
    bp::overflow_error<bp::ignore_error>, bp::underflow_error<bp::ignore_error>,
    bp::evaluation_error<bp::ignore_error>,
    bp::rounding_error<bp::ignore_error>,
    bp::indeterminate_result_error<bp::ignore_error>,
    bp::promote_double<false>>;
using NonCentralT = bm::non_central_t_distribution<double, Quiet>;

// The library counts terms of its series from delta^2 / 2 in an int.
constexpr double kLargest = 60000.0;

// At 1 and 2 degrees of freedom the library divides by zero on its way to a
// right answer: callers who trap that shall not be stopped by it.
class NoTraps {
 public:
  NoTraps() { std::feholdexcept(&kept_); }
  ~NoTraps() { std::fesetenv(&kept_); }
  NoTraps(const NoTraps&) = delete;
  NoTraps& operator=(const NoTraps&) = delete;

 private:
  std::fenv_t kept_;
};

bool is_level(double p) { return p > 0.0 && p < 0.5; }

}  // namespace

double noncentral_t_cdf(double t, double degrees_of_freedom,
                        double noncentrality) {
  if (!(degrees_of_freedom > 0.0) || !(std::abs(noncentrality) <= kLargest) ||
      !std::isfinite(degrees_of_freedom) || !std::isfinite(t))
    return std::numeric_limits<double>::quiet_NaN();
  const NoTraps no_traps;
  return bm::cdf(NonCentralT(degrees_of_freedom, noncentrality), t);
}

Outcome<double> detectable_noncentrality(double alpha, double beta,
                                         double degrees_of_freedom) {
  if (!is_level(alpha) || !is_level(beta) || !(degrees_of_freedom > 0.0) ||
      !std::isfinite(degrees_of_freedom))
    return NotApplicable{
        "no-noncentrality: alpha and beta must lie between 0 and 0.5"};
  const double t = student_t_quantile(1.0 - alpha, degrees_of_freedom);
  const auto excess = [&](double delta) {
    return noncentral_t_cdf(t, degrees_of_freedom, delta) - beta;
  };
  double high = std::min(2.0 * t + 4.0, kLargest);
  double at_high = excess(high);
  while (!(at_high < 0.0)) {
    if (!(high < kLargest))
      return NotApplicable{
          "no-noncentrality: alpha and beta are too small for so few degrees "
          "of freedom"};
    high = std::min(2.0 * high, kLargest);
    at_high = excess(high);
  }
  std::uintmax_t steps = 200;
  const NoTraps no_traps;
  const auto bracket = bm::tools::toms748_solve(
      excess, 0.0, high, excess(0.0), at_high,
      bm::tools::eps_tolerance<double>(50), steps, Quiet());
  return 0.5 * (bracket.first + bracket.second);
}

}  // namespace loqsmith
