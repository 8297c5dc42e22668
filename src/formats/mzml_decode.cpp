#include <utility>

#include "loqsmith/formats/base64.hpp"
#include "loqsmith/formats/inflate.hpp"
#include "loqsmith/formats/mzml_arrays.hpp"
#include "loqsmith/formats/text_pieces.hpp"

namespace loqsmith {
namespace {

class ArrayDecoder {
 public:
  ArrayDecoder(const MzmlArray& array, DocumentSource& source)
      : array_(array), source_(source) {}

  std::vector<double> run(std::vector<std::string>& warnings) {
    std::string storage;
    const std::string_view text =
        joined_text(array_.text, source_.bytes, storage);
    DecodedBase64 decoded = taken(decode_base64(text));
    check_length(decoded.characters, text.size(), warnings);
    std::string bytes = std::move(decoded.bytes);
    const std::size_t wanted = array_.points * width_of(array_.type);
    // No points may be written as no text at all, even where zlib is named.
    const bool nothing = wanted == 0 && bytes.empty();
    if (array_.zlib && !nothing) bytes = taken(inflate_zlib(bytes, wanted));
    if (bytes.size() != wanted) {
      fail(std::to_string(bytes.size()) + " bytes in the " +
               std::string(array_.word),
           std::to_string(array_.points) + " values of " +
               std::to_string(width_of(array_.type)) + " bytes");
    }
    return taken(widen(bytes, array_.type));
  }

 private:
  [[noreturn]] void fail(std::string found, std::string expected) {
    throw InputError(source_.problem(array_.offset, std::move(found),
                                     std::move(expected),
                                     "copy or export the file again"));
  }

  template <class T>
  T taken(Outcome<T> outcome) {
    if (!outcome) {
      fail(outcome.reason() + " in the " + std::string(array_.word),
           "sound data");
    }
    return std::move(outcome.value());
  }

  void check_length(std::size_t characters, std::size_t raw,
                    std::vector<std::string>& warnings) {
    if (array_.encoded_length == characters) return;
    if (array_.encoded_length == raw) {
      warnings.push_back("encodedLength of the " + std::string(array_.word) +
                         " counts white space");
      return;
    }
    fail(std::to_string(characters) + " base64 characters in the " +
             std::string(array_.word),
         std::to_string(array_.encoded_length) + ", as encodedLength says");
  }

  const MzmlArray& array_;
  DocumentSource& source_;
};

}  // namespace

std::vector<double> decode_mzml_array(const MzmlArray& array,
                                      DocumentSource& source,
                                      std::vector<std::string>& warnings) {
  return ArrayDecoder(array, source).run(warnings);
}

}  // namespace loqsmith
