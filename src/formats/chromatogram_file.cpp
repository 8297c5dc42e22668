#include "loqsmith/formats/chromatogram_file.hpp"

#include <algorithm>
#include <cstddef>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/xml_scan.hpp"
#include "loqsmith/formats/animl.hpp"
#include "loqsmith/formats/mzml_reader.hpp"

namespace loqsmith {
namespace {

// Hears of the root element and stops the scan.
class RootFinder : public XmlHandler {
 public:
  void start_element(const XmlStart& start) override {
    name_ = start.local_name;
    offset_ = start.offset;
    found_ = true;
  }
  bool finished() const override { return found_; }

  const std::string& name() const { return name_; }
  std::size_t offset() const { return offset_; }

 private:
  std::string name_;
  std::size_t offset_ = 0;
  bool found_ = false;
};

void refuse_gzip(std::string_view bytes, const std::string& name) {
  if (!bytes.starts_with("\x1F\x8B")) return;
  throw InputError(InputProblem{name, 0, 0, "a gzip file", "mzML or AnIML",
                                "unpack it first"});
}

// The content decides, the extension only earns a remark.
void warn_of_extension(const std::string& name, std::string_view format,
                       std::vector<std::string>& warnings) {
  const std::size_t dot = name.rfind('.');
  if (dot == std::string::npos) return;
  std::string extension = name.substr(dot + 1);
  std::transform(
      extension.begin(), extension.end(), extension.begin(), [](char c) {
        return c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
      });
  const std::string usual = format == "AnIML" ? "animl" : "mzml";
  if (extension == usual || extension == "xml" ||
      extension.find('/') != std::string::npos) {
    return;
  }
  warnings.push_back("the name ends in " + in_quotes("." + extension) +
                     ", the content is " + std::string(format));
}

}  // namespace

FileContents read_chromatogram_file(std::string_view bytes,
                                    const std::string& name,
                                    const ReadPolicy& policy,
                                    const std::vector<TraceSelector>* wanted) {
  refuse_gzip(bytes, name);
  std::string storage;
  const std::string_view text = xml_as_utf8(bytes, name, storage);
  RootFinder root;
  scan_xml(text, name, XmlLimits{}, root);
  const bool animl = root.name() == "AnIML";
  if (!animl && root.name() != "mzML" && root.name() != "indexedmzML") {
    const TextPlace place = line_column(text, root.offset());
    throw InputError(InputProblem{name, place.line, place.column,
                                  "the root element " + in_quotes(root.name()),
                                  "mzML, indexedmzML or AnIML", ""});
  }
  FileContents contents = animl ? read_animl(text, name, policy, wanted)
                                : read_mzml(text, bytes, name, policy, wanted);
  warn_of_extension(name, animl ? "AnIML" : "mzML", contents.warnings);
  return contents;
}

}  // namespace loqsmith
