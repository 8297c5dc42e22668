#include "loqsmith/record/record_json.hpp"

#include <ostream>

#include "loqsmith/record/record_sections.hpp"
#include "loqsmith/record/reportable.hpp"

namespace loqsmith {

void member_words(JsonWriter& json, std::string_view key,
                  const std::vector<std::string>& words) {
  json.begin_array(key);
  for (const std::string& word : words) json.value(word);
  json.end_array();
}

void member_whole(JsonWriter& json, std::string_view key, std::int64_t number) {
  json.member(key, number);
}

void member_count(JsonWriter& json, std::string_view key, std::size_t count) {
  json.member(key, static_cast<std::int64_t>(count));
}

void write_record(std::ostream& out, const PublishedRun& run) {
  JsonWriter json(out, 1);
  json.begin_object();
  member_whole(json, "record_version", 1);
  record_amendments(json, run);
  record_provenance(json, run);
  record_earlier_runs(json, run);
  json.member("needs_a_person", needs_a_person(run));
  record_templates(json, run);
  record_noise(json, run);
  record_analytes(json, run);
  record_reportable(json, run);
  record_checks(json, run);
  json.end_object();
  out << '\n';
}

}  // namespace loqsmith
