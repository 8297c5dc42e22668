#include <iostream>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/time.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/terminal.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/ledger/verification_note.hpp"
#include "loqsmith/ledger/verify.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"since", "N:HASH", "prove that this line still stands as it did"},
      {"inputs", "", "hash the runs' inputs again where they still are"},
      {"public-key", "FILE", "of the machine: it must have signed the runs"},
      {"note", "", "append the outcome to the ledger"},
      {"operator", "NAME", "who asks for it, for the note"},
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
            << report.files << " files";
  if (report.inputs > 0) {
    std::cout << ", " << report.inputs << " inputs unchanged";
  }
  if (report.signatures > 0) {
    std::cout << ", " << report.signatures
              << (report.signatures == 1 ? " signature" : " signatures");
  }
  std::cout << "; ledger head " << describe(report.head) << '\n';
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
  json.member("inputs", static_cast<std::int64_t>(report.inputs));
  json.member("signatures", static_cast<std::int64_t>(report.signatures));
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

VerifyRequest request_of(const ParsedOptions& parsed) {
  VerifyRequest request;
  request.inputs = parsed.has("inputs");
  if (const auto file = parsed.value("public-key")) {
    request.machine_key = read_public_key(*file);
  }
  if (const auto since = parsed.value("since")) {
    request.since = read_ledger_place(*since);
    if (!request.since) {
      throw WrongUse(
          "--since: expected a line's number and SHA-256, 12:ab34..., found " +
          in_quotes(*since));
    }
  }
  return request;
}

// What cannot be noted was found all the same: it is printed before.
void note_outcome(const ParsedOptions& parsed, const VerifyRequest& request,
                  const VerifyReport& report) {
  PublicationPlace place;
  place.out = parsed.positional.front();
  place.actor = current_actor(parsed.value("operator").value_or(""));
  place.clock = now_utc;
  const LedgerPlace noted = note_verification(place, request, report);
  std::cerr << "noted in ledger line " << describe(noted) << '\n';
}

}  // namespace

ExitStatus verify_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << verb_help(
        "loqsmith verify OUT [options]",
        "loqsmith verify results --inputs --note",
        "Reads every published file, every link of the ledger and its head, "
        "and\n"
        "names whatever is not as the ledger says (exit status 74). Nothing "
        "is\n"
        "written, unless the outcome is to be noted.",
        option_rows());
    return ExitStatus::Done;
  }
  if (parsed.positional.size() != 1) throw WrongUse("name one OUT folder");
  const VerifyRequest request = request_of(parsed);
  const VerifyReport report = verify_out(parsed.positional.front(), request);
  if (parsed.has("json")) {
    print_json(report);
  } else {
    print_text(report);
  }
  if (parsed.has("note")) note_outcome(parsed, request, report);
  return report.deviations.empty() ? ExitStatus::Done : ExitStatus::IoFailed;
}

}  // namespace loqsmith
