#pragma once

#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"
#include "loqsmith/judgement/judge_analyte.hpp"

namespace loqsmith {

/// What calibration, limits and results are computed from.
struct Response {
  /// Signal unit x minute (area), signal unit (height), or the ratio to the
  /// internal standard (no unit). Signed.
  double value = 0.0;
  /// What the peak's own response was divided by; its predicted noise is to be
  /// divided likewise. 1 without internal standard.
  double divisor = 1.0;
  /// Words that say what to be careful of, of the peak and of its internal
  /// standard ("internal-standard-saturated").
  std::vector<std::string> reasons;
};

/// How the responses of one analyte are formed, the same for every injection.
struct ResponseRule {
  ResponseKind measure = ResponseKind::Area;
  bool has_internal_standard = false;
  /// Mean of the standards' internal-standard responses, each referred to the
  /// undiluted internal standard; nothing: no standard shows one.
  std::optional<double> mean_internal_standard;
};

/// Response of the injection's internal standard, referred to the undiluted
/// one (see response_of()); nothing where no peak of it stands above zero.
std::optional<double> undiluted_internal_standard(
    const MeasuredInjection& measured, ResponseKind measure);

ResponseRule response_rule(const AnalyteRules& settings,
                           const std::vector<MeasuredInjection>& injections);

/// The response of one injection. With an internal standard
///
///     response = A / (A_is d)
///
/// where A and A_is are the two peaks' responses and d is the sheet's
/// internal_standard_dilution. The internal standard goes into every vial at
/// the same concentration C_is. In a vial whose content was diluted d-fold
/// afterwards it stands at C_is / d, so A_is = r C_is / d and A_is d = r C_is:
/// what the detector, at this injection's own sensitivity r, would have shown
/// of the undiluted internal standard. With A = r_a c the response is
/// (r_a / r) c / C_is: proportional to the analyte's concentration c in *this*
/// vial, whatever the injected volume. The calibration in concentration holds
/// as it stands, and the sheet's `dilution` leads from c back to the sample.
/// C_is is the same everywhere, cancels, and is therefore not divided by.
///
/// A solvent blank usually contains no internal standard. Where it shows none,
/// or less than a tenth of the standards' mean (which is carry-over, not an
/// addition), its response is divided by that mean instead, with the reason
/// "mean-internal-standard".
///
/// With the template response an injection whose shape differs is represented
/// by its area, which has the same unit and scale, with the peak's reason.
///
/// @return not applicable, beginning with a reason word: the peak's own reason,
///         "internal-standard-missing" (not measured, not found, not above
///         zero), "no-signal" (a response that was not computed).
///
/// Source: internal standard calibration as in US EPA SW-846 method 8000D,
/// with the internal standard's own dilution added; from memory.
Outcome<Response> response_of(const MeasuredInjection& measured,
                              const ResponseRule& rule);

}  // namespace loqsmith
