#include "loqsmith/calibration/diagnostics.hpp"

#include <utility>

#include "loqsmith/calibration/cochran_test.hpp"
#include "loqsmith/calibration/grubbs_test.hpp"
#include "loqsmith/calibration/lack_of_fit.hpp"
#include "loqsmith/calibration/levene_test.hpp"
#include "loqsmith/calibration/mandel_test.hpp"
#include "loqsmith/calibration/replicate_groups.hpp"
#include "loqsmith/calibration/residual_normality.hpp"

namespace loqsmith {

CalibrationDiagnostics diagnose_calibration(const Calibration& calibration) {
  const auto weighted = weighted_replicate_groups(calibration.points);
  CalibrationDiagnostics found;
  found.drift = slope_drift(calibration);
  found.tests = {
      {"lack-of-fit", lack_of_fit(calibration)},
      {"mandel", mandel_test(calibration)},
      {"cochran", cochran_test(weighted)},
      {"levene", levene_test(weighted)},
      {"residual-normality", residual_normality(calibration)},
      {"leverage", largest_leverage(calibration)},
      {"cooks-distance", largest_cooks_distance(calibration)},
      {"outlying-residual", outlying_residual(calibration)},
      {"slope-drift", found.drift ? Outcome<DiagnosticTest>(found.drift->test)
                                  : Outcome<DiagnosticTest>(
                                        NotApplicable{found.drift.reason()})}};
  for (NamedDiagnostic& test :
       grubbs_by_level(replicate_groups(calibration.points)))
    found.tests.push_back(std::move(test));
  const auto influence = point_influence(calibration);
  if (influence) found.influence = *influence;
  found.weights = advise_weight(calibration);
  found.suggested_exclusions = suggest_exclusions(calibration);
  return found;
}

}  // namespace loqsmith
