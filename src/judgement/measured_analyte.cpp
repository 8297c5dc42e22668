#include "loqsmith/judgement/measured_analyte.hpp"

#include <algorithm>

namespace loqsmith {

MeasuredAnalyte collect_responses(
    const AnalyteSettings& settings, const UnitSettings& units,
    const InternalStandardSettings* internal_standard, const Sequence& sequence,
    const std::vector<MeasuredInjection>& injections) {
  const ResponseRule rule =
      response_rule(settings, internal_standard, injections);
  MeasuredAnalyte analyte{&settings, &units, &sequence, {}};
  for (const MeasuredInjection& measured : injections) {
    const LevelEntry* entry =
        sequence.level_entry(measured.injection->level, settings.target.id);
    InjectionResponse one{measured.injection, measured.peak,
                          response_of(measured, rule), std::nullopt};
    if (entry != nullptr) one.nominal = entry->concentration;
    analyte.injections.push_back(std::move(one));
  }
  std::stable_sort(analyte.injections.begin(), analyte.injections.end(),
                   [](const InjectionResponse& a, const InjectionResponse& b) {
                     return a.injection->number < b.injection->number;
                   });
  return analyte;
}

}  // namespace loqsmith
