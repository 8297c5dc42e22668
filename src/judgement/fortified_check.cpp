#include "loqsmith/judgement/fortified_check.hpp"

#include <utility>

#include "loqsmith/base/reading_figures.hpp"
#include "loqsmith/judgement/affected.hpp"
#include "loqsmith/judgement/parent_sample.hpp"
#include "loqsmith/judgement/recovery.hpp"
#include "loqsmith/judgement/relative_difference.hpp"

namespace loqsmith {
namespace {

class FortifiedCheck {
 public:
  FortifiedCheck(const FirstResults& first, const FortifiedAcceptance& accept)
      : first_(first),
        accept_(accept),
        all_(with_known_amount(results_of_roles(
            first, {Role::Fortified, Role::FortifiedDuplicate}))) {}

  CheckOutcome check() {
    if (accept_.recovery) judge_recoveries();
    if (accept_.relative_difference) judge_differences();
    if (!accept_.recovery && !accept_.relative_difference) {
      unchecked("the method asks for no recovery and no relative difference");
    }
    return std::move(outcome_);
  }

 private:
  void unchecked(const std::string& why) {
    outcome_.rows.push_back(
        unchecked_row("fortified", first_, accept_.action, why));
  }

  void judge_recoveries() {
    if (all_.empty()) unchecked("no fortified sample contains the analyte");
    for (const KnownResult& one : all_) {
      CheckRow row = recovery_row("fortified", one, recovery_of(one),
                                  *accept_.recovery, accept_.action);
      finish(std::move(row), one, "recovery");
    }
  }

  void judge_differences() {
    bool any = false;
    for (const KnownResult& one : all_) {
      if (one.row->role != Role::FortifiedDuplicate) continue;
      any = true;
      CheckRow row = check_row("fortified", one, accept_.action);
      row.high = accept_.relative_difference;
      const Outcome<double> difference = difference_of(one);
      if (difference) {
        row.value = *difference;
        row.passed = *difference <= *row.high;
      } else {
        say_why_not(row, difference.reason());
      }
      finish(std::move(row), one, "relative difference");
    }
    if (!any) unchecked("no fortified duplicate contains the analyte");
  }

  /// The native amount, where it lets the added one be seen.
  Outcome<double> native_of(const KnownResult& one) const {
    const Outcome<SampleValue> native =
        value_of_sample(native_results(first_, one.injection()));
    if (!native) return NotApplicable{native.reason() + " (native sample)"};
    if (native->result > accept_.native_ratio * *one.measured->nominal) {
      return NotApplicable{
          "not checked: the native amount " + figure(native->result) +
          " exceeds " + figure(accept_.native_ratio) + " times the added one"};
    }
    return native->result;
  }

  Outcome<double> recovery_of(const KnownResult& one) const {
    const Outcome<SampleValue> found = value_of_sample({one});
    if (!found) return NotApplicable{found.reason()};
    const Outcome<double> native = native_of(one);
    if (!native) return native;
    return added_recovery_percent(found->result, *native,
                                  *one.measured->nominal);
  }

  Outcome<double> difference_of(const KnownResult& duplicate) const {
    const Outcome<SampleValue> second = value_of_sample({duplicate});
    if (!second) return NotApplicable{second.reason()};
    const std::vector<KnownResult> repeated = repeated_by(duplicate);
    if (repeated.empty()) {
      return NotApplicable{
          "not checked: no fortified sample of the same parent and amount"};
    }
    const Outcome<SampleValue> first = value_of_sample(repeated);
    if (!first) return NotApplicable{first.reason() + " (fortified sample)"};
    const Outcome<double> native = native_of(duplicate);
    if (!native) return native;
    if (!(first->result > 0.0) || !(second->result > 0.0)) {
      return NotApplicable{"not above zero"};
    }
    return relative_difference_percent(first->result, second->result);
  }

  /// Fortified samples of the duplicate's own native sample and amount.
  std::vector<KnownResult> repeated_by(const KnownResult& duplicate) const {
    const std::string native = native_name(duplicate);
    std::vector<KnownResult> repeated;
    for (const KnownResult& one : all_) {
      if (one.row->role == Role::Fortified &&
          *one.measured->nominal == *duplicate.measured->nominal &&
          one.injection().parent == native) {
        repeated.push_back(one);
      }
    }
    return repeated;
  }

  std::string native_name(const KnownResult& one) const {
    const std::vector<KnownResult> native =
        native_results(first_, one.injection());
    return native.empty() ? one.injection().parent : native.front().row->sample;
  }

  void finish(CheckRow row, const KnownResult& one, const std::string& what) {
    const Affected sample =
        sample_named(native_name(one), native_results(first_, one.injection()));
    row.affects = sample.words;
    if (row.passed.has_value()) {  // what is unchecked says so first
      row.note = what + (row.note.empty() ? "" : ": " + row.note);
    } else {
      row.note += " (" + what + ')';
    }
    if (row.passed == false) {
      affect(outcome_, sample, "fortified-failed", accept_.action);
    }
    outcome_.rows.push_back(std::move(row));
  }

  const FirstResults& first_;
  const FortifiedAcceptance& accept_;
  std::vector<KnownResult> all_;
  CheckOutcome outcome_;
};

}  // namespace

CheckOutcome check_fortified(const FirstResults& first) {
  const auto& accept = first.night.settings->acceptance.fortified;
  if (!accept) return {};
  return FortifiedCheck(first, *accept).check();
}

}  // namespace loqsmith
