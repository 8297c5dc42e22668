#include "loqsmith/formats/animl_schema.hpp"

#include <array>
#include <unordered_map>

namespace loqsmith {
namespace {

constexpr std::string_view kValues =
    "I* L* F* D* S* Boolean* DateTime* PNG* EmbeddedXML* SVG*";
constexpr std::string_view kOneValue =
    "I L F D S Boolean DateTime PNG EmbeddedXML SVG Unit";

// Source: AnIML core schema, draft 0.90 (ASTM E13.15), from memory.
constexpr std::array kRules{
    RuleText{"AnIML", "version",
             "SampleSet ExperimentStepSet AuditTrailEntrySet SignatureSet"},
    RuleText{"SampleSet", "id", "Sample*"},
    RuleText{"Sample",
             "sampleID name id barcode comment derived containerType "
             "containerID locationInContainer sourceDataLocation",
             "TagSet Category*"},
    RuleText{"TagSet", "", "Tag*"},
    RuleText{"Tag", "name value", ""},
    RuleText{"ExperimentStepSet", "id", "Template* ExperimentStep*"},
    RuleText{"Template", "", ""},
    RuleText{"AuditTrailEntrySet", "id", ""},
    RuleText{"SignatureSet", "", ""},
    RuleText{"ExperimentStep",
             "experimentStepID name id templateUsed comment sourceDataLocation",
             "TagSet Technique Infrastructure Method Result*"},
    RuleText{"Technique", "name uri sha256 id", "Extension*"},
    RuleText{"Extension", "name uri sha256", ""},
    RuleText{"Infrastructure", "id",
             "SampleReferenceSet ParentDataPointReferenceSet "
             "ExperimentDataReferenceSet Timestamp"},
    RuleText{"SampleReferenceSet", "id", "SampleReference* SampleInheritance*"},
    RuleText{"SampleReference", "sampleID role samplePurpose id", ""},
    RuleText{"SampleInheritance", "role samplePurpose id", ""},
    RuleText{"ParentDataPointReferenceSet", "id", "ParentDataPointReference*"},
    RuleText{"ParentDataPointReference", "seriesID id", "StartValue EndValue"},
    RuleText{"ExperimentDataReferenceSet", "id",
             "ExperimentDataReference* ExperimentDataBulkReference*"},
    RuleText{"ExperimentDataReference", "role dataPurpose experimentStepID id",
             ""},
    RuleText{"ExperimentDataBulkReference",
             "role dataPurpose experimentStepIDPrefix id", ""},
    RuleText{"Timestamp", "", "#"},
    RuleText{"Method", "name id", "Author Device Software Category*"},
    RuleText{"Author", "userType id",
             "Name Affiliation Role Email Phone Location"},
    RuleText{"Device", "id",
             "DeviceIdentifier Manufacturer Name FirmwareVersion SerialNumber"},
    RuleText{"Software", "id", "Manufacturer Name Version OperatingSystem"},
    RuleText{"Name", "", "#"},
    RuleText{"Affiliation", "", "#"},
    RuleText{"Role", "", "#"},
    RuleText{"Email", "", "#"},
    RuleText{"Phone", "", "#"},
    RuleText{"Location", "", "#"},
    RuleText{"DeviceIdentifier", "", "#"},
    RuleText{"Manufacturer", "", "#"},
    RuleText{"FirmwareVersion", "", "#"},
    RuleText{"SerialNumber", "", "#"},
    RuleText{"Version", "", "#"},
    RuleText{"OperatingSystem", "", "#"},
    RuleText{"Result", "name id", "SeriesSet Category* ExperimentStepSet"},
    RuleText{"Category", "name id", "Parameter* SeriesSet* Category*"},
    RuleText{"Parameter", "name parameterType id", kOneValue},
    RuleText{"SeriesSet", "name length id", "Series*"},
    RuleText{"Series",
             "name dependency seriesID seriesType visible plotScale id",
             "IndividualValueSet* EncodedValueSet* AutoIncrementedValueSet* "
             "Unit"},
    RuleText{"IndividualValueSet", "startIndex endIndex", kValues},
    RuleText{"EncodedValueSet", "startIndex endIndex", "#"},
    RuleText{"AutoIncrementedValueSet", "startIndex endIndex",
             "StartValue Increment"},
    RuleText{"StartValue", "", kOneValue},
    RuleText{"EndValue", "", kOneValue},
    RuleText{"Increment", "", kOneValue},
    RuleText{"Unit", "label quantity", "SIUnit*"},
    RuleText{"SIUnit", "factor exponent offset", "#"},
    RuleText{"I", "", "#"},
    RuleText{"L", "", "#"},
    RuleText{"F", "", "#"},
    RuleText{"D", "", "#"},
    RuleText{"S", "", "#"},
    RuleText{"Boolean", "", "#"},
    RuleText{"DateTime", "", "#"},
    RuleText{"PNG", "", "#"},
    RuleText{"EmbeddedXML", "", "#"},
    RuleText{"SVG", "", "#"},
};

std::unordered_map<std::string_view, SchemaElement> all_rules() {
  std::unordered_map<std::string_view, SchemaElement> rules;
  for (const RuleText& text : kRules) {
    rules.emplace(text.name, schema_element(text));
  }
  return rules;
}

}  // namespace

const SchemaElement* animl_rule(std::string_view name) {
  static const auto rules = all_rules();
  const auto it = rules.find(name);
  return it == rules.end() ? nullptr : &it->second;
}

bool is_stepped_over(std::string_view name) {
  return name == "Template" || name == "AuditTrailEntrySet" ||
         name == "SignatureSet";
}

}  // namespace loqsmith
