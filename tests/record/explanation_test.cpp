// Steps of a derivation that the sample runs do not have: other models, limits
// of other procedures, a critical value, uncertainty, sets of other names.

#include "loqsmith/record/explanation.hpp"

#include <cmath>

#include "loqsmith/calibration/fit_calibration.hpp"
#include "loqsmith/calibration/inverse.hpp"
#include "loqsmith/limits/procedures.hpp"
#include "support/calculator.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

using Model = CalibrationSettings::Model;

const ExplanationLine* line_named(const ExplanationSection& section,
                                  const std::string& label) {
  for (const ExplanationLine& line : section.lines) {
    if (line.label == label) return &line;
  }
  return nullptr;
}

bool says(const ExplanationSection& section, const std::string& words) {
  for (const ExplanationLine& line : section.lines) {
    if (line.label.find(words) != std::string::npos) return true;
  }
  return false;
}

void expect_steps_hold(const ExplanationSection& section, std::size_t steps) {
  std::size_t held = 0;
  for (const ExplanationLine& line : section.lines) {
    if (line.expression.empty()) continue;
    EXPECT_TRUE(
        agrees_to_digits(calculate(line.expression), calculate(line.value), 14))
        << line.label << ": " << line.expression << " = " << line.value;
    ++held;
  }
  EXPECT_EQ(held, steps);
}

// Duplicates about 0.3 + 2 x + c x squared.
std::vector<StandardPoint> standards(double c) {
  std::vector<StandardPoint> points;
  int injection = 0;
  for (const double x : {1.0, 2.0, 5.0, 10.0, 20.0, 50.0}) {
    for (const double miss : {0.013, -0.017}) {
      StandardPoint point;
      point.injection = ++injection;
      point.concentration = x;
      point.response = 0.3 + 2.0 * x + c * x * x + miss * std::sqrt(x);
      points.push_back(point);
    }
  }
  return points;
}

Calibration fitted(Model model, double c = -0.004) {
  CalibrationSettings settings;
  settings.model = model;
  return fit_calibration(standards(c), settings).value();
}

PublishedAnalyte analyte_with(const Calibration& curve,
                              const std::string& model) {
  PublishedSet set;
  set.set = "1";
  set.model = model;
  set.intercept = curve.intercept;
  set.slope = curve.slope;
  set.curvature = curve.curvature;
  set.lowest = 1.0;
  set.highest = 50.0;
  PublishedAnalyte analyte;
  analyte.concentration_unit = "mg/L";
  analyte.sets.push_back(set);
  return analyte;
}

PublishedResult result_with(double response, double vial) {
  PublishedResult result;
  result.row.set = "1";
  result.row.response = response;
  result.row.vial_concentration = vial;
  return result;
}

TEST(Explanation, SolvesEachModelAsThePredictionDoes) {
  for (const auto& [model, name, steps] :
       {std::tuple(Model::Linear, "linear", 2U),
        std::tuple(Model::Quadratic, "quadratic", 3U),
        std::tuple(Model::ResponseFactor, "response-factor", 1U)}) {
    const Calibration curve = fitted(model);
    for (const double response : {-0.02, 0.31, 17.5, 88.0}) {
      const double vial =
          concentration_from_response(curve, response)->concentration;
      const ExplanationSection told =
          explain_curve(analyte_with(curve, name), result_with(response, vial));
      expect_steps_hold(told, steps);
      ASSERT_TRUE(line_named(told, "in the vial") != nullptr) << name;
    }
  }
}

TEST(Explanation, TakesTheAmountOfAStandardAdditionFromItsLine) {
  PublishedAnalyte analyte = analyte_with(fitted(Model::Linear), "linear");
  PublishedSet& set = analyte.sets.front();
  set.addition = set.intercept / set.slope;
  expect_steps_hold(explain_curve(analyte, result_with(3.0, *set.addition)), 1);
}

TEST(Explanation, SaysWhyThereIsNoConcentration) {
  PublishedAnalyte analyte = analyte_with(fitted(Model::Linear), "linear");
  PublishedResult result = result_with(1.0, 1.0);
  result.row.vial_concentration.reset();
  EXPECT_TRUE(says(explain_curve(analyte, result), "beyond the curve"));
  analyte.sets.front().not_applicable = "few-levels: 2";
  EXPECT_TRUE(says(explain_curve(analyte, result), "none: few-levels: 2"));
}

TEST(Explanation, ShowsEachFactorFromVialToSample) {
  PublishedResult result = result_with(1.0, 2.5);
  ResultDerivation& told = result.derivation;
  told.dilution = 5.0;
  told.final_volume = 20.0;
  told.sample_amount = 0.25;
  told.unit_factor = 0.001;
  told.sample_factor = 5.0 * 20.0 / 0.25 * 0.001;
  result.row.result = 2.5 * told.sample_factor;
  expect_steps_hold(explain_sample(result), 2);
  told.final_volume.reset();
  told.unit_factor = 1.0;
  told.sample_factor = 5.0;
  result.row.result = 12.5;
  EXPECT_TRUE(says(explain_sample(result), "dilution 5"));
  expect_steps_hold(explain_sample(result), 1);
}

