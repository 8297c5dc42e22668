#include "loqsmith/sheets/vocabulary.hpp"

#include <algorithm>
#include <set>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "loqsmith/sheets/read_sheets.hpp"
#include "loqsmith/sheets/value_check.hpp"
#include "sheets/example.hpp"
#include "sheets/vocabulary_documents.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::same_bits;
using test::VocabularyDocument;

TEST(Vocabulary, KeysAndAttributesAreUnique) {
  std::set<std::string_view> keys;
  for (const ElementRule& element : method_vocabulary()) {
    EXPECT_TRUE(keys.insert(element.key).second) << element.key;
    EXPECT_FALSE(element.meaning.empty()) << element.key;
    std::set<std::string_view> names;
    for (const AttributeRule& attribute : element.attributes) {
      EXPECT_TRUE(names.insert(attribute.name).second) << attribute.name;
      EXPECT_FALSE(attribute.meaning.empty())
          << element.key << ' ' << attribute.name;
    }
  }
}

TEST(Vocabulary, EveryElementIsReachedFromTheRoot) {
  std::set<std::string_view> reached{"method"};
  for (const ElementRule& element : method_vocabulary()) {
    for (const ChildRule& child : element.children) {
      EXPECT_EQ(element_rule(child.key).key, child.key);
      reached.insert(child.key);
    }
  }
  EXPECT_EQ(reached.size(), method_vocabulary().size());
}

TEST(Vocabulary, DefaultsFitTheirOwnRules) {
  std::size_t defaults = 0;
  for (const ElementRule& element : method_vocabulary()) {
    for (const AttributeRule& attribute : element.attributes) {
      if (attribute.default_text.empty()) continue;
      ++defaults;
      EXPECT_FALSE(attribute.required) << element.key << attribute.name;
      EXPECT_FALSE(check_value(attribute.value, attribute.default_text))
          << element.key << ' ' << attribute.name;
    }
  }
  EXPECT_GT(defaults, 80U);
}

TEST(Vocabulary, AttributesOfTheRulesExist) {
  for (const GroupRule& group : method_groups()) {
    for (const std::string_view name : group.attributes) {
      EXPECT_NE(element_rule(group.element).attribute(name), nullptr) << name;
    }
  }
}

// What the method may ask for is what the limits room computes, and the other
// way round.
TEST(Vocabulary, ProceduresAreThoseThatAreComputed) {
  std::vector<std::string_view> names;
  for (const ChildRule& child : element_rule("limits").children) {
    names.push_back(child.key);
    const LimitProcedure* procedure = find_limit_procedure(child.key);
    ASSERT_NE(procedure, nullptr) << child.key;
    EXPECT_EQ(procedure->compute != nullptr,
              element_rule(child.key).availability == Availability::Now)
        << child.key;
  }
  EXPECT_EQ(names.size(), limit_procedures().size());
}

std::vector<InputProblem> problems_of(const std::string& text) {
  try {
    read_method(text, "method.xml");
  } catch (const InputError& error) {
    return error.problems();
  }
  return {};
}

TEST(Vocabulary, ReaderHoldsEveryRow) {
  const auto documents = test::vocabulary_documents();
  EXPECT_GT(documents.size(), 800U);
  for (const VocabularyDocument& document : documents) {
    const auto problems = problems_of(document.text);
    if (!document.fault) {
      EXPECT_EQ(problems.size(), document.in_later_element ? 1U : 0U)
          << document.name << '\n'
          << (problems.empty() ? "" : describe(problems.front()));
      continue;
    }
    const TextPlace place = line_column(document.text, *document.fault);
    const bool is_said = std::any_of(
        problems.begin(), problems.end(), [&](const InputProblem& problem) {
          return problem.line == place.line && problem.column == place.column &&
                 describe(problem).find(document.words) != std::string::npos;
        });
    EXPECT_TRUE(is_said) << document.name << '\n' << document.text;
  }
}

// The tests below hold the defaults of the table against those that stand
// beside the options themselves.

TEST(Vocabulary, DefaultsOfSignalAreThoseOfItsSettings) {
  const Method method = read_method(test::kSmallestMethod, "method.xml");
  const IntegrationSettings wanted;
  const IntegrationSettings& found = method.analytes[0].target.integration;
  EXPECT_EQ(found.response, wanted.response);
  EXPECT_EQ(found.bounds, wanted.bounds);
  EXPECT_EQ(found.baseline, wanted.baseline);
  EXPECT_EQ(found.overlap, wanted.overlap);
  EXPECT_EQ(found.smoothing_points, wanted.smoothing_points);
  EXPECT_EQ(found.smoothing_order, wanted.smoothing_order);
  EXPECT_TRUE(same_bits(found.threshold, wanted.threshold));
  EXPECT_TRUE(
      same_bits(found.minimum_width_minutes, wanted.minimum_width_minutes));
  EXPECT_EQ(found.hold_up_minutes, wanted.hold_up_minutes);

  const NoiseSettings wanted_noise;
  const NoiseSettings& noise = method.analytes[0].target.noise;
  EXPECT_EQ(noise.source, wanted_noise.source);
  EXPECT_EQ(noise.measure, wanted_noise.measure);
  EXPECT_TRUE(same_bits(noise.span_widths, wanted_noise.span_widths));
  EXPECT_EQ(noise.drift, wanted_noise.drift);

  EXPECT_TRUE(same_bits(method.analytes[0].target.window_minutes,
                        TargetSettings{}.window_minutes));
  EXPECT_TRUE(
      same_bits(method.traces[0].tolerance_mz, TraceSelector{}.tolerance_mz));
  EXPECT_EQ(method.traces[0].kind, TraceSelector{}.kind);
  EXPECT_TRUE(same_bits(method.units.factor, UnitSettings{}.factor));
  EXPECT_EQ(method.checksum_required, Method{}.checksum_required);
}

