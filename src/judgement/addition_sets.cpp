#include "loqsmith/judgement/addition_sets.hpp"

#include <algorithm>
#include <cstddef>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/judgement/calibration_sets.hpp"
#include "loqsmith/judgement/reasons.hpp"
#include "loqsmith/judgement/sample_units.hpp"
#include "loqsmith/judgement/standards.hpp"

namespace loqsmith {
namespace {

// One line: a sample at one dilution and preparation.
struct Line {
  std::string parent;
  double factor = 1.0;
  double dilution = 1.0;
};

bool is_addition(const InjectionResponse& one) {
  return one.injection->role == Role::AddedStandard && one.nominal;
}

bool is_own(const InjectionResponse& one, const std::string& parent) {
  const Role role = one.injection->role;
  return one.injection->sample == parent && ends_a_block(role) &&
         role != Role::AddedStandard && role != Role::LowSpike;
}

std::vector<Line> lines_of(const MeasuredAnalyte& night) {
  std::vector<Line> lines;
  for (const InjectionResponse& one : night.injections) {
    if (!is_addition(one)) continue;
    const Line line{one.injection->parent,
                    sample_factor(*one.injection, *night.units),
                    one.injection->dilution};
    const bool known =
        std::any_of(lines.begin(), lines.end(), [&](const Line& other) {
          return other.parent == line.parent && other.factor == line.factor;
        });
    if (!known) lines.push_back(line);
  }
  return lines;
}

AdditionMembers members_of(const MeasuredAnalyte& night, const Line& line) {
  AdditionMembers members;
  members.name = "addition:" + line.parent;
  members.analyte = {night.settings, night.units, night.sequence, {}};
  for (const InjectionResponse& one : night.injections) {
    if (sample_factor(*one.injection, *night.units) != line.factor) continue;
    if (is_addition(one) && one.injection->parent == line.parent) {
      members.analyte.injections.push_back(one);
    } else if (is_own(one, line.parent)) {
      members.analyte.injections.push_back(one);
      members.analyte.injections.back().nominal = 0.0;
    }
  }
  return members;
}

std::string note_of(const StandardAddition& found) {
  std::string note = "standard addition: a/b = " + figure(found.amount);
  if (found.interval) {
    note += ", 95 % interval " + figure(found.interval->lower) + " to " +
            figure(found.interval->upper);
  }
  return note;
}

void fail(AnalyteFindings& findings, CheckAction action) {
  const bool withholds = action == CheckAction::Withhold;
  (withholds ? findings.withholding : findings.careful)
      .emplace_back("calibration-failed");
}

void check_line(SetVerdict& verdict, const AnalyteRules& settings,
                const CalibrationSet& set) {
  const auto& acceptance = settings.acceptance.calibration;
  if (!acceptance || (set.calibration && !acceptance->minimum_r2)) return;
  CheckRow row;
  row.check = "calibration";
  row.analyte = settings.analyte;
  row.action = check_action_name(acceptance->action);
  row.affects = "the sample's results";
  row.passed = false;
  if (set.calibration) {
    row.note = "minimum-r2";
    row.value = set.calibration->r2;
    row.low = acceptance->minimum_r2;
    row.passed = *row.value >= *row.low;
    if (!*row.passed) fail(verdict.findings, acceptance->action);
  } else {
    row.note = "no line: " + set.calibration.reason();
  }
  verdict.checks.push_back(std::move(row));
}

}  // namespace

std::vector<AdditionMembers> find_additions(const MeasuredAnalyte& night) {
  std::vector<AdditionMembers> found;
  for (const Line& line : lines_of(night)) {
    AdditionMembers members = members_of(night, line);
    const bool taken = std::any_of(found.begin(), found.end(),
                                   [&](const AdditionMembers& other) {
                                     return other.name == members.name;
                                   });
    if (taken) members.name += " x" + shortest(line.dilution);
    found.push_back(std::move(members));
  }
  return found;
}

CalibrationSet calibrate_addition(const AdditionMembers& members,
                                  const std::string& refused) {
  OfferedStandards offered;
  for (const InjectionResponse& one : members.analyte.injections) {
    offer_standard(offered, one);
  }
  CalibrationSet set;
  set.set = members.name;
  set.alone = false;
  set.over_additions = true;
  set.standards = offered.points;
  set.unmeasured = std::move(offered.unmeasured);
  if (!refused.empty()) {
    set.calibration = NotApplicable{refused};
    return set;
  }
  set.calibration = fit_addition_line(std::move(offered.points));
  if (!set.calibration) return set;
  set.addition = amount_by_addition(*set.calibration);
  set.calibration.value().notes.push_back(note_of(*set.addition));
  set.standards = set.calibration->points;
  set.diagnostics = diagnose_calibration(*set.calibration);
  return set;
}

SetVerdict check_addition(const AdditionMembers& members,
                          const CalibrationSet& set) {
  SetVerdict verdict;
  AnalyteFindings& findings = verdict.findings;
  if (!set.calibration) {
    findings.withholding.emplace_back("no-calibration");
    findings.withholding.push_back(reason_word(set.calibration.reason()));
  }
  check_line(verdict, *members.analyte.settings, set);
  if (!set.calibration) return verdict;
  if (!set.limits.governing) {
    findings.withholding.emplace_back("no-valid-limit");
  }
  if (set.addition->amount > set.calibration->highest) {
    findings.careful.emplace_back("beyond-additions");
  }
  if (!set.addition->interval) findings.careful.emplace_back("slope-uncertain");
  return verdict;
}

}  // namespace loqsmith
