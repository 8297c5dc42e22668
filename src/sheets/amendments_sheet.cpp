#include "loqsmith/sheets/amendments_sheet.hpp"

#include <algorithm>
#include <cctype>
#include <limits>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/time.hpp"

namespace loqsmith {
namespace {

using What = Amendment::What;

const std::vector<SheetColumn>& columns() {
  static const std::vector<SheetColumn> all{
      {"when", true}, {"who", true}, {"why", true}, {"what", true},
      {"injection"},  {"analyte"},   {"value"},
  };
  return all;
}

std::vector<std::string> words_of(const std::string& text) {
  std::vector<std::string> words = split(text, ' ');
  std::erase_if(words, [](const std::string& word) { return word.empty(); });
  return words;
}

// A word holds a letter of any script; dashes and dots say nothing.
bool says_something(const std::string& word) {
  return std::any_of(word.begin(), word.end(), [](unsigned char c) {
    return c >= 0x80 || std::isalnum(c) != 0;
  });
}

template <class T>
using Words = std::vector<std::pair<std::string, T>>;

template <class T>
std::optional<T> meaning(const Words<T>& words, const std::string& word) {
  for (const auto& [known, value] : words) {
    if (known == word) return value;
  }
  return std::nullopt;
}

class AmendmentReader {
 public:
  AmendmentReader(AmendmentsSheet& sheet, std::size_t row)
      : sheet_(sheet), row_(row) {}

  Amendment read() {
    const SheetCell when = sheet_.table.cell(row_, "when");
    read_.line = when.line;
    read_.when = when.text;
    read_.who = text("who");
    read_.why = text("why");
    read_.analyte = text("analyte");
    read_.value = text("value");
    check_time();
    check_reason();
    read_injection();
    const auto what = amendment_from_name(text("what"));
    if (what) {
      read_.what = *what;
      read_kind();
    } else if (!text("what").empty()) {
      add("what", in_quotes(text("what")),
          "one of " + join(amendment_names(), ", "), "use one of these words");
    }
    return std::move(read_);
  }

 private:
  std::string text(std::string_view column) const {
    return sheet_.table.cell(row_, column).text;
  }

  void add(std::string_view column, std::string found, std::string expected,
           std::string mend) {
    sheet_.add(row_, column, std::move(found), std::move(expected),
               std::move(mend));
  }

  void check_time() {
    if (read_.when.empty()) return;
    const auto moment = parse_moment(read_.when);
    if (moment && moment->has_zone) return;
    add("when", in_quotes(read_.when), "a time with its zone (RFC 3339)",
        "write it like 2026-03-01T08:15:00Z or 2026-03-01T09:15:00+01:00");
  }

  void check_reason() {
    if (read_.why.empty()) return;
    const std::vector<std::string> words = words_of(read_.why);
    if (std::count_if(words.begin(), words.end(), says_something) >= 2) return;
    add("why", in_quotes(read_.why), "a reason of at least two words",
        "say why, so that somebody else can follow it");
  }

  void read_injection() {
    const std::string written = text("injection");
    if (written.empty()) return;
    const auto number = parse_whole(written);
    if (number && *number >= 1 && *number <= std::numeric_limits<int>::max()) {
      read_.injection = static_cast<int>(*number);
      return;
    }
    add("injection", in_quotes(written), "a number of the sequence sheet", "");
  }

  void wants(std::string_view column, bool wanted) {
    const std::string written = text(column);
    const std::string what = amendment_name(read_.what);
    if (wanted && written.empty()) {
      add(column, "is empty", "what the row is about, for " + what,
          "fill it in");
    }
    if (!wanted && !written.empty()) {
      add(column, in_quotes(written), "an empty cell for " + what,
          "leave it empty");
    }
  }

