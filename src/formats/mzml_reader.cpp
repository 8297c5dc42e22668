#include "loqsmith/formats/mzml_reader.hpp"

#include <algorithm>
#include <cstddef>
#include <utility>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/formats/mzml_arrays.hpp"
#include "loqsmith/formats/mzml_scan.hpp"
#include "loqsmith/formats/start_time.hpp"
#include "loqsmith/formats/trace_checks.hpp"

namespace loqsmith {
namespace {

std::string lower_hex(std::string_view text) {
  std::string result(text);
  for (char& c : result) {
    if (c >= 'A' && c <= 'F') c = static_cast<char>(c - 'A' + 'a');
  }
  return result;
}

void append(std::vector<std::string>& list,
            const std::vector<std::string>& more) {
  list.insert(list.end(), more.begin(), more.end());
}

class MzmlReader {
 public:
  MzmlReader(std::string_view bytes, std::string_view original,
             const std::string& name, const ReadPolicy& policy)
      : original_(original),
        source_{bytes, name, policy, TextPlaces(bytes)},
        index_(original, original.data() != bytes.data()),
        scan_(source_, index_) {}

  FileContents run(const std::vector<TraceSelector>* wanted) {
    scan_xml(source_.bytes, source_.file, XmlLimits{}, scan_);
    scan_.require_whole();
    check_integrity();
    if (auto warning = start_time_warning(scan_.run()->start_time)) {
      contents_.warnings.push_back(std::move(*warning));
    }
    append(contents_.warnings, index_.warnings());
    append(contents_.warnings, scan_.notes().all());
    contents_.format = scan_.indexed() ? "indexed mzML 1.1" : "mzML 1.1";
    contents_.runs.push_back(*scan_.run());
    if (scan_.spectra() > 0) {
      contents_.skipped.push_back(std::to_string(scan_.spectra()) +
                                  " spectra: only chromatograms are read");
    }
    source_.places = TextPlaces(source_.bytes);  // from the beginning again
    for (MzmlChromatogram& chromatogram : scan_.chromatograms()) {
      take(chromatogram, wanted);
    }
    return std::move(contents_);
  }

 private:
  // SHA-1 of everything up to and with the '>' of <fileChecksum>. It shows
  // damage, not tampering.
  void check_integrity() {
    if (!scan_.checksum()) {
      contents_.warnings.emplace_back("no integrity value in the file");
      return;
    }
    const std::string_view stated = trim(*scan_.checksum());
    const std::string computed =
        sha1_hex(original_.substr(0, original_offset(scan_.checksum_begin())));
    if (lower_hex(stated) == computed) return;
    const std::string found = "the checksum " + in_quotes(stated);
    if (source_.policy.checksum_required) {
      throw InputError(source_.problem(
          scan_.checksum_begin(), found, computed,
          "the file was damaged or edited: copy or export it again"));
    }
    contents_.warnings.push_back(found + " is wrong, the bytes give " +
                                 computed);
  }

  // Converted characters took one byte each before.
  std::size_t original_offset(std::size_t offset) const {
    if (original_.data() == source_.bytes.data()) return offset;
    const std::string_view before = source_.bytes.substr(0, offset);
    const auto added = std::count_if(before.begin(), before.end(), [](char c) {
      return (static_cast<unsigned char>(c) & 0xC0U) == 0x80U;
    });
    return offset - static_cast<std::size_t>(added);
  }

  void take(MzmlChromatogram& chromatogram,
            const std::vector<TraceSelector>* wanted) {
    TraceHeader& header = chromatogram.header;
    if (chromatogram.fault) {
      contents_.refused.push_back(
          {std::move(header), std::move(*chromatogram.fault)});
      return;
    }
    if (!is_wanted(wanted, header)) {
      contents_.left_out.push_back(std::move(header));
      return;
    }
    try {
      contents_.traces.push_back(decode(chromatogram));
    } catch (const InputError& error) {
      InputProblem problem = error.problems().front();
      problem.found += " (chromatogram " + in_quotes(header.id) + ")";
      contents_.refused.push_back({std::move(header), std::move(problem)});
    }
  }

  Trace decode(const MzmlChromatogram& chromatogram) {
    source_.places.pass(chromatogram.time.offset);
    Trace trace;
    trace.header = chromatogram.header;
    trace.warnings = chromatogram.warnings;
    trace.minutes =
        decode_mzml_array(chromatogram.time, source_, trace.warnings);
    for (double& time : trace.minutes) {
      time = time * chromatogram.unit.numerator / chromatogram.unit.denominator;
    }
    trace.signal =
        decode_mzml_array(chromatogram.signal, source_, trace.warnings);
    if (auto fault = find_point_fault(trace.minutes, trace.signal)) {
      throw InputError(source_.problem(chromatogram.time.offset,
                                       std::move(fault->found),
                                       std::move(fault->expected)));
    }
    append(trace.warnings, point_warnings(trace));
    return trace;
  }

  std::string_view original_;
  DocumentSource source_;
  MzmlIndexCheck index_;
  MzmlScan scan_;
  FileContents contents_;
};

}  // namespace

FileContents read_mzml(std::string_view bytes, std::string_view original,
                       const std::string& name, const ReadPolicy& policy,
                       const std::vector<TraceSelector>* wanted) {
  return MzmlReader(bytes, original, name, policy).run(wanted);
}

}  // namespace loqsmith
