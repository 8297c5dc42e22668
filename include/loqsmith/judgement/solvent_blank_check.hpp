#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// What solvent blanks contain, one row each.
///
/// A failed one affects, as a failed check standard does, what lies between the
/// last solvent blank before it and the next one after it that passed: of these
/// the detected results, for what was not found cannot come from the solvent.
/// A blank that could not be judged says nothing of others.
CheckOutcome check_solvent_blanks(const FirstResults& first);

}  // namespace loqsmith
