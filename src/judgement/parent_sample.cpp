#include "loqsmith/judgement/parent_sample.hpp"

#include <algorithm>
#include <utility>

namespace loqsmith {
namespace {

std::vector<KnownResult> named(std::vector<KnownResult> results,
                               const std::string& name) {
  std::erase_if(
      results, [&](const KnownResult& one) { return one.row->sample != name; });
  return results;
}

SampleValue mean_of(const std::vector<KnownResult>& results) {
  SampleValue value;
  for (const KnownResult& one : results) {
    value.result += *one.row->result;
    // An absent one is smaller than any.
    value.quantitation_limit =
        std::max(value.quantitation_limit, one.row->quantitation_limit);
  }
  value.result /= static_cast<double>(results.size());
  return value;
}

std::vector<KnownResult> least_diluted(std::vector<KnownResult> results) {
  double least = results.front().row->dilution;
  for (const KnownResult& one : results) {
    least = std::min(least, one.row->dilution);
  }
  std::erase_if(results, [&](const KnownResult& one) {
    return one.row->dilution > least;
  });
  return results;
}

}  // namespace

std::vector<KnownResult> parent_results(const FirstResults& first,
                                        const std::string& name) {
  std::vector<KnownResult> found =
      named(results_of_roles(first, {Role::Sample, Role::Control}), name);
  if (!found.empty()) return found;
  return named(results_of_roles(first, {Role::Fortified}), name);
}

std::vector<KnownResult> native_results(const FirstResults& first,
                                        const Injection& fortified) {
  std::vector<KnownResult> parent = parent_results(first, fortified.parent);
  if (fortified.role != Role::FortifiedDuplicate || parent.empty() ||
      parent.front().row->role != Role::Fortified) {
    return parent;
  }
  return parent_results(first, parent.front().injection().parent);
}

Outcome<SampleValue> value_of_sample(const std::vector<KnownResult>& results) {
  std::vector<KnownResult> usable;
  for (const KnownResult& one : results) {
    if (found_in_sample(one) && !above_range(*one.row)) usable.push_back(one);
  }
  if (usable.empty()) {
    for (const KnownResult& one : results) {
      if (above_range(*one.row)) {
        return NotApplicable{"not checked: above-range"};
      }
    }
    if (results.empty()) return NotApplicable{"not measured"};
    return NotApplicable{found_in_sample(results.front()).reason()};
  }
  return mean_of(least_diluted(std::move(usable)));
}

}  // namespace loqsmith
