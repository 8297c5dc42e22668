#include "loqsmith/ledger/line.hpp"

#include <algorithm>
#include <nlohmann/json.hpp>
#include <set>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/time.hpp"

namespace loqsmith {
namespace {

using Json = nlohmann::ordered_json;

constexpr int kMostDepth = 16;

const std::vector<std::string>& field_names() {
  static const std::vector<std::string> names = {
      "number", "time",   "actor",    "operator", "host",   "program",
      "action", "object", "manifest", "reason",   "detail", "previous"};
  return names;
}

std::string dump(const Json& json) {
  return json.dump(-1, ' ', false, Json::error_handler_t::replace);
}

// What the parser passes by and the finished value no longer shows: the order
// of the fields, keys given twice, and depth.
class Strictness {
 public:
  bool operator()(int depth, Json::parse_event_t event, const Json& value) {
    if (event == Json::parse_event_t::object_start) keys_[depth + 1].clear();
    if (event == Json::parse_event_t::key) {
      const auto& key = value.get_ref<const std::string&>();
      if (depth == 1) fields_.push_back(key);
      if (!keys_[depth].insert(key).second) twice_ = true;
    }
    if (depth > kMostDepth) too_deep_ = true;
    return !too_deep_;
  }

  std::string complaint() const {
    if (too_deep_) return "it is nested too deeply";
    if (twice_) return "it has a key twice";
    if (fields_ != field_names()) return "its fields are not those of a line";
    return {};
  }

 private:
  std::map<int, std::set<std::string>> keys_;
  std::vector<std::string> fields_;
  bool twice_ = false;
  bool too_deep_ = false;
};

std::string text_of(const Json& value) {
  return value.is_string() ? value.get<std::string>() : dump(value);
}

std::string wrong_kind(const Json& json) {
  if (!json["number"].is_number_unsigned()) return "its number is no number";
  if (!json["detail"].is_object()) return "its detail is no object";
  for (const auto& [key, value] : json.items()) {
    if (key != "number" && key != "detail" && !value.is_string()) {
      return "its " + key + " is no text";
    }
  }
  return {};
}

LedgerLine line_of(const Json& json) {
  LedgerLine line;
  line.number = json["number"].get<std::uint64_t>();
  line.time = text_of(json["time"]);
  line.actor = text_of(json["actor"]);
  line.operator_ = text_of(json["operator"]);
  line.host = text_of(json["host"]);
  line.program = text_of(json["program"]);
  line.action = text_of(json["action"]);
  line.object = text_of(json["object"]);
  line.manifest = text_of(json["manifest"]);
  line.reason = text_of(json["reason"]);
  for (const auto& [key, value] : json["detail"].items()) {
    line.detail.emplace_back(key, text_of(value));
  }
  line.previous = text_of(json["previous"]);
  return line;
}

std::string wrong_value(const LedgerLine& line) {
  const auto moment = parse_moment(line.time);
  if (!moment || !moment->has_zone) return "its time is no time with a zone";
  if (!is_sha256(line.previous)) return "its previous is no SHA-256";
  if (!line.manifest.empty() && !is_sha256(line.manifest)) {
    return "its manifest is no SHA-256";
  }
  return {};
}

}  // namespace

std::string ledger_line_text(const LedgerLine& line) {
  Json detail = Json::object();
  for (const auto& [key, value] : line.detail) detail[key] = value;
  Json json = Json::object();
  json["number"] = line.number;
  json["time"] = line.time;
  json["actor"] = line.actor;
  json["operator"] = line.operator_;
  json["host"] = line.host;
  json["program"] = line.program;
  json["action"] = line.action;
  json["object"] = line.object;
  json["manifest"] = line.manifest;
  json["reason"] = line.reason;
  json["detail"] = std::move(detail);
  json["previous"] = line.previous;
  return dump(json) + '\n';
}

Outcome<LedgerLine> read_ledger_line(std::string_view text) {
  Strictness strictness;
  const Json json =
      Json::parse(text, std::ref(strictness), /*allow_exceptions=*/false);
  if (json.is_discarded() || !json.is_object()) {
    return NotApplicable{"it is not one JSON object"};
  }
  std::string complaint = strictness.complaint();
  if (complaint.empty()) complaint = wrong_kind(json);
  if (!complaint.empty()) return NotApplicable{complaint};
  LedgerLine line = line_of(json);
  complaint = wrong_value(line);
  if (!complaint.empty()) return NotApplicable{complaint};
  return line;
}

std::string detail_of(const LedgerLine& line, std::string_view key) {
  for (const auto& [name, value] : line.detail) {
    if (name == key) return value;
  }
  return {};
}

std::string as_ledger_text(std::string_view text) {
  return Json::parse(dump(Json(std::string(text)))).get<std::string>();
}

bool is_sha256(std::string_view text) {
  return text.size() == 64 && std::all_of(text.begin(), text.end(), [](char c) {
           return (c >= '0' && c <= '9') || (c >= 'a' && c <= 'f');
         });
}

std::string describe(const LedgerPlace& place) {
  return std::to_string(place.number) + ':' + place.sha256;
}

std::optional<LedgerPlace> read_ledger_place(std::string_view text) {
  const std::size_t colon = text.find(':');
  if (colon == std::string_view::npos) return std::nullopt;
  const auto number = parse_whole(text.substr(0, colon));
  if (!number || *number < 1) return std::nullopt;
  LedgerPlace place{static_cast<std::uint64_t>(*number),
                    std::string(text.substr(colon + 1))};
  if (!is_sha256(place.sha256) || describe(place) != text) return std::nullopt;
  return place;
}

}  // namespace loqsmith
