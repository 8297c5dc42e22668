// `explain` for every published result of both sample runs: each step that it
// prints is computed again from the figures that stand in it, the result from
// nothing but printed figures, and the reported text from the printed value.

#include <nlohmann/json.hpp>
#include <set>
#include <sstream>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/rounding.hpp"
#include "support/calculator.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

// One printed step: "label: expression = value unit".
struct Step {
  std::string label;
  std::string expression;
  double value = 0.0;
  std::string unit;
};

// One printed derivation.
struct Derivation {
  std::vector<Step> steps;
  std::string text;

  const Step* step(const std::string& label) const {
    for (const Step& one : steps) {
      if (one.label == label) return &one;
    }
    return nullptr;
  }
};

Step read_step(const std::string& line, std::size_t equals) {
  const std::size_t colon = line.rfind(": ", equals);
  std::istringstream right(line.substr(equals + 3));
  Step step;
  step.label = line.substr(2, colon - 2);
  step.expression = line.substr(colon + 2, equals - colon - 2);
  right >> step.value >> step.unit;
  return step;
}

// By the injection's number, out of the program's output.
std::map<std::string, Derivation> read_derivations(const std::string& text) {
  std::map<std::string, Derivation> found;
  Derivation* open = nullptr;
  std::istringstream lines(text);
  for (std::string line; std::getline(lines, line);) {
    const std::size_t injection = line.find(", injection ");
    if (!line.starts_with("  ") && injection != std::string::npos) {
      std::istringstream number(line.substr(injection + 12));
      std::string name;
      number >> name;
      open = &found[name];
    }
    if (open == nullptr) continue;
    open->text += line + '\n';
    const std::size_t equals = line.find(" = ");
    if (line.starts_with("  ") && equals != std::string::npos) {
      open->steps.push_back(read_step(line, equals));
    }
  }
  return found;
}

// Two or three roundings lie between the step in the program and this one.
void expect_step_holds(const Step& step, const std::string& where) {
  const double again = calculate(step.expression);
  EXPECT_TRUE(within_condition(again, step.value, 8.0))
      << where << ": " << step.label << ": " << step.expression << " is "
      << again << ", not " << step.value;
}

// The figures of a step must be those that earlier steps gave: otherwise each
// might hold by itself and the whole lead nowhere.
void expect_chained(const Derivation& told, const SheetRow& row,
                    const std::string& where) {
  const Step* vial = told.step("in the vial");
  const Step* result = told.step("result");
  ASSERT_TRUE(vial && result) << where << '\n' << told.text;
  const Step* factor = told.step(
      "from vial to sample (dilution, final volume over amount of sample)");
  EXPECT_EQ(numbers_in(result->expression),
            (std::vector<double>{vial->value, factor != nullptr
                                                  ? factor->value
                                                  : number(row, "dilution")}))
      << where;
  EXPECT_EQ(vial->value, number(row, "vial_concentration")) << where;
  EXPECT_EQ(result->value, number(row, "result")) << where;
  EXPECT_EQ(result->unit, row.at("unit")) << where;
  const std::vector<double> solved = numbers_in(vial->expression);
  const Step* above = told.step("response less intercept");
  ASSERT_TRUE(above != nullptr) << where;
  EXPECT_EQ(solved.front(), above->value) << where;
  EXPECT_EQ(numbers_in(above->expression).front(), number(row, "response"))
      << where;
}

void expect_limits_in_sample(const Derivation& told, const SheetRow& row,
                             const std::string& where) {
  for (const auto& [label, column] :
       {std::pair("detection limit in the sample", "detection_limit"),
        std::pair("quantitation limit in the sample", "quantitation_limit")}) {
    const Step* step = told.step(label);
    ASSERT_TRUE(step != nullptr) << where << ": " << label;
    EXPECT_EQ(step->value, number(row, column)) << where;
  }
}

std::string after(const std::string& text, const std::string& words) {
  const std::size_t at = text.find(words);
  if (at == std::string::npos) return {};
  return text.substr(at + words.size(),
                     text.find('\n', at) - at - words.size());
}

// "reported: 0.0495, rounded (3 significant digits, a limit always up), gives
// \"< 0.0496\"".
void expect_rounded(const Derivation& told, const SheetRow& row,
                    const std::string& where) {
  std::istringstream line(after(told.text, "reported: "));
  double value = 0.0;
  line >> value;
  const std::string words = line.str();
  ASSERT_TRUE(holds(words, "3 significant digits")) << where << words;
  const bool below = row.at("status") == "not-detected";
  const bool above = row.at("status") == "above-range";
  const RoundingRule rule = below   ? RoundingRule::Up
                            : above ? RoundingRule::Down
                                    : RoundingRule::HalfEven;
  const std::string text = (below   ? "< "
                            : above ? "> "
                                    : "") +
                           round_to_significant(value, 3, rule);
  EXPECT_EQ(text, row.at("reported")) << where;
  EXPECT_TRUE(holds(words, "gives \"" + text + "\"")) << where << words;
}

