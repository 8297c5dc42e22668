#include "loqsmith/judgement/set_evidence.hpp"

#include <algorithm>
#include <array>
#include <cstddef>
#include <set>

#include "loqsmith/judgement/limit_evidence.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kEnoughSpikes = 7;
constexpr std::array kKinds{BlankKind::Solvent, BlankKind::Method,
                            BlankKind::ZeroStandard};

std::set<int> numbers_of(const MeasuredAnalyte& members) {
  std::set<int> numbers;
  for (const InjectionResponse& one : members.injections) {
    numbers.insert(one.injection->number);
  }
  return numbers;
}

struct Kinds {
  std::set<BlankKind> own;       ///< enough of them in the set itself
  std::set<BlankKind> borrowed;  ///< too few, and there are more elsewhere
};

Kinds divide_kinds(const std::vector<BlankResponse>& blanks,
                   const std::set<int>& members, std::size_t minimum) {
  Kinds kinds;
  for (const BlankKind kind : kKinds) {
    std::size_t own = 0;
    std::size_t elsewhere = 0;
    for (const BlankResponse& blank : blanks) {
      if (blank.kind != kind || blank.after_high) continue;
      ++(members.contains(blank.injection) ? own : elsewhere);
    }
    const bool enough = own >= minimum || elsewhere == 0;
    (enough ? kinds.own : kinds.borrowed).insert(kind);
  }
  return kinds;
}

// The night's list, of some kinds only what belongs to the set.
template <typename Blank>
std::vector<Blank> of_set(const std::vector<Blank>& night,
                          const std::set<int>& members, const Kinds& kinds) {
  std::vector<Blank> blanks;
  for (const Blank& blank : night) {
    if (kinds.borrowed.contains(blank.kind) ||
        members.contains(blank.injection)) {
      blanks.push_back(blank);
    }
  }
  return blanks;
}

}  // namespace

SetEvidence evidence_of_set(const MeasuredAnalyte& night,
                            const MeasuredAnalyte& members,
                            const Calibration& calibration,
                            const std::vector<SpikeResult>& spikes) {
  // After what an injection comes is seen in the whole night only.
  const LimitEvidence all = gather_limit_evidence(night, calibration);
  SetEvidence set{gather_limit_evidence(members, calibration), {}};
  const std::set<int> numbers = numbers_of(members);
  const auto minimum =
      static_cast<std::size_t>(night.settings->limits.minimum_blanks);
  const Kinds kinds = divide_kinds(all.blanks, numbers, minimum);
  set.evidence.carry_over_passed = all.carry_over_passed;
  set.evidence.blanks = of_set(all.blanks, numbers, kinds);
  set.evidence.predicted_noise = of_set(all.predicted_noise, numbers, kinds);
  if (!kinds.borrowed.empty()) {
    set.evidence.predicted_noise_absent = all.predicted_noise_absent;
    set.evidence.predicted_bias = all.predicted_bias;
    set.notes.emplace_back("blanks-of-all-sets");
  }
  if (set.evidence.spikes.size() < kEnoughSpikes &&
      set.evidence.spikes.size() < spikes.size()) {
    set.evidence.spikes = spikes;
    set.notes.emplace_back("spikes-of-all-sets");
  }
  return set;
}

void add_notes(LimitsOfAnalyte& limits, const std::vector<std::string>& notes) {
  if (!limits.governing) return;
  std::vector<std::string>& all = limits.governing.value().notes;
  all.insert(all.end(), notes.begin(), notes.end());
}

}  // namespace loqsmith
