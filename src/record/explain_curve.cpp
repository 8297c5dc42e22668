#include <cmath>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/record/explanation.hpp"

namespace loqsmith {
namespace {

std::string curve_words(const PublishedSet& set, const std::string& unit) {
  std::string words = "set " + set.set + ": " + set.model + ", weight " +
                      set.weight + ", " + std::to_string(set.points) +
                      " standards at " + std::to_string(set.levels) +
                      " levels above zero";
  if (set.lowest && set.highest) {
    words += ", accepted from " + shortest(*set.lowest) + " to " +
             shortest(*set.highest) + ' ' + unit;
  }
  return words;
}

std::string equation_words(const PublishedSet& set) {
  if (set.model == "response-factor") {
    return "response is b x concentration; b is " + shortest(set.slope);
  }
  std::string words = "response is a + b x concentration";
  if (set.model == "quadratic") words += " + c x concentration squared";
  words +=
      "; a is " + shortest(set.intercept) + ", b is " + shortest(set.slope);
  if (set.model == "quadratic") words += ", c is " + shortest(set.curvature);
  return words;
}

// The root is written so that nothing cancels: 2 d / (b + sqrt(b b + 4 c d)).
void solve_quadratic(ExplanationSection& section, const PublishedSet& set,
                     double above, double vial, const std::string& unit) {
  const std::string b = in_expression(set.slope);
  const double under = set.slope * set.slope + 4.0 * set.curvature * above;
  section.lines.push_back({"under the root",
                           b + " x " + b + " + 4 x " +
                               in_expression(set.curvature) + " x " +
                               in_expression(above),
                           shortest(under)});
  section.lines.push_back({"in the vial",
                           "2 x " + in_expression(above) + " / (" + b +
                               " + sqrt(" + in_expression(under) + "))",
                           shortest(vial), unit});
}

void solve(ExplanationSection& section, const PublishedSet& set,
           double response, double vial, const std::string& unit) {
  double above = response;
  if (set.intercept != 0.0) {
    above = response - set.intercept;
    section.lines.push_back(
        {"response less intercept",
         in_expression(response) + " - " + in_expression(set.intercept),
         shortest(above)});
  }
  if (set.curvature != 0.0) {
    solve_quadratic(section, set, above, vial, unit);
    return;
  }
  section.lines.push_back(
      {"in the vial", in_expression(above) + " / " + in_expression(set.slope),
       shortest(vial), unit});
}

// What leads from the vial to the sample; a dilution alone needs no step.
void tell_factor(ExplanationSection& section, const ResultDerivation& told) {
  std::string factors = in_expression(told.dilution);
  std::string words = "dilution";
  if (told.final_volume && told.sample_amount) {
    factors += " x " + in_expression(*told.final_volume) + " / " +
               in_expression(*told.sample_amount);
    words += ", final volume over amount of sample";
  }
  if (told.unit_factor != 1.0) {
    factors += " x " + in_expression(told.unit_factor);
    words += ", the method's factor";
  }
  if (words == "dilution") {
    section.lines.push_back({"dilution " + factors});
    return;
  }
  section.lines.push_back({"from vial to sample (" + words + ")", factors,
                           shortest(told.sample_factor)});
}

}  // namespace

ExplanationSection explain_curve(const PublishedAnalyte& analyte,
                                 const PublishedResult& result) {
  const ResultRow& row = result.row;
  const std::string& unit = analyte.concentration_unit;
  ExplanationSection section{"curve", {}};
  const PublishedSet* set = analyte.set_named(row.set);
  if (set == nullptr || !set->not_applicable.empty()) {
    section.lines.push_back(
        {"none: " +
         (set == nullptr ? "no calibration set" : set->not_applicable)});
    return section;
  }
  section.lines.push_back({curve_words(*set, unit)});
  section.lines.push_back({equation_words(*set)});
  if (!row.vial_concentration) {
    section.lines.push_back(
        {row.response ? "the response lies beyond the curve: no concentration"
                      : "no response, no concentration"});
    return section;
  }
  if (set->addition) {
    section.lines.push_back(
        {"standard addition: the line meets zero at the amount in the vial, "
         "one for all injections of the sample"});
    section.lines.push_back(
        {"in the vial",
         in_expression(set->intercept) + " / " + in_expression(set->slope),
         shortest(*row.vial_concentration), unit});
    return section;
  }
  solve(section, *set, *row.response, *row.vial_concentration, unit);
  return section;
}

ExplanationSection explain_sample(const PublishedResult& result) {
  const ResultRow& row = result.row;
  ExplanationSection section{"sample", {}};
  tell_factor(section, result.derivation);
  if (row.result && row.vial_concentration) {
    section.lines.push_back({"result",
                             in_expression(*row.vial_concentration) + " x " +
                                 in_expression(result.derivation.sample_factor),
                             shortest(*row.result), row.unit});
  } else {
    section.lines.push_back({"no result"});
  }
  if (row.calibration_uncertainty) {
    section.lines.push_back(
        {"expanded uncertainty of the calibration alone "
         "(95 %): " +
         shortest(*row.calibration_uncertainty) + ' ' + row.unit});
  }
  if (!result.automatic_result.empty() || !result.automatic_status.empty()) {
    section.lines.push_back(
        {"amended; without the amendment: " + result.automatic_result + ' ' +
         result.automatic_status});
  }
  return section;
}

}  // namespace loqsmith
