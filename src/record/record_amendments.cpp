#include "loqsmith/record/record_sections.hpp"

namespace loqsmith {

void record_amendments(JsonWriter& json, const PublishedRun& run) {
  json.begin_array("amendments");
  for (const Amendment& amendment : run.amendments) {
    json.begin_object();
    member_count(json, "line", amendment.line);
    json.member("when", amendment.when);
    json.member("who", amendment.who);
    json.member("why", amendment.why);
    json.member("what", amendment_name(amendment.what));
    if (amendment.injection) {
      member_whole(json, "injection", *amendment.injection);
    } else {
      json.member_null("injection");
    }
    json.member("analyte", amendment.analyte);
    json.member("value", amendment.value);
    json.member("in_force", amendment.in_force);
    json.member("signed", false);
    json.end_object();
  }
  json.end_array();
}

void record_earlier_runs(JsonWriter& json, const PublishedRun& run) {
  json.begin_array("earlier_runs");
  for (const EarlierRun& earlier : run.earlier_runs) json.value(earlier.run);
  json.end_array();
  json.begin_array("reported_changes");
  for (const ReportedChange& change : run.reported_changes) {
    json.begin_object();
    member_whole(json, "injection", change.injection);
    json.member("analyte", change.analyte);
    json.member("was", change.was);
    json.member("is", change.is);
    json.end_object();
  }
  json.end_array();
  if (!run.not_compared.empty()) json.member("not_compared", run.not_compared);
}

}  // namespace loqsmith
