#include "loqsmith/formats/mzml_schema.hpp"

#include <array>
#include <unordered_map>
#include <utility>

namespace loqsmith {
namespace {

// Source: mzML schemas 1.1.0 and 1.1.1 with the index wrapper up to 1.1.3
// (HUPO Proteomics Standards Initiative), from memory.
constexpr std::array kRules{
    RuleText{"indexedmzML", "", "mzML indexList indexListOffset fileChecksum"},
    RuleText{"indexList", "count", "index*"},
    RuleText{"index", "name", "offset*"},
    RuleText{"offset", "idRef spotID scanTime", "#"},
    RuleText{"indexListOffset", "", "#"},
    RuleText{"fileChecksum", "", "#"},
    RuleText{"mzML", "accession version id",
             "cvList fileDescription referenceableParamGroupList sampleList "
             "softwareList scanSettingsList instrumentConfigurationList "
             "dataProcessingList run"},
    RuleText{"cvList", "count", "cv*"},
    RuleText{"cv", "id fullName version URI", ""},
    RuleText{"fileDescription", "", "fileContent sourceFileList contact*"},
    RuleText{"fileContent", "", "@"},
    RuleText{"sourceFileList", "count", "sourceFile*"},
    RuleText{"sourceFile", "id name location", "@"},
    RuleText{"contact", "", "@"},
    RuleText{"referenceableParamGroupList", "count",
             "referenceableParamGroup*"},
    RuleText{"referenceableParamGroup", "id", "cvParam* userParam*"},
    RuleText{"sampleList", "count", "sample*"},
    RuleText{"sample", "id name", "@"},
    RuleText{"softwareList", "count", "software*"},
    RuleText{"software", "id version", "@"},
    RuleText{"scanSettingsList", "count", "scanSettings*"},
    RuleText{"scanSettings", "id", "@ sourceFileRefList targetList"},
    RuleText{"sourceFileRefList", "count", "sourceFileRef*"},
    RuleText{"sourceFileRef", "ref", ""},
    RuleText{"targetList", "count", "target*"},
    RuleText{"target", "", "@"},
    RuleText{"instrumentConfigurationList", "count",
             "instrumentConfiguration*"},
    RuleText{"instrumentConfiguration", "id scanSettingsRef",
             "@ componentList softwareRef"},
    RuleText{"componentList", "count", "source* analyzer* detector*"},
    RuleText{"source", "order", "@"},
    RuleText{"analyzer", "order", "@"},
    RuleText{"detector", "order", "@"},
    RuleText{"softwareRef", "ref", ""},
    RuleText{"dataProcessingList", "count", "dataProcessing*"},
    RuleText{"dataProcessing", "id", "processingMethod*"},
    RuleText{"processingMethod", "order softwareRef", "@"},
    RuleText{"run",
             "id defaultInstrumentConfigurationRef defaultSourceFileRef "
             "sampleRef startTimeStamp",
             "@ spectrumList chromatogramList"},
    RuleText{"spectrumList", "count defaultDataProcessingRef", "spectrum*"},
    RuleText{"spectrum",
             "id spotID index defaultArrayLength dataProcessingRef "
             "sourceFileRef",
             "@ scanList precursorList productList binaryDataArrayList"},
    RuleText{"scanList", "count", "@ scan*"},
    RuleText{"scan",
             "spectrumRef sourceFileRef externalSpectrumID "
             "instrumentConfigurationRef",
             "@ scanWindowList"},
    RuleText{"scanWindowList", "count", "scanWindow*"},
    RuleText{"scanWindow", "", "@"},
    RuleText{"precursorList", "count", "precursor*"},
    RuleText{"precursor", "spectrumRef sourceFileRef externalSpectrumID",
             "isolationWindow selectedIonList activation"},
    RuleText{"isolationWindow", "", "@"},
    RuleText{"selectedIonList", "count", "selectedIon*"},
    RuleText{"selectedIon", "", "@"},
    RuleText{"activation", "", "@"},
    RuleText{"productList", "count", "product*"},
    RuleText{"product", "", "isolationWindow"},
    RuleText{"chromatogramList", "count defaultDataProcessingRef",
             "chromatogram*"},
    RuleText{"chromatogram", "id index defaultArrayLength dataProcessingRef",
             "@ precursor product binaryDataArrayList"},
    RuleText{"binaryDataArrayList", "count", "binaryDataArray*"},
    RuleText{"binaryDataArray", "arrayLength dataProcessingRef encodedLength",
             "@ binary"},
    RuleText{"binary", "", "#"},
    RuleText{"cvParam",
             "cvRef accession name value unitAccession unitName unitCvRef", ""},
    RuleText{"userParam", "name type value unitAccession unitName unitCvRef",
             ""},
    RuleText{"referenceableParamGroupRef", "ref", ""},
};

constexpr std::array kReferences{
    std::pair{"cvRef", "cv"},
    std::pair{"unitCvRef", "cv"},
    std::pair{"dataProcessingRef", "dataProcessing"},
    std::pair{"defaultDataProcessingRef", "dataProcessing"},
    std::pair{"instrumentConfigurationRef", "instrumentConfiguration"},
    std::pair{"defaultInstrumentConfigurationRef", "instrumentConfiguration"},
    std::pair{"sourceFileRef", "sourceFile"},
    std::pair{"defaultSourceFileRef", "sourceFile"},
    std::pair{"scanSettingsRef", "scanSettings"},
    std::pair{"softwareRef", "software"},
    std::pair{"sampleRef", "sample"},
};

std::unordered_map<std::string_view, SchemaElement> all_rules() {
  std::unordered_map<std::string_view, SchemaElement> rules;
  for (const RuleText& text : kRules)
    rules.emplace(text.name, schema_element(text));
  return rules;
}

}  // namespace

const SchemaElement* mzml_rule(std::string_view name) {
  static const auto rules = all_rules();
  const auto it = rules.find(name);
  return it == rules.end() ? nullptr : &it->second;
}

std::string_view mzml_reference_target(std::string_view attribute) {
  for (const auto& [name, target] : kReferences) {
    if (attribute == name) return target;
  }
  return {};
}

}  // namespace loqsmith
