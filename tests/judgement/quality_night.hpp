#pragma once

#include <string>
#include <vector>

#include "judgement/night_builder.hpp"

namespace loqsmith::test {

/// A night whose curve is exact (response 2 per concentration unit, standards
/// from 1 to 50) and whose blanks give a detection limit of 0.15 and a
/// quantitation limit of 1, the lowest standard. Injections 1 to 13.
inline NightBuilder quality_night() {
  NightBuilder night;
  ProcedureSettings blanks;
  blanks.name = "blank-deviation";
  night.settings.limits.procedures = {blanks};
  for (const double response : {-0.1, 0.1, -0.1, 0.1, -0.1, 0.1, 0.0}) {
    night.add(Role::SolventBlank, response, false);
  }
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0}) night.standard(x);
  return night;
}

/// An injection whose undiluted vial holds `found`.
inline NightRow& add_found(NightBuilder& night, Role role, double found,
                           const std::string& sample, double dilution = 1.0) {
  NightRow& row = night.add(role, night.sensitivity * found / dilution);
  row.injection.sample = sample;
  row.injection.dilution = dilution;
  return row;
}

/// Likewise of a level of its own.
inline NightRow& add_known(NightBuilder& night, Role role, double known,
                           double found) {
  return night.add_level(role, known, night.sensitivity * found);
}

/// Injections whose results have the word.
inline std::vector<int> with_word(const AnalyteJudgement& judgement,
                                  const std::string& word) {
  std::vector<int> numbers;
  for (const ResultRow& row : judgement.results) {
    if (has_word(row.reasons, word)) numbers.push_back(row.injection);
  }
  return numbers;
}

}  // namespace loqsmith::test
