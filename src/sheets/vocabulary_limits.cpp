#include "loqsmith/sheets/vocabulary_rows.hpp"

namespace loqsmith::vocabulary {
namespace {

std::vector<Choice> blank_choices() {
  return {{"solvent"}, {"method"}, {"zero-standard"}, {"all"}};
}

AttributeRule blanks() {
  return optional("blanks", choice(blank_choices()),
                  "Which blanks; those of limits where left out.");
}

AttributeRule up_to() {
  return defaulted("up-to", number_or(at_least(1.0), {{"all"}}), "10",
                   "How far up standards are used, times the lowest one.");
}

AttributeRule detection_factor(std::string_view value) {
  return defaulted("detection-factor", number(above(0.0)), value,
                   "Multiple of the standard deviation for detection.");
}

AttributeRule quantitation_factor() {
  return defaulted("quantitation-factor", number(above(0.0)), "10",
                   "Multiple of the standard deviation for quantitation.");
}

AttributeRule alpha(std::string_view value) {
  return defaulted("alpha", number(between(0.0, 0.5)), value,
                   "Chance of calling a blank present.");
}

AttributeRule beta(std::string_view value) {
  return defaulted("beta", number(between(0.0, 0.5)), value,
                   "Chance of missing what lies at the limit.");
}

AttributeRule replicates() {
  return defaulted("replicates", whole(1, 1000), "1",
                   "Measurements averaged into one result.");
}

ElementRule procedure(std::string_view name, std::string_view meaning,
                      std::vector<AttributeRule> attributes,
                      Availability availability) {
  return {name, name,        meaning, Content::Empty, std::move(attributes),
          {},   availability};
}

std::vector<ElementRule> basic_procedures() {
  return {
      procedure("blank-deviation",
                "Multiples of the blanks' standard deviation over the slope.",
                {detection_factor("3"), quantitation_factor(),
                 defaulted("offset", choice({{"none"}, {"blank-mean"}}), "none",
                           "Whether the blanks' mean counts."),
                 blanks()},
                kNow),
      procedure("calibration-residual",
                "Multiples of the residual standard deviation over the slope.",
                {detection_factor("3"), quantitation_factor(), up_to()}, kNow),
      procedure("intercept-deviation",
                "Multiples of the intercept's standard deviation over the "
                "slope.",
                {detection_factor("3.3"), quantitation_factor(), up_to()},
                kNow),
      procedure("signal-to-noise",
                "Concentrations at which the peak height has the ratios.",
                {defaulted("detection-ratio", number(above(0.0)), "3",
                           "Signal-to-noise at the detection limit."),
                 defaulted("quantitation-ratio", number(above(0.0)), "10",
                           "Signal-to-noise at the quantitation limit.")},
                kNow),
      procedure("noise-model",
                "From the predicted response noise at zero; instrument noise "
                "only.",
                {detection_factor("3.29"), quantitation_factor()}, kNow),
      procedure("spike-replicates", "From low spikes and method blanks.",
                {defaulted("confidence", number(between(0.5, 1.0)), "0.99",
                           "Level of Student's t."),
                 quantitation_factor(),
                 defaulted("spike-ratio", pair(above(0.0)), "2 10",
                           "Spike level over the limit."),
                 optional("blanks", choice(blank_choices()),
                          "Which blanks; method where left out.")},
                kNow),
  };
}

std::vector<ElementRule> calibration_procedures() {
  return {
      procedure("critical-and-detectable",
                "Critical value and minimum detectable value by non-central t.",
                {alpha("0.05"), beta("0.05"), replicates(),
                 defaulted("variance", choice({{"constant"}, {"linear"}}),
                           "constant", "How the variance depends on x."),
                 up_to()},
                kNow),
      procedure(
          "din-32645", "Decision, detection and quantitation by DIN 32645.",
          {defaulted("way", choice({{"calibration"}, {"blank"}}), "calibration",
                     "From the calibration line or from blanks."),
           alpha("0.01"), beta("0.01"),
           defaulted("k", number(above(0.0)), "3",
                     "Result over half its confidence interval."),
           replicates(), up_to(), blanks()},
          kNow),
      procedure("prediction-band",
                "From the prediction band of the calibration line.",
                {alpha("0.05"), beta("0.05"), replicates(), up_to()}, kNow),
  };
}

std::vector<ElementRule> further_procedures() {
  return {
      procedure("low-level-precision",
                "From the standard deviation near zero, corrected for "
                "averaging.",
                {replicates(),
                 defaulted("blank-replicates", whole(0, 1000), "0",
                           "Blanks averaged into one correction."),
                 quantitation_factor(), blanks()},
                kNow),
      procedure("blank-and-low-level",
                "Limit of blank and limit of detection from blanks and spikes.",
                {defaulted("ranks", choice({{"no"}, {"yes"}}), "no",
                           "Whether ranks are used instead of moments."),
                 alpha("0.05"), beta("0.05"), blanks()},
                kNow),
      procedure("error-propagation",
                "With the errors of blank, slope and intercept propagated.",
                {detection_factor("3"), quantitation_factor(), blanks()}, kNow),
      procedure(
          "two-component", "From an error model of two components.",
          {defaulted("relative-deviation", number(between(0.0, 1.0)), "0.10",
                     "Relative standard deviation at quantitation.")},
          kNow),
      procedure("accuracy-profile",
                "Quantitation where the tolerance interval stays acceptable.",
                {defaulted("beta", number(between(0.0, 1.0)), "0.80",
                           "Part of future results in the interval."),
                 defaulted("acceptance", pair(at_least(0.0)), "80 120",
                           "Acceptable recovery, percent.")},
                kNow),
      procedure("established", "Limits that a validation has established.",
                {required("detection", number(above(0.0)),
                          "Detection limit, vial concentration."),
                 required("quantitation", number(above(0.0)),
                          "Quantitation limit, vial concentration."),
                 optional("source", text(), "Where they come from.")},
                kNow),
  };
}

std::vector<ElementRule> procedures() {
  std::vector<ElementRule> all = basic_procedures();
  for (ElementRule& row : calibration_procedures()) all.push_back(row);
  for (ElementRule& row : further_procedures()) all.push_back(row);
  return all;
}

ElementRule limits(const std::vector<ElementRule>& all) {
  std::vector<Choice> governing{{"first"}, {"largest"}};
  std::vector<ChildRule> children;
  for (const ElementRule& row : all) {
    governing.push_back({row.name, row.availability});
    children.push_back({row.key});
  }
  return {
      "limits",
      "limits",
      "The limit procedures to compute, and which of them rules.",
      Content::EachOnce,
      {defaulted("governing", choice(std::move(governing)), "first",
                 "Which procedure rules; established where that is "
                 "present and nothing is said."),
       defaulted("decision", choice({{"detection-limit"}, {"critical-value"}}),
                 "detection-limit", "From where on something is present."),
       defaulted("quantitation-floor", choice({{"lowest-standard"}, {"none"}}),
                 "lowest-standard",
                 "Whether quantitation ends at the lowest standard."),
       defaulted("blanks", choice(blank_choices()), "solvent",
                 "Which blanks the procedures rest on."),
       defaulted("minimum", whole(3, 1000), "7",
                 "Blanks below which a limit is not valid.")},
      std::move(children)};
}

}  // namespace

std::vector<ElementRule> limit_elements() {
  std::vector<ElementRule> all = procedures();
  all.insert(all.begin(), limits(all));
  return all;
}

std::vector<Choice> procedure_choices() {
  std::vector<Choice> choices;
  for (const ElementRule& row : procedures()) {
    choices.push_back({row.name, row.availability});
  }
  return choices;
}

}  // namespace loqsmith::vocabulary
