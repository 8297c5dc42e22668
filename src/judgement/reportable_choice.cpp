#include "loqsmith/judgement/reportable_choice.hpp"

#include <algorithm>
#include <map>

namespace loqsmith {
namespace {

using Repeats = std::vector<Repeat>;

bool has(const Repeats& repeats, Status status) {
  return std::any_of(
      repeats.begin(), repeats.end(),
      [status](const Repeat& one) { return one.row->status == status; });
}

// Withheld ones stand nowhere.
std::optional<int> height_of(Status status) {
  switch (status) {
    case Status::NotDetected:
      return 0;
    case Status::Estimated:
      return 1;
    case Status::Reportable:
      return 2;
    case Status::AboveRange:
      return 3;
    case Status::Withheld:
      return std::nullopt;
  }
  return std::nullopt;
}

// By dilution, of all that are not withheld.
std::map<double, int> highest_by_dilution(const Repeats& repeats) {
  std::map<double, int> highest;
  for (const Repeat& one : repeats) {
    const std::optional<int> height = height_of(one.row->status);
    if (!height) continue;
    int& most = highest.emplace(one.row->dilution, *height).first->second;
    most = std::max(most, *height);
  }
  return highest;
}

bool rises_with_dilution(const Repeats& repeats) {
  const std::map<double, int> highest = highest_by_dilution(repeats);
  return !std::is_sorted(
      highest.begin(), highest.end(),
      [](const auto& a, const auto& b) { return a.second > b.second; });
}

bool below_quantitation(const Repeat& one) {
  return one.row->status == Status::NotDetected ||
         one.row->status == Status::Estimated;
}

// `above` exceeds the end of its range; `below` lies under a lower limit.
bool exclude(const Repeat& above, const Repeat& below) {
  if (above.row->status != Status::AboveRange) return false;
  if (!below_quantitation(below)) return false;
  if (!above.end_of_range || !below.row->quantitation_limit) return false;
  return *below.row->quantitation_limit < *above.end_of_range;
}

bool all_withheld(const Repeats& repeats) {
  return std::all_of(repeats.begin(), repeats.end(), [](const Repeat& one) {
    return one.row->status == Status::Withheld;
  });
}

// Withheld injections that failed for another reason were never compared.
bool not_close(const Repeats& repeats) {
  return all_withheld(repeats) &&
         std::any_of(repeats.begin(), repeats.end(), [](const Repeat& one) {
           const auto& words = one.row->reasons;
           return std::find(words.begin(), words.end(), kDilutionsDisagree) !=
                  words.end();
         });
}

template <Status status>
bool any(const Repeats& repeats) {
  return has(repeats, status);
}

double chosen_dilution(const Repeats& repeats, const ReportableRule& rule) {
  std::vector<double> dilutions;
  for (const Repeat& one : repeats) {
    if (one.row->status == rule.status) dilutions.push_back(one.row->dilution);
  }
  return rule.pick == ReportableRule::Pick::MostDiluted
             ? *std::max_element(dilutions.begin(), dilutions.end())
             : *std::min_element(dilutions.begin(), dilutions.end());
}

std::string why_rejected(const ResultRow& row, const ReportableRule& rule) {
  using Pick = ReportableRule::Pick;
  if (row.status != Status::Withheld && rule.pick == Pick::None) {
    return kDilutionsDisagree;
  }
  if (row.status == Status::Withheld && !row.reasons.empty()) {
    return row.reasons.front();
  }
  if (row.status == rule.status) {
    return rule.pick == Pick::MostDiluted ? "less-diluted" : "more-diluted";
  }
  return row.status == Status::Estimated ? "below-quantitation-limit"
                                         : status_name(row.status);
}

}  // namespace

bool rule_each_other_out(const Repeats& repeats) {
  const bool above_and_below =
      has(repeats, Status::AboveRange) &&
      std::any_of(repeats.begin(), repeats.end(), below_quantitation);
  if (above_and_below && !has(repeats, Status::Reportable)) return true;
  if (rises_with_dilution(repeats)) return true;
  for (const Repeat& one : repeats) {
    for (const Repeat& other : repeats) {
      if (exclude(one, other)) return true;
    }
  }
  return false;
}

const std::vector<ReportableRule>& reportable_rules() {
  using S = Status;
  using P = ReportableRule::Pick;
  static const std::vector<ReportableRule> rules{
      // clang-format off
      {"withheld because their results in range differ too much",
       not_close,           S::Withheld,    P::None},
      {"every injection is withheld",
       all_withheld,        S::Withheld,    P::LeastDiluted},
      {"what one injection says rules out what another says",
       rule_each_other_out, S::Withheld,    P::None},
      {"in range: the least diluted ones, averaged",
       any<S::Reportable>,  S::Reportable,  P::LeastDiluted},
      {"all above the range: the most diluted one excludes most",
       any<S::AboveRange>,  S::AboveRange,  P::MostDiluted},
      {"detected, but nowhere in range: the least diluted estimates, averaged",
       any<S::Estimated>,   S::Estimated,   P::LeastDiluted},
      {"nowhere detected: the least diluted one excludes most",
       any<S::NotDetected>, S::NotDetected, P::LeastDiluted},
      // clang-format on
  };
  return rules;
}

ReportableChoice choose_reportable(const Repeats& repeats) {
  const auto& rules = reportable_rules();
  const auto rule = std::find_if(
      rules.begin(), rules.end(),
      [&](const ReportableRule& one) { return one.holds(repeats); });
  ReportableChoice choice;
  if (rule == rules.end()) return choice;  // no repeats
  choice.status = rule->status;
  choice.disagree = rule->pick == ReportableRule::Pick::None;
  const double dilution =
      choice.disagree ? 0.0 : chosen_dilution(repeats, *rule);
  for (const Repeat& one : repeats) {
    if (!choice.disagree && one.row->status == rule->status &&
        one.row->dilution == dilution) {
      choice.counting.push_back(&one);
    } else {
      choice.rejected.push_back(
          {one.row->injection, why_rejected(*one.row, *rule)});
    }
  }
  return choice;
}

}  // namespace loqsmith
