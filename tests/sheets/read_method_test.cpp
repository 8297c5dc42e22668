#include <algorithm>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/sheets/read_sheets.hpp"
#include "sheets/example.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::kExampleMethod;
using test::kSmallestMethod;
using test::replaced;
using test::same_bits;

std::string default_of(const Method& method, const std::string& element,
                       const std::string& attribute) {
  for (const DefaultUsed& used : method.defaults_used) {
    if (used.element == element && used.attribute == attribute) {
      return used.value;
    }
  }
  return "(none)";
}

TEST(ReadMethod, ExampleHasTheValuesItStates) {
  const Method method = read_method(kExampleMethod, "method.xml");
  EXPECT_EQ(method.id, "well-water-herbicides");
  EXPECT_EQ(method.revision, "3");
  EXPECT_EQ(method.title, "Herbicides in well water, direct injection");
  EXPECT_EQ(method.units.concentration, "ug/L");
  EXPECT_EQ(method.time_unit_if_none, "");
  EXPECT_TRUE(method.checksum_required);

  ASSERT_EQ(method.traces.size(), 2U);
  EXPECT_EQ(method.traces[0].kind, TraceSelector::Kind::Absorption);
  EXPECT_EQ(method.traces[0].name, "220");
  EXPECT_EQ(method.traces[1].kind, TraceSelector::Kind::Srm);
  EXPECT_TRUE(same_bits(method.traces[1].precursor_mz.value(), 233.1));
  EXPECT_TRUE(same_bits(method.traces[1].product_mz.value(), 72.1));
  EXPECT_TRUE(same_bits(method.traces[1].tolerance_mz, 0.3));
  EXPECT_EQ(method.trace("diuron"), &method.traces[1]);
  EXPECT_EQ(method.trace("nothing"), nullptr);

  const InternalStandardSettings* standard = method.internal_standard("is1");
  ASSERT_NE(standard, nullptr);
  EXPECT_TRUE(same_bits(standard->concentration, 50.0));
  EXPECT_TRUE(same_bits(standard->target.retention_minutes, 5.1));
  EXPECT_TRUE(same_bits(standard->target.window_minutes, 0.2));
}

TEST(ReadMethod, AnalyteReplacesAttributeByAttribute) {
  const std::string text =
      replaced(kExampleMethod, R"(<calibration model="linear" weight="1/x"/>)",
               R"(<calibration weight="1/x"/>
      <integration threshold="6"/>
      <reporting decimals="2" reporting-limit="0.5"><letter status="estimated" code="j"/></reporting>
      <acceptance><calibration minimum-levels="4"/></acceptance>)");
  const Method method =
      read_method(replaced(replaced(replaced(text, "<reporting significant-",
                                             "<reporting relative-uncertainty="
                                             "\"24\" significant-"),
                                    R"(model="linear" weight="none")",
                                    R"(model="quadratic")"),
                           R"(<integration response="area")",
                           R"(<integration response="height")"),
                  "method.xml");
  ASSERT_EQ(method.analytes.size(), 2U);
  const AnalyteSettings& simazine = method.analytes[0];
  const AnalyteSettings& atrazine = method.analytes[1];
  EXPECT_EQ(simazine.internal_standard, "");
  EXPECT_EQ(atrazine.internal_standard, "is1");

  using Calibration = CalibrationSettings;
  EXPECT_EQ(simazine.calibration.weight, Calibration::Weight::None);
  EXPECT_EQ(simazine.calibration.model, Calibration::Model::Quadratic);
  EXPECT_EQ(atrazine.calibration.weight, Calibration::Weight::InverseX);
  EXPECT_EQ(atrazine.calibration.model, Calibration::Model::Quadratic);

  using Response = IntegrationSettings::Response;
  EXPECT_EQ(atrazine.target.integration.response, Response::Height);
  EXPECT_TRUE(same_bits(atrazine.target.integration.threshold, 6.0));
  EXPECT_TRUE(same_bits(simazine.target.integration.threshold, 4.0));

  EXPECT_EQ(simazine.acceptance.calibration->minimum_levels, 5);
  EXPECT_EQ(atrazine.acceptance.calibration->minimum_levels, 4);
  EXPECT_TRUE(
      same_bits(atrazine.acceptance.calibration->minimum_r2.value(), 0.99));
  ASSERT_TRUE(atrazine.acceptance.check_standard.has_value());
  EXPECT_TRUE(
      same_bits(atrazine.acceptance.check_standard->recovery.high, 115.0));

  // Decimals of the analyte displace the method's significant digits.
  EXPECT_EQ(atrazine.reporting.decimals, 2);
  EXPECT_FALSE(simazine.reporting.decimals.has_value());
  EXPECT_EQ(atrazine.reporting.reporting_limit, 0.5);
  EXPECT_FALSE(simazine.reporting.reporting_limit.has_value());
  EXPECT_EQ(atrazine.reporting.relative_uncertainty, 24.0);
  EXPECT_EQ(simazine.reporting.relative_uncertainty, 24.0);
  EXPECT_EQ(atrazine.reporting.letters.at("estimated"), "j");
  EXPECT_TRUE(simazine.reporting.letters.empty());
}

