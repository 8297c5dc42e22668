#include "loqsmith/judgement/measured_analyte.hpp"

#include <algorithm>
#include <iterator>

#include "loqsmith/judgement/signal_unit.hpp"

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

const Injection* injection_before(const Sequence& sequence, int number) {
  const auto here = std::lower_bound(
      sequence.injections.begin(), sequence.injections.end(), number,
      [](const Injection& one, int wanted) { return one.number < wanted; });
  return here == sequence.injections.begin() ? nullptr : &*std::prev(here);
}

// None of the peaks of an injection that people call invalid was measured.
std::vector<MeasuredInjection> without_invalid(
    std::vector<MeasuredInjection> injections, const std::set<int>& invalid) {
  for (MeasuredInjection& one : injections) {
    if (!invalid.contains(one.injection->number)) continue;
    one.peak = NotApplicable{"invalid-injection: by an amendment"};
    if (one.internal_standard) one.internal_standard = one.peak;
    if (one.second_trace) one.second_trace = one.peak;
  }
  return injections;
}

}  // namespace

const InjectionResponse* right_before(const MeasuredAnalyte& night,
                                      int number) {
  const Injection* before = injection_before(*night.sequence, number);
  if (before == nullptr) return nullptr;
  const auto found = std::lower_bound(
      night.injections.begin(), night.injections.end(), before->number,
      [](const InjectionResponse& one, int wanted) {
        return one.injection->number < wanted;
      });
  const bool measured = found != night.injections.end() &&
                        found->injection->number == before->number;
  return measured ? &*found : nullptr;
}

MeasuredAnalyte collect_responses(
    const AnalyteRules& settings, const UnitSettings& units,
    const Sequence& sequence,
    const std::vector<MeasuredInjection>& all_injections) {
  const ManualDecisions& decisions = settings.decisions;
  const std::vector<MeasuredInjection> injections =
      without_invalid(all_injections, decisions.invalid_injections);
  const ResponseRule rule = response_rule(settings, injections);
  MeasuredAnalyte analyte{&settings, &units, &sequence, {}};
  const Outcome<std::string> unit = common_signal_unit(injections);
  for (const MeasuredInjection& measured : injections) {
    const std::string refused =
        unit && measured.peak ? why_unit_differs(measured, *unit) : "";
    InjectionResponse one{
        measured.injection,
        measured.peak,
        refused.empty() ? response_of(measured, rule)
                        : Outcome<Response>(NotApplicable{refused}),
        nominal_of(*measured.injection, sequence, settings.analyte),
        measured.expected_minutes,
        undiluted_internal_standard(measured, ResponseKind::Area),
        measured.second_trace,
        decisions.excluded_standards.contains(measured.injection->number)};
    analyte.injections.push_back(std::move(one));
  }
  std::stable_sort(analyte.injections.begin(), analyte.injections.end(),
                   [](const InjectionResponse& a, const InjectionResponse& b) {
                     return a.injection->number < b.injection->number;
                   });
  return analyte;
}

}  // namespace loqsmith
