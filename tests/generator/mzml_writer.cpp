#include "generator/mzml_writer.hpp"

#include <libdeflate.h>

#include <cstddef>
#include <memory>
#include <stdexcept>
#include <vector>

#include "generator/base64.hpp"
#include "generator/random_stream.hpp"
#include "loqsmith/base/digest.hpp"

namespace loqsmith::test {
namespace {

constexpr const char* kAbsorptionId = "UV 220 nm";
constexpr const char* kPressureId = "Column pressure";

struct Term {
  const char* accession;
  const char* name;
  const char* unit_accession = nullptr;
  const char* unit_name = nullptr;
};

constexpr Term kMinutes{"MS:1000595", "time array", "UO:0000031", "minute"};
constexpr Term kAbsorbance{"MS:1000515", "intensity array", "UO:0000269",
                           "absorbance unit"};
constexpr Term kPascal{"MS:1000821", "pressure array", "UO:0000110", "pascal"};
constexpr Term kDouble{"MS:1000523", "64-bit float"};
constexpr Term kFloat{"MS:1000521", "32-bit float"};
constexpr Term kZlib{"MS:1000574", "zlib compression"};

std::string deflated(const std::string& bytes) {
  const std::unique_ptr<libdeflate_compressor,
                        decltype(&libdeflate_free_compressor)>
      compressor(libdeflate_alloc_compressor(9), &libdeflate_free_compressor);
  if (!compressor) throw std::runtime_error("no memory for the compressor");
  std::string out(
      libdeflate_zlib_compress_bound(compressor.get(), bytes.size()), '\0');
  out.resize(libdeflate_zlib_compress(compressor.get(), bytes.data(),
                                      bytes.size(), out.data(), out.size()));
  return out;
}

std::string cv_param(const Term& term, const std::string& value = "") {
  std::string text = std::string("<cvParam cvRef=\"MS\" accession=\"") +
                     term.accession + "\" name=\"" + term.name + "\" value=\"" +
                     value + "\"";
  if (term.unit_accession != nullptr) {
    text += std::string(" unitCvRef=\"UO\" unitAccession=\"") +
            term.unit_accession + "\" unitName=\"" + term.unit_name + "\"";
  }
  return text + "/>\n";
}

std::string data_array(const std::string& packed, const Term& type,
                       const Term& kind) {
  const std::string text = base64_text(deflated(packed));
  return "          <binaryDataArray encodedLength=\"" +
         std::to_string(text.size()) + "\">\n            " + cv_param(type) +
         "            " + cv_param(kZlib) + "            " + cv_param(kind) +
         "            <binary>" + text +
         "</binary>\n          </binaryDataArray>\n";
}

std::string chromatogram(int index, const std::string& id, const Term& type,
                         const std::vector<double>& minutes,
                         const std::vector<double>& signal,
                         const Term& signal_kind) {
  return "      <chromatogram index=\"" + std::to_string(index) + "\" id=\"" +
         id + "\" defaultArrayLength=\"" + std::to_string(minutes.size()) +
         "\">\n        " + cv_param(type) +
         "        <binaryDataArrayList count=\"2\">\n" +
         data_array(packed_doubles(minutes), kDouble, kMinutes) +
         data_array(packed_floats(signal), kFloat, signal_kind) +
         "        </binaryDataArrayList>\n      </chromatogram>\n";
}

std::string absorption(const SimulatedNight& night, const Vial& vial) {
  const std::vector<double> signal = simulate_signal(night, vial);
  std::vector<double> minutes(signal.size());
  for (std::size_t i = 0; i < minutes.size(); ++i) {
    minutes[i] = time_of_point(night.detector, i);
  }
  return chromatogram(0, kAbsorptionId,
                      {"MS:1000812", "absorption chromatogram"}, minutes,
                      signal, kAbsorbance);
}

std::string pressure(const SimulatedNight& night, const Vial& vial) {
  RandomStream random(night.name + "/" + std::to_string(vial.number) +
                      "/pressure");
  std::vector<double> minutes;
  std::vector<double> pascal;
  for (double t = 0.0; t <= night.detector.run_minutes; t += 0.25) {
    minutes.push_back(t);
    const double steps = 9600.0 + 20.0 * t + 6.0 * random.normal();
    pascal.push_back(2048.0 * static_cast<double>(static_cast<int>(steps)));
  }
  return chromatogram(1, kPressureId, {"MS:1003019", "pressure chromatogram"},
                      minutes, pascal, kPascal);
}

std::string header(const SimulatedNight& night, const Vial& vial) {
  const std::string sample_id = "vial_" + std::to_string(vial.number);
  return R"(  <mzML xmlns="http://psi.hupo.org/ms/mzml" version="1.1.0">
    <cvList count="2">
      <cv id="MS" fullName="Proteomics Standards Initiative Mass Spectrometry Ontology" URI="https://raw.githubusercontent.com/HUPO-PSI/psi-ms-CV/master/psi-ms.obo"/>
      <cv id="UO" fullName="Unit Ontology" URI="https://raw.githubusercontent.com/bio-ontology-research-group/unit-ontology/master/unit.obo"/>
    </cvList>
    <fileDescription>
      <fileContent>
        <cvParam cvRef="MS" accession="MS:1000812" name="absorption chromatogram" value=""/>
        <cvParam cvRef="MS" accession="MS:1003019" name="pressure chromatogram" value=""/>
      </fileContent>
    </fileDescription>
    <sampleList count="1">
      <sample id=")" +
         sample_id + "\" name=\"" + vial.sample + R"("/>
    </sampleList>
    <softwareList count="1">
      <software id="simulator" version="1">
        <cvParam cvRef="MS" accession="MS:1000799" name="custom unreleased software tool" value="simulated chromatograph"/>
      </software>
    </softwareList>
    <instrumentConfigurationList count="1">
      <instrumentConfiguration id="simulated_detector">
        <cvParam cvRef="MS" accession="MS:1000031" name="instrument model" value=""/>
      </instrumentConfiguration>
    </instrumentConfigurationList>
    <dataProcessingList count="1">
      <dataProcessing id="as_acquired">
        <processingMethod order="0" softwareRef="simulator">
          <cvParam cvRef="MS" accession="MS:1000544" name="Conversion to mzML" value=""/>
        </processingMethod>
      </dataProcessing>
    </dataProcessingList>
    <run id="injection_)" +
         std::to_string(vial.number) +
         "\" defaultInstrumentConfigurationRef=\"simulated_detector\" "
         "sampleRef=\"" +
         sample_id + "\" startTimeStamp=\"" + start_time(night, vial) + "\">\n";
}

std::string index_entry(const std::string& document, const std::string& id) {
  const std::size_t name = document.find("id=\"" + id + "\"");
  const std::size_t offset = document.rfind("<chromatogram ", name);
  return "      <offset idRef=\"" + id + "\">" + std::to_string(offset) +
         "</offset>\n";
}

std::string with_index(std::string document) {
  const std::string entries =
      index_entry(document, kAbsorptionId) + index_entry(document, kPressureId);
  document += "  ";
  const std::size_t list_offset = document.size();
  document += "<indexList count=\"1\">\n    <index name=\"chromatogram\">\n" +
              entries + "    </index>\n  </indexList>\n  <indexListOffset>" +
              std::to_string(list_offset) +
              "</indexListOffset>\n  <fileChecksum>";
  return document + sha1_hex(document) + "</fileChecksum>\n</indexedmzML>\n";
}

}  // namespace

std::string mzml_document(const SimulatedNight& night, const Vial& vial) {
  return with_index(
      "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n"
      "<indexedmzML xmlns=\"http://psi.hupo.org/ms/mzml\">\n" +
      header(night, vial) +
      "      <chromatogramList count=\"2\" "
      "defaultDataProcessingRef=\"as_acquired\">\n" +
      absorption(night, vial) + pressure(night, vial) +
      "      </chromatogramList>\n    </run>\n  </mzML>\n");
}

}  // namespace loqsmith::test
