#include "loqsmith/formats/mzml_chromatogram.hpp"

#include <algorithm>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/formats/mzml_arrays.hpp"

namespace loqsmith {
namespace {

constexpr std::size_t kMostParams = 1000;

using Params = std::vector<CvParam>;

const CvParam* find_param(const Params& params, std::string_view accession) {
  const auto it = std::find_if(
      params.begin(), params.end(),
      [&](const CvParam& param) { return param.accession == accession; });
  return it == params.end() ? nullptr : &*it;
}

class HeaderReader {
 public:
  HeaderReader(const MzmlNode& node, const ParamGroups& groups,
               DocumentSource& source, MzmlChromatogram& result)
      : node_(node), groups_(groups), source_(source), result_(result) {}

  void run() {
    const std::string* id = node_.attribute("id");
    if (id == nullptr || id->empty()) {
      fail(node_.offset, "a chromatogram without id", "an id");
    }
    result_.header.id = *id;
    result_.header.names.push_back(*id);
    const Params params = resolved_params(node_, groups_, source_);
    read_type(params);
    const CvParam* title = find_param(params, kTitle);
    if (title != nullptr && !title->value.empty()) {
      result_.header.names.push_back(title->value);
    }
    result_.header.precursor_mz = read_mz("precursor");
    if (!result_.header.precursor_mz) read_selected_ion();
    result_.header.product_mz = read_mz("product");
  }

 private:
  [[noreturn]] void fail(std::size_t offset, std::string found,
                         std::string expected) {
    throw InputError(
        source_.problem(offset, std::move(found), std::move(expected)));
  }

  void read_type(const Params& params) {
    std::size_t types = 0;
    for (const CvParam& param : params) {
      if (const auto kind = chromatogram_type(param.accession)) {
        result_.header.kind = *kind;
        ++types;
      }
    }
    if (types == 1) return;
    result_.header.kind = TraceKind::Unknown;
    result_.warnings.emplace_back(types == 0 ? "chromatogram type not stated"
                                             : "several chromatogram types");
  }

  double number(const CvParam& param, const std::string& what) {
    const auto value = parse_number(param.value);
    if (!value) {
      fail(param.offset, what + " " + in_quotes(param.value),
           "a plain decimal number");
    }
    return *value;
  }

  std::optional<double> read_mz(std::string_view side) {
    const MzmlNode* node = node_.child(side);
    if (node != nullptr) node = node->child("isolationWindow");
    if (node == nullptr) return std::nullopt;
    const Params params = resolved_params(*node, groups_, source_);
    const CvParam* target = find_param(params, kIsolationTarget);
    if (target == nullptr) return std::nullopt;
    return number(*target, std::string(side) + " m/z");
  }

  // Some writers state the ion alone, without the window around it.
  void read_selected_ion() {
    const MzmlNode* node = node_.child("precursor");
    if (node != nullptr) node = node->child("selectedIonList");
    if (node == nullptr || node->children.size() != 1) return;
    const Params params =
        resolved_params(node->children.front(), groups_, source_);
    const CvParam* mz = find_param(params, kSelectedIonMz);
    if (mz == nullptr) return;
    result_.header.precursor_mz = number(*mz, "selected ion m/z");
    result_.warnings.emplace_back(
        "no isolation window: precursor taken from the selected ion");
  }

  const MzmlNode& node_;
  const ParamGroups& groups_;
  DocumentSource& source_;
  MzmlChromatogram& result_;
};

}  // namespace

std::vector<CvParam> resolved_params(const MzmlNode& node,
                                     const ParamGroups& groups,
                                     DocumentSource& source) {
  Params params;
  for (const MzmlNode& child : node.children) {
    if (child.name == "cvParam") {
      params.push_back(cv_param(child));
    } else if (child.name == "referenceableParamGroupRef") {
      const std::string* ref = child.attribute("ref");
      const auto group = ref == nullptr ? groups.end() : groups.find(*ref);
      if (group == groups.end()) {
        throw InputError(source.problem(
            child.offset,
            "the parameter group " + in_quotes(ref == nullptr ? "" : *ref),
            "a group that stands in referenceableParamGroupList"));
      }
      params.insert(params.end(), group->second.begin(), group->second.end());
    }
    if (params.size() > kMostParams) {
      throw InputError(source.problem(
          node.offset,
          "more than " + std::to_string(kMostParams) + " parameters",
          "fewer parameters"));
    }
  }
  return params;
}

MzmlChromatogram read_mzml_chromatogram(
    const MzmlNode& node, const ParamGroups& groups, DocumentSource& source,
    const std::optional<InputProblem>& fault) {
  MzmlChromatogram result;
  try {
    HeaderReader(node, groups, source, result).run();
    read_mzml_arrays(node, groups, source, result);
  } catch (const WholeFileError&) {
    throw;
  } catch (const InputError& error) {
    result.fault = error.problems().front();
  }
  if (fault) result.fault = fault;
  if (result.fault) {
    result.fault->found +=
        " (chromatogram " + in_quotes(result.header.id) + ")";
  }
  return result;
}

}  // namespace loqsmith
