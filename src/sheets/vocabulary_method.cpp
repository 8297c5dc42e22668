#include "loqsmith/sheets/vocabulary_rows.hpp"

namespace loqsmith::vocabulary {

std::vector<ElementRule> method_elements() {
  return {
      {"method",
       "method",
       "How to integrate, calibrate, set limits, judge and report.",
       Content::EachOnce,
       {required("id", name(), "Name of the method."),
        required("revision", name(), "Which revision of the method this is.")},
       {{"title"},
        {"units", true},
        {"traces", true},
        {"integration"},
        {"noise"},
        {"internal-standards"},
        {"analytes", true},
        {"calibration"},
        {"limits"},
        {"acceptance"},
        {"reporting"},
        {"amendments"}}},
      {"title", "title", "Title for people.", Content::Text, {}, {}},
      {"units",
       "units",
       "Units, printed as given, and how vial concentrations become results: "
       "result = vial x dilution x final volume / sample amount x factor.",
       Content::Empty,
       {required("concentration", name(),
                 "Unit of vial concentrations and of levels."),
        required("result", name(), "Unit of results."),
        defaulted("factor", number(above(0.0)), "1",
                  "Factor between the units; required where they differ and "
                  "where preparation columns are used."),
        optional("sample-amount", name(), "Unit of the column sample_amount."),
        optional("final-volume", name(), "Unit of the column final_volume.")},
       {}},
      {"amendments",
       "amendments",
       "Whether manual decisions need a signature.",
       Content::Empty,
       {defaulted("unsigned", choice({{"refused"}, {"accepted"}}), "refused",
                  "What becomes of unsigned amendments.")},
       {}},
  };
}

std::vector<ElementRule> trace_elements() {
  return {
      {"traces",
       "traces",
       "The chromatograms that the method looks at.",
       Content::Repeated,
       {optional("time-unit", choice({{"minute"}, {"second"}}),
                 "Time unit of files that state none; such files are refused "
                 "without it."),
        defaulted("checksum", choice({{"required"}, {"ignored"}}), "required",
                  "Whether a wrong checksum inside a file refuses it, or is "
                  "only said and recorded.")},
       {{"trace", true}}},
      {"trace",
       "trace",
       "Which chromatogram of a file is meant; exactly one may match.",
       Content::Empty,
       {required("id", name(), "Name of the trace within the method."),
        defaulted("kind",
                  choice({{"any"},
                          {"absorption"},
                          {"emission"},
                          {"srm"},
                          {"sim"},
                          {"tic"},
                          {"extracted", kLater}}),
                  "any", "What the chromatogram shows."),
        optional("name", text(),
                 "Text contained in the chromatogram's id or title (mzML) or "
                 "in its step, result and series names (AnIML)."),
        optional("precursor", number(above(0.0)), "Precursor m/z."),
        optional("product", number(above(0.0)), "Product m/z."),
        optional("mz", number(above(0.0)), "The m/z that is monitored."),
        defaulted("tolerance", number(above(0.0)), "0.5",
                  "How far an m/z may be off, m/z units."),
        optional("tolerance-ppm", number(above(0.0)),
                 "How far an m/z may be off, parts per million.")},
       {}},
  };
}

}  // namespace loqsmith::vocabulary
