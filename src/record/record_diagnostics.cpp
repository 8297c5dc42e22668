#include "loqsmith/record/record_sections.hpp"
#include "loqsmith/record/words.hpp"

namespace loqsmith {
namespace {

void record_test(JsonWriter& json, const NamedDiagnostic& named) {
  json.begin_object();
  json.member("test", named.name);
  if (named.outcome) {
    const DiagnosticTest& test = *named.outcome;
    json.member("statistic", test.statistic);
    json.member("critical", test.critical);
    json.member("degrees_1", test.degrees_1);
    json.member("degrees_2", test.degrees_2);
    json.member("p", test.p);
    json.member("passed", test.passed);
    json.member("concentration", test.concentration);
    if (test.injection) member_whole(json, "injection", *test.injection);
    json.member("meaning", test.meaning);
  } else {
    json.member("not_applicable", named.outcome.reason());
  }
  json.end_object();
}

void record_influence(JsonWriter& json,
                      const std::vector<PointInfluence>& points) {
  json.begin_array("influence");
  for (const PointInfluence& point : points) {
    json.begin_object();
    member_whole(json, "injection", point.injection);
    json.member("leverage", point.leverage);
    json.member("standardised_residual", point.standardised_residual);
    json.member("deleted_residual", point.deleted_residual);
    json.member("cooks_distance", point.cooks_distance);
    json.end_object();
  }
  json.end_array();
}

void record_weights(JsonWriter& json, const WeightAdvice& advice) {
  json.begin_object("weights");
  json.begin_array("candidates");
  for (const WeightCandidate& one : advice.candidates) {
    json.begin_object();
    json.member("weight", weight_word(one.weight));
    if (one.sum_relative_error_percent) {
      json.member("sum_relative_error_percent",
                  *one.sum_relative_error_percent);
    } else {
      json.member("not_applicable", one.sum_relative_error_percent.reason());
    }
    json.end_object();
  }
  json.end_array();
  json.member("advises_change", advice.advises_change);
  json.member("advice", advice.advice);
  json.end_object();
}

void record_suggestions(JsonWriter& json,
                        const std::vector<SuggestedExclusion>& suggested) {
  json.begin_array("suggested_exclusions");
  for (const SuggestedExclusion& one : suggested) {
    json.begin_object();
    member_whole(json, "injection", one.injection);
    json.member("level", one.level);
    json.member("why", one.why);
    json.begin_object("without");
    if (one.without) {
      json.member("intercept", one.without->intercept);
      json.member("slope", one.without->slope);
      json.member("curvature", one.without->curvature);
      json.member("residual_sd", one.without->residual_sd);
      json.member("r2", one.without->r2);
    } else {
      json.member("not_applicable", one.without.reason());
    }
    json.end_object();
    json.end_object();
  }
  json.end_array();
}

}  // namespace

void record_diagnostics(JsonWriter& json,
                        const Outcome<CalibrationDiagnostics>& diagnostics) {
  json.begin_object("diagnostics");
  if (diagnostics) {
    json.begin_array("tests");
    for (const NamedDiagnostic& test : diagnostics->tests) {
      record_test(json, test);
    }
    json.end_array();
    record_influence(json, diagnostics->influence);
    if (diagnostics->drift) {
      json.member("drift_percent_per_injection",
                  diagnostics->drift->percent_per_injection);
    }
    record_weights(json, diagnostics->weights);
    record_suggestions(json, diagnostics->suggested_exclusions);
  } else {
    json.member("not_applicable", diagnostics.reason());
  }
  json.end_object();
}

}  // namespace loqsmith
