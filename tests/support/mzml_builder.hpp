#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith::test {

/// One chromatogram to write. Every text that goes into the document may be
/// replaced afterwards (with_change) to break a rule.
struct MzmlTrace {
  std::string id = "TIC";
  std::string title;                ///< empty: none
  std::string type = "MS:1000235";  ///< accession of the chromatogram type
  std::optional<double> precursor_mz;
  std::optional<double> product_mz;
  std::vector<double> times{0.0, 0.5, 1.0, 1.5};  ///< in time_unit
  std::vector<double> signal{1.0, 2.0, 4.0, 3.0};
  std::string time_unit = "UO:0000031";    ///< accession; empty: no unit
  std::string signal_unit = "MS:1000131";  ///< accession; empty: no unit
  /// MS:1000521 and MS:1000523 floats, MS:1000519 and MS:1000522 integers of
  /// 32 and 64 bits.
  std::string time_type = "MS:1000523";
  std::string signal_type = "MS:1000523";
  std::string signal_kind = "MS:1000515";
  bool zlib = false;
};

/// One document to write.
struct MzmlDocumentPlan {
  std::vector<MzmlTrace> traces{MzmlTrace{}};
  std::string run_id = "run1";
  std::string start_time;   ///< empty: none
  std::string sample_name;  ///< empty: no sample
  bool indexed = false;     ///< with true offsets and checksum
};

/// mzML 1.1 as a careful writer makes it.
std::string mzml_document(const MzmlDocumentPlan& plan);

/// A plain document with these traces.
std::string mzml_document(const std::vector<MzmlTrace>& traces);

/// The document with the first `from` replaced; fails the test where the
/// document does not contain it.
std::string with_change(std::string document, std::string_view from,
                        std::string_view to);

/// An indexed document whose checksum is made right again after a change.
std::string resealed(const std::string& document);

/// The numbers in little-endian order in the type of that accession.
std::string packed(const std::vector<double>& values, std::string_view type);
std::string base64(std::string_view bytes);
std::string zlib_compressed(std::string_view bytes);

}  // namespace loqsmith::test