  void read_kind() {
    switch (read_.what) {
      case What::ExcludeStandard:
        wants("injection", true);
        wants("value", false);
        return;
      case What::InvalidInjection:
        wants("injection", true);
        wants("analyte", false);
        wants("value", false);
        return;
      case What::IntegrationBounds:
        wants("injection", true);
        wants("analyte", true);
        read_bounds();
        return;
      case What::CalibrationModel:
        wants("injection", false);
        wants("analyte", true);
        read_model();
        return;
      case What::OverrideStatus:
        wants("injection", true);
        wants("analyte", true);
        read_status();
        return;
      case What::Withdraw:
        read_withdrawn();
        return;
    }
  }

  void refuse_value(const std::string& expected) {
    add("value", in_quotes(read_.value), expected, "");
  }

  void read_bounds() {
    const std::vector<std::string> words = words_of(read_.value);
    const auto start =
        words.size() == 2 ? parse_number(words[0]) : std::nullopt;
    const auto end = words.size() == 2 ? parse_number(words[1]) : std::nullopt;
    if (!start || !end || !(*start >= 0.0) || !(*end > *start)) {
      refuse_value("start and end in minutes, like 3.31 3.52");
      return;
    }
    read_.start_minutes = *start;
    read_.end_minutes = *end;
  }

  void read_model() {
    using S = CalibrationSettings;
    static const Words<S::Model> kModels{
        {"linear", S::Model::Linear},
        {"quadratic", S::Model::Quadratic},
        {"response-factor", S::Model::ResponseFactor}};
    static const Words<S::Weight> kWeights{
        {"none", S::Weight::None},
        {"1/x", S::Weight::InverseX},
        {"1/x2", S::Weight::InverseXSquared},
        {"1/s2", S::Weight::InverseVariance}};
    static const Words<S::Intercept> kIntercepts{
        {"fitted", S::Intercept::Fitted}, {"zero", S::Intercept::Zero}};
    const std::vector<std::string> words = words_of(read_.value);
    const bool fits = words.size() == 2 || words.size() == 3;
    const auto model =
        fits ? meaning(kModels, words[0]) : std::optional<S::Model>{};
    const auto weight =
        fits ? meaning(kWeights, words[1]) : std::optional<S::Weight>{};
    if (words.size() == 3) read_.intercept = meaning(kIntercepts, words[2]);
    if (!model || !weight || (words.size() == 3 && !read_.intercept)) {
      refuse_value(
          "model and weight, like linear 1/x, and where wanted the intercept, "
          "like linear none zero");
      return;
    }
    read_.calibration.model = *model;
    read_.calibration.weight = *weight;
  }

  void read_status() {
    std::vector<std::string> known;
    for (const Status status :
         {Status::NotDetected, Status::Estimated, Status::Reportable,
          Status::AboveRange, Status::Withheld}) {
      known.push_back(status_name(status));
      if (known.back() != read_.value) continue;
      read_.status = status;
      return;
    }
    refuse_value("one of " + join(known, ", "));
  }

  void read_withdrawn() {
    const auto withdrawn = amendment_from_name(read_.value);
    if (withdrawn && *withdrawn != What::Withdraw) {
      read_.withdrawn = *withdrawn;
      return;
    }
    refuse_value("the word of the row that is taken back");
  }

  AmendmentsSheet& sheet_;
  std::size_t row_;
  Amendment read_;
};

AmendmentsSheet open_sheet(std::string_view csv, const std::string& file) {
  SheetProblems problems(file);
  SheetTable table(csv, columns(), problems);
  return {{std::move(problems), std::move(table)}, {}};
}

}  // namespace

AmendmentsSheet read_amendments_sheet(std::string_view csv,
                                      const std::string& file) {
  AmendmentsSheet sheet = open_sheet(csv, file);
  for (std::size_t row = 0; row < sheet.table.rows(); ++row) {
    sheet.entries.push_back(AmendmentReader(sheet, row).read());
  }
  return sheet;
}

}  // namespace loqsmith
