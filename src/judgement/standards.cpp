#include "loqsmith/judgement/standards.hpp"

#include <algorithm>

#include "loqsmith/base/text.hpp"
#include "loqsmith/judgement/reasons.hpp"

namespace loqsmith {
namespace {

bool has(const std::vector<std::string>& words, const char* word) {
  return std::find(words.begin(), words.end(), word) != words.end();
}

std::string why_not_used(const InjectionResponse& standard) {
  if (standard.excluded) return "excluded-by-amendment";
  const std::vector<std::string>& reasons = standard.response->reasons;
  for (const char* word : {"saturated", "internal-standard-saturated"}) {
    if (has(reasons, word)) return word;
  }
  if (*standard.nominal > 0.0 && !standard.peak->identified()) {
    return "peak-not-found";
  }
  return {};
}

StandardPoint standard_point(const InjectionResponse& standard) {
  StandardPoint point;
  point.injection = standard.injection->number;
  point.level = standard.injection->level;
  point.concentration = *standard.nominal;
  point.response = standard.response->value;
  const std::string excluded = why_not_used(standard);
  point.used = excluded.empty();
  std::vector<std::string> words{excluded};
  words.insert(words.end(), standard.response->reasons.begin(),
               standard.response->reasons.end());
  point.note = join(most_serious_first(std::move(words)), ";");
  return point;
}

}  // namespace

void offer_standard(OfferedStandards& offered, const InjectionResponse& one) {
  if (one.response) {
    offered.points.push_back(standard_point(one));
  } else {
    offered.unmeasured.push_back({one.injection->number, one.injection->level,
                                  *one.nominal,
                                  reason_word(one.response.reason())});
  }
}

OfferedStandards offer_standards(const MeasuredAnalyte& analyte) {
  OfferedStandards offered;
  for (const InjectionResponse& one : analyte.injections) {
    if (one.injection->role != Role::Standard || !one.nominal) continue;
    offer_standard(offered, one);
  }
  return offered;
}

}  // namespace loqsmith