LimitEvidence evidence() {
  LimitEvidence found;
  found.calibration = fitted(Model::Linear, 0.0);
  int injection = 20;
  for (const double response :
       {0.31, 0.27, 0.36, 0.33, 0.29, 0.30, 0.34, 0.28}) {
    found.blanks.push_back(
        {++injection, BlankKind::Solvent, response, false, ""});
    found.blanks.push_back(
        {++injection, BlankKind::Method, response + 0.01, false, ""});
    found.predicted_noise.push_back(
        {injection, BlankKind::Solvent, response / 10.0});
    found.spikes.push_back({injection, 0.2, 0.5 * response + 0.05, "", true});
  }
  for (const StandardPoint& point : found.calibration->points) {
    found.heights.push_back(
        {point.injection, point.concentration, 3.0 * point.response});
  }
  found.noise = 1.7;
  return found;
}

// The terms' names are the procedures' own: one that is renamed shows here.
TEST(Explanation, LimitsFollowFromTheirTerms) {
  ProcedureSettings offset;
  offset.name = "blank-deviation";
  offset.offset_blank_mean = true;
  std::vector<ProcedureSettings> procedures{offset};
  for (const char* name :
       {"blank-deviation", "calibration-residual", "intercept-deviation",
        "signal-to-noise", "noise-model", "low-level-precision"}) {
    procedures.emplace_back();
    procedures.back().name = name;
  }
  for (const NoiseMeasure measure :
       {NoiseMeasure::HalfPeakToPeak, NoiseMeasure::StandardDeviation}) {
    LimitEvidence known = evidence();
    known.noise_measure = measure;
    for (const ProcedureSettings& procedure : procedures) {
      const Outcome<LimitEstimate> estimate =
          find_limit_procedure(procedure.name)
              ->compute(known, LimitSettings{}, procedure);
      ASSERT_TRUE(estimate.has_value())
          << procedure.name << ": " << estimate.reason();
      for (const bool quantitation : {false, true}) {
        const std::string expression =
            limit_expression(*estimate, quantitation);
        ASSERT_FALSE(expression.empty()) << procedure.name;
        EXPECT_TRUE(agrees_to_digits(
            calculate(expression),
            quantitation ? *estimate->quantitation : *estimate->detection, 14))
            << procedure.name << ": " << expression;
      }
    }
  }
}

TEST(Explanation, ShowsNoEquationThatDoesNotHold) {
  LimitEvidence known = evidence();
  ProcedureSettings procedure;
  procedure.name = "blank-deviation";
  LimitEstimate estimate = find_limit_procedure(procedure.name)
                               ->compute(known, LimitSettings{}, procedure)
                               .value();
  *estimate.detection *= 1.0 + 1e-9;
  EXPECT_EQ(limit_expression(estimate, false), "");
  EXPECT_NE(limit_expression(estimate, true), "");
}

CheckRow check_standard(int injection, bool passed) {
  CheckRow row;
  row.check = "check-standard";
  row.analyte = "a";
  row.injection = injection;
  row.value = passed ? 100.5 : 80.25;
  row.low = 90.0;
  row.high = 110.0;
  row.unit = "%";
  row.passed = passed;
  row.action = "withhold";
  return row;
}

TEST(Explanation, NamesTheChecksThatStandAroundTheResult) {
  PublishedRecord record;
  for (const int injection : {3, 7, 15, 21}) {
    record.checks.push_back(check_standard(injection, injection != 15));
  }
  record.checks.push_back(check_standard(9, true));
  record.checks.back().analyte = "b";
  record.checks.push_back(check_standard(10, true));
  record.checks.back().note = "set 2: elsewhere";
  CheckRow saturation;
  saturation.check = "saturation";
  saturation.injection = 12;
  saturation.passed = false;
  record.checks.push_back(saturation);
  PublishedResult result;
  result.row.analyte = "a";
  result.row.set = "1";
  result.row.injection = 11;
  const ExplanationSection told = explain_checks(record, result);
  ASSERT_EQ(told.lines.size(), 2U);
  EXPECT_EQ(told.lines[0].label,
            "check-standard, injection 7: 100.5 %, allowed 90 to 110: passed");
  EXPECT_EQ(told.lines[1].label,
            "check-standard, injection 15: 80.25 %, allowed 90 to 110: "
            "failed, withhold");
}

// A surrogate is an analyte of its own, a control may stand far away.
TEST(Explanation, NamesEachFailedCheckThatIsAReason) {
  PublishedRecord record;
  for (const int injection : {3, 5, 7}) {
    record.checks.push_back(check_standard(injection, injection != 3));
    record.checks.back().check = "control";
  }
  for (const int injection : {10, 11}) {
    record.checks.push_back(check_standard(injection, false));
    record.checks.back().check = "surrogate";
    record.checks.back().analyte = "s";
  }
  PublishedResult result;
  result.row.analyte = "a";
  result.row.set = "1";
  result.row.injection = 11;
  EXPECT_EQ(explain_checks(record, result).lines.size(), 1U);
  result.row.reasons = {"control-failed", "surrogate-failed"};
  const ExplanationSection told = explain_checks(record, result);
  ASSERT_EQ(told.lines.size(), 3U);
  EXPECT_TRUE(says(told, "control, injection 3: 80.25 %"));
  EXPECT_TRUE(says(told, "control, injection 7: 100.5 %"));
  EXPECT_TRUE(says(told, "surrogate, injection 11: 80.25 %"));
}

}  // namespace
}  // namespace loqsmith::test
