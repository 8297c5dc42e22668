#include "loqsmith/ledger/signatures.hpp"

#include <algorithm>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

constexpr std::string_view kMachineKey = "machine_key";

Deviation deviation(const LedgerLine& line, std::string what) {
  return {"ledger.jsonl line " + std::to_string(line.number), std::move(what)};
}

const RunEvents* run_named(const RunHistory& history, const std::string& run) {
  for (const RunEvents& events : history.runs) {
    if (events.object == run) return &events;
  }
  return nullptr;
}

// What is wrong with a person's signature; empty where nothing is.
std::string wrong_signature(const LedgerLine& line, const RunHistory& history,
                            const SignerRegister& signers) {
  const RunEvents* run = run_named(history, line.object);
  if (run == nullptr || run->published == 0 || run->published > line.number) {
    return "it signs " + line.object + ", which was not published before";
  }
  if (line.manifest != run->manifest) {
    return "it signs another manifest than that of " + line.object;
  }
  const auto& meanings = signature_meanings();
  if (std::find(meanings.begin(), meanings.end(), detail_of(line, "meaning")) ==
      meanings.end()) {
    return "its meaning is none that a signature can have";
  }
  const std::string name = detail_of(line, "signer");
  const Signer* signer = signers.with_name(name);
  if (signer == nullptr) {
    return "its signer, " + name + ", was not registered then";
  }
  return is_line_signed_by(line, signer->public_key)
             ? ""
             : "its signature is not that of " + name;
}

}  // namespace

std::string signed_text(LedgerLine line) {
  if (!line.detail.empty() && line.detail.back().first == kSignature) {
    line.detail.pop_back();
  }
  return ledger_line_text(line);
}

bool is_line_signed_by(const LedgerLine& line, std::string_view public_key) {
  return !line.detail.empty() && line.detail.back().first == kSignature &&
         is_signed_by(public_key, signed_text(line), line.detail.back().second);
}

const std::vector<std::string>& signature_meanings() {
  static const std::vector<std::string> kMeanings{"reviewed", "approved",
                                                  "rejected"};
  return kMeanings;
}

std::vector<RunSignature> collect_signatures(
    const std::vector<LedgerLine>& lines) {
  std::vector<RunSignature> signatures;
  for (const LedgerLine& line : lines) {
    if (line.action != "signature") continue;
    signatures.push_back({line.object, detail_of(line, "signer"),
                          detail_of(line, "meaning"), line.reason, line.time,
                          line.number});
  }
  return signatures;
}

std::string describe_signed_runs(const std::vector<LedgerLine>& lines,
                                 const std::string& sequence) {
  std::string text;
  for (const RunSignature& signature : collect_signatures(lines)) {
    const std::size_t slash = signature.run.rfind('/');
    if (slash == std::string::npos ||
        signature.run.substr(0, slash) != sequence) {
      continue;
    }
    text += (text.empty() ? "" : "; ") + signature.run.substr(slash + 1) + ' ' +
            signature.meaning + " by " + signature.signer + " at " +
            signature.time + " (line " + std::to_string(signature.line) + ')';
  }
  return text;
}

std::vector<Deviation> check_signatures(const std::vector<LedgerLine>& lines,
                                        const RunHistory& history) {
  std::vector<Deviation> deviations;
  SignerRegister signers;
  for (const LedgerLine& line : lines) {
    signers.take(line);
    if (line.action == "signature") {
      const std::string wrong = wrong_signature(line, history, signers);
      if (!wrong.empty()) deviations.push_back(deviation(line, wrong));
    }
    const std::string machine = detail_of(line, kMachineKey);
    if (line.action == "run-published" && !machine.empty() &&
        !is_line_signed_by(line, machine)) {
      deviations.push_back(
          deviation(line, "its signature is not that of its machine_key"));
    }
  }
  return deviations;
}

std::vector<Deviation> check_machine_key(const std::vector<LedgerLine>& lines,
                                         const std::string& public_key,
                                         std::uint64_t& not_signed) {
  std::vector<Deviation> deviations;
  bool begun = false;
  not_signed = 0;
  for (const LedgerLine& line : lines) {
    if (line.action != "run-published") continue;
    if (is_line_signed_by(line, public_key)) {
      begun = true;
    } else if (begun || !detail_of(line, kSignature).empty()) {
      deviations.push_back(deviation(
          line, line.object + " is published without a signature of this key"));
    } else {
      ++not_signed;
    }
  }
  if (!begun) {
    deviations.push_back(
        {"ledger.jsonl", "no published run bears a signature of this key"});
  }
  return deviations;
}

}  // namespace loqsmith
