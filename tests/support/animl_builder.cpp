#include "support/animl_builder.hpp"

#include "support/mzml_builder.hpp"

namespace loqsmith::test {
namespace {

std::string attribute(std::string_view name, std::string_view value) {
  return " " + std::string(name) + "=\"" + std::string(value) + "\"";
}

std::string series_text(const AnimlSeriesPlan& plan) {
  return "<Series" + attribute("name", plan.name) +
         attribute("dependency", plan.dependency) +
         attribute("seriesID", plan.id) + attribute("seriesType", plan.type) +
         ">" + plan.values + plan.unit + "</Series>\n";
}

std::string injection_text(const AnimlInjection& plan) {
  return "<ExperimentStep" + attribute("name", plan.name) +
         attribute("experimentStepID", plan.id) +
         ">\n"
         "<Technique name=\"Chromatography\" uri=\"\"/>\n"
         "<Infrastructure><SampleReferenceSet><SampleReference" +
         attribute("sampleID", plan.sample_id) +
         " role=\"Test Sample\" samplePurpose=\"consumed\"/>"
         "</SampleReferenceSet><Timestamp>2026-03-01T08:15:00Z</Timestamp>"
         "</Infrastructure>\n"
         "<Result name=\"Separation Monitoring\"><ExperimentStepSet>\n"
         "<ExperimentStep name=\"UV 254 nm\"" +
         attribute("experimentStepID", plan.id + "-uv") + ">\n<Result" +
         attribute("name", plan.result) + ">\n" + plan.content +
         "</Result>\n</ExperimentStep>\n</ExperimentStepSet></Result>\n"
         "</ExperimentStep>\n";
}

std::string_view accession_of(std::string_view type) {
  if (type == "Int32") return "MS:1000519";
  if (type == "Int64") return "MS:1000522";
  if (type == "Float32") return "MS:1000521";
  return "MS:1000523";
}

}  // namespace

AnimlSeriesPlan animl_time() {
  return {"Time",
          "independent",
          "t",
          "Float64",
          "<AutoIncrementedValueSet startIndex=\"0\" endIndex=\"3\">"
          "<StartValue><D>0</D></StartValue>"
          "<Increment><D>0.5</D></Increment></AutoIncrementedValueSet>",
          "<Unit label=\"min\" quantity=\"Time\">"
          "<SIUnit factor=\"60\">s</SIUnit></Unit>"};
}

std::string animl_set(const std::vector<AnimlSeriesPlan>& series,
                      std::string_view length, std::string_view name) {
  std::string text = "<SeriesSet" + attribute("name", name) +
                     attribute("length", length) + ">\n";
  for (const AnimlSeriesPlan& plan : series) text += series_text(plan);
  return text + "</SeriesSet>\n";
}

std::string animl_document(const std::vector<AnimlInjection>& injections) {
  std::string text =
      "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n"
      "<AnIML xmlns=\"urn:org:astm:animl:schema:core:draft:0.90\" "
      "version=\"0.90\">\n<SampleSet>\n"
      "<Sample name=\"well 3\" sampleID=\"S-1\" id=\"s1\"/>\n"
      "<Sample name=\"blank\" sampleID=\"B-1\"/>\n"
      "</SampleSet>\n<ExperimentStepSet>\n";
  for (const AnimlInjection& plan : injections) text += injection_text(plan);
  return text + "</ExperimentStepSet>\n</AnIML>\n";
}

std::string animl_document(const std::string& content) {
  AnimlInjection injection;
  injection.content = content;
  return animl_document(std::vector<AnimlInjection>{injection});
}

std::string animl_document() {
  return animl_document(animl_set({animl_time(), AnimlSeriesPlan{}}));
}

std::string animl_encoded(const std::vector<double>& values,
                          std::string_view type, std::string_view attributes) {
  std::string text = "<EncodedValueSet";
  if (!attributes.empty()) text += " " + std::string(attributes);
  return text + ">" + base64(packed(values, accession_of(type))) +
         "</EncodedValueSet>";
}

}  // namespace loqsmith::test
