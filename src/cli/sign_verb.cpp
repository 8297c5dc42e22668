#include <algorithm>
#include <iostream>

#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/time.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/terminal.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/ledger/sign_run.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"key", "FILE", "your private key: PEM, Ed25519, mode 0600"},
      {"meaning", "WORD", "reviewed, approved or rejected"},
      {"reason", "TEXT", "why; needed where the run is rejected"},
      {"wait", "SECONDS", "how long to wait for another process's lock (0)"},
      {"json", "", "print the signature as JSON"},
      {"help", "", "this text"},
  };
  return kRows;
}

std::string help() {
  return verb_help(
      "loqsmith sign OUT/SEQUENCE/run-N --key FILE --meaning WORD [options]",
      "loqsmith sign results/well-water-0412/run-0001 --key ada.key --meaning "
      "approved",
      "A person signs a published run: the ledger gets a line with the name\n"
      "under which the key is registered, the time, the meaning, and the\n"
      "SHA-256 of the run's manifest. The run is checked first; what has\n"
      "changed is not signed.",
      option_rows());
}

SigningRequest request_of(const ParsedOptions& parsed) {
  if (parsed.positional.size() != 1) {
    throw WrongUse("name one run, OUT/SEQUENCE/run-N");
  }
  if (!parsed.has("key")) throw WrongUse("--key FILE is missing");
  SigningRequest request;
  request.meaning = parsed.value("meaning").value_or("");
  request.reason = parsed.value("reason").value_or("");
  const auto& meanings = signature_meanings();
  if (std::find(meanings.begin(), meanings.end(), request.meaning) ==
      meanings.end()) {
    throw WrongUse("--meaning: expected " + join(meanings, ", ") + ", found " +
                   in_quotes(request.meaning));
  }
  return request;
}

void print_json(const RunSignature& signature) {
  JsonWriter json(std::cout);
  json.begin_object();
  json.member("run", signature.run);
  json.member("signer", signature.signer);
  json.member("meaning", signature.meaning);
  json.member("reason", signature.reason);
  json.member("time", signature.time);
  json.member("line", static_cast<std::int64_t>(signature.line));
  json.end_object();
  std::cout << '\n';
}

}  // namespace

ExitStatus sign_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << help();
    return ExitStatus::Done;
  }
  SigningRequest request = request_of(parsed);
  const SigningKey key = SigningKey::read(*parsed.value("key"));
  const RunPlace run = find_run_place(parsed.positional.front());
  request.run = run.run;
  const PublicationPlace place{
      run.out, current_actor(""), now_utc,
      std::chrono::seconds(parsed.whole("wait", 0, 0))};
  const RunSignature signature = sign_run(place, request, key);
  if (parsed.has("json")) {
    print_json(signature);
  } else {
    std::cout << signature.run << ' ' << signature.meaning << " by "
              << signature.signer << " at " << signature.time
              << ", ledger line " << signature.line << '\n';
  }
  return ExitStatus::Done;
}

}  // namespace loqsmith
