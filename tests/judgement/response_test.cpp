#include "loqsmith/judgement/response.hpp"

#include <array>

#include "judgement/night_builder.hpp"
#include "loqsmith/judgement/standards.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;
using test::has_word;
using test::NightBuilder;
using test::peak_of;
using test::same_bits;

TEST(Response, AreaOrHeight) {
  NightBuilder night;
  night.add(Role::Sample, 7.0);
  EXPECT_TRUE(same_bits(night.collect().injections[0].response->value, 7.0));
  night.settings.response = ResponseKind::Height;
  EXPECT_TRUE(same_bits(night.collect().injections[0].response->value, 70.0));
}

TEST(Response, TemplateThatWasNotComputedIsNoZero) {
  NightBuilder night;
  night.add(Role::Sample, 7.0);
  night.settings.response = ResponseKind::Template;
  const MeasuredAnalyte analyte = night.collect();
  ASSERT_FALSE(analyte.injections[0].response.has_value());
  night.rows[0].peak.value().template_response = 5.0;
  EXPECT_TRUE(same_bits(night.collect().injections[0].response->value, 5.0));
}

TEST(Response, AreaStandsInWhereTheTemplateDoesNotFit) {
  NightBuilder night;
  night.add(Role::Sample, 7.0);
  night.settings.response = ResponseKind::Template;
  Peak& peak = night.rows[0].peak.value();
  peak.area_instead = true;
  peak.reasons = {"shape-differs"};
  const MeasuredAnalyte analyte = night.collect();
  ASSERT_TRUE(analyte.injections[0].response);
  EXPECT_TRUE(same_bits(analyte.injections[0].response->value, 7.0));
  EXPECT_TRUE(
      has_word(analyte.injections[0].response->reasons, "shape-differs"));
}

TEST(Response, AnInternalStandardOfItsOwnAreaServesATemplate) {
  NightBuilder night;
  night.settings.internal_standard = "is1";
  night.settings.response = ResponseKind::Template;
  auto& row = night.add(Role::Sample, 1.0);
  row.peak.value().template_response = 6.0;
  row.internal_standard = peak_of(4.0);
  EXPECT_TRUE(same_bits(night.collect().injections[0].response->value, 1.5));
}

TEST(Response, KeepsThePeaksOwnReasonWhereThereIsNone) {
  NightBuilder night;
  night.add(Role::Sample, 1.0).peak = NotApplicable{"trace-missing: none fits"};
  EXPECT_EQ(night.collect().injections[0].response.reason(),
            "trace-missing: none fits");
}

// Analyte at c, internal standard added at 50 and diluted d-fold with the
// vial; each injection has a sensitivity of its own.
TEST(Response, InternalStandardAlgebraHoldsThroughDilution) {
  constexpr double kAnalyteResponse = 3.0;
  constexpr double kStandardResponse = 2.0;
  constexpr double kAdded = 50.0;
  NightBuilder night;
  night.settings.internal_standard = "is1";
  for (const double dilution : {1.0, 2.0, 10.0, 25.0}) {
    for (const double sensitivity : {0.5, 1.0, 1.7}) {
      const double in_vial = 80.0 / dilution;
      auto& row =
          night.add(Role::Sample, sensitivity * kAnalyteResponse * in_vial);
      row.injection.dilution = dilution;
      row.injection.internal_standard_dilution = dilution;
      row.internal_standard =
          peak_of(sensitivity * kStandardResponse * kAdded / dilution);
    }
  }
  const MeasuredAnalyte analyte = night.collect();
  for (const InjectionResponse& one : analyte.injections) {
    const double c =
        one.response->value * kStandardResponse * kAdded / kAnalyteResponse;
    // The response stands for the concentration in this vial; the dilution
    // leads back to 80 in the sample.
    EXPECT_TRUE(agrees_to_digits(c * one.injection->dilution, 80.0, 14));
  }
}

TEST(Response, WithoutInternalStandardPeakThereIsNoResult) {
  Peak unseen = peak_of(4.0, false);
  const std::array<std::optional<Outcome<Peak>>, 5> absent{
      std::nullopt, NotApplicable{"trace-missing: none"}, peak_of(0.0),
      peak_of(-1.0), unseen};
  for (const auto& peak : absent) {
    NightBuilder night;
    night.settings.internal_standard = "is1";
    night.add(Role::Sample, 7.0).internal_standard = peak;
    const MeasuredAnalyte analyte = night.collect();
    ASSERT_FALSE(analyte.injections[0].response.has_value());
    EXPECT_EQ(analyte.injections[0].response.reason().find(
                  "internal-standard-missing"),
              0U);
  }
}

