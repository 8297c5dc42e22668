#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/ledger/deviation.hpp"
#include "loqsmith/ledger/line.hpp"
#include "loqsmith/ledger/out_layout.hpp"
#include "loqsmith/ledger/publication.hpp"

namespace loqsmith {

/// A person who may sign.
struct Signer {
  std::string name;
  std::string public_key;  ///< Ed25519, 64 hex digits (base/ed25519.hpp)
  std::uint64_t line = 0;  ///< of the ledger that added the signer
  std::string since;       ///< that line's time
};

/// The register of signers, made from the lines `signer-added` and
/// `signer-removed` in their order. OUT/signers.jsonl holds the same changes
/// for people and other programs; each line of the ledger gives the SHA-256 of
/// the file as it is from then on.
class SignerRegister {
 public:
  /// Lines of other actions change nothing. A change that no register of ours
  /// could have seen, or another hash, is a deviation; it is not carried out.
  void take(const LedgerLine& line);

  const std::vector<Signer>& signers() const { return signers_; }
  const Signer* with_name(const std::string& name) const;
  const Signer* with_key(const std::string& public_key) const;
  const std::vector<Deviation>& deviations() const { return deviations_; }

  /// The bytes of signers.jsonl; nothing: there is no such file.
  std::optional<std::string> text() const { return text_; }
  /// The same before the last change.
  std::optional<std::string> text_before() const { return before_; }

  /// What text() will be after this change.
  std::string text_with(const std::string& change, const Signer& signer) const;

 private:
  std::string wrong_change(const std::string& change,
                           const Signer& signer) const;

  std::vector<Signer> signers_;
  std::vector<Deviation> deviations_;
  std::optional<std::string> text_;
  std::optional<std::string> before_;
};

/// The register after all lines.
SignerRegister collect_signers(const std::vector<LedgerLine>& lines);

/// How OUT/signers.jsonl stands against the register.
enum class RegisterFile {
  Current,
  OneBehind,  ///< the last change is in the ledger only: an interruption
  Damaged,
};
RegisterFile register_file(const std::optional<std::string>& found,
                           const SignerRegister& signers);
RegisterFile register_file(const OutLayout& layout,
                           const SignerRegister& signers);

/// Why a person cannot be registered under a name; empty where it fits: UTF-8
/// without control characters or blanks at its ends, at most 200 bytes.
std::string unfit_signer_name(const std::string& name);

/// Recovery first, then the line, then the file.
/// @throws InputError for an unfit name, one that is registered already, or a
///         key that is; Halt as OpenLedger
LedgerPlace add_signer(const PublicationPlace& place, const std::string& name,
                       const std::string& public_key);

/// What the signer signed stays valid: a signature is held against the
/// register as of its line.
/// @throws InputError where nobody is registered under the name
LedgerPlace remove_signer(const PublicationPlace& place,
                          const std::string& name, const std::string& reason);

/// Those registered now; only reads.
/// @throws Halt 74 where OUT has no ledger that can be read, or register and
///         ledger do not agree
std::vector<Signer> list_signers(const std::filesystem::path& out);

}  // namespace loqsmith
