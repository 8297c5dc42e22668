#include "loqsmith/signal/local_fit.hpp"

#include <cstddef>

namespace loqsmith {

LocalFit::LocalFit(std::span<const double> nodes,
                   std::span<const double> values, int order)
    : origin_(nodes[nodes.size() / 2]) {
  const std::size_t n = nodes.size();
  std::vector<double> before(n, 0.0);
  std::vector<double> now(n, 1.0);
  double norm_before = 1.0;
  for (int k = 0; k <= order; ++k) {
    double norm = 0.0;
    double moment = 0.0;
    double product = 0.0;
    for (std::size_t i = 0; i < n; ++i) {
      norm += now[i] * now[i];
      moment += (nodes[i] - origin_) * now[i] * now[i];
      product += now[i] * values[i];
    }
    const Term term{moment / norm, k == 0 ? 0.0 : norm / norm_before,
                    product / norm};
    terms_.push_back(term);
    norm_before = norm;
    for (std::size_t i = 0; i < n; ++i) {
      const double next =
          (nodes[i] - origin_ - term.shift) * now[i] - term.ratio * before[i];
      before[i] = now[i];
      now[i] = next;
    }
  }
}

Jet LocalFit::at(double place) const {
  Jet sum{0.0, 0.0, 0.0};
  Jet before{0.0, 0.0, 0.0};
  Jet now{1.0, 0.0, 0.0};
  for (const Term& term : terms_) {
    for (std::size_t d = 0; d < 3; ++d) sum[d] += term.share * now[d];
    const double u = place - origin_ - term.shift;
    const Jet next{u * now[0] - term.ratio * before[0],
                   u * now[1] + now[0] - term.ratio * before[1],
                   u * now[2] + 2.0 * now[1] - term.ratio * before[2]};
    before = now;
    now = next;
  }
  return sum;
}

}  // namespace loqsmith
