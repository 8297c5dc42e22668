#include "loqsmith/limits/blank_offset.hpp"

#include <cmath>
#include <string>

#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"

namespace loqsmith {

// The share of chance is taken out first: with 7 blanks their mean strays from
// the true one by 0.38 standard deviations, which alone moves the predicted
// rate from 1.6 to 2.5 %.
void judge_blank_offset(LimitEstimate& estimate, const BlankSample& sample,
                        const Calibration& calibration) {
  const double threshold =
      calibration.intercept + calibration.slope * *estimate.detection;
  const double rate = false_positive_rate(sample, threshold);
  estimate.terms.push_back(
      {"predicted rate of blank samples at or above the detection limit", rate,
       ""});

  const double n = static_cast<double>(sample.n());
  const double difference = sample.mean - calibration.intercept;
  const double chance =
      student_t_quantile(0.975, n - 1.0) * sample.sd / std::sqrt(n);
  if (!(std::abs(difference) > chance)) return;
  const Grade grade = rate > 0.05   ? Grade::NotValid
                      : rate > 0.02 ? Grade::Caution
                                    : Grade::Note;
  estimate.findings.push_back(
      {grade, "blank-differs-from-intercept",
       "the blanks' mean lies " + figure(std::abs(difference) / sample.sd) +
           " of their standard deviations " +
           (difference > 0.0 ? "above" : "below") +
           " the intercept: of blank samples " + percent_figure(rate) +
           " are to be expected at or above the detection limit; a weighted "
           "calibration or offset=\"blank-mean\" may mend it"});
}

void judge_baseline_without_offset(LimitEstimate& estimate,
                                   const LimitEvidence& evidence) {
  if (!evidence.baseline_biased) return;
  estimate.findings.push_back(
      {Grade::NotValid, "baseline-biases-blanks",
       "this baseline shifts the responses of blanks: offset=\"blank-mean\" "
       "is needed with it"});
}

}  // namespace loqsmith
