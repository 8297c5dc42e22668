// How one chromatogram's arrays may be wrong, and what shall come of it.

#include <gtest/gtest.h>

#include <cmath>
#include <limits>
#include <string>
#include <vector>

#include "edge_case.hpp"

namespace loqsmith::test {
namespace {

constexpr double kInfinity = std::numeric_limits<double>::infinity();

std::string document_of(const MzmlTrace& trace) {
  return mzml_document({trace});
}

MzmlTrace with_points(std::vector<double> times, std::vector<double> signal) {
  MzmlTrace trace;
  trace.times = std::move(times);
  trace.signal = std::move(signal);
  return trace;
}

std::string changed(std::string_view from, std::string_view to) {
  return with_change(mzml_document({MzmlTrace{}}), from, to);
}

std::string changed_zlib(std::string_view from, std::string_view to) {
  MzmlTrace trace;
  trace.zlib = true;
  return with_change(document_of(trace), from, to);
}

MzmlTrace with_time_unit(const std::string& unit) {
  MzmlTrace trace;
  trace.time_unit = unit;
  return trace;
}

std::string term(std::string_view accession) {
  return "<cvParam cvRef=\"MS\" accession=\"" + std::string(accession) +
         "\" name=\"x\"/>";
}

const std::string kFloat64 =
    "<cvParam cvRef=\"MS\" accession=\"MS:1000523\" name=\"64-bit float\" "
    "value=\"\"/>";
const std::string kUncompressed =
    "<cvParam cvRef=\"MS\" accession=\"MS:1000576\" name=\"no compression\" "
    "value=\"\"/>\n<cvParam cvRef=\"MS\" accession=\"MS:1000595\"";
const std::string kTimeKind =
    "accession=\"MS:1000595\" name=\"time array\" value=\"\" "
    "unitCvRef=\"UO\" unitAccession=\"UO:0000031\" unitName=\"minute\"";
const std::string kBehindTimeKind =
    "accession=\"MS:1000595\" name=\"time array\" value=\"\" ";

std::string with_compression(std::string_view accession) {
  return changed(kUncompressed, term(accession) +
                                    "<cvParam cvRef=\"MS\" "
                                    "accession=\"MS:1000595\"");
}

// A third array of that kind before the others' end.
std::string with_array(std::string_view kind, std::string_view attributes) {
  std::string text =
      changed("</binaryDataArrayList>",
              "<binaryDataArray encodedLength=\"0\"" + std::string(attributes) +
                  ">" + kFloat64 + term("MS:1000576") + term(kind) +
                  "<binary/></binaryDataArray></binaryDataArrayList>");
  return with_change(text, "binaryDataArrayList count=\"2\"",
                     "binaryDataArrayList count=\"3\"");
}

std::vector<EdgeCase> unit_cases() {
  using enum Behaviour;
  MzmlTrace no_signal_unit;
  no_signal_unit.signal_unit.clear();
  const auto time_unit = [](const std::string& attributes) {
    return changed(kTimeKind, kBehindTimeKind + attributes);
  };
  return {
      {"Case03NoTimeUnit", document_of(with_time_unit("")), RefuseTrace,
       "no unit on the time array"},
      {"Case03NoTimeUnitButTheMethodStatesOne",
       document_of(with_time_unit("")),
       Warn,
       "taken from the method",
       {"second", true}},
      {"Case04UnitNameAlone", time_unit("unitName=\"minute\""), RefuseTrace,
       "without accession"},
      {"Case04SignalUnitNameAlone",
       changed("unitCvRef=\"MS\" unitAccession=\"MS:1000131\"", ""),
       RefuseTrace, "without accession"},
      {"Case04NameAndAccessionDisagree",
       time_unit("unitAccession=\"UO:0000031\" unitName=\"second\""), Warn,
       "means minute"},
      {"Case04FormerName",
       changed("unitName=\"number of detector counts\"",
               "unitName=\"number of counts\""),
       Accept},
      {"Case04WrongUnitCvRef",
       time_unit("unitCvRef=\"MS\" unitAccession=\"UO:0000031\""), Warn,
       "refers to the vocabulary MS"},
      {"Case05Minutes", document_of(with_time_unit("UO:0000031")), Accept},
      {"Case05Seconds", document_of(with_time_unit("UO:0000010")), Accept},
      {"Case05Milliseconds", document_of(with_time_unit("UO:0000028")), Warn,
       "milliseconds"},
      {"Case05Hours", document_of(with_time_unit("UO:0000032")), Warn, "hours"},
      {"Case05Microseconds", document_of(with_time_unit("UO:0000029")),
       RefuseTrace, "UO:0000029"},
      {"Case06NoSignalUnit", document_of(no_signal_unit), Warn,
       "unit of the signal not stated"},
  };
}

std::vector<EdgeCase> term_cases() {
  using enum Behaviour;
  MzmlTrace mixed;
  mixed.signal_type = "MS:1000521";
  MzmlTrace integers;
  integers.signal_type = "MS:1000519";
  MzmlTrace huge_integer = with_points({0.0, 1.0}, {1.0, 0x1.0p54});
  huge_integer.signal_type = "MS:1000522";
  return {
      {"Case08MixedWidths", document_of(mixed), Accept},
      {"Case08IntegerSignal", document_of(integers), Accept},
      {"Case08IntegerBeyondADouble", document_of(huge_integer), RefuseTrace,
       "index 1"},
      {"Case09NoDataType", changed(kFloat64, ""), RefuseTrace,
       "no known data type"},
      {"Case09NoCompression",
       changed(kUncompressed, "<cvParam cvRef=\"MS\" accession=\"MS:1000595\""),
       RefuseTrace, "no known compression"},
      {"Case09NoKind", changed("accession=\"MS:1000595\"", "accession=\"\""),
       RefuseTrace, "no known kind of array"},
      {"Case09TwoDataTypes", changed(kFloat64, kFloat64 + term("MS:1000521")),
       RefuseTrace, "MS:1000523 and MS:1000521"},
      {"Case09OneDataTypeTwice", changed(kFloat64, kFloat64 + kFloat64),
       RefuseTrace, "more than one data type"},
      {"Case09TwoCompressions",
       changed(kFloat64, kFloat64 + term("MS:1000574")), RefuseTrace,
       "more than one compression"},
      {"Case09TwoKinds", changed(kFloat64, kFloat64 + term("MS:1000515")),
       RefuseTrace, "more than one kind"},
      {"Case09Obsolete16BitFloat", changed(kFloat64, term("MS:1000520")),
       RefuseTrace, "MS:1000520 (16-bit float)"},
      {"Case09Text", changed(kFloat64, term("MS:1001479")), RefuseTrace,
       "MS:1001479"},
      {"Case09UnknownDataType", changed(kFloat64, term("MS:1999999")),
       RefuseTrace, "MS:1999999"},
      {"Case34TwoIntensityArrays", with_array("MS:1000515", ""), RefuseTrace,
       "a second intensity array"},
      {"Case34TwoTimeArrays", with_array("MS:1000595", ""), RefuseTrace,
       "a second time array"},
      {"Case34NoIntensityArray",
       changed("accession=\"MS:1000515\"", "accession=\"MS:1000516\""),
       RefuseTrace, "no intensity array"},
      {"Case34NoTimeArray",
       changed("accession=\"MS:1000595\"", "accession=\"MS:1000514\""),
       RefuseTrace, "no time array"},
      {"Case34NonStandardArrayBeside", with_array("MS:1000786", ""), Accept},
      {"Case47NumpressLinear", with_compression("MS:1002312"), RefuseTrace,
       "MS:1002312 (MS-Numpress linear prediction compression)"},
      {"Case47NumpressWithZlib", with_compression("MS:1002748"), RefuseTrace,
       "MS:1002748 (MS-Numpress short logged float compression followed by"},
      {"Case47Zstd", with_compression("MS:1003780"), RefuseTrace,
       "MS:1003780 (zstd compression)"},
  };
}

std::string length_attribute(const std::string& name,
                             const std::string& value) {
  return changed("defaultArrayLength=\"4\"", name + "=\"" + value + "\"");
}

std::vector<EdgeCase> length_cases() {
  using enum Behaviour;
  MzmlTrace empty = with_points({}, {});
  MzmlTrace empty_zlib = empty;
  empty_zlib.zlib = true;
  const auto array_lengths = [](const std::string& time,
                                const std::string& signal) {
    const std::string from = "<binaryDataArray encodedLength";
    std::string text = changed(
        from, "<binaryDataArray  arrayLength=\"" + time + "\" encodedLength");
    return with_change(
        text, from,
        "<binaryDataArray  arrayLength=\"" + signal + "\" encodedLength");
  };
  return {
      {"Case10ArrayLengthAgrees", array_lengths("4", "4"), Accept},
      {"Case10ArrayLengthWinsOverTheDefault",
       with_change(array_lengths("4", "4"), "defaultArrayLength=\"4\"",
                   "defaultArrayLength=\"7\""),
       Accept},
      {"Case10ArrayLengthsDiffer", array_lengths("4", "3"), RefuseTrace,
       "3 signal values"},
      {"Case10AnotherArrayOfOtherLength",
       with_array("MS:1000786", " arrayLength=\"0\""), Warn, "another length"},
      {"Case11NoPoints", document_of(empty), Accept},
      {"Case11NoPointsZlib", document_of(empty_zlib), Accept},
      {"Case11NoPointsNamedZlibWithoutText",
       with_change(document_of(empty), kUncompressed,
                   term("MS:1000574") +
                       "<cvParam cvRef=\"MS\" accession=\"MS:1000595\""),
       Accept},
      {"Case11NoPointsStatedButData",
       length_attribute("defaultArrayLength", "0"), RefuseTrace, "32 bytes"},
      {"Case12LengthsDiffer",
       document_of(with_points({0.0, 1.0, 2.0}, {1.0, 2.0})), RefuseTrace,
       "16 bytes in the signal array"},
      {"Case13MoreBytesThanStated", length_attribute("defaultArrayLength", "3"),
       RefuseTrace, "32 bytes"},
      {"Case13FewerBytesThanStated",
       length_attribute("defaultArrayLength", "5"), RefuseTrace, "32 bytes"},
      {"Case13WidthDoesNotFit", changed(kFloat64, term("MS:1000521")),
       RefuseTrace, "32 bytes"},
  };
}

std::vector<EdgeCase> absurd_length_cases() {
  using enum Behaviour;
  return {
      {"Case23NegativeLength", length_attribute("defaultArrayLength", "-4"),
       RefuseFile, "-4"},
      {"Case23NegativeEncodedLength",
       changed("encodedLength=\"44\"", "encodedLength=\"-44\""), RefuseFile,
       "-44"},
      {"Case23HugeLengthUncompressed",
       length_attribute("defaultArrayLength", "100000000"), RefuseTrace,
       "100000000 values"},
      {"Case23HugeLengthZlib",
       changed_zlib("defaultArrayLength=\"4\"",
                    "defaultArrayLength=\"100000000\""),
       RefuseTrace, "cannot hold"},
      {"Case23LengthBeyondTheCap",
       length_attribute("defaultArrayLength", "134217729"), RefuseTrace,
       "at most 134217728"},
      {"Case23LengthBeyond64Bits",
       length_attribute("defaultArrayLength", "99999999999999999999"),
       RefuseTrace, "a whole number"},
      {"Case23WrongCount",
       changed("chromatogramList count=\"1\"", "chromatogramList count=\"9\""),
       Warn, "holds 1"},
      {"Case38LengthIsNoNumber", length_attribute("defaultArrayLength", "4.0"),
       RefuseTrace, "4.0"},
      {"Case38LengthIsEmpty", length_attribute("defaultArrayLength", ""),
       RefuseTrace, "a whole number"},
      {"Case38LengthWithPlus", length_attribute("defaultArrayLength", "+4"),
       RefuseTrace, "+4"},
  };
}

std::vector<EdgeCase> number_cases() {
  using enum Behaviour;
  const double nan = std::numeric_limits<double>::quiet_NaN();
  MzmlTrace absorbance = with_points({-0.1, 0.0, 0.1}, {-0.075, 0.0, 0.1});
  absorbance.signal_unit = "UO:0000269";
  return {
      {"Case14EqualTimes", document_of(with_points({0, 1, 1}, {1, 2, 3})),
       RefuseTrace, "index 2"},
      {"Case14FallingTimes", document_of(with_points({0, 2, 1}, {1, 2, 3})),
       RefuseTrace, "index 2"},
      {"Case15NotANumberInTime",
       document_of(with_points({0, nan, 2}, {1, 2, 3})), RefuseTrace,
       "not a number at index 1 of the time array"},
      {"Case15NotANumberInSignal",
       document_of(with_points({0, 1, 2}, {1, 2, nan})), RefuseTrace,
       "not a number at index 2 of the signal array"},
      {"Case15Infinity", document_of(with_points({0, 1, 2}, {kInfinity, 2, 3})),
       RefuseTrace, "plus infinity at index 0"},
      {"Case15MinusInfinity",
       document_of(with_points({-kInfinity, 1, 2}, {1, 2, 3})), RefuseTrace,
       "minus infinity at index 0"},
      {"Case15NegativeZeroAndDenormal",
       document_of(with_points({0, 1, 2}, {-0.0, 5e-324, 1})), Accept},
      {"Case16NegativeTimeAndAbsorbance", document_of(absorbance), Accept},
      {"Case16NegativeCounts", document_of(with_points({0, 1}, {-1, 2})), Warn,
       "negative ion counts"},
      {"Case17UnevenSampling",
       document_of(with_points({0, 1, 2.5, 3, 7.9}, {1, 1, 1, 1, 1})), Accept},
      {"Case17Gap",
       document_of(with_points({0, 1, 2, 3, 8.5, 9}, {1, 1, 1, 1, 1, 1})), Warn,
       "from 3 to 8.5 min"},
  };
}

class MzmlArrayCase : public testing::TestWithParam<EdgeCase> {};

TEST_P(MzmlArrayCase, BehavesAsWanted) { expect_behaviour(GetParam()); }

INSTANTIATE_TEST_SUITE_P(Units, MzmlArrayCase, testing::ValuesIn(unit_cases()),
                         case_words);
INSTANTIATE_TEST_SUITE_P(Terms, MzmlArrayCase, testing::ValuesIn(term_cases()),
                         case_words);
INSTANTIATE_TEST_SUITE_P(Lengths, MzmlArrayCase,
                         testing::ValuesIn(length_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(AbsurdLengths, MzmlArrayCase,
                         testing::ValuesIn(absurd_length_cases()), case_words);
INSTANTIATE_TEST_SUITE_P(Numbers, MzmlArrayCase,
                         testing::ValuesIn(number_cases()), case_words);

}  // namespace
}  // namespace loqsmith::test
