#include "loqsmith/limits/blanks.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/limits/words.hpp"
#include "loqsmith/numerics/distributions.hpp"
#include "loqsmith/numerics/mean.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kLeastBlanks = 3;

std::string left_out_words(std::size_t left_out) {
  if (left_out == 0) return "";
  return " (" + std::to_string(left_out) + " left out: after-high)";
}

bool all_equal(const std::vector<double>& values) {
  return std::all_of(values.begin(), values.end(),
                     [&](double value) { return value == values.front(); });
}

std::vector<double> responses_of(const std::vector<BlankResponse>& blanks) {
  std::vector<double> values;
  for (const BlankResponse& blank : blanks) values.push_back(blank.response);
  return values;
}

}  // namespace

std::string blank_kind_words(BlankKind kind) {
  switch (kind) {
    case BlankKind::Solvent:
      return "solvent blank";
    case BlankKind::Method:
      return "method blank";
    case BlankKind::ZeroStandard:
      return "zero standard";
    case BlankKind::All:
      return "blank";
  }
  return "blank";
}

Outcome<BlankSample> usable_blanks(const LimitEvidence& evidence,
                                   BlankKind kind) {
  BlankSample sample;
  for (const BlankResponse& blank : evidence.blanks) {
    if (kind != BlankKind::All && blank.kind != kind) continue;
    if (blank.after_high && !evidence.carry_over_passed)
      ++sample.left_out;
    else
      sample.blanks.push_back(blank);
  }
  const std::string words = counted(sample.n(), blank_kind_words(kind)) +
                            left_out_words(sample.left_out);
  if (sample.n() < kLeastBlanks)
    return NotApplicable{"few-blanks: " + words + ", at least 3 are needed"};
  const std::vector<double> responses = responses_of(sample.blanks);
  if (all_equal(responses))
    return NotApplicable{"blanks-all-equal: " + words +
                         " gave the same response: a thresholded or rounded "
                         "signal has no spread to rest a limit on"};
  sample.mean = mean(responses);
  sample.sd = standard_deviation(responses);
  return sample;
}

BlankKind blank_kind_of(const LimitSettings& settings,
                        const ProcedureSettings& procedure) {
  return procedure.blanks.value_or(settings.blanks);
}

double false_positive_rate(const BlankSample& sample, double threshold) {
  const double n = static_cast<double>(sample.n());
  const double t =
      (threshold - sample.mean) / (sample.sd * std::sqrt(1.0 + 1.0 / n));
  return student_t_upper_tail(t, sample.degrees_of_freedom());
}

}  // namespace loqsmith
