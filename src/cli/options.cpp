#include "loqsmith/cli/options.hpp"

#include <algorithm>
#include <boost/program_options.hpp>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

namespace po = boost::program_options;

po::options_description describe_rows(const std::vector<OptionRow>& rows) {
  po::options_description description;
  for (const OptionRow& row : rows) {
    const std::string name(row.name);
    if (row.value.empty()) {
      description.add_options()(name.c_str(), "");
    } else {
      description.add_options()(name.c_str(), po::value<std::string>(), "");
    }
  }
  return description;
}

std::string suggestion(const std::vector<OptionRow>& rows,
                       std::string_view name) {
  std::vector<std::string> known;
  for (const OptionRow& row : rows) known.emplace_back(row.name);
  while (name.starts_with('-')) name.remove_prefix(1);
  const std::string near = nearest_name(name, known);
  return near.empty() ? std::string{} : "; did you mean --" + near + "?";
}

}  // namespace

bool ParsedOptions::has(std::string_view name) const {
  return values.find(name) != values.end();
}

std::optional<std::string> ParsedOptions::value(std::string_view name) const {
  const auto found = values.find(name);
  if (found == values.end()) return std::nullopt;
  return found->second;
}

long ParsedOptions::whole(std::string_view name, long least,
                          long otherwise) const {
  const std::optional<std::string> text = value(name);
  if (!text) return otherwise;
  const auto number = parse_whole(*text);
  if (!number || *number < least || *number > 1'000'000) {
    throw WrongUse("--" + std::string(name) +
                   ": expected a whole number from " + std::to_string(least) +
                   ", found " + in_quotes(*text));
  }
  return static_cast<long>(*number);
}

ParsedOptions parse_options(const std::vector<OptionRow>& rows,
                            const std::vector<std::string>& arguments) {
  const po::options_description description = describe_rows(rows);
  ParsedOptions parsed;
  try {
    namespace style = po::command_line_style;
    const po::parsed_options found =
        po::command_line_parser(arguments)
            .options(description)
            .style(style::allow_long | style::long_allow_adjacent |
                   style::long_allow_next)
            .run();
    for (const po::option& option : found.options) {
      if (option.string_key.empty() || option.position_key >= 0) {
        parsed.positional.insert(parsed.positional.end(), option.value.begin(),
                                 option.value.end());
        continue;
      }
      const std::string value = option.value.empty() ? "" : option.value.back();
      if (!parsed.values.emplace(option.string_key, value).second) {
        throw WrongUse("--" + option.string_key + " is given twice");
      }
    }
  } catch (const po::unknown_option& error) {
    throw WrongUse("unknown option " + in_quotes(error.get_option_name()) +
                   suggestion(rows, error.get_option_name()));
  } catch (const po::error& error) {
    throw WrongUse(error.what());
  }
  for (const std::string& text : parsed.positional) {
    if (text.size() > 1 && text.front() == '-') {
      throw WrongUse("unknown option " + in_quotes(text) +
                     suggestion(rows, text));
    }
  }
  return parsed;
}

std::string verb_help(std::string_view usage, std::string_view example,
                      std::string_view text,
                      const std::vector<OptionRow>& rows) {
  std::string help = "Example:\n  " + std::string(example) + "\n\nUsage:\n  " +
                     std::string(usage) + "\n\n" + std::string(text) +
                     "\n\nOptions:\n";
  for (const OptionRow& row : rows) {
    std::string left = "  --" + std::string(row.name);
    if (!row.value.empty()) left += ' ' + std::string(row.value);
    left.resize(std::max<std::size_t>(left.size() + 1, 22), ' ');
    help += left + std::string(row.meaning) + '\n';
  }
  return help;
}

}  // namespace loqsmith
