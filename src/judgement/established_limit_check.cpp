#include "loqsmith/judgement/established_limit_check.hpp"

#include <algorithm>
#include <optional>
#include <utility>

#include "loqsmith/base/text.hpp"
#include "loqsmith/limits/blanks.hpp"

namespace loqsmith {
namespace {

// Below it one blank is 3 % or more.
constexpr std::size_t kBlanksForAShare = 34;
constexpr double kShareAbove = 3.0;  // percent

const LimitRow* row_of(const CalibrationSet& set,
                       const std::string& procedure) {
  for (const LimitRow& row : set.limits.rows)
    if (row.procedure == procedure) return &row;
  return nullptr;
}

std::string words_against(const LimitEstimate& estimate) {
  std::vector<std::string> words;
  for (const LimitFinding& finding : estimate.findings)
    if (finding.grade == Grade::NotValid) words.push_back(finding.word);
  return join(words, ", ");
}

/// Why tonight's estimate cannot be compared; empty: it can.
std::string why_not(const LimitRow* row, const std::string& name) {
  if (row == nullptr) return name + " is not among the limits";
  if (!row->estimate) return name + ": " + row->estimate.reason();
  if (row->grade() == Grade::NotValid)
    return name + " is not valid tonight: " + words_against(*row->estimate);
  return {};
}

class Comparison {
 public:
  Comparison(const AnalyteRules& settings, const CalibrationSet& set)
      : analyte_(settings.analyte),
        limits_(settings.limits),
        accept_(*settings.acceptance.established_limit),
        set_(set) {}

  LimitCheck check() {
    const LimitRow* given = row_of(set_, "established");
    const LimitRow* tonight = row_of(set_, accept_.procedure);
    std::string obstacle = set_.calibration ? "" : "no calibration";
    if (obstacle.empty()) obstacle = why_not(given, "established");
    if (obstacle.empty()) obstacle = why_not(tonight, accept_.procedure);
    if (!obstacle.empty()) {
      found_.rows.push_back(row("not checked: " + obstacle));
      return std::move(found_);
    }
    const LimitEstimate& established = *given->estimate;
    const LimitEstimate& estimate = *tonight->estimate;
    compare("detection limit", estimate.detection, established.detection);
    compare("quantitation limit", estimate.quantitation,
            established.quantitation);
    if (accept_.procedure == "spike-replicates" && established.detection)
      count_blanks(*established.detection);
    return std::move(found_);
  }

 private:
  CheckRow row(std::string note) const {
    CheckRow row;
    row.check = "established-limit";
    row.analyte = analyte_;
    row.action = check_action_name(accept_.action);
    row.affects = "all results of the analyte";
    row.note = std::move(note);
    return row;
  }

  void judge(CheckRow row, bool passed) {
    row.passed = passed;
    found_.failed = found_.failed || !passed;
    found_.rows.push_back(std::move(row));
  }

  void compare(const std::string& which, const std::optional<double>& tonight,
               const std::optional<double>& established) {
    if (!tonight || !established) return;
    CheckRow one =
        row(which + " by " + accept_.procedure + " over the established one");
    one.value = *tonight / *established;
    one.low = accept_.ratio_low;
    one.high = accept_.ratio_high;
    const bool passed = *one.value >= *one.low && *one.value <= *one.high;
    judge(std::move(one), passed);
  }

  void count_blanks(double established) {
    const std::vector<double> blanks = spike_replicates_blanks();
    if (blanks.size() < kBlanksForAShare) {
      found_.rows.push_back(
          row("not checked: blanks above the established detection limit: of " +
              std::to_string(blanks.size()) +
              " a single one would decide, 34 are needed"));
      return;
    }
    const auto above = static_cast<std::size_t>(
        std::count_if(blanks.begin(), blanks.end(),
                      [&](double blank) { return blank > established; }));
    CheckRow one =
        row(std::to_string(above) + " of " + std::to_string(blanks.size()) +
            " blanks above the established detection limit; less than 3 %");
    one.value =
        100.0 * static_cast<double>(above) / static_cast<double>(blanks.size());
    one.high = kShareAbove;
    one.unit = "%";
    judge(std::move(one), few_blanks_above(above, blanks.size()));
  }

  /// Concentrations of the blanks that the procedure rests on.
  std::vector<double> spike_replicates_blanks() const {
    LimitEvidence evidence;
    evidence.blanks = set_.blanks;
    const Outcome<BlankSample> sample =
        usable_blanks(evidence, kind_of_blanks());
    std::vector<double> found;
    if (!sample) return found;
    const Calibration& line = *set_.calibration;
    for (const BlankResponse& blank : sample->blanks)
      found.push_back((blank.response - line.intercept) / line.slope);
    return found;
  }

  BlankKind kind_of_blanks() const {
    for (const ProcedureSettings& one : limits_.procedures)
      if (one.name == accept_.procedure && one.blanks) return *one.blanks;
    return BlankKind::Method;
  }

  std::string analyte_;
  const LimitSettings& limits_;
  const EstablishedLimitAcceptance& accept_;
  const CalibrationSet& set_;
  LimitCheck found_;
};

}  // namespace

LimitCheck check_established_limit(const AnalyteRules& settings,
                                   const CalibrationSet& set) {
  if (!settings.acceptance.established_limit) return {};
  return Comparison(settings, set).check();
}

bool few_blanks_above(std::size_t above, std::size_t blanks) {
  return 100 * above < 3 * blanks;
}

}  // namespace loqsmith
