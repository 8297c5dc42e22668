#include "loqsmith/record/record_sections.hpp"

namespace loqsmith {
namespace {

void record_program(JsonWriter& json, const PublishedRun& run) {
  json.begin_object("program");
  json.member("name", "loqsmith");
  json.member("version", run.program_version);
  json.member("build", run.build);
  json.member("processor_class", run.processor_class);
  json.end_object();
}

void record_units(JsonWriter& json, const UnitSettings& units) {
  json.begin_object("units");
  json.member("concentration", units.concentration);
  json.member("result", units.result);
  json.member("factor", units.factor);
  json.member("sample_amount", units.sample_amount);
  json.member("final_volume", units.final_volume);
  json.end_object();
}

void record_method(JsonWriter& json, const Method& method) {
  json.begin_object("method");
  json.member("id", method.id);
  json.member("revision", method.revision);
  json.member("title", method.title);
  record_units(json, method.units);
  json.begin_array("defaults_used");
  for (const DefaultUsed& used : method.defaults_used) {
    json.begin_object();
    json.member("element", used.element);
    json.member("attribute", used.attribute);
    json.member("value", used.value);
    json.end_object();
  }
  json.end_array();
  json.end_object();
}

void record_input(JsonWriter& json, const InputFile& file) {
  json.begin_object();
  json.member("path", file.path);
  if (file.sha256.empty()) {
    json.member_null("sha256");
  } else {
    json.member("sha256", file.sha256);
  }
  member_whole(json, "bytes", static_cast<std::int64_t>(file.bytes));
  json.member("format", file.format);
  member_words(json, "warnings", file.warnings);
  json.end_object();
}

void record_problem(JsonWriter& json, int injection,
                    const InputProblem& problem) {
  json.begin_object();
  member_whole(json, "injection", injection);
  json.member("file", problem.file);
  member_count(json, "line", problem.line);
  member_count(json, "column", problem.column);
  json.member("found", problem.found);
  json.member("expected", problem.expected);
  json.member("mend", problem.mend);
  json.end_object();
}

}  // namespace

void record_provenance(JsonWriter& json, const PublishedRun& run) {
  record_program(json, run);
  json.begin_object("sequence");
  json.member("name", run.sequence.name);
  member_count(json, "injections", run.sequence.injections.size());
  json.end_object();
  member_whole(json, "run", run.run_number);
  json.member("begun", run.begun);
  json.member("finished", run.finished);
  json.member("ledger_head", run.ledger_head);
  record_method(json, run.method);
  json.begin_array("inputs");
  for (const InputFile& file : run.inputs) record_input(json, file);
  json.end_array();
  json.begin_array("problems");
  for (const auto& [injection, problem] : run.problems) {
    record_problem(json, injection, problem);
  }
  json.end_array();
}

}  // namespace loqsmith
