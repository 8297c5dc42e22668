#include "loqsmith/judgement/repeats.hpp"

#include <algorithm>
#include <cstddef>
#include <map>
#include <utility>

#include "loqsmith/judgement/sample_units.hpp"

namespace loqsmith {
namespace {

std::optional<double> end_of_range(const std::vector<CalibrationSet>& sets,
                                   const std::string& name,
                                   const Injection& injection,
                                   const UnitSettings& units) {
  for (const CalibrationSet& set : sets) {
    if (set.set != name || !set.calibration) continue;
    if (!set.calibration->accepted_highest) continue;
    return in_sample(*set.calibration->accepted_highest,
                     sample_factor(injection, units));
  }
  return std::nullopt;
}

}  // namespace

std::vector<SampleRepeats> repeats_of_samples(
    const std::vector<ResultRow>& results,
    const std::vector<CalibrationSet>& sets, const Sequence& sequence,
    const UnitSettings& units) {
  std::map<int, const Injection*> injections;
  for (const Injection& one : sequence.injections) {
    injections.emplace(one.number, &one);
  }
  std::vector<SampleRepeats> samples;
  std::map<std::pair<std::string, std::string>, std::size_t> places;
  for (const ResultRow& row : results) {
    const auto injection = injections.find(row.injection);
    if (row.role != Role::Sample || injection == injections.end()) continue;
    const auto [place, is_new] =
        places.emplace(std::pair(row.sample, row.unit), samples.size());
    if (is_new) samples.push_back({row.sample, row.unit, {}});
    samples[place->second].repeats.push_back(
        {&row, injection->second,
         end_of_range(sets, row.set, *injection->second, units)});
  }
  return samples;
}

std::vector<double> results_in_range(const std::vector<Repeat>& repeats) {
  std::vector<double> values;
  for (const Repeat& one : repeats) {
    if (one.row->status != Status::Reportable) continue;
    if (one.row->result) values.push_back(*one.row->result);
  }
  return values;
}

double percent_difference(const std::vector<double>& values) {
  const auto [least, most] = std::minmax_element(values.begin(), values.end());
  return 100.0 * (*most - *least) / (0.5 * (*most + *least));
}

}  // namespace loqsmith
