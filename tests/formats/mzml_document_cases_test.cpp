// How a document around its chromatograms may be wrong, and what shall come of
// it.

#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "edge_case.hpp"

namespace loqsmith::test {
namespace {

const std::string kPlain = mzml_document(MzmlDocumentPlan{});

std::string changed(std::string_view from, std::string_view to) {
  return with_change(kPlain, from, to);
}

std::string with_declaration(std::string_view declaration) {
  return changed("<?xml version=\"1.0\" encoding=\"UTF-8\"?>", declaration);
}

std::string repeated(std::string_view piece, int times) {
  std::string text;
  for (int i = 0; i < times; ++i) text += piece;
  return text;
}

// What stands between the two marks, marks included.
std::string cut_out(std::string_view from, std::string_view to) {
  const std::size_t start = kPlain.find(from);
  const std::size_t end = kPlain.find(to, start) + to.size();
  return kPlain.substr(start, end - start);
}

std::vector<EdgeCase> encoding_cases() {
  using enum Behaviour;
  const std::string latin1 = with_change(
      with_declaration("<?xml version='1.0' encoding='iso-8859-1'?>"),
      "fullName=\"units\"", "fullName=\"unit\xE9s\"");
  return {
      {"Case27ByteOrderMark", "\xEF\xBB\xBF" + kPlain, Accept},
      {"Case27Latin1", latin1, Accept},
      {"Case27Ascii",
       with_declaration("<?xml version='1.0' "
                        "encoding='US-ASCII'?>"),
       Accept},
      {"Case27NoDeclaration", with_declaration(""), Accept},
      {"Case27Windows1252",
       with_declaration("<?xml version='1.0' "
                        "encoding='Windows-1252'?>"),
       RefuseFile, "Windows-1252"},
      {"Case27Utf16", "\xFF\xFE<", RefuseFile, "UTF-16"},
      {"Case27Xml11", with_declaration("<?xml version='1.1'?>"), RefuseFile,
       "1.1"},
      {"Case27MarkAgainstDeclaration", "\xEF\xBB\xBF" + latin1, RefuseFile,
       "byte order mark"},
      {"Case27InvalidUtf8", changed("id=\"TIC\"", "id=\"T\xE9\""), RefuseFile,
       "0xE9"},
      {"Case27Nul", changed("id=\"TIC\"", std::string("id=\"T\0X\"", 8)),
       RefuseFile, "0x00"},
      {"Case27Control", changed("id=\"TIC\"", "id=\"T\x07\""), RefuseFile,
       "0x07"},
      {"Case28Doctype", changed("<mzML ", "<!DOCTYPE mzML><mzML "), RefuseFile,
       "DOCTYPE"},
      {"Case28Entity", changed("id=\"TIC\"", "id=\"&x;\""), RefuseFile, "&x;"},
      {"Case28SchemaLocation",
       changed("<mzML ",
               "<mzML xmlns:xsi=\"http://www.w3.org/2001/"
               "XMLSchema-instance\" xsi:schemaLocation=\"a b\" "),
       Accept},
      {"Case29Depth",
       changed("<run ", repeated("<x>", 300) + repeated("</x>", 300) + "<run "),
       RefuseFile, "256"},
      {"Case29Attributes",
       changed(
           "<run ", "<x" +
                        [] {
                          std::string text;
                          for (int i = 0; i < 300; ++i) {
                            text += " a" + std::to_string(i) + "='1'";
                          }
                          return text;
                        }() +
                        "/><run "),
       RefuseFile, "256"},
      {"Case29NameLength",
       changed("<run ", "<" + repeated("n", 2000) + "/><run "), RefuseFile,
       "1024"},
  };
}

std::vector<EdgeCase> structure_cases() {
  using enum Behaviour;
  const std::string softwares = cut_out("<softwareList", "</softwareList>");
  const std::string list = cut_out("<chromatogramList", "</chromatogramList>");
  const std::string type = cut_out(
      "<cvParam cvRef=\"MS\" "
      "accession=\"MS:1000235\"",
      "/>");
  MzmlTrace twin;
  return {
      {"Case18DuplicateIds", mzml_document({twin, twin}), RefuseFile,
       "a second chromatogram \"TIC\""},
      {"Case30UnknownElementInChromatogram", changed(type, type + "<extra/>"),
       RefuseTrace, "<extra>"},
      {"Case30ForeignElementInChromatogram",
       changed(type, type + "<cvParam xmlns=\"urn:other\"/>"), RefuseTrace,
       "<cvParam>"},
      {"Case30UnknownAttributeOnArray",
       changed("<binaryDataArray ", "<binaryDataArray extra=\"1\" "),
       RefuseTrace, "\"extra\""},
      {"Case30UnknownAttributeOnChromatogram",
       changed("<chromatogram ", "<chromatogram extra=\"1\" "), RefuseTrace,
       "\"extra\""},
      {"Case30TextInChromatogram", changed(type, type + "text"), RefuseTrace,
       "text inside <chromatogram>"},
      {"Case30UnknownElementElsewhere", changed("<run ", "<extra/><run "), Warn,
       "<extra>"},
      {"Case30UnknownAttributeElsewhere",
       changed("<software ", "<software info=\"1\" "), Warn, "\"info\""},
      {"Case31DraftNamespace",
       changed("http://psi.hupo.org/ms/mzml",
               "http://psi.hupo.org/schema_revision/mzML_1.0.0"),
       RefuseFile, "mzML_1.0.0"},
      {"Case31NoNamespace",
       changed(" xmlns=\"http://psi.hupo.org/ms/mzml\"", ""), RefuseFile,
       "without namespace"},
      {"Case31VersionIsDecoration",
       changed("version=\"1.1.0\"", "version=\"\""), Accept},
      {"Case32OrderInChromatogram",
       changed(type, "<userParam name=\"n\"/>" + type), RefuseTrace,
       "<cvParam> too late"},
      {"Case32SecondPrecursor",
       changed(type,
               type + repeated("<precursor><activation/></precursor>", 2)),
       RefuseTrace, "a second <precursor>"},
      {"Case32OrderElsewhere",
       with_change(changed(softwares, ""), "<run ", softwares + "<run "), Warn,
       "<softwareList> too late"},
      {"Case32SecondRun", changed("</run>", "</run><run id=\"r2\"></run>"),
       RefuseFile, "a second <run>"},
      {"Case32SecondChromatogramList", changed(list, list + list), RefuseFile,
       "a second <chromatogramList>"},
      {"Case32SecondBinary", changed("</binary>", "</binary><binary/>"),
       RefuseFile, "a second <binary>"},
      {"Case32NoRun", changed(cut_out("<run ", "</run>"), ""), RefuseFile,
       "no run"},
  };
}

std::vector<EdgeCase> reference_cases() {
  using enum Behaviour;
  const std::string type = cut_out(
      "<cvParam cvRef=\"MS\" "
      "accession=\"MS:1000235\"",
      "/>");
  MzmlTrace srm;
  srm.type = "MS:1001473";
  srm.precursor_mz = 233.1;
  srm.product_mz = 72.1;
  MzmlTrace other = srm;
  other.id = "second";
  MzmlDocumentPlan timed;
  timed.start_time = "2026-03-01T08:15:00";
  const auto with_q1 = [&](const std::string& text) {
    return with_change(mzml_document({srm}), "value=\"233.1\"",
                       "value=\"" + text + "\"");
  };
  std::vector<EdgeCase> cases{
      {"Case19SameTransitionTwice", mzml_document({srm, other}), Accept},
      {"Case33DanglingGroup",
       changed(type, "<referenceableParamGroupRef ref=\"none\"/>" + type),
       RefuseTrace, "the parameter group \"none\""},
      {"Case33DanglingSample", changed("<run ", "<run sampleRef=\"s9\" "), Warn,
       "sampleRef \"s9\""},
      {"Case33DanglingDataProcessing",
       changed("<binaryDataArray ",
               "<binaryDataArray dataProcessingRef=\"x\" "),
       Warn, "dataProcessingRef \"x\""},
      {"Case33DanglingCvRef",
       changed("cvRef=\"MS\" accession=\"MS:1000235\"",
               "cvRef=\"QQ\" accession=\"MS:1000235\""),
       Warn, "cvRef \"QQ\""},
      {"Case35NoType", changed(type, ""), Warn, "type not stated"},
      {"Case35SeveralTypes",
       changed(type, type + "<cvParam cvRef=\"MS\" accession=\"MS:1000628\" "
                            "name=\"basepeak chromatogram\"/>"),
       Warn, "several chromatogram types"},
      {"Case35QualityMetricIsNoType", changed("MS:1000235", "MS:4000104"), Warn,
       "type not stated"},
      {"Case36SpectraBesideChromatograms",
       changed("<chromatogramList",
               "<spectrumList count=\"1\" defaultDataProcessingRef=\"dp\">"
               "<spectrum index=\"0\" id=\"scan=1\" defaultArrayLength=\"0\"/>"
               "</spectrumList><chromatogramList"),
       Accept},
      {"Case37StartTimeWithoutZone", mzml_document(timed), Warn,
       "2026-03-01T08:15:00: zone not stated"},
      {"Case38Plain", with_q1("2.331e2"), Accept},
  };
  const std::vector<std::pair<std::string, std::string>> numbers{
      {"Comma", "1,5"},      {"Plus", "+5"},      {"Unit", "5 mg"},
      {"Hex", "0x1p3"},      {"Huge", "1e999"},   {"Empty", ""},
      {"NotANumber", "NaN"}, {"Infinity", "INF"}, {"Blank", " 5"}};
  for (const auto& [words, text] : numbers) {
    cases.push_back({"Case38" + words, with_q1(text), RefuseTrace,
                     "precursor m/z \"" + text + "\""});
  }
  return cases;
}

class MzmlDocumentCase : public testing::TestWithParam<EdgeCase> {};

TEST_P(MzmlDocumentCase, BehavesAsWanted) { expect_behaviour(GetParam()); }

INSTANTIATE_TEST_SUITE_P(Encoding, MzmlDocumentCase,
                         testing::ValuesIn(encoding_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Structure, MzmlDocumentCase,
                         testing::ValuesIn(structure_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(References, MzmlDocumentCase,
                         testing::ValuesIn(reference_cases()), case_words);

}  // namespace
}  // namespace loqsmith::test
