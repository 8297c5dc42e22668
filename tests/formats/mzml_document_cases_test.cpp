// How a document around its chromatograms may be wrong, and what shall come of
// it.

#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "edge_case.hpp"

namespace loqsmith::test {
namespace {

const std::string kPlain = mzml_document(MzmlDocumentPlan{});

std::string indexed_document() {
  MzmlDocumentPlan plan;
  plan.indexed = true;
  return mzml_document(plan);
}

std::string changed(std::string_view from, std::string_view to) {
  return with_change(kPlain, from, to);
}

std::string changed_index(std::string_view from, std::string_view to) {
  return resealed(with_change(indexed_document(), from, to));
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

std::vector<EdgeCase> whole_file_cases() {
  using enum Behaviour;
  const std::string indexed = indexed_document();
  const std::string checksum =
      indexed.substr(indexed.find("<fileChecksum>") + 14, 40);
  std::string upper = checksum;
  for (char& c : upper) {
    if (c >= 'a' && c <= 'f') c = static_cast<char>(c - 'a' + 'A');
  }
  const auto with_checksum = [&](const std::string& text) {
    return with_change(indexed, checksum, text);
  };
  return {
      {"Case01Empty", "", RefuseFile, "incomplete"},
      {"Case01RootOpen", changed("</mzML>", ""), RefuseFile, "incomplete"},
      {"Case01IndexedWithoutChecksum",
       with_change(indexed, "<fileChecksum>" + checksum + "</fileChecksum>",
                   ""),
       RefuseFile, "incomplete"},
      {"Case02BytesBehindTheRoot", kPlain + "x", RefuseFile, "behind the root"},
      {"Case02SecondDocumentBehind", kPlain + kPlain, RefuseFile,
       "at the very beginning"},
      {"Case02CommentBehindTheRoot", kPlain + "<!-- done -->\n<?p?>", Accept},
      {"Case24RightChecksum", indexed, Accept},
      {"Case24UpperCaseChecksum", with_checksum(upper), Accept},
      {"Case24WrongChecksum", with_checksum(std::string(40, '0')), RefuseFile,
       checksum},
      {"Case24NoChecksumAtAll", with_checksum("DEMO"), RefuseFile, "DEMO"},
      {"Case24WrongChecksumIgnored",
       with_checksum(std::string(40, '0')),
       Warn,
       checksum,
       {"", false}},
      {"Case24OneByteChanged",
       with_change(indexed, "id=\"run1\"", "id=\"run2\""), RefuseFile,
       "damaged or edited"},
      {"Case25PlainDocument", kPlain, Accept},
      {"Case39Gzip", "\x1F\x8B\x08" + kPlain, RefuseFile, "gzip"},
      {"Case40WrongExtension",
       kPlain,
       Warn,
       "the content is mzML",
       {},
       "a.csv"},
      {"Case40OtherFormatsExtension",
       kPlain,
       Warn,
       "the content is mzML",
       {},
       "a.animl"},
      {"Case40ExtensionInCapitals", kPlain, Accept, "", {}, "a.MZML"},
      {"Case40NoXml", "PK\x03\x04", RefuseFile, "an XML document"},
      {"Case40OtherRoot", "<html/>", RefuseFile, "mzML, indexedmzML or AnIML"},
  };
}

std::vector<EdgeCase> index_cases() {
  using enum Behaviour;
  const std::string plain = indexed_document();
  const std::size_t at = plain.find("<offset idRef=\"TIC\">") + 20;
  const std::string offset = plain.substr(at, plain.find('<', at) - at);
  const std::size_t list_at = plain.find("<indexListOffset>") + 17;
  const std::string list =
      plain.substr(list_at, plain.find('<', list_at) - list_at);
  const auto entry = [&](const std::string& position) {
    return changed_index(">" + offset + "</offset>",
                         ">" + position + "</offset>");
  };
  const auto list_offset = [&](const std::string& position) {
    return changed_index("<indexListOffset>" + list,
                         "<indexListOffset>" + position);
  };
  const std::string wrong = "1 of 1 offsets";
  const std::string list_wrong = "indexListOffset does not point";
  return {
      {"Case26TrueOffsets", plain, Accept},
      {"Case26OffsetOneEarly", entry(std::to_string(std::stoul(offset) - 1)),
       Warn, wrong},
      {"Case26OffsetOutside", entry("999999999"), Warn, wrong},
      {"Case26OffsetNegative", entry("-1"), Warn, wrong},
      {"Case26OffsetNoNumber", entry("x"), Warn, wrong},
      {"Case26OffsetWithoutIdRef",
       changed_index("<offset idRef=\"TIC\"", "<offset"), Warn, wrong},
      {"Case26OffsetOfAnotherId",
       changed_index("<offset idRef=\"TIC\"", "<offset idRef=\"TOC\""), Warn,
       wrong},
      {"Case26IndexOfSpectra",
       changed_index("<index name=\"chromatogram\"",
                     "<index name=\"spectrum\""),
       Warn, wrong},
      {"Case26ListOffsetEarly",
       list_offset(std::to_string(std::stoul(list) - 3)), Warn, list_wrong},
      {"Case26ListOffsetNil",
       changed_index("<indexListOffset>" + list,
                     "<indexListOffset "
                     "xmlns:xsi=\"http://www.w3.org/2001/XMLSchema-instance\" "
                     "xsi:nil=\"true\">"),
       Accept},
  };
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
       changed_index("<offset ", "<offset info=\"1\" "), Warn, "\"info\""},
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

INSTANTIATE_TEST_SUITE_P(WholeFile, MzmlDocumentCase,
                         testing::ValuesIn(whole_file_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Index, MzmlDocumentCase,
                         testing::ValuesIn(index_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Encoding, MzmlDocumentCase,
                         testing::ValuesIn(encoding_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Structure, MzmlDocumentCase,
                         testing::ValuesIn(structure_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(References, MzmlDocumentCase,
                         testing::ValuesIn(reference_cases()), case_words);

}  // namespace
}  // namespace loqsmith::test
