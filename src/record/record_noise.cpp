#include "loqsmith/record/record_sections.hpp"

namespace loqsmith {
namespace {

void record_segments(JsonWriter& json, const Outcome<SegmentNoise>& segments) {
  json.begin_object("segments");
  if (segments) {
    member_count(json, "count", segments->segments);
    json.member("minutes", segments->segment_minutes);
    json.member("peak_to_peak", segments->peak_to_peak);
    json.member("drift_per_hour", segments->drift_per_hour);
  } else {
    json.member("not_applicable", segments.reason());
  }
  json.end_object();
}

void record_model(JsonWriter& json, const Outcome<NoiseModel>& model) {
  json.begin_object("whole_trace");
  if (model) {
    json.member("white_variance", model->white_variance);
    json.member("creeping_variance", model->creeping_variance);
    json.member("correlation", model->correlation);
  } else {
    json.member("not_applicable", model.reason());
  }
  json.end_object();
}

void record_blank(JsonWriter& json, int injection, const NoiseEstimate& noise) {
  json.begin_object();
  member_whole(json, "injection", injection);
  json.member("start_minutes", noise.start_minutes);
  json.member("end_minutes", noise.end_minutes);
  member_count(json, "points", noise.points);
  json.member("peak_to_peak", noise.peak_to_peak);
  json.member("standard_deviation", noise.standard_deviation);
  member_words(json, "reasons", noise.reasons);
  record_segments(json, noise.segments);
  record_model(json, noise.whole);
  json.end_object();
}

}  // namespace

void record_noise(JsonWriter& json, const PublishedRun& run) {
  json.begin_array("noise");
  for (const TargetRecord& record : run.targets) {
    json.begin_object();
    json.member("target", record.target);
    json.begin_array("blanks");
    for (const auto& [injection, noise] : record.blank_noise) {
      record_blank(json, injection, noise);
    }
    json.end_array();
    json.end_object();
  }
  json.end_array();
}

}  // namespace loqsmith
