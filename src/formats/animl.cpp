#include "loqsmith/formats/animl.hpp"

#include "loqsmith/base/input_error.hpp"

namespace loqsmith {

FileContents read_animl(std::string_view, const std::string& name,
                        const ReadPolicy&, const std::vector<TraceSelector>*) {
  throw InputError(InputProblem{
      name, 0, 0, "an AnIML document, which is not available in this version",
      "mzML 1.1", "export the file as mzML"});
}

}  // namespace loqsmith
