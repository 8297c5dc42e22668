#include <cmath>
#include <limits>
#include <optional>

#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/calibration/prediction_spread.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

// Further than this many times what is at hand nothing is looked for.
constexpr double kFar = 1e6;

// The t test of one trial concentration; a refused one is outside.
class TrialTest {
 public:
  TrialTest(const Calibration& calibration, double response, double estimate,
            int replicates)
      : calibration_(calibration),
        spread_(calibration, replicates),
        response_(response),
        t_(student_t_quantile(0.975, spread_.degrees_at(estimate))) {}

  bool refuses(double x) const {
    const double off = response_ - response_from_concentration(calibration_, x);
    return std::abs(off) > half_width_at(x);
  }

  // In response units: t times the standard deviation of response less curve.
  double half_width_at(double x) const {
    return t_ * std::sqrt(spread_.variance_at(x));
  }

 private:
  const Calibration& calibration_;
  PredictionSpread spread_;
  double response_;
  double t_;
};

// Where the rising branch ends in this direction; infinite for a line.
double branch_end(const Calibration& calibration, double direction) {
  const double c = calibration.curvature;
  if (c * direction < 0.0) return -calibration.slope / (2.0 * c);
  return direction * std::numeric_limits<double>::infinity();
}

// The last trial, from `inside` on, that is not refused; `outside` is.
double last_not_refused(const TrialTest& test, double inside, double outside) {
  for (;;) {
    const double middle = inside + 0.5 * (outside - inside);
    if (middle == inside || middle == outside) return inside;
    (test.refuses(middle) ? outside : inside) = middle;
  }
}

std::optional<double> end_of(const TrialTest& test,
                             const Calibration& calibration, double estimate,
                             double direction) {
  const double branch = branch_end(calibration, direction);
  const double first =
      test.half_width_at(estimate) /
      (calibration.slope + 2.0 * calibration.curvature * estimate);
  const double scale = std::abs(estimate) + calibration.highest + first;
  const double far = estimate + direction * kFar * scale;
  // A line that far trials do not refuse lets everything through: g >= 1.
  if (calibration.curvature == 0.0 && !test.refuses(far)) return std::nullopt;
  double inside = estimate;
  double step = first;
  if (step == 0.0) return estimate;  // standards without any scatter
  if (!(step > 0.0) || !std::isfinite(step)) return std::nullopt;
  while (step < kFar * scale) {
    double trial = estimate + direction * step;
    const bool at_end = direction * (branch - trial) <= 0.0;
    if (at_end) trial = branch;
    if (test.refuses(trial)) return last_not_refused(test, inside, trial);
    if (at_end) return std::nullopt;
    inside = trial;
    step *= 2.0;
  }
  return std::nullopt;
}

}  // namespace

Outcome<ConcentrationInterval> profile_interval(const Calibration& calibration,
                                                double response,
                                                int replicates) {
  const Outcome<double> estimate = point_on_curve(calibration, response);
  if (!estimate) return NotApplicable{"no-finite-interval: beyond the curve"};
  const TrialTest test(calibration, response, *estimate, replicates);
  const auto lower = end_of(test, calibration, *estimate, -1.0);
  const auto upper = end_of(test, calibration, *estimate, 1.0);
  if (!lower || !upper)
    return NotApplicable{
        "no-finite-interval: the slope does not differ from zero, or the curve "
        "turns before the interval ends"};
  return ConcentrationInterval{*lower, *upper};
}

}  // namespace loqsmith
