// How a file as a whole may be wrong: cut, appended to, its checksum, its
// index, its name.

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
      {"Case30UnknownAttributeOfAnOffset",
       changed_index("<offset ", "<offset info=\"1\" "), Warn, "\"info\""},
      {"Case26ListOffsetNil",
       changed_index("<indexListOffset>" + list,
                     "<indexListOffset "
                     "xmlns:xsi=\"http://www.w3.org/2001/XMLSchema-instance\" "
                     "xsi:nil=\"true\">"),
       Accept},
  };
}

class MzmlFileCase : public testing::TestWithParam<EdgeCase> {};

TEST_P(MzmlFileCase, BehavesAsWanted) { expect_behaviour(GetParam()); }

INSTANTIATE_TEST_SUITE_P(WholeFile, MzmlFileCase,
                         testing::ValuesIn(whole_file_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Index, MzmlFileCase, testing::ValuesIn(index_cases()),
                         case_words);

}  // namespace
}  // namespace loqsmith::test
