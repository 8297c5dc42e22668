#include <map>

#include "loqsmith/record/record_sections.hpp"

namespace loqsmith {
namespace {

struct Tally {
  std::size_t passed = 0;
  std::size_t failed = 0;
  std::size_t not_checked = 0;
};

std::vector<const CheckRow*> all_checks(const PublishedRun& run) {
  std::vector<const CheckRow*> checks;
  for (const CheckRow& check : run.sequence_checks) checks.push_back(&check);
  for (const AnalyteJudgement& analyte : run.analytes) {
    for (const CheckRow& check : analyte.checks) checks.push_back(&check);
  }
  return checks;
}

std::map<std::string, Tally> tally(const std::vector<const CheckRow*>& checks) {
  std::map<std::string, Tally> tallies;
  for (const CheckRow* check : checks) {
    Tally& entry = tallies[check->check];
    if (!check->passed) {
      ++entry.not_checked;
    } else {
      ++(*check->passed ? entry.passed : entry.failed);
    }
  }
  return tallies;
}

void record_failed(JsonWriter& json, const CheckRow& check) {
  json.begin_object();
  json.member("check", check.check);
  json.member("analyte", check.analyte);
  if (!check.set.empty()) json.member("set", check.set);
  if (check.injection) {
    member_whole(json, "injection", *check.injection);
  } else {
    json.member_null("injection");
  }
  json.member("value", check.value);
  json.member("low", check.low);
  json.member("high", check.high);
  json.member("unit", check.unit);
  json.member("action", check.action);
  json.member("affects", check.affects);
  json.member("note", check.note);
  json.end_object();
}

}  // namespace

void record_checks(JsonWriter& json, const PublishedRun& run) {
  const std::vector<const CheckRow*> checks = all_checks(run);
  json.begin_object("checks");
  json.begin_array("summary");
  for (const auto& [name, entry] : tally(checks)) {
    json.begin_object();
    json.member("check", name);
    member_count(json, "passed", entry.passed);
    member_count(json, "failed", entry.failed);
    member_count(json, "not_checked", entry.not_checked);
    json.end_object();
  }
  json.end_array();
  json.begin_array("failed");
  for (const CheckRow* check : checks) {
    if (check->passed == false) record_failed(json, *check);
  }
  json.end_array();
  json.end_object();
}

}  // namespace loqsmith
