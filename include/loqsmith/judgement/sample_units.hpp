#pragma once

#include <string>

#include "loqsmith/chromatogram/sequence.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// True where the injection was not prepared although the method states its
/// results for an amount of sample (a standard, a check standard, a solvent
/// blank beside weighed samples): then its result stays a concentration.
bool stays_in_the_vial(const Injection& injection, const UnitSettings& units);

/// From the vial to the sample: dilution x final_volume / sample_amount x
/// factor; where the method uses no preparation columns dilution x factor;
/// where the injection stays in the vial its dilution alone. Always > 0.
double sample_factor(const Injection& injection, const UnitSettings& units);

/// Unit of the injection's result: the method's result unit, or its
/// concentration unit where the injection stays in the vial.
std::string result_unit(const Injection& injection, const UnitSettings& units);

/// The reporting settings that hold for the injection: a reporting limit is
/// stated in the sample and says nothing of what stays in the vial.
ReportingSettings reporting_of(const Injection& injection,
                               const UnitSettings& units,
                               const ReportingSettings& settings);

/// A vial concentration, limit or uncertainty in the sample's unit.
///
/// Results, limits and the end of the range all go through this one function,
/// which never decreases as the concentration grows: what is equal or above
/// in the vial is so in the sample. Where the product misses a decimal number
/// of at most 12 digits by no more than the arithmetic's own error (0.1 x 3
/// gives 0.30000000000000004), that number is taken: otherwise such a limit,
/// rounded up for print, would become "< 0.301".
double in_sample(double vial, double factor);

}  // namespace loqsmith
