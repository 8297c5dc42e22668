#pragma once

#include <string>
#include <vector>

#include "judgement/night_builder.hpp"

namespace loqsmith::test {

/// A night without checks: seven solvent blanks with standard deviation 0.1,
/// standards 1 to 100 on the line 2x. Detection from 0.15, quantitation from
/// 0.5, in responses 0.3 and 1.
inline NightBuilder checked_night() {
  NightBuilder night;
  ProcedureSettings blanks;
  blanks.name = "blank-deviation";
  night.settings.limits.procedures = {blanks};
  night.settings.limits.floor_at_lowest_standard = false;
  for (const double response : {-0.1, 0.1, -0.1, 0.1, -0.1, 0.1, 0.0}) {
    night.add(Role::SolventBlank, response, false);
  }
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0}) {
    night.standard(x);
  }
  return night;
}

/// A sample at the given concentration in the vial.
inline NightRow& sample(NightBuilder& night, double concentration) {
  return night.add(Role::Sample, night.sensitivity * concentration);
}

/// "15 17": the injections whose results carry the word, in run order.
inline std::string marked(const AnalyteJudgement& judgement,
                          const std::string& word) {
  std::string numbers;
  for (const ResultRow& row : judgement.results) {
    if (!has_word(row.reasons, word)) continue;
    numbers += (numbers.empty() ? "" : " ") + std::to_string(row.injection);
  }
  return numbers;
}

/// "+-?": what each row of a check says: passed, failed, not checked.
inline std::string outcomes(const AnalyteJudgement& judgement,
                            const std::string& check) {
  std::string signs;
  for (const CheckRow& row : rows_of(judgement.checks, check)) {
    signs += !row.passed ? '?' : *row.passed ? '+' : '-';
  }
  return signs;
}

inline const ResultRow& result_of(const AnalyteJudgement& judgement,
                                  int injection) {
  for (const ResultRow& row : judgement.results) {
    if (row.injection == injection) return row;
  }
  throw std::runtime_error("no row for injection " + std::to_string(injection));
}

}  // namespace loqsmith::test
