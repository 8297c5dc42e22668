#include "loqsmith/sheets/vocabulary_rows.hpp"

namespace loqsmith::vocabulary {
namespace {

ElementRule integration() {
  return {
      "integration",
      "integration",
      "How peaks are found and integrated.",
      Content::Empty,
      {defaulted("response", choice({{"area"}, {"height"}, {"template"}}),
                 "area", "What is calibrated."),
       defaulted("bounds", choice({{"template"}, {"own"}}), "template",
                 "Every role over the same window, or the found feet; limits "
                 "from blanks are not valid with the latter."),
       defaulted("baseline",
                 choice({{"valley"}, {"asymmetric-least-squares"}, {"snip"}}),
                 "valley",
                 "What is subtracted: a straight line from foot to foot, or a "
                 "curve estimated below the peaks. The latter lifts the "
                 "responses of blanks: limits from their deviation then need "
                 "offset=\"blank-mean\"."),
       defaulted("overlap", choice({{"drop"}, {"skim"}, {"model"}}), "drop",
                 "Perpendicular drop, tangent skim, or exponentially modified "
                 "Gaussians fitted together."),
       defaulted("smoothing-points",
                 {ValueKind::Whole, from_to(0, 999), {}, true}, "0",
                 "Points of the smoothing for finding peaks: 0 is the odd "
                 "number nearest the width at half height, 1 none."),
       defaulted("smoothing-order", whole(0, 9), "2",
                 "Order of the smoothing polynomial."),
       defaulted("threshold", number(at_least(0.0)), "4",
                 "Least height of a peak in multiples of that height's own "
                 "standard deviation."),
       defaulted("minimum-width", number(at_least(0.0)), "0",
                 "Least width at half height, minutes."),
       optional("hold-up-time", number(above(0.0)),
                "Time of an unretained compound, minutes.")},
      {}};
}

ElementRule noise() {
  return {"noise",
          "noise",
          "How noise is measured.",
          Content::Empty,
          {defaulted("source", choice({{"blank"}, {"baseline"}}), "blank",
                     "The nearest solvent blank, or peak-free parts of the "
                     "same trace."),
           defaulted("measure",
                     choice({{"half-peak-to-peak"},
                             {"peak-to-peak"},
                             {"standard-deviation"}}),
                     "half-peak-to-peak",
                     "Signal-to-noise is 2H/h, H/h, or height over standard "
                     "deviation."),
           defaulted("span", number(above(0.0)), "5",
                     "How much time around the retention time, in widths at "
                     "half height."),
           defaulted("drift", choice({{"kept"}, {"removed"}}), "kept",
                     "Whether a straight line is removed first.")},
          {}};
}

ElementRule calibration() {
  return {
      "calibration",
      "calibration",
      "How standards become a curve.",
      Content::Empty,
      {defaulted("model",
                 choice({{"linear"}, {"quadratic"}, {"response-factor"}}),
                 "linear", "Shape of the curve."),
       defaulted("weight",
                 choice({{"none"}, {"1/x"}, {"1/x2"}, {"1/s2"}}),
                 "none", "Weight of a standard."),
       defaulted("intercept", choice({{"fitted"}, {"zero"}}), "fitted",
                 "Whether the curve is forced through zero."),
       defaulted("sets", choice({{"one"}, {"bracketing"}, {"latest"}}), "one",
                 "Which standards belong to which samples.")},
      {}};
}

}  // namespace

std::vector<ElementRule> signal_elements() {
  return {integration(), noise(), calibration()};
}

std::vector<ElementRule> analyte_elements() {
  return {
      {"internal-standards",
       "internal-standards",
       "What is added to every vial to compare with.",
       Content::Repeated,
       {},
       {{"internal-standard", true}}},
      {"internal-standard",
       "internal-standard",
       "One internal standard.",
       Content::Empty,
       {required("id", name(), "Name of the internal standard."),
        required("trace", name(), "Id of its trace."),
        required("retention-time", number(above(0.0)), "Minutes."),
        defaulted("window", number(above(0.0)), "0.2",
                  "How far its peak may be off, minutes."),
        required("concentration", number(above(0.0)),
                 "In the undiluted vial.")},
       {}},
      {"analytes",
       "analytes",
       "What is determined.",
       Content::Repeated,
       {},
       {{"analyte", true}}},
      {"analyte",
       "analyte",
       "One analyte; what its children state replaces the method's, attribute "
       "by attribute (limits: as a whole).",
       Content::EachOnce,
       {required("id", name(), "Name of the analyte, as in levels.csv."),
        required("trace", name(), "Id of its trace."),
        required("retention-time", number(above(0.0)), "Minutes."),
        defaulted("window", number(above(0.0)), "0.2",
                  "How far its peak may be off, minutes."),
        optional("internal-standard", name(), "Id of its internal standard."),
        optional("surrogate-concentration", number(above(0.0)),
                 "Makes it a surrogate: added to every prepared vial, this "
                 "much in the undiluted one, judged by recovery.")},
       {{"integration"},
        {"noise"},
        {"calibration"},
        {"limits"},
        {"acceptance"},
        {"reporting"},
        {"second-trace"}}},
      {"second-trace",
       "second-trace",
       "A second trace whose response ratio must agree.",
       Content::Empty,
       {required("trace", name(), "Id of the second trace."),
        required("ratio", number(above(0.0)),
                 "Response of the second trace over that of the first."),
        required("tolerance", number(above(0.0)), "Percent of the ratio.")},
       {}},
  };
}

}  // namespace loqsmith::vocabulary
