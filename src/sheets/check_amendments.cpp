#include <algorithm>
#include <string>
#include <vector>

#include "loqsmith/base/text.hpp"
#include "loqsmith/judgement/result_row.hpp"
#include "loqsmith/sheets/amendments_sheet.hpp"

namespace loqsmith {
namespace {

using What = Amendment::What;

const Injection* injection_of(const Sequence& sequence, int number) {
  for (const Injection& injection : sequence.injections) {
    if (injection.number == number) return &injection;
  }
  return nullptr;
}

bool is_offered_to_a_line(Role role) {
  return role == Role::Standard || role == Role::AddedStandard;
}

class RowCheck {
 public:
  RowCheck(AmendmentsSheet& sheet, std::size_t row, const Sequence& sequence,
           const Method& method)
      : sheet_(sheet),
        row_(row),
        amendment_(sheet.entries[row]),
        sequence_(sequence),
        method_(method) {}

  void check() {
    if (!injection_is_there() || !target_is_there()) return;
    switch (amendment_.what) {
      case What::ExcludeStandard:
        check_standard();
        return;
      case What::IntegrationBounds:
      case What::InvalidInjection:
        check_measured();
        return;
      case What::OverrideStatus:
        check_quantified();
        return;
      case What::CalibrationModel:
      case What::Withdraw:
        return;
    }
  }

 private:
  void add(std::string_view column, const std::string& found,
           const std::string& expected) {
    sheet_.add(row_, column, found + " (" + describe(amendment_) + ')',
               expected, "see sequence.csv, levels.csv and method.xml");
  }

  bool injection_is_there() {
    if (!amendment_.injection) return true;
    injection_ = injection_of(sequence_, *amendment_.injection);
    if (injection_ != nullptr) return true;
    add("injection", std::to_string(*amendment_.injection),
        "an injection of the sequence");
    return false;
  }

  bool is_analyte() const {
    return std::any_of(method_.analytes.begin(), method_.analytes.end(),
                       [&](const AnalyteSettings& analyte) {
                         return analyte.target.id == amendment_.analyte;
                       });
  }

  bool target_is_there() {
    if (amendment_.analyte.empty() || is_analyte()) return true;
    const bool bounds = amendment_.what == What::IntegrationBounds ||
                        amendment_.withdrawn == What::IntegrationBounds;
    if (bounds && method_.internal_standard(amendment_.analyte) != nullptr) {
      return true;
    }
    add("analyte", in_quotes(amendment_.analyte),
        bounds ? "an analyte or internal standard of the method"
               : "an analyte of the method");
    return false;
  }

  bool level_holds_something() const {
    return std::any_of(sequence_.levels.begin(), sequence_.levels.end(),
                       [&](const LevelEntry& entry) {
                         return entry.level == injection_->level &&
                                (amendment_.analyte.empty() ||
                                 entry.analyte == amendment_.analyte);
                       });
  }

  void check_standard() {
    if (is_offered_to_a_line(injection_->role) && level_holds_something()) {
      return;
    }
    add("injection",
        std::to_string(injection_->number) + ", a " +
            role_name(injection_->role),
        "a standard that contains the analyte");
  }

  void check_measured() {
    if (injection_->role != Role::Conditioning) return;
    add("injection", std::to_string(injection_->number) + ", conditioning",
        "an injection that is measured");
  }

  void check_quantified() {
    if (is_quantified(injection_->role)) return;
    add("injection",
        std::to_string(injection_->number) + ", a " +
            role_name(injection_->role),
        "an injection that has a result");
  }

  AmendmentsSheet& sheet_;
  std::size_t row_;
  const Amendment& amendment_;
  const Sequence& sequence_;
  const Method& method_;
  const Injection* injection_ = nullptr;
};

}  // namespace

void check_amendments(AmendmentsSheet& sheet, const Sequence& sequence,
                      const Method& method) {
  for (std::size_t row = 0; row < sheet.entries.size(); ++row) {
    RowCheck(sheet, row, sequence, method).check();
  }
}

}  // namespace loqsmith
