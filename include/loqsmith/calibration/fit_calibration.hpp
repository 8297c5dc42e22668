#pragma once

#include <optional>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/calibration/calibration.hpp"

namespace loqsmith {

/// Fits the curve by QR (never normal equations) to the points marked `used`.
/// A level with concentration 0 enters fits only where its weight has a value:
/// unweighted, and with 1/s2 where the scatter has an additive part. Otherwise
/// it is left out with the note "zero-level-unweighted-only". It never counts
/// as a level. All levels count as accepted until accept_levels() says
/// otherwise.
///
/// The points are those of one set: how standards are divided into sets is not
/// looked at here.
///
/// @return not applicable (a reason word, then words): fewer distinct levels
///         above zero than the model has coefficients plus one, all responses
///         equal, slope not positive, a quadratic that turns over below the
///         highest standard, weight 1/s2 without replicate standards (see
///         variance_function.hpp).
Outcome<Calibration> fit_calibration(std::vector<StandardPoint> points,
                                     const CalibrationSettings& settings);

/// Which levels are accepted: used, and mean back-calculation within
/// `percent` (`lowest_percent` at the lowest level; the same where absent).
/// No limit: every used level. Failing lowest or highest levels narrow the
/// accepted range without a new fit.
void accept_levels(Calibration& calibration, std::optional<double> percent,
                   std::optional<double> lowest_percent);

}  // namespace loqsmith
