#include "loqsmith/sheets/method_section.hpp"
#include "loqsmith/sheets/method_settings.hpp"

namespace loqsmith {

IntegrationSettings integration_settings(const MethodElement* own,
                                         const MethodElement* shared) {
  using S = IntegrationSettings;
  const Section section(element_rule("integration"), own, shared);
  S settings;
  settings.response = section.pick<S::Response>(
      "response", {{"area", S::Response::Area},
                   {"height", S::Response::Height},
                   {"template", S::Response::Template}});
  settings.bounds = section.pick<S::Bounds>(
      "bounds", {{"template", S::Bounds::Template}, {"own", S::Bounds::Own}});
  settings.baseline = section.pick<S::Baseline>(
      "baseline",
      {{"valley", S::Baseline::Valley},
       {"asymmetric-least-squares", S::Baseline::AsymmetricLeastSquares},
       {"snip", S::Baseline::Snip}});
  settings.overlap =
      section.pick<S::Overlap>("overlap", {{"drop", S::Overlap::Drop},
                                           {"skim", S::Overlap::Skim},
                                           {"model", S::Overlap::Model}});
  settings.smoothing_points = section.whole("smoothing-points");
  settings.smoothing_order = section.whole("smoothing-order");
  settings.threshold = section.number("threshold");
  settings.minimum_width_minutes = section.number("minimum-width");
  settings.hold_up_minutes = section.optional_number("hold-up-time");
  return settings;
}

NoiseSettings noise_settings(const MethodElement* own,
                             const MethodElement* shared) {
  using S = NoiseSettings;
  const Section section(element_rule("noise"), own, shared);
  S settings;
  settings.source = section.pick<S::Source>(
      "source",
      {{"blank", S::Source::Blank}, {"baseline", S::Source::Baseline}});
  settings.measure = section.pick<S::Measure>(
      "measure", {{"half-peak-to-peak", S::Measure::HalfPeakToPeak},
                  {"peak-to-peak", S::Measure::PeakToPeak},
                  {"standard-deviation", S::Measure::StandardDeviation}});
  settings.span_widths = section.number("span");
  settings.drift = section.pick<S::Drift>(
      "drift", {{"kept", S::Drift::Kept}, {"removed", S::Drift::Removed}});
  return settings;
}

CalibrationSettings calibration_settings(const MethodElement* own,
                                         const MethodElement* shared) {
  using S = CalibrationSettings;
  const Section section(element_rule("calibration"), own, shared);
  S settings;
  settings.model = section.pick<S::Model>(
      "model", {{"linear", S::Model::Linear},
                {"quadratic", S::Model::Quadratic},
                {"response-factor", S::Model::ResponseFactor}});
  settings.weight =
      section.pick<S::Weight>("weight", {{"none", S::Weight::None},
                                         {"1/x", S::Weight::InverseX},
                                         {"1/x2", S::Weight::InverseXSquared},
                                         {"1/s2", S::Weight::InverseVariance}});
  settings.intercept = section.pick<S::Intercept>(
      "intercept",
      {{"fitted", S::Intercept::Fitted}, {"zero", S::Intercept::Zero}});
  settings.sets =
      section.pick<S::Sets>("sets", {{"one", S::Sets::One},
                                     {"bracketing", S::Sets::Bracketing},
                                     {"latest", S::Sets::Latest}});
  return settings;
}

}  // namespace loqsmith
