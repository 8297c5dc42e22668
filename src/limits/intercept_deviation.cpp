#include "loqsmith/limits/intercept_deviation.hpp"

#include "loqsmith/limits/low_range_procedure.hpp"
#include "loqsmith/limits/spread_limit.hpp"
#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {
namespace {

void judge_promise(LimitEstimate& estimate, const LowRangeLine& line,
                   const ProcedureSettings& procedure) {
  const double t = procedure.detection_factor * line.intercept_sd() /
                   line.blank_reading_sd(1.0);
  const double rate = student_t_upper_tail(t, line.degrees_of_freedom);
  estimate.terms.push_back(
      {"rate of blanks at or above the detection limit by the line's scatter",
       rate, ""});
  if (!(rate > 0.02)) return;
  estimate.findings.push_back(
      {Grade::Caution, "intercept-not-response",
       "an intercept scatters less than a response: of blank samples " +
           percent_figure(rate) +
           " are to be expected at or above the detection limit"});
}

}  // namespace

Outcome<LimitEstimate> intercept_deviation(const LimitEvidence& evidence,
                                           const LimitSettings& settings,
                                           const ProcedureSettings& procedure) {
  const Outcome<LowRangeLine> line = low_range_of(evidence, procedure);
  if (!line) return NotApplicable{line.reason()};
  if (line->through_zero)
    return NotApplicable{
        "line-through-zero: a line through zero has no intercept that could "
        "scatter"};
  LimitEstimate estimate = estimate_of(*line);
  estimate.terms.push_back(
      {"standard deviation of the intercept", line->intercept_sd(), kResponse});
  estimate.terms.push_back(
      {"detection factor", procedure.detection_factor, ""});
  estimate.terms.push_back(
      {"quantitation factor", procedure.quantitation_factor, ""});
  set_spread_limits(
      estimate,
      {line->intercept_sd(), static_cast<double>(line->degrees_of_freedom)},
      line->slope, procedure);
  judge_promise(estimate, *line, procedure);
  judge_low_range(estimate, evidence, settings, procedure, *line);
  return estimate;
}

}  // namespace loqsmith
