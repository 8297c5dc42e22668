#include "loqsmith/formats/mzml_arrays.hpp"

#include <optional>
#include <utility>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/formats/mzml_units.hpp"

namespace loqsmith {
namespace {

// One <binaryDataArray> as far as its parameters say it.
struct Described {
  const MzmlNode* node = nullptr;
  std::vector<CvParam> params;
  const CvParam* kind = nullptr;
};

class ArraysReader {
 public:
  ArraysReader(const MzmlNode& chromatogram, const ParamGroups& groups,
               DocumentSource& source, MzmlChromatogram& result)
      : chromatogram_(chromatogram),
        groups_(groups),
        source_(source),
        result_(result) {}

  void run() {
    default_length_ = length(chromatogram_, "defaultArrayLength");
    describe_all();
    const Described& time = time_array();
    const Described& signal = signal_array();
    result_.time = read_array(time, "time array");
    result_.signal = read_array(signal, "signal array");
    result_.header.points = result_.time.points;
    result_.header.encoding = encoding();
    if (result_.time.points != result_.signal.points) {
      fail(signal.node->offset,
           std::to_string(result_.signal.points) + " signal values",
           "as many as the " + std::to_string(result_.time.points) + " times");
    }
    read_time_unit(*time.kind, source_, result_);
    read_signal_unit(*signal.kind, source_, result_);
    warn_of_other_lengths();
  }

 private:
  [[noreturn]] void fail(std::size_t offset, std::string found,
                         std::string expected, std::string mend = {}) {
    throw InputError(source_.problem(offset, std::move(found),
                                     std::move(expected), std::move(mend)));
  }

  // Nothing where the attribute is not written.
  std::optional<std::size_t> length(const MzmlNode& node,
                                    std::string_view name) {
    const std::string* text = node.attribute(name);
    if (text == nullptr) return std::nullopt;
    const auto value = parse_whole(*text);
    if (!value) {
      fail(node.offset, std::string(name) + " " + in_quotes(*text),
           "a whole number");
    }
    if (*value < 0) {
      throw WholeFileError(source_.problem(
          node.offset, std::string(name) + " " + in_quotes(*text),
          "a number from 0 up"));
    }
    return static_cast<std::size_t>(*value);
  }

  void describe_all() {
    const MzmlNode* list = chromatogram_.child("binaryDataArrayList");
    if (list == nullptr) {
      fail(chromatogram_.offset, "no binaryDataArrayList",
           "a time and a signal array");
    }
    for (const MzmlNode& node : list->children) {
      if (node.name != "binaryDataArray") continue;
      arrays_.push_back({&node, resolved_params(node, groups_, source_), {}});
    }
    for (Described& array : arrays_) {
      array.kind = the_one(array, "kind of array", is_array_kind);
    }
  }

  // The one parameter of an array that `belongs` names.
  template <class Belongs>
  const CvParam* the_one(const Described& array, const std::string& what,
                         Belongs belongs) {
    const CvParam* found = nullptr;
    for (const CvParam& param : array.params) {
      if (!belongs(param.accession)) continue;
      if (found != nullptr) {
        fail(array.node->offset,
             "more than one " + what + ": " + found->accession + " and " +
                 param.accession,
             "exactly one");
      }
      found = &param;
    }
    if (found == nullptr) {
      fail(array.node->offset, "no known " + what + " among " + list_of(array),
           "exactly one");
    }
    return found;
  }

  static std::string list_of(const Described& array) {
    constexpr std::size_t kMostShown = 10;
    std::vector<std::string> accessions;
    for (const CvParam& param : array.params) {
      accessions.push_back(in_quotes(param.accession));
      if (accessions.size() == kMostShown) break;
    }
    return accessions.empty() ? "no terms" : join(accessions, ", ");
  }

