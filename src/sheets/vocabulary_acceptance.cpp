#include "loqsmith/sheets/vocabulary_rows.hpp"

namespace loqsmith::vocabulary {
namespace {

constexpr std::string_view kWithhold = "withhold";
constexpr std::string_view kFlag = "flag";

AttributeRule recovery() {
  return required("recovery", pair(at_least(0.0)), "Percent, low and high.");
}

AttributeRule percent(std::string_view name, std::string_view meaning) {
  return optional(name, number(above(0.0)), meaning);
}

AttributeRule blank_maximum() {
  return defaulted(
      "maximum",
      number_or(above(0.0), {{"detection-limit"}, {"quantitation-limit"}}),
      "detection-limit", "Most that a blank may contain.");
}

ElementRule check(std::string_view key, std::string_view meaning,
                  std::vector<AttributeRule> attributes,
                  std::string_view action, Availability availability) {
  attributes.push_back(defaulted("action", choice({{kWithhold}, {kFlag}}),
                                 action,
                                 "What a failure does to what it affects."));
  return {key,
          key.substr(key.find('/') + 1),
          meaning,
          Content::Empty,
          std::move(attributes),
          {},
          availability};
}

ElementRule calibration_check() {
  return check(
      "acceptance/calibration", "The calibration of the analyte.",
      {defaulted("minimum-levels", whole(1, 1000), "5", "Levels above zero."),
       optional("minimum-r2", number(from_to(0.0, 1.0)),
                "Coefficient of determination."),
       percent("maximum-relative-standard-error", "Percent."),
       percent("back-calculation", "Percent of the stated concentration."),
       percent("back-calculation-lowest",
               "The same for the lowest level, where it differs."),
       defaulted("minimum-accepted", number(from_to(0.0, 100.0)), "75",
                 "Percent of the levels that must be accepted.")},
      kWithhold, kNow);
}

std::vector<ElementRule> standard_checks() {
  return {
      calibration_check(),
      check("acceptance/second-source", "A standard of another source.",
            {recovery()}, kWithhold, kNow),
      check("acceptance/check-standard", "Standards measured in between.",
            {recovery(),
             defaulted("governs", choice({{"both"}, {"forward"}}), "both",
                       "Whether a failed one also affects what stands before "
                       "it, back to the last passing one.")},
            kWithhold, kNow),
  };
}

std::vector<ElementRule> preparation_checks() {
  return {
      check("acceptance/solvent-blank", "What solvent blanks contain.",
            {blank_maximum()}, kFlag, kNow),
      check("acceptance/method-blank", "What method blanks contain.",
            {blank_maximum(),
             defaulted("sample-ratio", number(above(0.0)), "10",
                       "Results above this many times the blank are not "
                       "affected.")},
            kFlag, kNow),
      check("acceptance/control", "Laboratory control samples.", {recovery()},
            kWithhold, kNow),
      check(
          "acceptance/fortified", "Fortified samples.",
          {optional("recovery", pair(at_least(0.0)), "Percent, low and high."),
           percent("relative-difference", "Percent between the duplicates."),
           defaulted("native-ratio", number(above(0.0)), "4",
                     "Native over added amount beyond which it is not "
                     "judged.")},
          kFlag, kNow),
      check("acceptance/duplicate", "Duplicates of samples.",
            {required("relative-difference", number(above(0.0)), "Percent.")},
            kFlag, kNow),
      check("acceptance/surrogate", "Recovery of the surrogates.", {recovery()},
            kWithhold, kNow),
  };
}

std::vector<ElementRule> injection_checks() {
  return {
      check("acceptance/internal-standard", "Area of the internal standard.",
            {defaulted("area", pair(at_least(0.0)), "50 200",
                       "Percent of the calibration's mean.")},
            kWithhold, kNow),
      check("acceptance/retention-time", "Where the peak stands.",
            {required("shift", number(above(0.0)),
                      "Minutes from the expectation.")},
            kFlag, kNow),
      check("acceptance/suitability", "Peaks of the standards.",
            {optional("tailing", number(above(0.0)), "Largest tailing."),
             optional("plates", number(above(0.0)), "Least plate number."),
             optional("resolution", number(above(0.0)), "Least resolution."),
             percent("area-rsd", "Largest relative standard deviation."),
             optional("signal-to-noise", number(above(0.0)),
                      "Least signal-to-noise.")},
            kFlag, kNow),
      check("acceptance/carry-over", "The blank after the highest standard.",
            {defaulted("maximum", number(above(0.0)), "20",
                       "Percent of the lowest standard's response.")},
            kFlag, kNow),
      check("acceptance/second-trace", "The ratio of the two traces.", {},
            kWithhold, kNow),
  };
}

// What was established cannot be held against itself.
std::vector<Choice> estimating_procedures() {
  std::vector<Choice> choices = procedure_choices();
  std::erase_if(choices,
                [](const Choice& one) { return one.word == "established"; });
  return choices;
}

std::vector<ElementRule> limit_checks() {
  return {
      check("acceptance/established-limit",
            "Tonight's limit against the established one.",
            {required("procedure", choice(estimating_procedures()),
                      "Procedure of tonight's limit."),
             defaulted("ratio", pair(above(0.0)), "0.5 2.0",
                       "Tonight's over established.")},
            kFlag, kNow),
      check("acceptance/confirmation", "Spikes at the quantitation limit.",
            {defaulted("maximum-rsd", number(above(0.0)), "20",
                       "Relative standard deviation, percent."),
             defaulted("recovery", pair(at_least(0.0)), "80 120",
                       "Percent, low and high."),
             defaulted("prediction", pair(at_least(0.0)), "50 150",
                       "Prediction interval, percent.")},
            kFlag, kNow),
      check("acceptance/closeness", "Repeats and dilutions of one sample.",
            {defaulted("replicates", number(above(0.0)), "20",
                       "Percent difference.")},
            kWithhold, kNow),
  };
}

}  // namespace

std::vector<ElementRule> acceptance_elements() {
  std::vector<ElementRule> all{{"acceptance",
                                "acceptance",
                                "The checks; an absent one is not made.",
                                Content::EachOnce,
                                {},
                                {}}};
  for (auto* piece :
       {standard_checks, preparation_checks, injection_checks, limit_checks}) {
    for (ElementRule& row : piece()) {
      all.front().children.push_back({row.key});
      all.push_back(row);
    }
  }
  return all;
}

std::vector<ElementRule> reporting_elements() {
  return {
      {"reporting",
       "reporting",
       "How results are written.",
       Content::Repeated,
       {defaulted("significant-digits", whole(1, 15), "3",
                  "Significant digits."),
        optional("decimals", whole(0, 15), "Decimals instead."),
        defaulted("rounding", choice({{"half-even"}, {"half-up"}}), "half-even",
                  "Which way a half goes."),
        defaulted("below-detection", choice({{"limit"}, {"quantitation"}}),
                  "limit", "Which limit is printed below detection."),
        defaulted("below-quantitation", choice({{"estimate"}, {"limit"}}),
                  "estimate", "What is printed below quantitation."),
        optional("reporting-limit", number(above(0.0)),
                 "The laboratory's reporting limit, in the sample."),
        optional("relative-uncertainty", number(above(0.0)),
                 "Expanded uncertainty from the validation, percent."),
        defaulted("recovery-correction", choice({{"none"}}), "none",
                  "Whether results are corrected for recovery.")},
       {{"letter"}}},
      {"letter",
       "letter",
       "Replaces a qualifier letter.",
       Content::Empty,
       {required("status",
                 choice({{"not-detected"},
                         {"estimated"},
                         {"reportable"},
                         {"above-range"},
                         {"withheld"}}),
                 "Which status it stands for."),
        required("code", name(), "The letter.")},
       {}},
  };
}

}  // namespace loqsmith::vocabulary