TEST(ReadMethod, SetsOfStandards) {
  using Sets = CalibrationSettings::Sets;
  const std::pair<const char*, Sets> kinds[] = {
      {"one", Sets::One},
      {"bracketing", Sets::Bracketing},
      {"latest", Sets::Latest}};
  for (const auto& [word, sets] : kinds) {
    const Method method = read_method(
        replaced(kExampleMethod, R"(weight="1/x"/>)",
                 std::string(R"(weight="1/x" sets=")") + word + R"("/>)"),
        "method.xml");
    ASSERT_EQ(method.analytes.size(), 2U);
    EXPECT_EQ(method.analytes[0].calibration.sets, Sets::One) << word;
    EXPECT_EQ(method.analytes[1].calibration.sets, sets) << word;
  }
}

TEST(ReadMethod, ClosenessOfRepeats) {
  const auto closeness = [](const char* element) {
    const Method method =
        read_method(replaced(kExampleMethod, "<check-standard ",
                             element + std::string("<check-standard ")),
                    "method.xml");
    return method.analytes[0].acceptance.closeness;
  };
  EXPECT_FALSE(closeness(""));
  const auto defaults = closeness("<closeness/>");
  ASSERT_TRUE(defaults.has_value());
  EXPECT_EQ(defaults->action, CheckAction::Withhold);
  EXPECT_TRUE(same_bits(defaults->replicates, 20.0));
  const auto given = closeness("<closeness replicates=\"8\" action=\"flag\"/>");
  ASSERT_TRUE(given.has_value());
  EXPECT_EQ(given->action, CheckAction::Flag);
  EXPECT_TRUE(same_bits(given->replicates, 8.0));
}

TEST(ReadMethod, ChecksOfKnownAmounts) {
  const Method method = read_method(
      replaced(kExampleMethod, "<check-standard ",
               "<second-source recovery=\"70 130\" action=\"flag\"/>"
               "<control recovery=\"80 120\"/>"
               "<fortified relative-difference=\"20\" native-ratio=\"3\"/>"
               "<duplicate relative-difference=\"25\"/>"
               "<surrogate recovery=\"60 140\"/><check-standard "),
      "method.xml");
  const AcceptanceSettings& accept = method.analytes[0].acceptance;
  ASSERT_TRUE(accept.second_source && accept.control && accept.fortified &&
              accept.duplicate);
  EXPECT_EQ(accept.second_source->action, CheckAction::Flag);
  EXPECT_TRUE(same_bits(accept.second_source->recovery.high, 130.0));
  EXPECT_EQ(accept.control->action, CheckAction::Withhold);
  EXPECT_TRUE(same_bits(accept.control->recovery.low, 80.0));
  EXPECT_EQ(accept.fortified->action, CheckAction::Flag);
  EXPECT_FALSE(accept.fortified->recovery.has_value());
  EXPECT_TRUE(same_bits(accept.fortified->relative_difference.value(), 20.0));
  EXPECT_TRUE(same_bits(accept.fortified->native_ratio, 3.0));
  EXPECT_EQ(accept.duplicate->action, CheckAction::Flag);
  EXPECT_TRUE(same_bits(accept.duplicate->relative_difference, 25.0));
  ASSERT_TRUE(accept.surrogate);
  EXPECT_EQ(accept.surrogate->action, CheckAction::Withhold);
  EXPECT_TRUE(same_bits(accept.surrogate->recovery.low, 60.0));
}

TEST(ReadMethod, ASurrogateStatesItsConcentration) {
  const Method method = read_method(
      replaced(kExampleMethod, "<analyte id=\"simazine\"",
               "<analyte surrogate-concentration=\"25\" id=\"simazine\""),
      "method.xml");
  EXPECT_TRUE(
      same_bits(method.analytes[0].surrogate_concentration.value(), 25.0));
  EXPECT_FALSE(method.analytes[1].surrogate_concentration);
}

TEST(ReadMethod, ChecksOfTheLimits) {
  const Method method = read_method(
      replaced(replaced(kExampleMethod, "<calibration-residual ",
                        "<established detection=\"1\" quantitation=\"3\"/>"
                        "<spike-replicates confidence=\"0.95\" "
                        "spike-ratio=\"1 5\" blanks=\"solvent\"/>"
                        "<accuracy-profile acceptance=\"70 130\"/>"
                        "<calibration-residual "),
               "<check-standard ",
               "<established-limit procedure=\"spike-replicates\" "
               "ratio=\"0.4 1.5\" action=\"withhold\"/>"
               "<confirmation maximum-rsd=\"15\" prediction=\"60 140\"/>"
               "<check-standard "),
      "method.xml");
  const AnalyteSettings& rules = method.analytes[0];
  ASSERT_TRUE(rules.acceptance.established_limit.has_value());
  const auto& established = *rules.acceptance.established_limit;
  EXPECT_EQ(established.procedure, "spike-replicates");
  EXPECT_EQ(established.action, CheckAction::Withhold);
  EXPECT_TRUE(same_bits(established.ratio_low, 0.4));
  EXPECT_TRUE(same_bits(established.ratio_high, 1.5));
  ASSERT_TRUE(rules.acceptance.confirmation.has_value());
  const auto& confirmation = *rules.acceptance.confirmation;
  EXPECT_EQ(confirmation.action, CheckAction::Flag);
  EXPECT_TRUE(same_bits(confirmation.maximum_rsd, 15.0));
  EXPECT_TRUE(same_bits(confirmation.recovery.low, 80.0));
  EXPECT_TRUE(same_bits(confirmation.prediction.high, 140.0));

  const auto& procedures = rules.limits.procedures;
  ASSERT_EQ(procedures.size(), 6U);
  EXPECT_TRUE(same_bits(procedures[2].confidence, 0.95));
  EXPECT_TRUE(same_bits(procedures[2].spike_ratio_low, 1.0));
  EXPECT_TRUE(same_bits(procedures[2].spike_ratio_high, 5.0));
  EXPECT_EQ(procedures[2].blanks, BlankKind::Solvent);
  EXPECT_TRUE(same_bits(procedures[3].beta, 0.80));
  EXPECT_TRUE(same_bits(procedures[3].acceptance_low, 70.0));
}

TEST(ReadMethod, ChecksOfTheRun) {
  const Method method =
      read_method(replaced(kExampleMethod, "<check-standard ",
                           "<solvent-blank/>"
                           "<method-blank maximum=\"0.5\" sample-ratio=\"5\" "
                           "action=\"withhold\"/>"
                           "<internal-standard area=\"60 140\"/>"
                           "<retention-time shift=\"0.05\"/>"
                           "<suitability tailing=\"1.8\" area-rsd=\"2\"/>"
                           "<carry-over/>"
                           "<check-standard "),
                  "method.xml");
  const AcceptanceSettings& checks = method.analytes[0].acceptance;
  ASSERT_TRUE(checks.solvent_blank && checks.method_blank &&
              checks.internal_standard && checks.retention_time &&
              checks.suitability && checks.carry_over);
  using Kind = BlankMaximum::Kind;
  EXPECT_EQ(checks.solvent_blank->maximum.kind, Kind::DetectionLimit);
  EXPECT_EQ(checks.solvent_blank->action, CheckAction::Flag);
  EXPECT_EQ(checks.method_blank->maximum.kind, Kind::Number);
  EXPECT_TRUE(same_bits(checks.method_blank->maximum.number, 0.5));
  EXPECT_TRUE(same_bits(checks.method_blank->sample_ratio, 5.0));
  EXPECT_EQ(checks.method_blank->action, CheckAction::Withhold);
  EXPECT_TRUE(same_bits(checks.internal_standard->area.high, 140.0));
  EXPECT_EQ(checks.internal_standard->action, CheckAction::Withhold);
  EXPECT_TRUE(same_bits(checks.retention_time->shift_minutes, 0.05));
  EXPECT_TRUE(same_bits(checks.suitability->maximum_tailing.value(), 1.8));
  EXPECT_TRUE(same_bits(checks.suitability->maximum_area_rsd.value(), 2.0));
  EXPECT_FALSE(checks.suitability->minimum_plates.has_value());
  EXPECT_TRUE(same_bits(checks.carry_over->maximum_percent, 20.0));
}

TEST(ReadMethod, SignificantDigitsOfAnAnalyteDisplaceDecimals) {
  const Method method = read_method(
      replaced(replaced(kExampleMethod, R"(significant-digits="3" )",
                        R"(decimals="2" )"),
               R"(<calibration model="linear" weight="1/x"/>)",
               R"(<reporting significant-digits="4"/>)"),
      "method.xml");
  EXPECT_EQ(method.analytes[0].reporting.decimals, 2);
  EXPECT_FALSE(method.analytes[1].reporting.decimals.has_value());
  EXPECT_EQ(method.analytes[1].reporting.significant_digits, 4);
  EXPECT_EQ(default_of(method, "reporting", "significant-digits"), "(none)");
}

TEST(ReadMethod, LimitsOfAnAnalyteReplaceAsAWhole) {
  const Method method = read_method(
      replaced(kExampleMethod, R"(<calibration model="linear" weight="1/x"/>)",
               R"(<limits minimum="9"><established detection="0.1"
        quantitation="0.3" source="validation 7"/>
        <blank-deviation detection-factor="3.3" offset="blank-mean"
          blanks="all"/>
        <calibration-residual up-to="all"/></limits>)"),
      "method.xml");
  const LimitSettings& shared = method.analytes[0].limits;
  EXPECT_EQ(shared.governing, "blank-deviation");
  ASSERT_EQ(shared.procedures.size(), 3U);
  EXPECT_EQ(shared.procedures[2].name, "signal-to-noise");
  EXPECT_EQ(shared.procedures[1].up_to, 10.0);

  const LimitSettings& own = method.analytes[1].limits;
  EXPECT_EQ(own.governing, "established");
  EXPECT_EQ(own.minimum_blanks, 9);
  ASSERT_EQ(own.procedures.size(), 3U);
  EXPECT_EQ(own.procedures[0].detection, 0.1);
  EXPECT_EQ(own.procedures[0].quantitation, 0.3);
  EXPECT_EQ(own.procedures[0].source, "validation 7");
  EXPECT_TRUE(same_bits(own.procedures[1].detection_factor, 3.3));
  EXPECT_TRUE(own.procedures[1].offset_blank_mean);
  EXPECT_EQ(own.procedures[1].blanks, BlankKind::All);
  EXPECT_FALSE(own.procedures[2].up_to.has_value());
  EXPECT_EQ(default_of(method, "analyte[atrazine]/limits", "governing"),
            "established");
  EXPECT_EQ(default_of(method, "analyte[atrazine]/limits/blank-deviation",
                       "quantitation-factor"),
            "10");
}

// Each procedure has the defaults of its own document.
TEST(ReadMethod, ProceduresOnALineHaveTheirOwnDefaults) {
  const Method method = read_method(
      replaced(kExampleMethod, R"(<calibration model="linear" weight="1/x"/>)",
               R"(<limits><intercept-deviation/>
        <critical-and-detectable variance="linear" up-to="all"/>
        <din-32645 way="blank" replicates="2"/><prediction-band beta="0.1"/>
        <error-propagation blanks="method"/></limits>)"),
      "method.xml");
  const auto& own = method.analytes[1].limits.procedures;
  ASSERT_EQ(own.size(), 5U);
  EXPECT_TRUE(same_bits(own[0].detection_factor, 3.3));
  EXPECT_TRUE(same_bits(own[1].alpha, 0.05));
  EXPECT_TRUE(own[1].variance_linear);
  EXPECT_FALSE(own[1].up_to.has_value());
  EXPECT_TRUE(same_bits(own[2].alpha, 0.01));
  EXPECT_TRUE(same_bits(own[2].beta, 0.01));
  EXPECT_TRUE(same_bits(own[2].k, 3.0));
  EXPECT_TRUE(own[2].way_blank);
  EXPECT_EQ(own[2].replicates, 2);
  EXPECT_TRUE(same_bits(own[3].beta, 0.1));
  EXPECT_FALSE(own[3].variance_linear);
  EXPECT_TRUE(same_bits(own[4].detection_factor, 3.0));
  EXPECT_EQ(own[4].blanks, BlankKind::Method);
}

TEST(ReadMethod, DefaultsUsedAreNoted) {
  const Method method = read_method(kExampleMethod, "method.xml");
  EXPECT_EQ(default_of(method, "integration", "threshold"), "4");
  EXPECT_EQ(default_of(method, "integration", "baseline"), "(none)");
  EXPECT_EQ(default_of(method, "noise", "drift"), "kept");
  EXPECT_EQ(default_of(method, "units", "factor"), "1");
  EXPECT_EQ(default_of(method, "traces", "checksum"), "required");
  EXPECT_EQ(default_of(method, "limits", "minimum"), "7");
  EXPECT_EQ(default_of(method, "limits/calibration-residual", "up-to"), "10");
  EXPECT_EQ(default_of(method, "acceptance/check-standard", "action"),
            "withhold");
  EXPECT_EQ(default_of(method, "amendments", "unsigned"), "refused");
  EXPECT_EQ(default_of(method, "trace[uv220]", "tolerance"), "(none)");
  EXPECT_EQ(default_of(method, "analyte[simazine]", "window"), "(none)");

  const Method smallest = read_method(kSmallestMethod, "method.xml");
  EXPECT_EQ(default_of(smallest, "analyte[a]", "window"), "0.2");
  EXPECT_EQ(default_of(smallest, "calibration", "model"), "linear");
  EXPECT_EQ(default_of(smallest, "limits", "governing"), "first");
}

TEST(ReadMethod, PrefixesCommentsAndByteOrderMarkMeanNothing) {
  const std::string text =
      "\xEF\xBB\xBF<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<!-- x -->\n"
      "<q:method xmlns:q='urn:loqsmith:method' id='a&amp;b' revision='1'>"
      "<?pi?><q:title>A &lt; <![CDATA[B & C]]></q:title>"
      "<q:units concentration='&#xB5;g/L' result='&#xB5;g/L'/>"
      "<q:traces><q:trace id='t'/></q:traces>"
      "<q:analytes><!-- none --><q:analyte id='x' trace='t' "
      "retention-time=' 3.5 '/></q:analytes>"
      "<q:limits><q:blank-deviation/></q:limits></q:method>";
  const Method method = read_method(text, "method.xml");
  EXPECT_EQ(method.id, "a&b");
  EXPECT_EQ(method.title, "A < B & C");
  EXPECT_EQ(method.units.result, "\xC2\xB5g/L");
  EXPECT_TRUE(same_bits(method.analytes[0].target.retention_minutes, 3.5));
}

}  // namespace
}  // namespace loqsmith
