#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/ledger/deviation.hpp"
#include "loqsmith/ledger/line.hpp"
#include "loqsmith/ledger/run_history.hpp"

namespace loqsmith {

// A line of the ledger is signed by the last member of its detail, `signature`:
// 128 hex digits, Ed25519, over the bytes of the line as they are without that
// member, line feed included. So time, person, meaning, manifest, and by
// `previous` the whole ledger above are under the signature. Without us:
//   sed -n 12p ledger.jsonl | sed 's/,"signature":"[0-9a-f]*"//' > signed

/// The member's name.
inline constexpr std::string_view kSignature = "signature";

/// The bytes that the line's signature is over.
std::string signed_text(LedgerLine line);

/// Whether the line carries a signature, as its last member, of this key.
bool is_line_signed_by(const LedgerLine& line, std::string_view public_key);

/// What a person may say of a run: reviewed, approved, rejected.
const std::vector<std::string>& signature_meanings();

/// A person signed a run.
struct RunSignature {
  std::string run;
  std::string signer;
  std::string meaning;
  std::string reason;
  std::string time;
  std::uint64_t line = 0;
};

/// Signatures by persons, in the ledger's order.
std::vector<RunSignature> collect_signatures(
    const std::vector<LedgerLine>& lines);

/// "run-0001 approved by Ada Quill at 2026-03-02T08:15:00.000Z (line 7)", "; "
/// between them: what a later run of the sequence says. Empty where no run of
/// it was signed.
std::string describe_signed_runs(const std::vector<LedgerLine>& lines,
                                 const std::string& sequence);

/// Signatures by persons, each against the register as of its line, the run it
/// names, and that run's manifest; and signatures of published lines against
/// the `machine_key` that they name.
std::vector<Deviation> check_signatures(const std::vector<LedgerLine>& lines,
                                        const RunHistory& history);

/// Published lines against the machine's public key. From the first that bears
/// its signature on, all must; a line that has none before that is of a time
/// when there was no key yet, as the signature, over `previous`, vouches for
/// all lines above it. No line signed by it at all is a deviation.
/// @param not_signed  counts those before the first
std::vector<Deviation> check_machine_key(const std::vector<LedgerLine>& lines,
                                         const std::string& public_key,
                                         std::uint64_t& not_signed);

}  // namespace loqsmith
