#pragma once

#include <cstddef>
#include <functional>
#include <map>
#include <optional>
#include <set>
#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/formats/mzml_chromatogram.hpp"
#include "loqsmith/formats/mzml_index.hpp"
#include "loqsmith/formats/mzml_node.hpp"
#include "loqsmith/formats/mzml_schema.hpp"
#include "loqsmith/formats/notes.hpp"

namespace loqsmith {

/// Listens to the scan of an mzML document and keeps what a reader of
/// chromatograms needs: the run, samples, groups of parameters, and each
/// chromatogram's description (not its numbers). Spectra are counted and
/// stepped over. Holds the document against the schema's elements, attributes
/// and order: a fault inside a chromatogram refuses that chromatogram, one
/// elsewhere is a warning, and what makes the document ambiguous (a second run,
/// list or binary, doubled ids) refuses the file.
class MzmlScan : public XmlHandler {
 public:
  MzmlScan(DocumentSource& source, MzmlIndexCheck& index)
      : source_(source), index_(index) {}

  void start_element(const XmlStart& start) override;
  void end_element(const XmlEnd& end) override;
  void text(std::size_t begin, std::size_t end, bool verbatim) override;

  /// What must be there at the end. @throws InputError
  void require_whole();

  bool indexed() const { return indexed_; }
  const std::optional<FileRun>& run() const { return run_; }
  std::vector<MzmlChromatogram>& chromatograms() { return chromatograms_; }
  std::size_t spectra() const { return spectra_; }
  /// Text of fileChecksum, and where it begins; nothing in a plain file.
  const std::optional<std::string>& checksum() const { return checksum_; }
  std::size_t checksum_begin() const { return checksum_begin_; }
  Notes& notes() { return notes_; }

 private:
  struct Frame {
    const SchemaElement* rule = nullptr;  ///< none: a stranger, stepped over
    std::size_t place = 0;                ///< of the last child
    bool has_children = false;
    std::optional<std::string> count;  ///< as a list states it
    std::size_t items = 0;
  };

  void check_root(const XmlStart& start);
  const SchemaElement* rule_of_child(Frame& parent, const XmlStart& start);
  void check_order(Frame& parent, std::size_t place, const XmlStart& start);
  void check_attributes(const SchemaElement& rule, const XmlStart& start);
  void check_reference(const XmlAttribute& attribute);
  void begin_node(const SchemaElement& rule, const XmlStart& start);
  void end_node();
  void keep_group(const MzmlNode& node);
  void keep_sample(const MzmlNode& node);
  void keep_chromatogram(const MzmlNode& node);
  void begin_run(const XmlStart& start);
  void check_count(const Frame& frame);
  void end_text_element(std::string_view name);
  /// Refuses the chromatogram in hand, or warns.
  void fault(std::size_t offset, const std::string& found,
             const std::string& expected);
  [[noreturn]] void refuse(std::size_t offset, std::string found,
                           std::string expected, std::string mend = {});

  DocumentSource& source_;
  MzmlIndexCheck& index_;
  Notes notes_;
  std::vector<Frame> frames_;
  std::size_t skipped_depth_ = 0;  ///< open elements inside a spectrum

  std::vector<MzmlNode*> open_nodes_;  ///< from root_ down
  MzmlNode root_;
  std::size_t node_count_ = 0;
  std::optional<InputProblem> chromatogram_fault_;

  bool indexed_ = false;
  std::optional<FileRun> run_;
  std::map<std::string, std::set<std::string, std::less<>>, std::less<>> ids_;
  std::map<std::string, std::string, std::less<>> sample_names_;
  ParamGroups groups_;
  std::vector<MzmlChromatogram> chromatograms_;
  std::set<std::string, std::less<>> chromatogram_ids_;
  std::size_t spectra_ = 0;

  std::string text_;  ///< of the element outside chromatograms in hand
  std::string index_name_;
  std::optional<std::string> offset_id_;
  std::optional<std::string> checksum_;
  std::size_t checksum_begin_ = 0;
};

}  // namespace loqsmith
