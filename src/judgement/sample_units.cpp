#include "loqsmith/judgement/sample_units.hpp"

#include <cmath>
#include <limits>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/rounding.hpp"

namespace loqsmith {
namespace {

// A product of four factors, each step within half a unit in the last place.
constexpr double kArithmeticError =
    4.0 * std::numeric_limits<double>::epsilon();
constexpr int kDecimalDigits = 12;

}  // namespace

bool stays_in_the_vial(const Injection& injection, const UnitSettings& units) {
  return !units.sample_amount.empty() && !injection.sample_amount;
}

double sample_factor(const Injection& injection, const UnitSettings& units) {
  double factor = injection.dilution;
  if (stays_in_the_vial(injection, units)) return factor;
  if (injection.final_volume && injection.sample_amount) {
    factor = factor * *injection.final_volume / *injection.sample_amount;
  }
  return factor * units.factor;
}

std::string result_unit(const Injection& injection, const UnitSettings& units) {
  return units.result.empty() || stays_in_the_vial(injection, units)
             ? units.concentration
             : units.result;
}

ReportingSettings reporting_of(const Injection& injection,
                               const UnitSettings& units,
                               const ReportingSettings& settings) {
  ReportingSettings own = settings;
  if (stays_in_the_vial(injection, units)) own.reporting_limit.reset();
  return own;
}

double in_sample(double vial, double factor) {
  const double product = vial * factor;
  if (factor == 1.0 || !std::isfinite(product)) return product;
  const auto decimal = parse_number(
      round_to_significant(product, kDecimalDigits, RoundingRule::HalfEven));
  if (!decimal) return product;
  const double allowed = kArithmeticError * std::abs(product);
  return std::abs(*decimal - product) <= allowed ? *decimal : product;
}

}  // namespace loqsmith
