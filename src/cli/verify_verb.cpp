#include <iostream>

#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/ledger/verify.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"json", "", "print the outcome as JSON"},
      {"help", "", "this text"},
  };
  return kRows;
}

void print_text(const VerifyReport& report) {
  for (const Deviation& deviation : report.deviations) {
    std::cout << deviation.place << ": " << deviation.what << '\n';
  }
  for (const std::string& note : report.notes) {
    std::cout << "note: " << note << '\n';
  }
  std::cout << report.lines << " ledger lines, " << report.runs << " runs, "
            << report.files << " files; ledger head " << describe(report.head)
            << '\n';
  if (report.deviations.empty()) {
    std::cout << "everything is as the ledger says\n";
  } else {
    std::cout << report.deviations.size()
              << (report.deviations.size() == 1 ? " deviation\n"
                                                : " deviations\n");
  }
}

void print_json(const VerifyReport& report) {
  JsonWriter json(std::cout);
  json.begin_object();
  json.member("lines", static_cast<std::int64_t>(report.lines));
  json.member("runs", static_cast<std::int64_t>(report.runs));
  json.member("files", static_cast<std::int64_t>(report.files));
  json.member("head", describe(report.head));
  json.begin_array("deviations");
  for (const Deviation& deviation : report.deviations) {
    json.begin_object();
    json.member("place", deviation.place);
    json.member("what", deviation.what);
    json.end_object();
  }
  json.end_array();
  json.begin_array("notes");
  for (const std::string& note : report.notes) json.value(note);
  json.end_array();
  json.end_object();
  std::cout << '\n';
}

}  // namespace

ExitStatus verify_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << verb_help(
        "loqsmith verify OUT [options]", "loqsmith verify results",
        "Reads every published file, every link of the ledger and its head, "
        "and\n"
        "names whatever is not as the ledger says (exit status 74).",
        option_rows());
    return ExitStatus::Done;
  }
  if (parsed.positional.size() != 1) throw WrongUse("name one OUT folder");
  const VerifyReport report = verify_out(parsed.positional.front());
  if (parsed.has("json")) {
    print_json(report);
  } else {
    print_text(report);
  }
  return report.deviations.empty() ? ExitStatus::Done : ExitStatus::IoFailed;
}

}  // namespace loqsmith
