#pragma once

#include <array>
#include <span>
#include <vector>

namespace loqsmith {

/// Value, slope and curvature of one polynomial at one place.
using Jet = std::array<double, 3>;

/// The polynomial that fits a few points best by least squares, to be asked
/// for at several places: through polynomials made orthogonal on these very
/// nodes, as local_polynomial_weights does for one place.
class LocalFit {
 public:
  /// @param nodes  strictly increasing, more than `order` of them
  LocalFit(std::span<const double> nodes, std::span<const double> values,
           int order);

  Jet at(double place) const;

 private:
  // p[k + 1] = (x - origin - shift[k]) p[k] - ratio[k] p[k - 1]
  struct Term {
    double shift = 0.0;
    double ratio = 0.0;
    double share = 0.0;  // of p[k] in the fit
  };
  double origin_;
  std::vector<Term> terms_;
};

}  // namespace loqsmith
