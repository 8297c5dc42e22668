#include "loqsmith/chromatogram/trace_selector.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

bool kind_fits(TraceSelector::Kind wanted, TraceKind kind) {
  switch (wanted) {
    case TraceSelector::Kind::Any:
      return true;
    case TraceSelector::Kind::Absorption:
      return kind == TraceKind::Absorption;
    case TraceSelector::Kind::Emission:
      return kind == TraceKind::Emission;
    case TraceSelector::Kind::Srm:
      return kind == TraceKind::Srm;
    case TraceSelector::Kind::Sim:
      return kind == TraceKind::Sim;
    case TraceSelector::Kind::Tic:
      return kind == TraceKind::Tic;
    case TraceSelector::Kind::Extracted:
      return false;  // made from spectra, never a chromatogram of the file
  }
  return false;
}

bool mz_fits(const TraceSelector& selector, const std::optional<double>& wanted,
             const std::optional<double>& found) {
  if (!wanted) return true;
  if (!found) return false;
  const double tolerance = selector.tolerance_ppm
                               ? *wanted * *selector.tolerance_ppm * 1e-6
                               : selector.tolerance_mz;
  return std::abs(*found - *wanted) <= tolerance;
}

std::string kind_word(TraceSelector::Kind kind) {
  switch (kind) {
    case TraceSelector::Kind::Any:
      return "any";
    case TraceSelector::Kind::Absorption:
      return "absorption";
    case TraceSelector::Kind::Emission:
      return "emission";
    case TraceSelector::Kind::Srm:
      return "srm";
    case TraceSelector::Kind::Sim:
      return "sim";
    case TraceSelector::Kind::Tic:
      return "tic";
    case TraceSelector::Kind::Extracted:
      return "extracted";
  }
  return {};
}

}  // namespace

std::string trace_kind_name(TraceKind kind) {
  switch (kind) {
    case TraceKind::Unknown:
      return "unknown";
    case TraceKind::Absorption:
      return "absorption";
    case TraceKind::Emission:
      return "emission";
    case TraceKind::Srm:
      return "srm";
    case TraceKind::Sim:
      return "sim";
    case TraceKind::Tic:
      return "tic";
    case TraceKind::BasePeak:
      return "base peak";
    case TraceKind::SelectedIon:
      return "selected ion";
    case TraceKind::Pressure:
      return "pressure";
    case TraceKind::Flow:
      return "flow rate";
    case TraceKind::Temperature:
      return "temperature";
    case TraceKind::Other:
      return "other";
  }
  return {};
}

bool matches(const TraceSelector& selector, const TraceHeader& header) {
  if (!kind_fits(selector.kind, header.kind)) return false;
  if (!selector.name.empty() &&
      std::none_of(header.names.begin(), header.names.end(),
                   [&](const std::string& name) {
                     return name.find(selector.name) != std::string::npos;
                   })) {
    return false;
  }
  return mz_fits(selector, selector.precursor_mz, header.precursor_mz) &&
         mz_fits(selector, selector.product_mz, header.product_mz) &&
         mz_fits(selector, selector.mz, header.precursor_mz);
}

std::string describe(const TraceSelector& selector) {
  std::string text = "kind " + kind_word(selector.kind);
  if (!selector.name.empty()) text += ", name with " + in_quotes(selector.name);
  if (selector.precursor_mz) {
    text += ", precursor " + shortest(*selector.precursor_mz);
  }
  if (selector.product_mz) text += ", product " + shortest(*selector.product_mz);
  if (selector.mz) text += ", m/z " + shortest(*selector.mz);
  if (selector.precursor_mz || selector.product_mz || selector.mz) {
    text += selector.tolerance_ppm
                ? " (+/- " + shortest(*selector.tolerance_ppm) + " ppm)"
                : " (+/- " + shortest(selector.tolerance_mz) + ")";
  }
  return text;
}

}  // namespace loqsmith
