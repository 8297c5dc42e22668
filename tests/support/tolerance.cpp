#include "support/tolerance.hpp"

#include <bit>
#include <cmath>
#include <cstdint>
#include <iomanip>
#include <limits>
#include <sstream>

namespace loqsmith::test {
namespace {

testing::AssertionResult outcome(bool pass, double found, double wanted,
                                 double allowed) {
  if (pass) return testing::AssertionSuccess();
  std::ostringstream text;
  text << std::setprecision(17) << "found " << found << " (" << std::hexfloat
       << found << std::defaultfloat << std::setprecision(17) << "), wanted "
       << wanted << " (" << std::hexfloat << wanted << std::defaultfloat
       << "), allowed difference " << allowed << ", difference "
       << std::abs(found - wanted);
  return testing::AssertionFailure() << text.str();
}

}  // namespace

testing::AssertionResult same_bits(double found, double wanted) {
  const bool same = std::bit_cast<std::uint64_t>(found) ==
                        std::bit_cast<std::uint64_t>(wanted) &&
                    !std::isnan(found);
  return outcome(same, found, wanted, 0.0);
}

testing::AssertionResult agrees_to_digits(double found, double wanted,
                                          int digits) {
  if (wanted == 0.0) return outcome(found == 0.0, found, wanted, 0.0);
  const double place = std::floor(std::log10(std::abs(wanted))) - digits + 1;
  // A hair above half a unit, for published figures that sit on a tie.
  const double allowed = 0.5000001 * std::pow(10.0, place);
  return outcome(std::abs(found - wanted) <= allowed, found, wanted, allowed);
}

testing::AssertionResult within_condition(double found, double wanted,
                                          double condition, double scale) {
  const double size = scale > 0.0 ? scale : std::abs(wanted);
  const double allowed =
      condition * std::numeric_limits<double>::epsilon() * size;
  return outcome(std::abs(found - wanted) <= allowed, found, wanted, allowed);
}

testing::AssertionResult within_sampling_error(double mean, double sd,
                                               std::size_t n, double wanted,
                                               double z) {
  const double allowed = z * sd / std::sqrt(static_cast<double>(n));
  return outcome(n > 0 && std::abs(mean - wanted) <= allowed, mean, wanted,
                 allowed);
}

}  // namespace loqsmith::test
