#include "loqsmith/night/judge_sequence.hpp"

#include <algorithm>
#include <optional>
#include <string>

#include "loqsmith/judgement/judge_analyte.hpp"
#include "loqsmith/judgement/surrogate_check.hpp"

namespace loqsmith {
namespace {

std::size_t place_of(const Learned& learned, const std::string& id) {
  const auto found = std::find_if(
      learned.targets.begin(), learned.targets.end(),
      [&](const TargetSettings& target) { return target.id == id; });
  return static_cast<std::size_t>(found - learned.targets.begin());
}

// What was measured of one analyte (and its internal standard) in an injection.
MeasuredInjection measured_of(const Learned& learned,
                              const AnalyteSettings& analyte,
                              const Injection& row,
                              const InjectionMeasured& measured) {
  const std::size_t own = place_of(learned, analyte.target.id);
  MeasuredInjection injection{&row, measured.peaks[own], std::nullopt,
                              measured.signal_units[own]};
  injection.expected_minutes = measured.expected_minutes[own];
  if (analyte.second_target) {
    injection.second_trace =
        measured.peaks[place_of(learned, analyte.second_target->id)];
  }
  if (analyte.internal_standard.empty()) return injection;
  const std::size_t standard = place_of(learned, analyte.internal_standard);
  injection.internal_standard = measured.peaks[standard];
  if (measured.signal_units[standard] != injection.signal_unit) {
    injection.signal_unit += " / " + measured.signal_units[standard];
  }
  return injection;
}

AnalyteJudgement judge(const SequenceFolder& folder, const Learned& learned,
                       const Measured& measured, const AnalyteSettings& analyte,
                       const std::vector<CheckEffect>& from_others) {
  std::vector<MeasuredInjection> injections;
  const std::vector<Injection>& rows = folder.sheets.sequence.injections;
  for (std::size_t i = 0; i < rows.size(); ++i) {
    if (rows[i].role == Role::Conditioning) continue;
    injections.push_back(
        measured_of(learned, analyte, rows[i], measured.injections[i]));
  }
  const Outcome<WindowTemplate>& window =
      learned.windows[place_of(learned, analyte.target.id)];
  return judge_analyte(analyte, folder.sheets.method.units,
                       folder.sheets.sequence, injections,
                       window ? std::string{} : window.reason(), from_others);
}

}  // namespace

std::vector<AnalyteJudgement> judge_sequence(const SequenceFolder& folder,
                                             const Learned& learned,
                                             const Measured& measured) {
  const std::vector<AnalyteSettings>& analytes = folder.sheets.method.analytes;
  std::vector<bool> is_surrogate;
  for (const AnalyteSettings& analyte : analytes) {
    is_surrogate.push_back(analyte.surrogate_concentration.has_value());
  }
  return judge_surrogates_first(
      is_surrogate,
      [&](std::size_t i, const std::vector<CheckEffect>& from_others) {
        return judge(folder, learned, measured, analytes[i], from_others);
      });
}

}  // namespace loqsmith
