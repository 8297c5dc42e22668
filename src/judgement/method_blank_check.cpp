#include "loqsmith/judgement/method_blank_check.hpp"

#include <map>
#include <set>
#include <string>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/judgement/blank_maximum.hpp"
#include "loqsmith/judgement/calibration_sets.hpp"
#include "loqsmith/judgement/check_rows.hpp"

namespace loqsmith {
namespace {

std::map<int, std::string> preps_of(const MeasuredAnalyte& night) {
  std::map<int, std::string> preps;
  for (const InjectionResponse& one : night.injections) {
    preps[one.injection->number] = one.injection->prep;
  }
  return preps;
}

std::string words_of(const std::string& prep) {
  return prep.empty() ? "without prep" : "of prep " + in_quotes(prep);
}

bool lies_above(const ResultRow& result, const ResultRow& blank, double ratio) {
  if (!result.result) return true;  // beyond the curve
  if (result.unit == blank.unit) {
    return *result.result > ratio * *blank.result;
  }
  return *result.vial_concentration > ratio * *blank.vial_concentration;
}

class MethodBlanks {
 public:
  explicit MethodBlanks(const FirstResults& first)
      : first_(first),
        accept_(*first.night.settings->acceptance.method_blank),
        pattern_(row_of_check("method-blank", first, accept_.action)),
        preps_(preps_of(first.night)) {}

  CheckOutcome check() {
    if (first_.night.settings->surrogate_concentration) {
      return not_checked(pattern_, "a surrogate is added to method blanks");
    }
    for (const ResultRow& result : first_.results) {
      if (result.role == Role::MethodBlank) judge(result);
    }
    if (with_blank_.empty()) return not_checked(pattern_, "no method blank");
    name_batches_without();
    return std::move(outcome_);
  }

 private:
  void judge(const ResultRow& blank) {
    const std::string& prep = preps_.at(blank.injection);
    with_blank_.insert(prep);
    CheckRow row = judge_blank(pattern_, blank, accept_.maximum);
    if (row.passed == false) {
      row.affects = "detected results " + words_of(prep) + " up to " +
                    shortest(accept_.sample_ratio) + " times the blank";
      affect(blank, prep);
    }
    outcome_.rows.push_back(std::move(row));
  }

  void affect(const ResultRow& blank, const std::string& prep) {
    for (const ResultRow& result : first_.results) {
      if (!ends_a_block(result.role) || !is_detected(result)) continue;
      if (preps_.at(result.injection) != prep) continue;
      if (lies_above(result, blank, accept_.sample_ratio)) continue;
      outcome_.effects.push_back(
          {result.injection, std::string(kMethodBlankFailed), accept_.action});
    }
  }

  void name_batches_without() {
    std::set<std::string> named = with_blank_;
    for (const ResultRow& result : first_.results) {
      if (!ends_a_block(result.role)) continue;
      const std::string& prep = preps_.at(result.injection);
      if (!named.insert(prep).second) continue;
      outcome_.rows.push_back(pattern_);
      outcome_.rows.back().note =
          "not checked: no method blank beside the samples " + words_of(prep);
    }
  }

  const FirstResults& first_;
  const MethodBlankAcceptance& accept_;
  CheckRow pattern_;
  std::map<int, std::string> preps_;
  std::set<std::string> with_blank_;
  CheckOutcome outcome_;
};

}  // namespace

CheckOutcome check_method_blanks(const FirstResults& first) {
  if (!first.night.settings->acceptance.method_blank) return {};
  return MethodBlanks(first).check();
}

}  // namespace loqsmith
