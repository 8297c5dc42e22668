#include "loqsmith/limits/estimate.hpp"

#include <algorithm>

namespace loqsmith {

std::string grade_name(Grade grade) {
  switch (grade) {
    case Grade::Valid:
      return "valid";
    case Grade::Note:
      return "note";
    case Grade::Caution:
      return "caution";
    case Grade::NotValid:
      return "not-valid";
    case Grade::NotApplicable:
      return "not-applicable";
  }
  return "not-applicable";
}

Grade LimitEstimate::grade() const {
  Grade worst = Grade::Valid;
  for (const LimitFinding& finding : findings)
    worst = std::max(worst, finding.grade);
  return worst;
}

}  // namespace loqsmith
