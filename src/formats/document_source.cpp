#include "loqsmith/formats/document_source.hpp"

#include <utility>

namespace loqsmith {

InputProblem DocumentSource::problem(std::size_t offset, std::string found,
                                     std::string expected, std::string mend) {
  const TextPlace place = places.at(offset);
  return {file,
          place.line,
          place.column,
          std::move(found),
          std::move(expected),
          std::move(mend)};
}

}  // namespace loqsmith
