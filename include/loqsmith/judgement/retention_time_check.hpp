#pragma once

#include "loqsmith/judgement/result_checks.hpp"

namespace loqsmith {

/// How far each found peak stands from where it was expected: the drift through
/// standards, check standards and controls, with the shift of the injection's
/// own internal standard. Minutes, later positive; the ends pass. One row for
/// each failure, one for all that passed. Affects the result.
CheckOutcome check_retention_times(const FirstResults& first);

}  // namespace loqsmith
