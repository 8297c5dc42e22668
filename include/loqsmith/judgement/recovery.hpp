#pragma once

#include <optional>
#include <string>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/known_results.hpp"
#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Recovery of a known amount, percent:
///
///     100 found / expected
///
/// @param found     what was measured, signed
/// @param expected  what is there, in the same unit, > 0
///
/// Source: US EPA SW-846 method 8000D, recoveries of control samples and
/// surrogates; from memory.
double recovery_percent(double found, double expected);

/// Recovery of an amount that was added to a sample, percent:
///
///     100 (fortified - native) / added
///
/// @param native  result of the sample itself, signed: noise about zero
///                cancels on average, which a cut at zero would prevent
///
/// Source: US EPA SW-846 method 8000D, matrix spike recovery; from memory.
double added_recovery_percent(double fortified, double native, double added);

/// One row of checks.csv for one recovery, ends of the range included. Without
/// a recovery it failed, and the note says why: nothing shows that the amount
/// was found. A reason that begins with "not checked" leaves it unchecked.
CheckRow recovery_row(const std::string& check, const KnownResult& of,
                      const Outcome<double>& percent, const PercentRange& range,
                      CheckAction action);

}  // namespace loqsmith
