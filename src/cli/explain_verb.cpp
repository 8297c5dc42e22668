#include <algorithm>
#include <filesystem>
#include <iostream>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/ledger/published_folder.hpp"
#include "loqsmith/record/explanation.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"sample", "S", "name of the sample, as in sequence.csv"},
      {"analyte", "A", "id of the analyte, as in the method"},
      {"injection", "N", "only this injection of the sample"},
      {"json", "", "print the derivation as JSON"},
      {"help", "", "this text"},
  };
  return kRows;
}

std::string help() {
  return verb_help(
      "loqsmith explain OUT/SEQUENCE/run-N --sample S --analyte A [options]",
      "loqsmith explain results/well-water-0412/run-0001 --sample W-108 "
      "--analyte simazine",
      "The whole derivation of a published result, for each injection of the\n"
      "sample: file, trace, window, feet, response, curve and the equation "
      "solved,\n"
      "dilution, limits and what went into them, checks, the rule that "
      "decided,\n"
      "the reported text. Steps are written as a x b = c, with the numbers of "
      "the\n"
      "tables, to be followed on a calculator. Only reads what was published; "
      "a\n"
      "run that was changed since is refused (exit status 65).",
      option_rows());
}

// Wrong use that names the nearest of the known names, or all when few.
[[noreturn]] void unknown(const std::string& what, const std::string& name,
                          std::vector<std::string> known) {
  std::sort(known.begin(), known.end());
  known.erase(std::unique(known.begin(), known.end()), known.end());
  const std::string near = nearest_name(name, known);
  std::string more;
  if (!near.empty()) {
    more = "; did you mean " + in_quotes(near) + "?";
  } else if (known.size() <= 12) {
    more = "; there are: " + join(known, ", ");
  } else {
    known.resize(12);
    more = "; there are: " + join(known, ", ") + ", and more";
  }
  throw WrongUse("unknown " + what + ' ' + in_quotes(name) + more);
}

std::string required(const ParsedOptions& parsed, const std::string& option,
                     const std::string& value) {
  const auto found = parsed.value(option);
  if (!found) throw WrongUse("--" + option + ' ' + value + " is missing");
  return *found;
}

const PublishedAnalyte& find_analyte(const PublishedRecord& record,
                                     const std::string& name) {
  std::vector<std::string> known;
  for (const PublishedAnalyte& one : record.analytes) {
    if (one.analyte == name) return one;
    known.push_back(one.analyte);
  }
  unknown("analyte", name, known);
}

std::vector<const PublishedResult*> find_results(
    const PublishedAnalyte& analyte, const ParsedOptions& parsed) {
  const std::string name = required(parsed, "sample", "S");
  const long injection = parsed.whole("injection", 1, 0);
  std::vector<const PublishedResult*> found;
  std::vector<std::string> known;
  std::vector<std::string> numbers;
  for (const PublishedResult& one : analyte.results) {
    known.push_back(one.row.sample);
    if (one.row.sample != name) continue;
    numbers.push_back(std::to_string(one.row.injection));
    if (injection == 0 || injection == one.row.injection) found.push_back(&one);
  }
  if (numbers.empty()) unknown("sample", name, known);
  if (found.empty()) {
    throw WrongUse("injection " + std::to_string(injection) +
                   " is none of sample " + in_quotes(name) +
                   "; there are: " + join(numbers, ", "));
  }
  return found;
}

std::string step_text(const ExplanationLine& line) {
  if (line.expression.empty()) return line.label;
  return line.label + ": " + line.expression + " = " + line.value +
         (line.unit.empty() ? "" : ' ' + line.unit);
}

void print_text(const std::string& run, const PublishedRecord& record,
                const PublishedAnalyte& analyte,
                const std::vector<const PublishedResult*>& results) {
  const char* separator = "";
  for (const PublishedResult* result : results) {
    std::cout << separator << result->row.sample << ", " << analyte.analyte
              << ", injection " << result->row.injection << " of " << run
              << " (" << role_name(result->row.role) << ")\nmethod "
              << record.method << ", revision " << record.revision
              << "; loqsmith " << record.program_version << '\n';
    for (const ExplanationSection& section :
         explain_result(record, analyte, *result)) {
      std::cout << section.title << '\n';
      for (const ExplanationLine& line : section.lines) {
        std::cout << "  " << step_text(line) << '\n';
      }
    }
    separator = "\n";
  }
}

void json_line(JsonWriter& json, const ExplanationLine& line) {
  json.begin_object();
  json.member("text", line.label);
  if (!line.expression.empty()) {
    json.member("expression", line.expression);
    json.member("value", line.value);
    json.member("unit", line.unit);
  }
  json.end_object();
}

void json_result(JsonWriter& json, const PublishedRecord& record,
                 const PublishedAnalyte& analyte,
                 const PublishedResult& result) {
  json.begin_object();
  json.member("injection", std::int64_t{result.row.injection});
  json.member("role", role_name(result.row.role));
  json.member("result", result.row.result);
  json.member("unit", result.row.unit);
  json.member("status", status_name(result.row.status));
  json.member("reported", result.row.reported);
  json.begin_object("derivation");
  for (const ExplanationSection& section :
       explain_result(record, analyte, result)) {
    json.begin_array(section.title);
    for (const ExplanationLine& line : section.lines) json_line(json, line);
    json.end_array();
  }
  json.end_object();
  json.end_object();
}

void print_json(const std::string& run, const PublishedRecord& record,
                const PublishedAnalyte& analyte,
                const std::vector<const PublishedResult*>& results) {
  JsonWriter json(std::cout);
  json.begin_object();
  json.member("run", run);
  json.member("method", record.method);
  json.member("revision", record.revision);
  json.member("sample", results.front()->row.sample);
  json.member("analyte", analyte.analyte);
  json.begin_array("results");
  for (const PublishedResult* result : results) {
    json_result(json, record, analyte, *result);
  }
  json.end_array();
  json.end_object();
  std::cout << '\n';
}

}  // namespace

ExitStatus explain_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << help();
    return ExitStatus::Done;
  }
  if (parsed.positional.size() != 1) {
    throw WrongUse("name one published run, OUT/SEQUENCE/run-N");
  }
  required(parsed, "sample", "S");
  const std::string wanted = required(parsed, "analyte", "A");
  const std::string& folder = parsed.positional.front();
  const Outcome<std::string> run = check_published_folder(folder);
  if (!run) {
    std::cerr << folder << ": " << run.reason() << '\n';
    return ExitStatus::BadInput;
  }
  const PublishedRecord record = read_published(folder);
  const PublishedAnalyte& analyte = find_analyte(record, wanted);
  const auto results = find_results(analyte, parsed);
  if (parsed.has("json")) {
    print_json(*run, record, analyte, results);
  } else {
    print_text(*run, record, analyte, results);
  }
  return ExitStatus::Done;
}

}  // namespace loqsmith
