#pragma once

#include <algorithm>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/limits/estimate.hpp"
#include "loqsmith/limits/evidence.hpp"
#include "loqsmith/limits/settings.hpp"

namespace loqsmith::test {

/// A straight line as if fitted to standards from `lowest` to `highest`.
inline Calibration known_line(double intercept, double slope,
                              double lowest = 1.0, double highest = 100.0) {
  Calibration line;
  line.intercept = intercept;
  line.slope = slope;
  line.residual_sd = 0.1;
  line.degrees_of_freedom = 5;
  line.lowest = lowest;
  line.highest = highest;
  line.accepted_lowest = lowest;
  line.accepted_highest = highest;
  return line;
}

inline std::vector<BlankResponse> blanks_of(
    const std::vector<double>& responses, BlankKind kind = BlankKind::Solvent) {
  std::vector<BlankResponse> blanks;
  for (double response : responses) {
    BlankResponse blank;
    blank.injection = static_cast<int>(blanks.size()) + 1;
    blank.kind = kind;
    blank.response = response;
    blanks.push_back(blank);
  }
  return blanks;
}

inline LimitEvidence evidence_of(const std::vector<double>& blanks,
                                 const Calibration& calibration) {
  LimitEvidence evidence;
  evidence.blanks = blanks_of(blanks);
  evidence.calibration = calibration;
  return evidence;
}

/// Low spikes of one amount, each in a preparation of its own, undiluted.
inline std::vector<SpikeResult> spikes_of(double nominal,
                                          const std::vector<double>& found) {
  std::vector<SpikeResult> spikes;
  for (double one : found) {
    const int number = static_cast<int>(spikes.size()) + 1;
    spikes.push_back(
        {100 + number, nominal, one, "P" + std::to_string(number)});
  }
  return spikes;
}

inline ProcedureSettings procedure(const std::string& name) {
  ProcedureSettings settings;
  settings.name = name;
  return settings;
}

inline ProcedureSettings with_factors(ProcedureSettings settings,
                                      double detection, double quantitation) {
  settings.detection_factor = detection;
  settings.quantitation_factor = quantitation;
  return settings;
}

/// The finding of that word, or none.
inline const LimitFinding* finding(const LimitEstimate& estimate,
                                   const std::string& word) {
  for (const LimitFinding& one : estimate.findings)
    if (one.word == word) return &one;
  return nullptr;
}

/// The value of the term of that name.
inline std::optional<double> term(const LimitEstimate& estimate,
                                  const std::string& name) {
  for (const LimitTerm& one : estimate.terms)
    if (one.name == name) return one.value;
  return std::nullopt;
}

inline bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

}  // namespace loqsmith::test
