// How the text of one array may be wrong: base64 and zlib.

#include <gtest/gtest.h>

#include <string>
#include <vector>

#include "edge_case.hpp"

namespace loqsmith::test {
namespace {

std::string changed(std::string_view from, std::string_view to) {
  return with_change(mzml_document({MzmlTrace{}}), from, to);
}

std::string changed_zlib(std::string_view from, std::string_view to) {
  MzmlTrace trace;
  trace.zlib = true;
  return with_change(mzml_document({trace}), from, to);
}

// The time array of the default trace as it stands in the document.
const std::string kTimes = base64(packed(MzmlTrace{}.times, "MS:1000523"));
const std::string kTimesZlib =
    base64(zlib_compressed(packed(MzmlTrace{}.times, "MS:1000523")));

// The time array's data replaced, its length stated truly.
std::string with_times_text(const std::string& text, std::size_t length) {
  return with_change(changed(kTimes, text),
                     "encodedLength=\"" + std::to_string(kTimes.size()),
                     "encodedLength=\"" + std::to_string(length));
}

std::string with_times_zlib(const std::string& bytes) {
  const std::string text = base64(bytes);
  return with_change(changed_zlib(kTimesZlib, text),
                     "encodedLength=\"" + std::to_string(kTimesZlib.size()),
                     "encodedLength=\"" + std::to_string(text.size()));
}

std::vector<EdgeCase> text_cases() {
  using enum Behaviour;
  const std::size_t n = kTimes.size();
  std::string wrapped = kTimes;
  wrapped.insert(20, " \r\n\t");
  const auto at_four = [](std::string_view what) {
    std::string text = kTimes;
    return text.replace(4, 1, what);
  };
  return {
      {"Case20EncodedLengthWrong",
       changed("encodedLength=\"44\"", "encodedLength=\"40\""), RefuseTrace,
       "44 base64 characters"},
      {"Case20NoEncodedLength", changed("encodedLength=\"44\"", ""),
       RefuseTrace, "no encodedLength"},
      {"Case20EncodedLengthCountsWhiteSpace",
       with_times_text(wrapped, wrapped.size()), Warn, "counts white space"},
      {"Case21WhiteSpace", with_times_text(wrapped, n), Accept},
      {"Case21ForeignCharacter", with_times_text(at_four("-"), n), RefuseTrace,
       "the character \"-\" at position 5"},
      {"Case21PaddingInTheMiddle", with_times_text(at_four("="), n),
       RefuseTrace, "padding"},
      {"Case21NoMultipleOfFour",
       with_times_text(kTimes.substr(0, n - 1), n - 1), RefuseTrace,
       "multiple of four"},
      {"Case21SpareBitsNotZero",
       with_times_text(kTimes.substr(0, n - 2) + "9=", n), RefuseTrace,
       "spare bits"},
      {"Case21SeveralPieces",
       with_times_text(kTimes.substr(0, 9) + "<!-- c --><![CDATA[" +
                           kTimes.substr(9, 9) + "]]><?p?>" + kTimes.substr(18),
                       n),
       Accept},
      {"Case21CharacterReference",
       with_times_text("&#65;" + kTimes.substr(1), n), Accept},
  };
}

std::vector<EdgeCase> zlib_cases() {
  using enum Behaviour;
  const std::string good =
      zlib_compressed(packed(MzmlTrace{}.times, "MS:1000523"));
  std::string wrong_sum = good;
  wrong_sum.back() = static_cast<char>(wrong_sum.back() ^ 1);
  return {
      {"Case22Zlib", with_times_zlib(good), Accept},
      {"Case22WrongAdler", with_times_zlib(wrong_sum), RefuseTrace, "damaged"},
      {"Case22EndsEarly", with_times_zlib(good.substr(0, good.size() - 5)),
       RefuseTrace, "damaged"},
      {"Case22BytesBehind", with_times_zlib(good + "xy"), RefuseTrace,
       "2 bytes behind"},
      {"Case22MoreThanStated",
       with_times_zlib(zlib_compressed(packed({0, 1, 2, 3, 4}, "MS:1000523"))),
       RefuseTrace, "more than 32"},
      {"Case22FewerThanStated",
       with_times_zlib(zlib_compressed(packed({0, 1, 2}, "MS:1000523"))),
       RefuseTrace, "fewer than 32"},
      {"Case22RawDeflate", with_times_zlib(good.substr(2)), RefuseTrace,
       "zlib header"},
      {"Case22Gzip", with_times_zlib("\x1F\x8B" + good), RefuseTrace,
       "zlib header"},
      {"Case22NotCompressedAtAll",
       with_times_zlib(packed(MzmlTrace{}.times, "MS:1000523")), RefuseTrace,
       "zlib header"},
  };
}

class MzmlTextCase : public testing::TestWithParam<EdgeCase> {};

TEST_P(MzmlTextCase, BehavesAsWanted) { expect_behaviour(GetParam()); }

INSTANTIATE_TEST_SUITE_P(Base64, MzmlTextCase, testing::ValuesIn(text_cases()),
                         case_words);
INSTANTIATE_TEST_SUITE_P(Zlib, MzmlTextCase, testing::ValuesIn(zlib_cases()),
                         case_words);

}  // namespace
}  // namespace loqsmith::test