  // The array whose kind `belongs` names; nullptr where there is none.
  template <class Belongs>
  const Described* only_one(const std::string& word, Belongs belongs) {
    const Described* found = nullptr;
    for (const Described& array : arrays_) {
      if (!belongs(array.kind->accession)) continue;
      if (found != nullptr) {
        fail(array.node->offset, "a second " + word, "one " + word);
      }
      found = &array;
    }
    return found;
  }

  const Described& time_array() {
    const Described* found = only_one(
        "time array",
        [](const std::string& accession) { return accession == kTimeArray; });
    if (found != nullptr) return *found;
    fail(chromatogram_.offset, "no time array", "one time array (MS:1000595)");
  }

  // The intensity array; for pressure, flow and temperature, which have none,
  // the array of that kind.
  const Described& signal_array() {
    const Described* found =
        only_one("intensity array", [](const std::string& accession) {
          return accession == kIntensityArray;
        });
    if (found == nullptr) found = only_one("signal array", is_signal_kind);
    if (found != nullptr) return *found;
    fail(chromatogram_.offset, "no intensity array",
         "one intensity array (MS:1000515)");
  }

  MzmlArray read_array(const Described& described, std::string_view word) {
    MzmlArray array;
    const MzmlNode& node = *described.node;
    array.offset = node.offset;
    array.word = word;
    array.type = number_type(readable(described, "data type", data_type_term));
    array.zlib =
        readable(described, "compression", compression_term).accession == kZlib;
    array.points = points_of(node);
    const auto encoded = length(node, "encodedLength");
    if (!encoded) fail(node.offset, "no encodedLength", "the text's length");
    array.encoded_length = *encoded;
    const MzmlNode* binary = node.child("binary");
    if (binary == nullptr) fail(node.offset, "no binary element", "the data");
    array.text = binary->text;
    return array;
  }

  template <class Lookup>
  const EncodingTerm& readable(const Described& array, const std::string& what,
                               Lookup lookup) {
    const CvParam* param =
        the_one(array, what, [&](const std::string& accession) {
          return lookup(accession) != nullptr;
        });
    const EncodingTerm& term = *lookup(param->accession);
    if (!term.readable) {
      fail(param->offset,
           param->accession + " (" + std::string(term.name) + ")",
           "a " + what + " that this version reads",
           "export the file again without it");
    }
    return term;
  }

  std::size_t points_of(const MzmlNode& node) {
    const auto own = length(node, "arrayLength");
    const auto points = own ? own : default_length_;
    if (!points) fail(node.offset, "no array length", "defaultArrayLength");
    if (*points > kMostPoints) {
      fail(node.offset, std::to_string(*points) + " points",
           "at most " + std::to_string(kMostPoints));
    }
    return *points;
  }

  std::string encoding() const {
    const auto words = [](const MzmlArray& array) {
      return number_type_name(array.type) +
             (array.zlib ? ", zlib" : ", uncompressed");
    };
    const std::string time = words(result_.time);
    const std::string signal = words(result_.signal);
    return time == signal ? time : "time " + time + "; signal " + signal;
  }

  void warn_of_other_lengths() {
    for (const Described& array : arrays_) {
      if (array.kind->accession == kTimeArray ||
          is_signal_kind(array.kind->accession)) {
        continue;
      }
      const auto own = length(*array.node, "arrayLength");
      if (own && *own != result_.time.points) {
        result_.warnings.push_back("another array (" + array.kind->accession +
                                   ") has another length; not read");
      }
    }
  }

  const MzmlNode& chromatogram_;
  const ParamGroups& groups_;
  DocumentSource& source_;
  MzmlChromatogram& result_;
  std::optional<std::size_t> default_length_;
  std::vector<Described> arrays_;
};

}  // namespace

void read_mzml_arrays(const MzmlNode& chromatogram, const ParamGroups& groups,
                      DocumentSource& source, MzmlChromatogram& result) {
  ArraysReader(chromatogram, groups, source, result).run();
}

}  // namespace loqsmith
