#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/judgement/repeats.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Reason word of a sample whose injections contradict each other.
inline constexpr const char* kDilutionsDisagree = "dilutions-disagree";

/// One row of the table that says which of a sample's injections count.
struct ReportableRule {
  enum class Pick {
    LeastDiluted,  ///< of those with the rule's status, all that share it
    MostDiluted,
    None,  ///< they contradict each other
  };

  std::string_view when;  ///< in words, for people
  bool (*holds)(const std::vector<Repeat>&);
  Status status;
  Pick pick;
};

/// The rules; the first that holds decides. In range means status "reportable":
/// from the quantitation limit to the highest accepted standard, in the vial, a
/// result at either one counting as in range.
const std::vector<ReportableRule>& reportable_rules();

/// An injection that does not count.
struct RejectedRepeat {
  int injection = 0;
  /// A word: "more-diluted", "less-diluted", "above-range",
  /// "below-quantitation-limit", "not-detected", "dilutions-disagree", or the
  /// most serious reason of a withheld one.
  std::string why;
};

/// Which of a sample's injections count and why the others do not.
struct ReportableChoice {
  Status status = Status::Withheld;
  bool disagree = false;
  std::vector<const Repeat*> counting;  ///< all diluted alike; empty: disagree
  std::vector<RejectedRepeat> rejected;
};
/// @pre at least one repeat; they must outlive the choice
ReportableChoice choose_reportable(const std::vector<Repeat>& repeats);

/// True where the statuses alone rule each other out, whatever the numbers:
/// - a more diluted injection stands higher than all at some lesser dilution
///   (not detected, estimated, in range, above range);
/// - one is above the range and another below its quantitation limit, unless a
///   third in range stands between them and the limit is not below the end of
///   the range.
/// Withheld ones never count.
bool rule_each_other_out(const std::vector<Repeat>& repeats);

}  // namespace loqsmith
