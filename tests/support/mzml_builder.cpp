#include "support/mzml_builder.hpp"

#include <gtest/gtest.h>
#include <libdeflate.h>

#include <cstdint>
#include <cstring>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/numbers.hpp"

namespace loqsmith::test {
namespace {

struct Term {
  std::string_view accession;
  std::string_view name;
};

constexpr Term kTerms[] = {
    {"MS:1000131", "number of detector counts"},
    {"MS:1000235", "total ion current chromatogram"},
    {"MS:1000515", "intensity array"},
    {"MS:1000519", "32-bit integer"},
    {"MS:1000521", "32-bit float"},
    {"MS:1000522", "64-bit integer"},
    {"MS:1000523", "64-bit float"},
    {"MS:1000574", "zlib compression"},
    {"MS:1000576", "no compression"},
    {"MS:1000595", "time array"},
    {"MS:1000809", "chromatogram title"},
    {"MS:1000812", "absorption chromatogram"},
    {"MS:1000820", "flow rate array"},
    {"MS:1000821", "pressure array"},
    {"MS:1000822", "temperature array"},
    {"MS:1000827", "isolation window target m/z"},
    {"MS:1001472", "selected ion monitoring chromatogram"},
    {"MS:1001473", "selected reaction monitoring chromatogram"},
    {"UO:0000010", "second"},
    {"UO:0000028", "millisecond"},
    {"UO:0000031", "minute"},
    {"UO:0000032", "hour"},
    {"UO:0000110", "pascal"},
    {"UO:0000218", "volt"},
    {"UO:0000269", "absorbance unit"},
};

std::string name_of(std::string_view accession) {
  for (const Term& term : kTerms) {
    if (term.accession == accession) return std::string(term.name);
  }
  return "term";
}

std::string escaped(std::string_view text) {
  std::string result;
  for (const char c : text) {
    if (c == '&') {
      result += "&amp;";
    } else if (c == '<') {
      result += "&lt;";
    } else if (c == '"') {
      result += "&quot;";
    } else {
      result += c;
    }
  }
  return result;
}

std::string attribute(std::string_view name, std::string_view value) {
  return " " + std::string(name) + "=\"" + escaped(value) + "\"";
}

std::string cv_param(std::string_view accession, std::string_view value = {},
                     std::string_view unit = {}) {
  std::string text = "<cvParam" + attribute("cvRef", accession.substr(0, 2)) +
                     attribute("accession", accession) +
                     attribute("name", name_of(accession)) +
                     attribute("value", value);
  if (!unit.empty()) {
    text += attribute("unitCvRef", unit.substr(0, 2)) +
            attribute("unitAccession", unit) +
            attribute("unitName", name_of(unit));
  }
  return text + "/>\n";
}

std::string array(const std::vector<double>& values, const MzmlTrace& trace,
                  std::string_view type, std::string_view kind,
                  std::string_view unit) {
  const std::string bytes = packed(values, type);
  const std::string text = base64(trace.zlib ? zlib_compressed(bytes) : bytes);
  return "<binaryDataArray" +
         attribute("encodedLength", std::to_string(text.size())) + ">\n" +
         cv_param(type) + cv_param(trace.zlib ? "MS:1000574" : "MS:1000576") +
         cv_param(kind, {}, unit) + "<binary>" + text +
         "</binary>\n</binaryDataArray>\n";
}

std::string isolation(std::string_view element, double mz,
                      std::string_view behind) {
  return "<" + std::string(element) + "><isolationWindow>" +
         cv_param("MS:1000827", shortest(mz), "MS:1000040") +
         "</isolationWindow>" + std::string(behind) + "</" +
         std::string(element) + ">\n";
}

std::string chromatogram(const MzmlTrace& trace, std::size_t index) {
  std::string text =
      "<chromatogram" + attribute("index", std::to_string(index)) +
      attribute("id", trace.id) +
      attribute("defaultArrayLength", std::to_string(trace.times.size())) +
      ">\n" + cv_param(trace.type);
  if (!trace.title.empty()) text += cv_param("MS:1000809", trace.title);
  if (trace.precursor_mz) {
    text += isolation("precursor", *trace.precursor_mz, "<activation/>");
  }
  if (trace.product_mz) text += isolation("product", *trace.product_mz, "");
  return text + "<binaryDataArrayList count=\"2\">\n" +
         array(trace.times, trace, trace.time_type, "MS:1000595",
               trace.time_unit) +
         array(trace.signal, trace, trace.signal_type, trace.signal_kind,
               trace.signal_unit) +
         "</binaryDataArrayList>\n</chromatogram>\n";
}

std::string front_matter(const MzmlDocumentPlan& plan) {
  std::string text =
      "<mzML xmlns=\"http://psi.hupo.org/ms/mzml\" version=\"1.1.0\">\n"
      "<cvList count=\"2\">\n"
      "<cv id=\"MS\" fullName=\"mass spectrometry\" URI=\"ms.obo\"/>\n"
      "<cv id=\"UO\" fullName=\"units\" URI=\"uo.obo\"/>\n</cvList>\n"
      "<fileDescription><fileContent/></fileDescription>\n"
      "<referenceableParamGroupList count=\"1\">\n"
      "<referenceableParamGroup id=\"group\">\n" +
      cv_param("MS:1000576") +
      "</referenceableParamGroup>\n</referenceableParamGroupList>\n";
  if (!plan.sample_name.empty()) {
    text += "<sampleList count=\"1\"><sample id=\"s1\"" +
            attribute("name", plan.sample_name) + "/></sampleList>\n";
  }
  return text +
         "<softwareList count=\"1\"><software id=\"sw\" version=\"1\"/>"
         "</softwareList>\n"
         "<instrumentConfigurationList count=\"1\">"
         "<instrumentConfiguration id=\"ic\"/></instrumentConfigurationList>\n"
         "<dataProcessingList count=\"1\"><dataProcessing id=\"dp\">"
         "<processingMethod order=\"0\" softwareRef=\"sw\"/></dataProcessing>"
         "</dataProcessingList>\n";
}

std::string run(const MzmlDocumentPlan& plan) {
  std::string text = "<run" + attribute("id", plan.run_id) +
                     attribute("defaultInstrumentConfigurationRef", "ic");
  if (!plan.sample_name.empty()) text += attribute("sampleRef", "s1");
  if (!plan.start_time.empty()) {
    text += attribute("startTimeStamp", plan.start_time);
  }
  text += ">\n<chromatogramList" +
          attribute("count", std::to_string(plan.traces.size())) +
          attribute("defaultDataProcessingRef", "dp") + ">\n";
  for (std::size_t i = 0; i < plan.traces.size(); ++i) {
    text += chromatogram(plan.traces[i], i);
  }
  return text + "</chromatogramList>\n</run>\n";
}

std::string index_of(const std::string& document,
                     const MzmlDocumentPlan& plan) {
  std::string text = "<indexList count=\"1\">\n<index name=\"chromatogram\">\n";
  std::size_t at = 0;
  for (const MzmlTrace& trace : plan.traces) {
    at = document.find("<chromatogram ", at + 1);
    text += "<offset" + attribute("idRef", trace.id) + ">" +
            std::to_string(at) + "</offset>\n";
  }
  return text + "</index>\n</indexList>\n<indexListOffset>" +
         std::to_string(document.size()) + "</indexListOffset>\n";
}

template <class Stored>
std::string packed_as(const std::vector<double>& values) {
  std::string bytes(values.size() * sizeof(Stored), '\0');
  for (std::size_t i = 0; i < values.size(); ++i) {
    const auto stored = static_cast<Stored>(values[i]);
    std::memcpy(bytes.data() + i * sizeof(Stored), &stored, sizeof(Stored));
  }
  return bytes;
}

}  // namespace

std::string mzml_document(const MzmlDocumentPlan& plan) {
  std::string text = "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n";
  if (plan.indexed) {
    text += "<indexedmzML xmlns=\"http://psi.hupo.org/ms/mzml\">\n";
  }
  text += front_matter(plan) + run(plan) + "</mzML>\n";
  if (!plan.indexed) return text;
  text += index_of(text, plan) + "<fileChecksum>";
  return text + sha1_hex(text) + "</fileChecksum>\n</indexedmzML>\n";
}

std::string mzml_document(const std::vector<MzmlTrace>& traces) {
  MzmlDocumentPlan plan;
  plan.traces = traces;
  return mzml_document(plan);
}

std::string with_change(std::string document, std::string_view from,
                        std::string_view to) {
  const std::size_t at = document.find(from);
  if (at == std::string::npos) {
    ADD_FAILURE() << "the document does not contain " << from;
    return document;
  }
  return document.replace(at, from.size(), to);
}

std::string resealed(const std::string& document) {
  const std::string mark = "<fileChecksum>";
  const std::size_t at = document.find(mark);
  if (at == std::string::npos) {
    ADD_FAILURE() << "no checksum to make right";
    return document;
  }
  const std::string covered = document.substr(0, at + mark.size());
  return covered + sha1_hex(covered) +
         document.substr(document.find("</fileChecksum>"));
}

std::string packed(const std::vector<double>& values, std::string_view type) {
  if (type == "MS:1000519") return packed_as<std::int32_t>(values);
  if (type == "MS:1000521") return packed_as<float>(values);
  if (type == "MS:1000522") return packed_as<std::int64_t>(values);
  return packed_as<double>(values);
}

std::string base64(std::string_view bytes) {
  constexpr std::string_view kDigits =
      "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";
  std::string text;
  for (std::size_t i = 0; i < bytes.size(); i += 3) {
    std::uint32_t word = 0;
    for (std::size_t k = i; k < i + 3; ++k) {
      word = word * 256 +
             (k < bytes.size() ? static_cast<unsigned char>(bytes[k]) : 0U);
    }
    for (unsigned shift : {18U, 12U, 6U, 0U}) {
      text += kDigits[(word >> shift) & 63U];
    }
  }
  const std::size_t missing = (3 - bytes.size() % 3) % 3;
  return text.replace(text.size() - missing, missing, missing, '=');
}

std::string zlib_compressed(std::string_view bytes) {
  libdeflate_compressor* compressor = libdeflate_alloc_compressor(6);
  std::string result(libdeflate_zlib_compress_bound(compressor, bytes.size()),
                     '\0');
  result.resize(libdeflate_zlib_compress(compressor, bytes.data(), bytes.size(),
                                         result.data(), result.size()));
  libdeflate_free_compressor(compressor);
  return result;
}

}  // namespace loqsmith::test
