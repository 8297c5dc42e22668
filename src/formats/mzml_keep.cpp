#include <utility>

#include "loqsmith/base/text.hpp"
#include "loqsmith/formats/mzml_scan.hpp"

namespace loqsmith {
namespace {

// More than any real chromatogram, sample or group has.
constexpr std::size_t kMostNodes = 5000;

bool is_kept(std::string_view name) {
  return name == "chromatogram" || name == "referenceableParamGroup" ||
         name == "sample";
}

}  // namespace

void MzmlScan::begin_node(const SchemaElement& rule, const XmlStart& start) {
  MzmlNode* node = nullptr;
  if (!open_nodes_.empty()) {
    if (++node_count_ == kMostNodes) {
      refuse(start.offset,
             "more than " + std::to_string(kMostNodes) + " elements inside <" +
                 std::string(root_.name) + ">",
             "fewer elements");
    }
    node = &open_nodes_.back()->children.emplace_back();
  } else if (is_kept(rule.name)) {
    root_ = MzmlNode{};
    node_count_ = 0;
    node = &root_;
  } else {
    return;
  }
  node->name = rule.name;
  node->offset = start.offset;
  for (const XmlAttribute& attribute : start.attributes) {
    if (!attribute.namespace_uri.empty()) continue;
    node->attributes.emplace_back(attribute.local_name,
                                  xml_value(attribute.raw_value));
  }
  open_nodes_.push_back(node);
}

void MzmlScan::end_node() {
  open_nodes_.pop_back();
  if (!open_nodes_.empty()) return;
  if (root_.name == "chromatogram") {
    keep_chromatogram(root_);
  } else if (root_.name == "sample") {
    keep_sample(root_);
  } else {
    keep_group(root_);
  }
}

void MzmlScan::keep_group(const MzmlNode& node) {
  const std::string* id = node.attribute("id");
  if (id == nullptr) return;
  std::vector<CvParam> params;
  for (const MzmlNode& child : node.children) {
    if (child.name == "cvParam") params.push_back(cv_param(child));
  }
  if (!groups_.emplace(*id, std::move(params)).second) {
    refuse(node.offset, "a second parameter group " + in_quotes(*id),
           "each id once");
  }
}

void MzmlScan::keep_sample(const MzmlNode& node) {
  const std::string* id = node.attribute("id");
  if (id == nullptr) return;
  const std::string* name = node.attribute("name");
  std::string shown = name == nullptr ? std::string() : *name;
  for (const MzmlNode& child : node.children) {
    if (!shown.empty() || child.name != "cvParam") continue;
    const CvParam param = cv_param(child);
    if (param.accession == kSampleName) shown = param.value;
  }
  sample_names_.emplace(*id, std::move(shown));
}

void MzmlScan::keep_chromatogram(const MzmlNode& node) {
  MzmlChromatogram chromatogram =
      read_mzml_chromatogram(node, groups_, source_, chromatogram_fault_);
  chromatogram_fault_.reset();
  if (run_) chromatogram.header.run = run_->id;
  const std::string& id = chromatogram.header.id;
  if (!id.empty() && !chromatogram_ids_.insert(id).second) {
    refuse(node.offset, "a second chromatogram " + in_quotes(id),
           "each id once", "a selection would be arbitrary");
  }
  chromatograms_.push_back(std::move(chromatogram));
}

}  // namespace loqsmith
