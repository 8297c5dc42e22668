// What a strict reader does with AnIML documents that break or bend one rule of
// the document or of its units.

#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "edge_case.hpp"
#include "support/animl_builder.hpp"

namespace loqsmith::test {
namespace {

std::string changed(std::string_view from, std::string_view to) {
  return with_change(animl_document(), from, to);
}

std::string with_time_unit(const std::string& unit) {
  AnimlSeriesPlan plan = animl_time();
  plan.unit = unit;
  return animl_document(animl_set({plan, AnimlSeriesPlan{}}));
}

std::vector<EdgeCase> document_cases() {
  using enum Behaviour;
  const std::string sound = animl_document();
  return {
      {"Sound", sound, Accept},
      {"Case01Cut", sound.substr(0, sound.size() - 10), RefuseFile,
       "incomplete"},
      {"Case01Empty", "", RefuseFile},
      {"Case02BytesBehind", sound + "x", RefuseFile},
      {"Case27Latin1", changed("UTF-8", "ISO-8859-1"), Accept},
      {"Case27Bom", "\xEF\xBB\xBF" + sound, Accept},
      {"Case28Doctype", changed("<AnIML", "<!DOCTYPE AnIML><AnIML"), RefuseFile,
       "DOCTYPE"},
      {"Case30StrangeElementOutside",
       changed("<SampleSet>", "<SampleSet><Extra/>"), Warn,
       "<Extra> inside <SampleSet>"},
      {"Case30StrangeAttributeOutside",
       changed("<Technique", "<Technique colour=\"red\""), Warn, "\"colour\""},
      {"Case30StrangeNamespaceOutside",
       changed("<SampleSet>", "<SampleSet><x:E xmlns:x=\"urn:x\"/>"), Warn,
       "<x:E> inside <SampleSet>"},
      {"Case30StrangeElementInside",
       changed("<Unit label=\"mAU\"/>", "<Unit label=\"mAU\"/><Extra/>"),
       RefuseTrace, "<Extra> inside <Series>"},
      {"Case30StrangeAttributeInside",
       changed("<SeriesSet ", "<SeriesSet colour=\"red\" "), RefuseTrace,
       "\"colour\""},
      {"Case30TextInside", changed("<Series ", "x<Series "), RefuseTrace,
       "text inside <SeriesSet>"},
      {"Case30ForeignAttribute",
       changed("version=\"0.90\"",
               "xmlns:i=\"http://www.w3.org/2001/XMLSchema-instance\" "
               "i:schemaLocation=\"a b\" version=\"0.90\""),
       Accept},
      {"Case31Namespace10", changed("draft:0.90", "draft:1.0"), RefuseFile,
       "draft:1.0"},
      {"Case31Version10", changed("version=\"0.90\"", "version=\"1.0\""),
       RefuseFile, "AnIML version \"1.0\""},
      {"Case31NoVersion", changed(" version=\"0.90\"", ""), RefuseFile,
       "no version"},
      {"Case31NoNamespace",
       changed(" xmlns=\"urn:org:astm:animl:schema:core:draft:0.90\"", ""),
       RefuseFile, "without namespace"},
      {"Case32SecondStepSet",
       changed("</AnIML>", "<ExperimentStepSet/></AnIML>"), RefuseFile,
       "a second <ExperimentStepSet>"},
      {"Case32OrderOutside",
       changed("</Infrastructure>",
               "</Infrastructure><Technique name=\"a\" uri=\"\"/>"),
       Warn, "<Technique> too late"},
      {"Case32UnitBeforeValues",
       changed("<AutoInc", "<Unit label=\"min\"/><AutoInc"), RefuseTrace,
       "<AutoIncrementedValueSet> too late inside <Series>"},
      {"Case33ReferenceToNoStep",
       changed("</SampleReferenceSet>",
               "</SampleReferenceSet><ExperimentDataReferenceSet>"
               "<ExperimentDataReference role=\"a\" dataPurpose=\"consumed\" "
               "experimentStepID=\"nope\"/></ExperimentDataReferenceSet>"),
       Warn, "\"nope\" refers to nothing"},
      {"Case37StartWithoutZone", changed("08:15:00Z", "08:15:00"), Warn,
       "zone not stated"},
      {"Case37StartIsNoDate", changed("2026-03-01T", "yesterday"), Warn,
       "is no date"},
      {"Case43SampleTwice", changed("\"B-1\"", "\" S-1 \""), RefuseFile,
       "a second sample with the sampleID \"S-1\""},
      {"Case43StepTwice", changed("\"inj-1-uv\"", "\"inj-1\""), RefuseFile,
       "a second step with the experimentStepID \"inj-1\""},
      {"Case43SeriesTwice", changed("seriesID=\"y\"", "seriesID=\"t\""),
       RefuseFile, "a second series with the seriesID \"t\""},
      {"Case43IdTwice", changed("\"B-1\"/>", "\"B-1\" id=\"s1\"/>"), RefuseFile,
       "a second element with the id \"s1\""},
      {"Case43SampleMissing",
       changed("<SampleReference sampleID=\"S-1\"",
               "<SampleReference sampleID=\"nope\""),
       RefuseTrace, "the sample \"nope\""},
      {"StepWithoutId", changed(" experimentStepID=\"inj-1-uv\"", ""),
       RefuseTrace, "without experimentStepID"},
      {"SignaturePresent",
       changed("</AnIML>",
               "<SignatureSet><s:Signature "
               "xmlns:s=\"http://www.w3.org/2000/09/xmldsig#\"/>"
               "</SignatureSet></AnIML>"),
       Warn, "signature present, not verified"},
      {"AuditTrailIsSteppedOver",
       changed("</AnIML>",
               "<AuditTrailEntrySet><AuditTrailEntry/></AuditTrailEntrySet>"
               "</AnIML>"),
       Accept},
  };
}

std::vector<EdgeCase> unit_cases() {
  using enum Behaviour;
  const auto time = with_time_unit;
  return {
      {"Case03NoUnit", time(""), RefuseTrace, "no unit on the time series"},
      {"Case03UnitFromTheMethod",
       time(""),
       Warn,
       "taken as minute",
       {"minute", true}},
      {"Case06NoSignalUnit", changed("<Unit label=\"mAU\"/>", ""), Warn,
       "unit of the signal not stated"},
      {"Case45FactorContradicts",
       time("<Unit label=\"s\"><SIUnit factor=\"60\">s</SIUnit></Unit>"),
       RefuseTrace, "\"s\" with the factor 60"},
      {"Case45OtherSiUnit",
       time("<Unit label=\"min\"><SIUnit>m</SIUnit></Unit>"), RefuseTrace,
       "no time"},
      {"Case45Exponent",
       time("<Unit label=\"s\"><SIUnit exponent=\"-1\">s</SIUnit></Unit>"),
       RefuseTrace, "no time"},
      {"Case45Offset",
       time("<Unit label=\"s\"><SIUnit offset=\"1\">s</SIUnit></Unit>"),
       RefuseTrace, "no time"},
      {"Case45TwoSiUnits",
       time("<Unit label=\"s\"><SIUnit>s</SIUnit><SIUnit>s</SIUnit></Unit>"),
       RefuseTrace, "no time"},
      {"Case45FactorZero",
       time("<Unit label=\"x\"><SIUnit factor=\"0\">s</SIUnit></Unit>"),
       RefuseTrace, "the factor 0"},
      {"Case45FactorIsNoNumber",
       time("<Unit label=\"s\"><SIUnit factor=\"1,0\">s</SIUnit></Unit>"),
       RefuseTrace, "\"1,0\""},
      {"Case45UnknownLabelAlone",
       time("<Unit label=\"minutes\" quantity=\"Time\"/>"), RefuseTrace,
       "\"minutes\" without SIUnit"},
      {"Case45LabelAlone", time("<Unit label=\"min\"/>"), Accept},
  };
}

class AnimlCase : public testing::TestWithParam<EdgeCase> {};

TEST_P(AnimlCase, BehavesAsWanted) {
  EdgeCase edge = GetParam();
  edge.file = "a.animl";
  expect_behaviour(edge);
}

INSTANTIATE_TEST_SUITE_P(Document, AnimlCase,
                         testing::ValuesIn(document_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Unit, AnimlCase, testing::ValuesIn(unit_cases()),
                         case_words);

TEST(AnimlContent, DecidesAndTheExtensionEarnsARemark) {
  EdgeCase edge{"Case40", animl_document(), Behaviour::Warn,
                "the content is AnIML"};
  edge.file = "a.mzML";
  expect_behaviour(edge);
}

}  // namespace
}  // namespace loqsmith::test
