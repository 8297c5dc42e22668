#include "loqsmith/formats/start_time.hpp"

#include "loqsmith/base/text.hpp"
#include "loqsmith/base/time.hpp"

namespace loqsmith {

std::optional<std::string> start_time_warning(const std::string& written) {
  if (written.empty()) return std::nullopt;
  const auto moment = parse_moment(written);
  if (!moment) return "start time " + in_quotes(written) + " is no date";
  if (!moment->has_zone) return "start time " + written + ": zone not stated";
  return std::nullopt;
}

}  // namespace loqsmith
