#include "loqsmith/sheets/method_reading.hpp"
#include "loqsmith/sheets/method_rules.hpp"
#include "loqsmith/sheets/method_section.hpp"
#include "loqsmith/sheets/method_settings.hpp"
#include "loqsmith/sheets/read_sheets.hpp"

namespace loqsmith {
namespace {

TraceSelector trace_selector(const MethodElement& element) {
  using Kind = TraceSelector::Kind;
  const Section section(*element.rule, &element);
  TraceSelector selector;
  selector.id = section.value("id");
  selector.kind = section.pick<Kind>("kind", {{"any", Kind::Any},
                                              {"absorption", Kind::Absorption},
                                              {"emission", Kind::Emission},
                                              {"srm", Kind::Srm},
                                              {"sim", Kind::Sim},
                                              {"tic", Kind::Tic},
                                              {"extracted", Kind::Extracted}});
  selector.name = section.text("name").value_or("");
  selector.precursor_mz = section.optional_number("precursor");
  selector.product_mz = section.optional_number("product");
  selector.mz = section.optional_number("mz");
  selector.tolerance_ppm = section.optional_number("tolerance-ppm");
  if (const auto tolerance = section.optional_number("tolerance")) {
    selector.tolerance_mz = *tolerance;
  }
  return selector;
}

// `analyte` is where own settings may stand; null for internal standards.
TargetSettings target_settings(const MethodElement& element,
                               const MethodElement& method,
                               const MethodElement* analyte) {
  const Section section(*element.rule, &element);
  const auto own = [&](std::string_view name) {
    return analyte == nullptr ? nullptr : analyte->child(name);
  };
  TargetSettings target;
  target.id = section.value("id");
  target.trace = section.value("trace");
  target.retention_minutes = section.number("retention-time");
  target.window_minutes = section.number("window");
  target.integration =
      integration_settings(own("integration"), method.child("integration"));
  target.noise = noise_settings(own("noise"), method.child("noise"));
  return target;
}

ResponseKind response_kind(IntegrationSettings::Response response) {
  switch (response) {
    case IntegrationSettings::Response::Area:
      return ResponseKind::Area;
    case IntegrationSettings::Response::Height:
      return ResponseKind::Height;
    case IntegrationSettings::Response::Template:
      return ResponseKind::Template;
  }
  return ResponseKind::Area;
}

NoiseMeasure noise_measure(NoiseSettings::Measure measure) {
  switch (measure) {
    case NoiseSettings::Measure::HalfPeakToPeak:
      return NoiseMeasure::HalfPeakToPeak;
    case NoiseSettings::Measure::PeakToPeak:
      return NoiseMeasure::PeakToPeak;
    case NoiseSettings::Measure::StandardDeviation:
      return NoiseMeasure::StandardDeviation;
  }
  return NoiseMeasure::HalfPeakToPeak;
}

// What judging needs to know of how the target is measured.
void tell_judgement(AnalyteSettings& settings) {
  const IntegrationSettings& integration = settings.target.integration;
  settings.analyte = settings.target.id;
  settings.response = response_kind(integration.response);
  settings.bounds_own = integration.bounds == IntegrationSettings::Bounds::Own;
  settings.baseline_biased =
      integration.baseline != IntegrationSettings::Baseline::Valley;
  settings.noise_measure = noise_measure(settings.target.noise.measure);
}

AnalyteSettings analyte_settings(const MethodElement& analyte,
                                 const MethodElement& method) {
  AnalyteSettings settings;
  settings.target = target_settings(analyte, method, &analyte);
  tell_judgement(settings);
  const Section section(*analyte.rule, &analyte);
  settings.internal_standard = section.text("internal-standard").value_or("");
  if (const MethodElement* second = analyte.child("second-trace")) {
    const Section stated(*second->rule, second);
    settings.second_trace =
        SecondTraceRule{stated.number("ratio"), stated.number("tolerance")};
    settings.second_target = settings.target;
    settings.second_target->id += " (second trace)";
    settings.second_target->second_trace_of = settings.target.id;
    settings.second_target->trace = stated.value("trace");
  }
  settings.surrogate_concentration =
      section.optional_number("surrogate-concentration");
  settings.calibration = calibration_settings(analyte.child("calibration"),
                                              method.child("calibration"));
  const MethodElement* limits = analyte.child("limits");
  settings.limits =
      limit_settings(limits != nullptr ? *limits : *method.child("limits"));
  settings.acceptance = acceptance_settings(analyte.child("acceptance"),
                                            method.child("acceptance"));
  settings.reporting =
      reporting_settings(analyte.child("reporting"), method.child("reporting"));
  return settings;
}

Method build_method(const MethodElement& root) {
  Method method;
  const Section section(*root.rule, &root);
  method.id = section.value("id");
  method.revision = section.value("revision");
  if (const auto* title = root.child("title")) method.title = title->text;
  method.units = unit_settings(*root.child("units"));
  const Section traces(element_rule("traces"), root.child("traces"));
  method.time_unit_if_none = traces.text("time-unit").value_or("");
  method.checksum_required = traces.value("checksum") == "required";
  for (const MethodElement* trace : root.at_path("traces/trace")) {
    method.traces.push_back(trace_selector(*trace));
  }
  for (const MethodElement* standard :
       root.at_path("internal-standards/internal-standard")) {
    method.internal_standards.push_back(
        {target_settings(*standard, root, nullptr),
         Section(*standard->rule, standard).number("concentration")});
  }
  for (const MethodElement* analyte : root.at_path("analytes/analyte")) {
    method.analytes.push_back(analyte_settings(*analyte, root));
  }
  method.unsigned_amendments_accepted =
      Section(element_rule("amendments"), root.child("amendments"))
          .value("unsigned") == "accepted";
  method.defaults_used = defaults_used(root);
  return method;
}

}  // namespace

MethodReading read_method_sheet(std::string_view xml, const std::string& file) {
  MethodReading reading{read_method_tree(xml, file), std::nullopt};
  check_method_rules(reading.document);
  if (reading.document.problems.empty() && reading.document.has_root) {
    reading.method = build_method(reading.document.root);
  }
  return reading;
}

Method read_method(std::string_view xml, const std::string& file) {
  MethodReading reading = read_method_sheet(xml, file);
  if (!reading.method) throw InputError(reading.document.problems.sorted());
  return std::move(*reading.method);
}

}  // namespace loqsmith