void expect_derived(const Derivation& told, const SheetRow& row) {
  const std::string where = row_key(row);
  for (const Step& step : told.steps) expect_step_holds(step, where);
  expect_chained(told, row, where);
  expect_limits_in_sample(told, row, where);
  expect_rounded(told, row, where);
  EXPECT_TRUE(holds(told.text, "status " + row.at("status"))) << where;
  EXPECT_TRUE(holds(told.text, "the rule that decided: ")) << where;
}

fs::path published(const std::string& name, const TempFolder& place) {
  EXPECT_EQ(process(sample_run(name), place / "out", {"--no-report"}).status,
            0);
  return place / "out" / name / "run-0001";
}

ProgramRun explain(const fs::path& run, const std::string& sample,
                   const std::string& analyte,
                   const std::vector<std::string>& more = {}) {
  std::vector<std::string> arguments{"explain", run.string(), "--sample",
                                     sample,    "--analyte",  analyte};
  arguments.insert(arguments.end(), more.begin(), more.end());
  return run_program(LOQSMITH_PROGRAM, arguments);
}

// One start of the program a sample and analyte gives all its injections.
std::size_t derive_all(const fs::path& run) {
  const auto results = by_key(read_sheet(run / "results.csv"));
  std::set<std::pair<std::string, std::string>> pairs;
  for (const auto& [key, row] : results) {
    pairs.emplace(row.at("sample"), row.at("analyte"));
  }
  std::size_t derived = 0;
  for (const auto& [sample, analyte] : pairs) {
    const ProgramRun told = explain(run, sample, analyte);
    EXPECT_EQ(told.status, 0) << told.err;
    for (const auto& [injection, one] : read_derivations(told.out)) {
      expect_derived(one, results.at(injection + "/" + analyte));
      ++derived;
    }
  }
  EXPECT_EQ(derived, results.size());
  return derived;
}

TEST(Explain, EveryResultOfTheWellWaterMultipliesOut) {
  const TempFolder place;
  EXPECT_GT(derive_all(published(kWellWater, place)), 150U);
}

TEST(Explain, EveryResultOfTheCoatingMultipliesOut) {
  const TempFolder place;
  EXPECT_GT(derive_all(published(kTabletCoating, place)), 90U);
}

// What the response rests on must be the peaks that were published, and the
// file the one that was read.
TEST(Explain, NamesPeakFileAndInternalStandardAsPublished) {
  const TempFolder place;
  const fs::path run = published(kTabletCoating, place);
  const auto peaks = by_key(read_sheet(run / "peaks.csv"));
  const auto results = by_key(read_sheet(run / "results.csv"));
  for (const auto& [key, row] : results) {
    if (row.at("role") != "sample" || row.at("analyte") != "ethanol") continue;
    const ProgramRun told = explain(run, row.at("sample"), "ethanol",
                                    {"--injection", row.at("injection")});
    const auto derivations = read_derivations(told.out);
    ASSERT_EQ(derivations.size(), 1U) << told.err;
    const Derivation& one = derivations.at(row.at("injection"));
    const SheetRow& standard = peaks.at(row.at("injection") + "/butan-1-ol");
    const Step* undiluted = one.step("its area, undiluted");
    const Step* ratio = one.step("ratio of the peak's area to it");
    ASSERT_TRUE(undiluted && ratio) << told.out;
    EXPECT_EQ(numbers_in(undiluted->expression).front(),
              number(standard, "area"));
    EXPECT_EQ(
        numbers_in(ratio->expression),
        (std::vector<double>{number(peaks.at(key), "area"), undiluted->value}));
    EXPECT_EQ(ratio->value, number(row, "response"));
    const Step* foot = one.step("left foot");
    ASSERT_TRUE(foot != nullptr) << told.out;
    EXPECT_EQ(foot->value, number(peaks.at(key), "start"));
  }
  const auto record = nlohmann::json::parse(read_file(run / "record.json"));
  const std::string told = explain(run, "diluent", "ethanol").out;
  for (const auto& input : record["inputs"]) {
    if (input["path"] != "data/opening.animl") continue;
    EXPECT_TRUE(holds(told, "SHA-256 " + input["sha256"].get<std::string>()));
  }
  EXPECT_TRUE(holds(told, "shows no internal standard butan-1-ol"));
}

