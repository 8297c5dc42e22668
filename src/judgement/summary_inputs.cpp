#include "loqsmith/judgement/summary_inputs.hpp"

#include <algorithm>

#include "loqsmith/judgement/reported_text.hpp"
#include "loqsmith/judgement/sample_units.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

using Kind = ReportedValue::Kind;

struct Candidate {
  double dilution = 1.0;
  ReportedValue reported;
};

/// All results of one sample.
struct SampleResults {
  std::string group;
  std::string sample;
  std::string unit;
  std::vector<Candidate> candidates;
};

std::optional<double> end_of_range(const AnalyteJudgement& analyte,
                                   const std::string& set_name,
                                   const Injection& injection,
                                   const UnitSettings& units) {
  for (const CalibrationSet& set : analyte.sets) {
    if (set.set != set_name || !set.calibration) continue;
    if (!set.calibration->accepted_highest) continue;
    return in_sample(*set.calibration->accepted_highest,
                     sample_factor(injection, units));
  }
  return std::nullopt;
}

const Injection* injection_of(const Sequence& sequence, int number) {
  const auto found = std::find_if(
      sequence.injections.begin(), sequence.injections.end(),
      [number](const Injection& one) { return one.number == number; });
  return found == sequence.injections.end() ? nullptr : &*found;
}

SampleResults& results_of(std::vector<SampleResults>& samples,
                          const Injection& injection, const std::string& unit) {
  const auto found = std::find_if(
      samples.begin(), samples.end(), [&](const SampleResults& one) {
        return one.group == injection.group && one.sample == injection.sample &&
               one.unit == unit;
      });
  if (found != samples.end()) return *found;
  samples.push_back({injection.group, injection.sample, unit, {}});
  return samples.back();
}

std::vector<double> values_of(const std::vector<Candidate>& candidates,
                              Kind kind) {
  std::vector<double> values;
  for (const Candidate& one : candidates) {
    if (one.reported.kind == kind) values.push_back(one.reported.value);
  }
  return values;
}

std::optional<double> least_diluted_number(
    const std::vector<Candidate>& candidates) {
  std::vector<double> numbers;
  double least = 0.0;
  for (const Candidate& one : candidates) {
    if (one.reported.kind != Kind::Number) continue;
    if (numbers.empty() || one.dilution < least) {
      numbers.clear();
      least = one.dilution;
    }
    if (one.dilution == least) numbers.push_back(one.reported.value);
  }
  if (numbers.empty()) return std::nullopt;
  return mean(numbers);
}

std::optional<CensoredValue> one_value(
    const std::vector<Candidate>& candidates) {
  if (const auto number = least_diluted_number(candidates)) {
    return CensoredValue{*number, Censoring::Measured};
  }
  const std::vector<double> ends = values_of(candidates, Kind::Above);
  const std::vector<double> limits = values_of(candidates, Kind::Below);
  if (!ends.empty()) {
    if (!limits.empty()) return std::nullopt;
    return CensoredValue{*std::max_element(ends.begin(), ends.end()),
                         Censoring::Above};
  }
  if (limits.empty()) return std::nullopt;
  return CensoredValue{*std::min_element(limits.begin(), limits.end()),
                       Censoring::Below};
}

}  // namespace

std::vector<SummaryInput> summary_inputs(const AnalyteJudgement& analyte,
                                         const Sequence& sequence,
                                         const UnitSettings& units,
                                         const ReportingSettings& reporting) {
  std::vector<SampleResults> samples;
  for (const ResultRow& row : analyte.results) {
    if (row.role != Role::Sample) continue;
    const Injection* injection = injection_of(sequence, row.injection);
    if (injection == nullptr || injection->group.empty()) continue;
    const ReportedNumbers numbers{
        row.result, row.detection_limit, row.quantitation_limit,
        end_of_range(analyte, row.set, *injection, units)};
    results_of(samples, *injection, row.unit)
        .candidates.push_back(
            {row.dilution,
             reported_value(row.status, numbers,
                            reporting_of(*injection, units, reporting))});
  }
  std::vector<SummaryInput> inputs;
  for (const SampleResults& sample : samples) {
    inputs.push_back({sample.group, analyte.analyte, sample.unit,
                      one_value(sample.candidates)});
  }
  return inputs;
}

}  // namespace loqsmith
