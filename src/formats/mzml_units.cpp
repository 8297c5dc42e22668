#include "loqsmith/formats/mzml_units.hpp"

#include <string>

#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

// Name and label are decoration: the accession wins, and it is said.
void warn_of_disagreement(const CvParam& kind, const std::string& array,
                          std::vector<std::string>& warnings) {
  const UnitTerm* unit = unit_term(kind.unit_accession);
  if (unit != nullptr && !kind.unit_name.empty() &&
      kind.unit_name != unit->name &&
      (unit->former_name.empty() || kind.unit_name != unit->former_name)) {
    warnings.push_back("unit of the " + array + " is named " +
                       in_quotes(kind.unit_name) + ", but its accession " +
                       kind.unit_accession + " means " +
                       std::string(unit->name));
  }
  const std::string prefix =
      kind.unit_accession.substr(0, kind.unit_accession.find(':'));
  const bool usual_label = kind.unit_cv == "MS" || kind.unit_cv == "UO";
  if (usual_label && kind.unit_cv != prefix) {
    warnings.push_back("unit " + in_quotes(kind.unit_accession) + " of the " +
                       array + " refers to the vocabulary " + kind.unit_cv);
  }
}

void refuse_name_alone(const CvParam& kind, const std::string& array,
                       DocumentSource& source) {
  if (!kind.unit_accession.empty() || kind.unit_name.empty()) return;
  throw InputError(source.problem(kind.offset,
                                  "the unit name " + in_quotes(kind.unit_name) +
                                      " without accession on " + "the " + array,
                                  "a unitAccession"));
}

}  // namespace

void read_time_unit(const CvParam& kind, DocumentSource& source,
                    MzmlChromatogram& result) {
  refuse_name_alone(kind, "time array", source);
  std::string accession = kind.unit_accession;
  if (accession.empty()) {
    const std::string& given = source.policy.time_unit_if_none;
    if (given.empty()) {
      throw InputError(source.problem(
          kind.offset, "no unit on the time array", "minute or second",
          "state time-unit in the method if you know it"));
    }
    accession = given == "minute" ? "UO:0000031" : "UO:0000010";
    result.warnings.push_back("time unit not stated; " + given +
                              " taken from the method");
  } else {
    warn_of_disagreement(kind, "time array", result.warnings);
  }
  const auto unit = time_unit(accession);
  if (!unit) {
    throw InputError(source.problem(
        kind.offset, "the unit " + in_quotes(accession) + " on the time array",
        "UO:0000031 (minute) or UO:0000010 (second)"));
  }
  result.unit = *unit;
  result.header.time_unit = std::string(unit_term(accession)->name);
  if (!unit->listed) {
    result.warnings.push_back("time in " + result.header.time_unit +
                              "s, which mzML does not list for time arrays");
  }
}

void read_signal_unit(const CvParam& kind, DocumentSource& source,
                      MzmlChromatogram& result) {
  refuse_name_alone(kind, "signal array", source);
  if (kind.unit_accession.empty()) return;
  warn_of_disagreement(kind, "signal array", result.warnings);
  const UnitTerm* unit = unit_term(kind.unit_accession);
  if (unit != nullptr) {
    result.header.signal_unit = std::string(unit->name);
  } else {
    result.header.signal_unit =
        kind.unit_name.empty() ? kind.unit_accession : kind.unit_name;
    result.warnings.push_back("unknown unit " + in_quotes(kind.unit_accession) +
                              " of the signal array, taken as written");
  }
}

}  // namespace loqsmith