NightBuilder night_with_standards() {
  NightBuilder night;
  night.settings.internal_standard = "is1";
  night.standard(10.0).internal_standard = peak_of(90.0);
  auto& diluted = night.standard(20.0);
  diluted.internal_standard = peak_of(11.0);
  diluted.injection.internal_standard_dilution = 10.0;
  // One that does not enter the mean: it was not seen.
  night.standard(30.0).internal_standard = peak_of(1.0, false);
  return night;
}

TEST(Response, SolventBlankWithoutInternalStandardUsesTheStandardsMean) {
  NightBuilder night = night_with_standards();
  night.add(Role::SolventBlank, 5.0).internal_standard = peak_of(0.1, false);
  const MeasuredAnalyte analyte = night.collect();
  const auto& response = analyte.injections[3].response;
  EXPECT_TRUE(same_bits(response->value, 5.0 / 100.0));
  EXPECT_TRUE(has_word(response->reasons, "mean-internal-standard"));
}

TEST(Response, CarriedOverInternalStandardInABlankCountsAsNone) {
  NightBuilder night = night_with_standards();
  night.add(Role::SolventBlank, 5.0).internal_standard = peak_of(9.99);
  night.add(Role::SolventBlank, 5.0).internal_standard = peak_of(10.0);
  night.add(Role::Sample, 5.0).internal_standard = peak_of(9.99);
  const MeasuredAnalyte analyte = night.collect();
  EXPECT_TRUE(same_bits(analyte.injections[3].response->value, 5.0 / 100.0));
  EXPECT_TRUE(same_bits(analyte.injections[4].response->value, 5.0 / 10.0));
  EXPECT_TRUE(same_bits(analyte.injections[5].response->value, 5.0 / 9.99));
}

TEST(Response, NoStandardShowsOneThenTheBlankHasNoResultEither) {
  NightBuilder night;
  night.settings.internal_standard = "is1";
  night.add(Role::SolventBlank, 5.0).internal_standard = peak_of(0.1, false);
  EXPECT_FALSE(night.collect().injections[0].response.has_value());
}

TEST(Response, MethodBlankMustContainTheInternalStandard) {
  NightBuilder night = night_with_standards();
  night.add(Role::MethodBlank, 5.0).internal_standard = peak_of(0.1, false);
  EXPECT_FALSE(night.collect().injections[3].response.has_value());
}

TEST(Standards, OnlyThoseWhoseLevelContainsTheAnalyte) {
  NightBuilder night;
  night.standard(10.0);
  night.add(Role::Standard, 5.0).injection.level = "another";
  night.add_level(Role::CheckStandard, 10.0, 20.0);
  const OfferedStandards offered = offer_standards(night.collect());
  ASSERT_EQ(offered.points.size(), 1U);
  EXPECT_TRUE(offered.points[0].used);
  EXPECT_EQ(offered.points[0].injection, 1);
  EXPECT_TRUE(same_bits(offered.points[0].response, 20.0));
}

TEST(Standards, SaturatedOrUnseenOnesAreNotUsed) {
  NightBuilder night;
  night.settings.internal_standard = "is1";
  for (const double x : {0.0, 1.0, 2.0, 3.0}) {
    night.standard(x).internal_standard = peak_of(100.0);
  }
  night.rows[1].peak.value().found = false;
  night.rows[2].peak.value().reasons = {"overlapped", "saturated"};
  night.rows[3].internal_standard->value().reasons = {"saturated"};
  const auto points = offer_standards(night.collect()).points;
  ASSERT_EQ(points.size(), 4U);
  EXPECT_TRUE(points[0].used);  // concentration zero needs no peak
  EXPECT_FALSE(points[1].used);
  EXPECT_EQ(points[1].note, "peak-not-found");
  EXPECT_FALSE(points[2].used);
  EXPECT_EQ(points[2].note, "saturated;overlapped");
  EXPECT_FALSE(points[3].used);
  EXPECT_EQ(points[3].note, "internal-standard-saturated");
}

TEST(Standards, UnmeasuredOnesAreKeptWithTheirReason) {
  NightBuilder night;
  night.standard(10.0).peak = NotApplicable{"file-refused: cut off"};
  const OfferedStandards offered = offer_standards(night.collect());
  EXPECT_TRUE(offered.points.empty());
  ASSERT_EQ(offered.unmeasured.size(), 1U);
  EXPECT_EQ(offered.unmeasured[0].note, "file-refused");
  EXPECT_TRUE(same_bits(offered.unmeasured[0].concentration, 10.0));
}

}  // namespace
}  // namespace loqsmith
