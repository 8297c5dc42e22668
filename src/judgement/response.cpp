#include "loqsmith/judgement/response.hpp"

#include <algorithm>
#include <cstddef>

namespace loqsmith {
namespace {

// Below this part of the standards' mean an internal standard in a solvent
// blank is carry-over.
constexpr double kCarriedOver = 0.1;

std::optional<double> peak_response(const Peak& peak, ResponseKind measure) {
  switch (measure) {
    case ResponseKind::Area:
      return peak.area;
    case ResponseKind::Height:
      return peak.height;
    case ResponseKind::Template:
      // The template has unit area: where it does not fit, the area says the
      // same in the same unit, and the peak's reasons say that it does.
      if (peak.area_instead) return peak.area;
      return peak.template_response;
  }
  return std::nullopt;
}

bool carried_over(double internal_standard, const ResponseRule& rule) {
  return rule.mean_internal_standard &&
         internal_standard < kCarriedOver * *rule.mean_internal_standard;
}

/// What is to be careful of in the internal standard's own peak.
std::vector<std::string> internal_standard_reasons(const Peak& peak) {
  std::vector<std::string> reasons;
  for (const std::string& reason : peak.reasons) {
    if (reason == "saturated" || reason == "overlapped") {
      reasons.push_back("internal-standard-" + reason);
    }
  }
  return reasons;
}

Outcome<Response> ratio(Response response, const MeasuredInjection& measured,
                        const ResponseRule& rule) {
  const std::optional<double> own =
      undiluted_internal_standard(measured, rule.measure);
  const bool blank = measured.injection->role == Role::SolventBlank;
  if (own && !(blank && carried_over(*own, rule))) {
    response.value /= *own;
    response.divisor = *own;
    const auto more =
        internal_standard_reasons(measured.internal_standard->value());
    response.reasons.insert(response.reasons.end(), more.begin(), more.end());
    return response;
  }
  if (blank && rule.mean_internal_standard) {
    response.value /= *rule.mean_internal_standard;
    response.divisor = *rule.mean_internal_standard;
    response.reasons.push_back("mean-internal-standard");
    return response;
  }
  return NotApplicable{
      "internal-standard-missing: no peak of the internal standard above zero"};
}

}  // namespace

std::optional<double> undiluted_internal_standard(
    const MeasuredInjection& measured, ResponseKind measure) {
  if (!measured.internal_standard || !*measured.internal_standard) {
    return std::nullopt;
  }
  const Peak& peak = measured.internal_standard->value();
  std::optional<double> response = peak_response(peak, measure);
  // One that is measured by area itself is so in every injection.
  if (!response && measure == ResponseKind::Template) response = peak.area;
  if (!peak.found || !response || !(*response > 0.0)) return std::nullopt;
  return *response * measured.injection->internal_standard_dilution;
}

ResponseRule response_rule(const AnalyteRules& settings,
                           const std::vector<MeasuredInjection>& injections) {
  ResponseRule rule;
  rule.measure = settings.response;
  rule.has_internal_standard = !settings.internal_standard.empty();
  double sum = 0.0;
  std::size_t n = 0;
  for (const MeasuredInjection& measured : injections) {
    if (measured.injection->role != Role::Standard) continue;
    const auto response = undiluted_internal_standard(measured, rule.measure);
    if (!response) continue;
    sum += *response;
    ++n;
  }
  if (n > 0) rule.mean_internal_standard = sum / static_cast<double>(n);
  return rule;
}

Outcome<Response> response_of(const MeasuredInjection& measured,
                              const ResponseRule& rule) {
  if (!measured.peak) return NotApplicable{measured.peak.reason()};
  const Peak& peak = measured.peak.value();
  const std::optional<double> value = peak_response(peak, rule.measure);
  if (!value) return NotApplicable{"no-signal: response was not computed"};
  Response response{.value = *value, .reasons = peak.reasons};
  if (!rule.has_internal_standard) return response;
  return ratio(std::move(response), measured, rule);
}

}  // namespace loqsmith
