#include "loqsmith/judgement/measured_analyte.hpp"

#include <algorithm>

namespace loqsmith {
namespace {

std::optional<double> nominal_of(const Injection& injection,
                                 const Sequence& sequence,
                                 const std::string& analyte) {
  if (injection.level.empty()) return std::nullopt;
  const LevelEntry* entry = sequence.level_entry(injection.level, analyte);
  if (entry == nullptr) return std::nullopt;
  return entry->concentration;
}

}  // namespace

MeasuredAnalyte collect_responses(
    const AnalyteSettings& settings, const UnitSettings& units,
    const InternalStandardSettings* internal_standard, const Sequence& sequence,
    const std::vector<MeasuredInjection>& injections) {
  const ResponseRule rule =
      response_rule(settings, internal_standard, injections);
  MeasuredAnalyte analyte{&settings, &units, &sequence, {}};
  for (const MeasuredInjection& measured : injections) {
    InjectionResponse one{
        measured.injection, measured.peak, response_of(measured, rule),
        nominal_of(*measured.injection, sequence, settings.target.id)};
    analyte.injections.push_back(std::move(one));
  }
  std::stable_sort(analyte.injections.begin(), analyte.injections.end(),
                   [](const InjectionResponse& a, const InjectionResponse& b) {
                     return a.injection->number < b.injection->number;
                   });
  return analyte;
}

}  // namespace loqsmith
