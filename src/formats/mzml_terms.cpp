#include "loqsmith/formats/mzml_terms.hpp"

#include <algorithm>
#include <array>
#include <utility>

namespace loqsmith {
namespace {

constexpr std::array kChromatogramTypes{
    std::pair{"MS:1000235", TraceKind::Tic},
    std::pair{"MS:1000627", TraceKind::SelectedIon},
    std::pair{"MS:1000628", TraceKind::BasePeak},
    std::pair{"MS:1000810", TraceKind::Other},  // ion current
    std::pair{"MS:1000811", TraceKind::Other},  // electromagnetic radiation
    std::pair{"MS:1000812", TraceKind::Absorption},
    std::pair{"MS:1000813", TraceKind::Emission},
    std::pair{"MS:1001472", TraceKind::Sim},
    std::pair{"MS:1001473", TraceKind::Srm},
    std::pair{"MS:1001474", TraceKind::Other},  // consecutive reactions
    std::pair{"MS:1002715", TraceKind::Temperature},
    std::pair{"MS:1003019", TraceKind::Pressure},
    std::pair{"MS:1003020", TraceKind::Flow},
    std::pair{"MS:4000025", TraceKind::Other},  // precursor ion current
};

constexpr std::array<std::string_view, 4> kSignalKinds{
    kIntensityArray, "MS:1000820", "MS:1000821", "MS:1000822"};

// m/z, charge, signal to noise, time, wavelength, non-standard, mobility and
// noise arrays and their like.
constexpr std::array<std::string_view, 26> kOtherKinds{
    "MS:1000514", "MS:1000516", "MS:1000517", kTimeArray,   "MS:1000617",
    "MS:1000786", "MS:1002477", "MS:1002478", "MS:1002529", "MS:1002530",
    "MS:1002742", "MS:1002743", "MS:1002744", "MS:1002745", "MS:1002816",
    "MS:1002893", "MS:1003006", "MS:1003007", "MS:1003008", "MS:1003143",
    "MS:1003153", "MS:1003154", "MS:1003155", "MS:1003156", "MS:1003157",
    "MS:1003158"};

constexpr std::array<EncodingTerm, 6> kDataTypes{{
    {"MS:1000519", "32-bit integer", true},
    {"MS:1000520", "16-bit float", false},
    {"MS:1000521", "32-bit float", true},
    {"MS:1000522", "64-bit integer", true},
    {"MS:1000523", "64-bit float", true},
    {"MS:1001479", "null-terminated ASCII string", false},
}};

constexpr std::array<EncodingTerm, 18> kCompressions{{
    {"MS:1000576", "no compression", true},
    {kZlib, "zlib compression", true},
    {"MS:1002312", "MS-Numpress linear prediction compression"},
    {"MS:1002313", "MS-Numpress positive integer compression"},
    {"MS:1002314", "MS-Numpress short logged float compression"},
    {"MS:1002746",
     "MS-Numpress linear prediction compression followed by zlib compression"},
    {"MS:1002747",
     "MS-Numpress positive integer compression followed by zlib compression"},
    {"MS:1002748",
     "MS-Numpress short logged float compression followed by zlib compression"},
    {"MS:1003088", "truncation and zlib compression"},
    {"MS:1003089", "truncation, delta prediction and zlib compression"},
    {"MS:1003090", "truncation, linear prediction and zlib compression"},
    {"MS:1003780", "zstd compression"},
    {"MS:1003781", "byte-shuffled zstd compression"},
    {"MS:1003782", "dictionary-encoded zstd compression"},
    {"MS:1003783",
     "MS-Numpress linear prediction compression followed by zstd compression"},
    {"MS:1003784",
     "MS-Numpress positive integer compression followed by zstd compression"},
    {"MS:1003785",
     "MS-Numpress short logged float compression followed by zstd compression"},
    {"MS:1003826", "coordinate grid encoding"},
}};

constexpr std::array<UnitTerm, 33> kUnits{{
    {"MS:1000040", "m/z", ""},
    {"MS:1000131", "number of detector counts", "number of counts"},
    {"MS:1000132", "percent of base peak", ""},
    {"MS:1000814", "counts per second", ""},
    {"MS:1000905", "percent of base peak times 100", ""},
    {"UO:0000010", "second", ""},
    {"UO:0000011", "ampere", ""},
    {"UO:0000012", "kelvin", ""},
    {"UO:0000018", "nanometer", ""},
    {"UO:0000027", "degree Celsius", ""},
    {"UO:0000028", "millisecond", ""},
    {"UO:0000029", "microsecond", ""},
    {"UO:0000031", "minute", ""},
    {"UO:0000032", "hour", ""},
    {"UO:0000098", "milliliter", ""},
    {"UO:0000106", "hertz", ""},
    {"UO:0000110", "pascal", ""},
    {"UO:0000148", "counts per minute", ""},
    {"UO:0000150", "nanosecond", ""},
    {"UO:0000175", "gram per liter", ""},
    {"UO:0000186", "dimensionless unit", ""},
    {"UO:0000187", "percent", ""},
    {"UO:0000189", "count unit", ""},
    {"UO:0000218", "volt", ""},
    {"UO:0000221", "dalton", ""},
    {"UO:0000247", "millivolt", ""},
    {"UO:0000249", "microvolt", ""},
    {"UO:0000266", "electronvolt", "electron volt"},
    {"UO:0000269", "absorbance unit", ""},
    {"UO:0000271", "microliters per minute", ""},
    {"UO:0000314", "relative fluorescence unit", ""},
    {"UO:0010054", "picoampere", ""},
    {"UO:0010069", "bar", ""},
}};

template <class Table>
const typename Table::value_type* find_term(const Table& table,
                                            std::string_view accession) {
  for (const auto& term : table) {
    if (term.accession == accession) return &term;
  }
  return nullptr;
}

template <class Table>
bool contains(const Table& table, std::string_view accession) {
  return std::find(table.begin(), table.end(), accession) != table.end();
}

}  // namespace

std::optional<TraceKind> chromatogram_type(std::string_view accession) {
  for (const auto& [known, kind] : kChromatogramTypes) {
    if (accession == known) return kind;
  }
  return std::nullopt;
}

bool is_signal_kind(std::string_view accession) {
  return contains(kSignalKinds, accession);
}

bool is_array_kind(std::string_view accession) {
  return is_signal_kind(accession) || contains(kOtherKinds, accession);
}

const EncodingTerm* data_type_term(std::string_view accession) {
  return find_term(kDataTypes, accession);
}

const EncodingTerm* compression_term(std::string_view accession) {
  return find_term(kCompressions, accession);
}

NumberType number_type(const EncodingTerm& readable_type) {
  if (readable_type.accession == "MS:1000519") return NumberType::Int32;
  if (readable_type.accession == "MS:1000521") return NumberType::Float32;
  if (readable_type.accession == "MS:1000522") return NumberType::Int64;
  return NumberType::Float64;
}

const UnitTerm* unit_term(std::string_view accession) {
  return find_term(kUnits, accession);
}

std::optional<TimeUnit> time_unit(std::string_view accession) {
  if (accession == "UO:0000031") return TimeUnit{};
  if (accession == "UO:0000010") return TimeUnit{1.0, 60.0, true};
  if (accession == "UO:0000028") return TimeUnit{1.0, 60000.0, false};
  if (accession == "UO:0000032") return TimeUnit{60.0, 1.0, false};
  return std::nullopt;
}

}  // namespace loqsmith
