#include "loqsmith/record/words.hpp"

#include <algorithm>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {

std::string model_word(CalibrationSettings::Model model) {
  switch (model) {
    case CalibrationSettings::Model::Linear:
      return "linear";
    case CalibrationSettings::Model::Quadratic:
      return "quadratic";
    case CalibrationSettings::Model::ResponseFactor:
      return "response-factor";
  }
  return {};
}

std::string weight_word(CalibrationSettings::Weight weight) {
  switch (weight) {
    case CalibrationSettings::Weight::None:
      return "none";
    case CalibrationSettings::Weight::InverseX:
      return "1/x";
    case CalibrationSettings::Weight::InverseXSquared:
      return "1/x2";
    case CalibrationSettings::Weight::InverseVariance:
      return "1/s2";
  }
  return {};
}

std::string intercept_word(CalibrationSettings::Intercept intercept) {
  switch (intercept) {
    case CalibrationSettings::Intercept::Fitted:
      return "fitted";
    case CalibrationSettings::Intercept::Zero:
      return "zero";
  }
  return {};
}

std::string governing_word(const LimitRow& row) {
  if (row.governs_detection && row.governs_quantitation) return "both";
  if (row.governs_detection) return "detection";
  return row.governs_quantitation ? "quantitation" : "none";
}

std::string terms_text(const LimitEstimate& estimate) {
  std::vector<std::string> parts;
  for (const LimitTerm& term : estimate.terms) {
    std::string part = term.name + ' ' + shortest(term.value);
    if (!term.unit.empty()) part += ' ' + term.unit;
    parts.push_back(std::move(part));
  }
  return join(parts, "; ");
}

std::string findings_text(const LimitEstimate& estimate) {
  std::vector<std::string> parts;
  for (const LimitFinding& finding : estimate.findings) {
    parts.push_back(finding.text.empty() ? finding.word
                                         : finding.word + ": " + finding.text);
  }
  return join(parts, "; ");
}

std::string limit_note(const LimitRow& row) {
  if (!row.estimate) return row.estimate.reason();
  const std::string findings = findings_text(*row.estimate);
  const std::string terms = terms_text(*row.estimate);
  if (findings.empty()) return terms;
  return terms.empty() ? findings : findings + "; " + terms;
}

std::string calibration_note(const Outcome<Calibration>& calibration) {
  if (!calibration) return calibration.reason();
  std::vector<std::string> parts = calibration->notes;
  if (!calibration->accepted_lowest || !calibration->accepted_highest) {
    parts.emplace_back("no accepted level");
  } else if (*calibration->accepted_lowest != calibration->lowest ||
             *calibration->accepted_highest != calibration->highest) {
    parts.push_back("accepted range " +
                    shortest(*calibration->accepted_lowest) + " to " +
                    shortest(*calibration->accepted_highest));
  }
  return join(parts, ";");
}

CalibrationSettings calibration_settings(const Method& method,
                                         const std::string& analyte,
                                         const CalibrationSet& set) {
  if (set.calibration) return set.calibration->settings;
  if (set.over_additions) return {};
  for (const AnalyteSettings& settings : method.analytes) {
    if (settings.target.id == analyte) return settings.calibration;
  }
  return {};
}

bool calibration_accepted(const AnalyteJudgement& judgement,
                          const CalibrationSet& set) {
  if (!set.calibration || !set.calibration->accepted_lowest) return false;
  return std::none_of(judgement.checks.begin(), judgement.checks.end(),
                      [&](const CheckRow& check) {
                        return check.check == "calibration" &&
                               (check.set.empty() || check.set == set.set) &&
                               !check.action.empty() && check.passed == false;
                      });
}

const std::vector<StandardPoint>& standards_of(const CalibrationSet& set) {
  return set.calibration && !set.calibration->points.empty()
             ? set.calibration->points
             : set.standards;
}

}  // namespace loqsmith
