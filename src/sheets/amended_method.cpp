#include <string>
#include <utility>
#include <vector>

#include "loqsmith/sheets/amendments_sheet.hpp"

namespace loqsmith {
namespace {

using What = Amendment::What;

bool means(const Amendment& amendment, const std::string& target) {
  return amendment.analyte.empty() || amendment.analyte == target;
}

void amend_target(const Amendment& amendment, const std::string& target,
                  Method& method) {
  if (!amendment.injection || !means(amendment, target)) return;
  TargetDecisions& decisions = method.decisions[target];
  if (amendment.what == What::ExcludeStandard ||
      amendment.what == What::InvalidInjection) {
    decisions.never_teach.insert(*amendment.injection);
  }
  if (amendment.what == What::IntegrationBounds) {
    decisions.bounds[*amendment.injection] = {amendment.start_minutes,
                                              amendment.end_minutes};
  }
}

void amend_analyte(const Amendment& amendment, AnalyteSettings& analyte) {
  if (!means(amendment, analyte.target.id)) return;
  const int injection = amendment.injection.value_or(0);
  ManualDecisions& decisions = analyte.decisions;
  switch (amendment.what) {
    case What::ExcludeStandard:
      decisions.excluded_standards.insert(injection);
      return;
    case What::InvalidInjection:
      decisions.invalid_injections.insert(injection);
      return;
    case What::OverrideStatus:
      decisions.statuses[injection] = amendment.status;
      return;
    case What::CalibrationModel:
      analyte.calibration.model = amendment.calibration.model;
      analyte.calibration.weight = amendment.calibration.weight;
      if (amendment.intercept) {
        analyte.calibration.intercept = *amendment.intercept;
      }
      return;
    case What::IntegrationBounds:
    case What::Withdraw:
      return;
  }
}

}  // namespace

Method amended(Method method, const std::vector<Amendment>& amendments) {
  for (const Amendment& amendment : amendments) {
    if (!amendment.in_force) continue;
    for (const InternalStandardSettings& standard : method.internal_standards) {
      amend_target(amendment, standard.target.id, method);
    }
    for (AnalyteSettings& analyte : method.analytes) {
      amend_target(amendment, analyte.target.id, method);
      amend_analyte(amendment, analyte);
    }
  }
  return method;
}

}  // namespace loqsmith
