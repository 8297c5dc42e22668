#include "loqsmith/limits/established.hpp"

#include "loqsmith/limits/spread_limit.hpp"

namespace loqsmith {

Outcome<LimitEstimate> established(const LimitEvidence&, const LimitSettings&,
                                   const ProcedureSettings& procedure) {
  if (!procedure.detection && !procedure.quantitation)
    return NotApplicable{"not-given: neither limit is given"};
  for (const std::optional<double>& limit :
       {procedure.detection, procedure.quantitation})
    if (limit && !(*limit > 0.0))
      return NotApplicable{"limit-not-positive: a limit lies above zero"};

  LimitEstimate estimate;
  estimate.detection = procedure.detection;
  estimate.quantitation = procedure.quantitation;
  if (procedure.detection)
    estimate.terms.push_back(
        {"established detection limit", *procedure.detection, kConcentration});
  if (procedure.quantitation)
    estimate.terms.push_back({"established quantitation limit",
                              *procedure.quantitation, kConcentration});
  estimate.findings.push_back({Grade::Note, "established",
                               procedure.source.empty()
                                   ? "the method states no source"
                                   : "from " + procedure.source});
  return estimate;
}

}  // namespace loqsmith
