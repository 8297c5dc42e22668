#include "loqsmith/record/record_sections.hpp"

namespace loqsmith {
namespace {

// The mean shape and the noise that its weights follow.
void record_shape(JsonWriter& json, const WindowTemplate& window) {
  const TemplateShape& shape = window.shape;
  json.begin_object("shape");
  json.member("first_offset_minutes", -shape.left_minutes);
  json.member("step_minutes", shape.step_minutes);
  member_whole(json, "lessons", static_cast<int>(shape.lessons));
  json.member("noise", shape.noise);
  json.member("scatter", shape.scatter);
  json.begin_array("values");
  for (const double value : shape.values) json.value(value);
  json.end_array();
  json.begin_object("weights_noise");
  json.member("white_variance", window.weights_noise.white_variance);
  json.member("creeping_variance", window.weights_noise.creeping_variance);
  json.member("correlation", window.weights_noise.correlation);
  json.end_object();
  json.end_object();
}

void record_window(JsonWriter& json, const WindowTemplate& window) {
  json.member("left_minutes", window.left_minutes);
  json.member("right_minutes", window.right_minutes);
  json.member("width_half_minutes", window.width_half_minutes);
  if (window.sigma_minutes > 0.0) {
    json.member("sigma_minutes", window.sigma_minutes);
    json.member("tau_minutes", window.tau_minutes);
  }
  json.member("weak", window.weak);
  json.begin_array("teachers");
  for (const int injection : window.teachers) {
    json.value(std::int64_t{injection});
  }
  json.end_array();
  json.begin_array("drift");
  for (const auto& [injection, minutes] : window.drift) {
    json.begin_object();
    member_whole(json, "injection", injection);
    json.member("minutes", minutes);
    json.end_object();
  }
  json.end_array();
  if (!window.shape.empty()) record_shape(json, window);
}

}  // namespace

void record_templates(JsonWriter& json, const PublishedRun& run) {
  json.begin_array("templates");
  for (const TargetRecord& record : run.targets) {
    json.begin_object();
    json.member("target", record.target);
    if (record.window) {
      record_window(json, *record.window);
    } else {
      json.member("not_applicable", record.window.reason());
    }
    json.end_object();
  }
  json.end_array();
}

}  // namespace loqsmith
