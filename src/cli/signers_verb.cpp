#include <iostream>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/base/time.hpp"
#include "loqsmith/cli/options.hpp"
#include "loqsmith/cli/terminal.hpp"
#include "loqsmith/cli/verb.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> kRows{
      {"out", "OUT", "where runs are published and the register is kept"},
      {"reason", "TEXT", "why a signer is removed"},
      {"operator", "NAME", "who asks for the change, for the ledger"},
      {"wait", "SECONDS", "how long to wait for another process's lock (0)"},
      {"json", "", "print the list as JSON, one object a signer"},
      {"help", "", "this text"},
  };
  return kRows;
}

std::string help() {
  return verb_help(
      "loqsmith signers add NAME PUBLIC-KEY-FILE --out OUT [options]\n"
      "  loqsmith signers remove NAME --out OUT --reason TEXT [options]\n"
      "  loqsmith signers list --out OUT [--json]",
      "openssl genpkey -algorithm ed25519 -out ada.key && chmod 600 ada.key\n"
      "  openssl pkey -in ada.key -pubout -out ada.pub\n"
      "  loqsmith signers add \"Ada Quill\" ada.pub --out results",
      "Keeps the register of those who may sign: OUT/signers.jsonl, each\n"
      "change a line of the ledger. A removed signer's signatures stay valid.",
      option_rows());
}

void expect_words(const ParsedOptions& parsed, std::size_t count,
                  const std::string& usage) {
  if (parsed.positional.size() != count) {
    throw WrongUse("expected loqsmith signers " + usage);
  }
}

PublicationPlace place_of(const ParsedOptions& parsed) {
  return {*parsed.value("out"),
          current_actor(parsed.value("operator").value_or("")), now_utc,
          std::chrono::seconds(parsed.whole("wait", 0, 0))};
}

void add(const ParsedOptions& parsed) {
  expect_words(parsed, 3, "add NAME PUBLIC-KEY-FILE");
  const std::string& name = parsed.positional[1];
  const std::string key = read_public_key(parsed.positional[2]);
  const LedgerPlace line = add_signer(place_of(parsed), name, key);
  std::cout << name << " may sign with the key " << key << ", ledger line "
            << line.number << '\n';
}

void remove(const ParsedOptions& parsed) {
  expect_words(parsed, 2, "remove NAME");
  const std::string reason = parsed.value("reason").value_or("");
  if (trim(reason).empty()) throw WrongUse("--reason TEXT is missing");
  const std::string& name = parsed.positional[1];
  const LedgerPlace line = remove_signer(place_of(parsed), name, reason);
  std::cout << name << " may not sign any more, ledger line " << line.number
            << '\n';
}

void print_json(const Signer& signer) {
  JsonWriter json(std::cout);
  json.begin_object();
  json.member("name", signer.name);
  json.member("public_key", signer.public_key);
  json.member("since", signer.since);
  json.member("line", static_cast<std::int64_t>(signer.line));
  json.end_object();
  std::cout << '\n';
}

void list(const ParsedOptions& parsed) {
  expect_words(parsed, 1, "list");
  for (const Signer& signer : list_signers(*parsed.value("out"))) {
    if (parsed.has("json")) {
      print_json(signer);
    } else {
      std::cout << signer.name << ": " << signer.public_key << ", since "
                << signer.since << " (ledger line " << signer.line << ")\n";
    }
  }
}

}  // namespace

ExitStatus signers_verb(const std::vector<std::string>& arguments) {
  const ParsedOptions parsed = parse_options(option_rows(), arguments);
  if (parsed.has("help")) {
    std::cout << help();
    return ExitStatus::Done;
  }
  const std::string word =
      parsed.positional.empty() ? "" : parsed.positional.front();
  if (word != "add" && word != "remove" && word != "list") {
    throw WrongUse("expected signers add, remove or list, found " +
                   in_quotes(word));
  }
  if (!parsed.has("out")) throw WrongUse("--out OUT is missing");
  if (word == "add") add(parsed);
  if (word == "remove") remove(parsed);
  if (word == "list") list(parsed);
  return ExitStatus::Done;
}

}  // namespace loqsmith