// Words as they are; numbers to 9 digits, as the last ones may differ on
// another class of processor.
bool same_line(const std::string& a, const std::string& b) {
  std::istringstream left(a);
  std::istringstream right(b);
  const auto bare = [](std::string word) {
    std::erase_if(word,
                  [](char c) { return c == '(' || c == ')' || c == ','; });
    return word;
  };
  for (std::string one, other;;) {
    const bool more = static_cast<bool>(left >> one);
    if (more != static_cast<bool>(right >> other)) return false;
    if (!more) return true;
    if (one == other) continue;
    const auto x = parse_number(bare(one));
    const auto y = parse_number(bare(other));
    if (!x || !y || !agrees_to_digits(*x, *y, 9)) return false;
  }
}

TEST(Explain, PrintsWhatTheReadmeShows) {
  const TempFolder place;
  const fs::path run = published(kWellWater, place);
  const std::string told =
      explain(run, "W-108", "simazine", {"--injection", "56"}).out;
  const std::string readme =
      read_file(fs::path(LOQSMITH_SOURCE_DIR) / "README.md");
  const std::size_t begin = readme.find("$ loqsmith explain");
  ASSERT_NE(begin, std::string::npos);
  std::istringstream shown(readme.substr(begin));
  std::string line;
  std::getline(shown, line);
  std::size_t lines = 0;
  for (; std::getline(shown, line) && !line.empty(); ++lines) {
    bool printed = false;
    std::istringstream all(told);
    for (std::string one; std::getline(all, one);) {
      printed = printed || same_line(one, line);
    }
    EXPECT_TRUE(printed) << line;
  }
  EXPECT_GE(lines, 8U);
}

TEST(Explain, SaysTheSameAsJson) {
  const TempFolder place;
  const fs::path run = published(kWellWater, place);
  const ProgramRun told = explain(run, "W-108", "simazine", {"--json"});
  ASSERT_EQ(told.status, 0) << told.err;
  const auto json = nlohmann::ordered_json::parse(told.out);
  EXPECT_EQ(json["run"], kWellWater + "/run-0001");
  const auto derivations =
      read_derivations(explain(run, "W-108", "simazine").out);
  ASSERT_EQ(json["results"].size(), derivations.size());
  for (const auto& result : json["results"]) {
    const std::string injection = std::to_string(int{result["injection"]});
    std::size_t steps = 0;
    for (const auto& section : result["derivation"]) {
      for (const auto& line : section) {
        if (!line.contains("expression")) continue;
        const Step& step = derivations.at(injection).steps.at(steps++);
        EXPECT_EQ(line["expression"], step.expression);
        EXPECT_EQ(line["text"], step.label);
      }
    }
    EXPECT_EQ(steps, derivations.at(injection).steps.size());
  }
}

TEST(Explain, SaysWhichNamesThereAre) {
  const TempFolder place;
  const fs::path run = published(kWellWater, place);
  struct Case {
    std::string sample, analyte;
    std::vector<std::string> more;
    std::string said;
  };
  const std::vector<Case> cases{
      {"W-10B", "simazine", {}, "unknown sample \"W-10B\"; did you mean"},
      {"W-108", "simazin", {}, "did you mean \"simazine\"?"},
      {"W-108", "zzz", {}, "there are: atrazine, diuron, simazine"},
      {"W-108", "simazine", {"--injection", "2"}, "none of sample"},
  };
  for (const Case& one : cases) {
    const ProgramRun wrong = explain(run, one.sample, one.analyte, one.more);
    EXPECT_EQ(wrong.status, 64) << one.said;
    EXPECT_TRUE(wrong.out.empty());
    EXPECT_TRUE(holds(wrong.err, one.said)) << wrong.err;
  }
}

TEST(Explain, RefusesWhatIsNotPublishedOrWasChanged) {
  const TempFolder place;
  const fs::path run = published(kWellWater, place);
  const auto refused = [&](const fs::path& folder, const std::string& said) {
    const ProgramRun told = explain(folder, "W-108", "simazine");
    EXPECT_EQ(told.status, 65);
    EXPECT_TRUE(told.out.empty());
    EXPECT_TRUE(holds(told.err, said)) << told.err;
  };
  refused(run.parent_path() / "run-0002", "no such folder");
  refused(sample_run(kWellWater), "no ledger.jsonl above it");
  refused(run.parent_path(), "the ledger does not name it");
  append_to_file(run / "peaks.csv", "\n");
  refused(run, "damaged: ");
}

}  // namespace
}  // namespace loqsmith::test
