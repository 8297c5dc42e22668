#include "loqsmith/ledger/signers.hpp"

#include <algorithm>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/json_writer.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {

std::string unfit_signer_name(const std::string& name) {
  constexpr std::size_t kMostBytes = 200;
  if (name.empty()) return "it is empty";
  if (name.size() > kMostBytes) return "it is too long";
  if (!is_utf8(name)) return "it is no UTF-8";
  if (trim(name) != name) return "it begins or ends with a blank";
  const bool controls = std::any_of(name.begin(), name.end(), [](char c) {
    const auto byte = static_cast<unsigned char>(c);
    return byte < 0x20U || byte == 0x7FU;
  });
  return controls ? "it holds a control character" : "";
}

const Signer* SignerRegister::with_name(const std::string& name) const {
  for (const Signer& signer : signers_) {
    if (signer.name == name) return &signer;
  }
  return nullptr;
}

const Signer* SignerRegister::with_key(const std::string& public_key) const {
  for (const Signer& signer : signers_) {
    if (signer.public_key == public_key) return &signer;
  }
  return nullptr;
}

std::string SignerRegister::text_with(const std::string& change,
                                      const Signer& signer) const {
  return text_.value_or("") + "{\"change\":" + json_text(change) +
         ",\"name\":" + json_text(signer.name) +
         ",\"public_key\":" + json_text(signer.public_key) + "}\n";
}

std::string SignerRegister::wrong_change(const std::string& change,
                                         const Signer& signer) const {
  const Signer* known = with_name(signer.name);
  if (change == "removed") {
    return known != nullptr && known->public_key == signer.public_key
               ? ""
               : "it removes a signer who is not registered";
  }
  if (!unfit_signer_name(signer.name).empty()) return "its object is no name";
  if (!is_public_key(signer.public_key)) return "its public_key is no key";
  if (known != nullptr) return "it adds a name that is registered";
  if (with_key(signer.public_key) != nullptr) {
    return "it adds a key that is registered";
  }
  return {};
}

void SignerRegister::take(const LedgerLine& line) {
  const bool added = line.action == "signer-added";
  if (!added && line.action != "signer-removed") return;
  const Signer signer{line.object, detail_of(line, "public_key"), line.number,
                      line.time};
  const std::string change = added ? "added" : "removed";
  std::string wrong = wrong_change(change, signer);
  const std::string text = text_with(change, signer);
  if (wrong.empty() && sha256_hex(text) != detail_of(line, "register")) {
    wrong = "its register is not the SHA-256 of signers.jsonl";
  }
  if (!wrong.empty()) {
    deviations_.push_back(
        {"ledger.jsonl line " + std::to_string(line.number), wrong});
    return;
  }
  before_ = std::exchange(text_, text);
  if (added) {
    signers_.push_back(signer);
  } else {
    std::erase_if(signers_, [&](const Signer& known) {
      return known.name == signer.name;
    });
  }
}

SignerRegister collect_signers(const std::vector<LedgerLine>& lines) {
  SignerRegister signers;
  for (const LedgerLine& line : lines) signers.take(line);
  return signers;
}

RegisterFile register_file(const std::optional<std::string>& found,
                           const SignerRegister& signers) {
  if (found == signers.text()) return RegisterFile::Current;
  return found == signers.text_before() ? RegisterFile::OneBehind
                                        : RegisterFile::Damaged;
}

RegisterFile register_file(const OutLayout& layout,
                           const SignerRegister& signers) {
  std::optional<std::string> found;
  if (is_there(layout.signers())) found = read_file(layout.signers());
  return register_file(found, signers);
}

}  // namespace loqsmith
