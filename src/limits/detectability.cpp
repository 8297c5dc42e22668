#include "loqsmith/limits/detectability.hpp"

#include "loqsmith/limits/low_range_procedure.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/noncentral_t.hpp"

namespace loqsmith {

Outcome<Detectability> detectability_of(const ProcedureSettings& procedure,
                                        double df) {
  const auto delta =
      detectable_noncentrality(procedure.alpha, procedure.beta, df);
  if (!delta) return NotApplicable{delta.reason()};
  return Detectability{student_t_quantile(1.0 - procedure.alpha, df), *delta};
}

void add_detectability_terms(LimitEstimate& estimate,
                             const ProcedureSettings& procedure,
                             const Detectability& multiples) {
  estimate.terms.push_back({"alpha", procedure.alpha, ""});
  estimate.terms.push_back({"beta", procedure.beta, ""});
  estimate.terms.push_back(
      {"measurements averaged", replicates_of(procedure), ""});
  estimate.terms.push_back({"quantile of t for alpha", multiples.t, ""});
  estimate.terms.push_back(
      {"non-centrality for alpha and beta", multiples.delta, ""});
  estimate.terms.push_back({"quantitation factor", kQuantitationFactor, ""});
}

}  // namespace loqsmith
