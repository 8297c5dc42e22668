#include "loqsmith/judgement/amendment.hpp"

#include <tuple>
#include <utility>

namespace loqsmith {
namespace {

using What = Amendment::What;

const std::vector<std::pair<std::string, What>>& words() {
  static const std::vector<std::pair<std::string, What>> all{
      {"exclude-standard", What::ExcludeStandard},
      {"integration-bounds", What::IntegrationBounds},
      {"invalid-injection", What::InvalidInjection},
      {"calibration-model", What::CalibrationModel},
      {"override-status", What::OverrideStatus},
      {"withdraw", What::Withdraw},
  };
  return all;
}

auto cells(const Amendment& a) {
  return std::tie(a.when, a.who, a.why, a.what, a.injection, a.analyte,
                  a.value);
}

}  // namespace

std::string amendment_name(What what) {
  for (const auto& [word, meaning] : words()) {
    if (meaning == what) return word;
  }
  return {};
}

std::optional<What> amendment_from_name(std::string_view name) {
  for (const auto& [word, meaning] : words()) {
    if (word == name) return meaning;
  }
  return std::nullopt;
}

std::vector<std::string> amendment_names() {
  std::vector<std::string> names;
  for (const auto& [word, meaning] : words()) names.push_back(word);
  return names;
}

std::string describe(const Amendment& amendment) {
  std::string text = amendment_name(amendment.what);
  if (amendment.injection) {
    text += ", injection " + std::to_string(*amendment.injection);
  }
  if (!amendment.analyte.empty()) text += ", " + amendment.analyte;
  if (!amendment.value.empty()) text += ": " + amendment.value;
  return text;
}

bool is_same_row(const Amendment& a, const Amendment& b) {
  return cells(a) == cells(b);
}

}  // namespace loqsmith
