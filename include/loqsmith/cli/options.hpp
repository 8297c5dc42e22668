#pragma once

#include <map>
#include <optional>
#include <stdexcept>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// One option of a verb. Help and parser are made from the same row.
struct OptionRow {
  std::string_view name;   ///< without the dashes
  std::string_view value;  ///< what it takes, "N"; empty: a switch
  std::string_view meaning;
};

/// What stood on the command line.
struct ParsedOptions {
  std::vector<std::string> positional;
  std::map<std::string, std::string, std::less<>> values;  ///< switches: ""

  bool has(std::string_view name) const;
  std::optional<std::string> value(std::string_view name) const;
  /// A whole number from `least` up; `otherwise` where the option is absent.
  /// @throws WrongUse
  long whole(std::string_view name, long least, long otherwise) const;
};

/// Wrong use of the command line (exit status 64).
class WrongUse : public std::runtime_error {
 public:
  using std::runtime_error::runtime_error;
};

/// @throws WrongUse for an unknown option (with the nearest known one), a
///         missing value, or an option given twice.
ParsedOptions parse_options(const std::vector<OptionRow>& rows,
                            const std::vector<std::string>& arguments);

/// Help of one verb: an example first, then usage and options.
std::string verb_help(std::string_view usage, std::string_view example,
                      std::string_view text,
                      const std::vector<OptionRow>& rows);

}  // namespace loqsmith