TEST(Vocabulary, DefaultsOfCalibrationAndReportingAreThoseOfTheirSettings) {
  const Method method = read_method(test::kSmallestMethod, "method.xml");
  const CalibrationSettings wanted;
  const CalibrationSettings& found = method.analytes[0].calibration;
  EXPECT_EQ(found.model, wanted.model);
  EXPECT_EQ(found.weight, wanted.weight);
  EXPECT_EQ(found.intercept, wanted.intercept);
  EXPECT_EQ(found.sets, wanted.sets);

  const ReportingSettings wanted_reporting;
  const ReportingSettings& reporting = method.analytes[0].reporting;
  EXPECT_EQ(reporting.significant_digits, wanted_reporting.significant_digits);
  EXPECT_EQ(reporting.decimals, wanted_reporting.decimals);
  EXPECT_EQ(reporting.rounding, wanted_reporting.rounding);
  EXPECT_EQ(reporting.below_detection, wanted_reporting.below_detection);
  EXPECT_EQ(reporting.below_quantitation, wanted_reporting.below_quantitation);
  EXPECT_EQ(reporting.reporting_limit, wanted_reporting.reporting_limit);
  EXPECT_EQ(reporting.relative_uncertainty,
            wanted_reporting.relative_uncertainty);
  EXPECT_EQ(reporting.letters, wanted_reporting.letters);
}

TEST(Vocabulary, DefaultsOfAcceptanceAreThoseOfItsSettings) {
  const Method none = read_method(test::kSmallestMethod, "method.xml");
  EXPECT_FALSE(none.analytes[0].acceptance.calibration.has_value());
  EXPECT_FALSE(none.analytes[0].acceptance.check_standard.has_value());

  const Method method =
      read_method(test::replaced(test::kSmallestMethod, "<limits>",
                                 "<acceptance><calibration/><check-standard "
                                 "recovery=\"85 115\"/></acceptance><limits>"),
                  "method.xml");
  const CalibrationAcceptance wanted;
  const auto& found = method.analytes[0].acceptance.calibration.value();
  EXPECT_EQ(found.action, wanted.action);
  EXPECT_EQ(found.minimum_levels, wanted.minimum_levels);
  EXPECT_EQ(found.minimum_r2, wanted.minimum_r2);
  EXPECT_EQ(found.maximum_relative_standard_error,
            wanted.maximum_relative_standard_error);
  EXPECT_EQ(found.back_calculation_percent, wanted.back_calculation_percent);
  EXPECT_EQ(found.back_calculation_lowest_percent,
            wanted.back_calculation_lowest_percent);
  EXPECT_TRUE(same_bits(found.minimum_accepted_percent,
                        wanted.minimum_accepted_percent));
  const CheckStandardAcceptance wanted_check;
  const auto& check = method.analytes[0].acceptance.check_standard.value();
  EXPECT_EQ(check.action, wanted_check.action);
  EXPECT_EQ(check.governs, wanted_check.governs);
}

TEST(Vocabulary, DefaultsOfLimitsAreThoseOfTheirSettings) {
  const Method method =
      read_method(test::replaced(test::kSmallestMethod, "<blank-deviation/>",
                                 "<blank-deviation/><calibration-residual/>"
                                 "<signal-to-noise/>"),
                  "method.xml");
  const LimitSettings wanted;
  const LimitSettings& found = method.analytes[0].limits;
  EXPECT_EQ(found.governing, wanted.governing);
  EXPECT_EQ(found.decision, wanted.decision);
  EXPECT_EQ(found.floor_at_lowest_standard, wanted.floor_at_lowest_standard);
  EXPECT_EQ(found.blanks, wanted.blanks);
  EXPECT_EQ(found.minimum_blanks, wanted.minimum_blanks);
  ASSERT_EQ(found.procedures.size(), 3U);
  const ProcedureSettings basic;
  for (const ProcedureSettings& one : found.procedures) {
    EXPECT_EQ(one.blanks, basic.blanks);
    EXPECT_TRUE(same_bits(one.detection_factor, basic.detection_factor));
    EXPECT_TRUE(same_bits(one.quantitation_factor, basic.quantitation_factor));
    EXPECT_EQ(one.offset_blank_mean, basic.offset_blank_mean);
    EXPECT_EQ(one.up_to, basic.up_to);
    EXPECT_TRUE(same_bits(one.detection_ratio, basic.detection_ratio));
    EXPECT_TRUE(same_bits(one.quantitation_ratio, basic.quantitation_ratio));
  }
}

}  // namespace
}  // namespace loqsmith
