#include <algorithm>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/open_ledger.hpp"
#include "loqsmith/ledger/recovery.hpp"
#include "loqsmith/ledger/signers.hpp"
#include "loqsmith/ledger/system_failures.hpp"

namespace loqsmith {
namespace {

constexpr std::chrono::seconds kLeastPatience{2};

[[noreturn]] void refuse(const std::string& found, const std::string& expected,
                         const std::string& mend) {
  InputProblem problem;
  problem.found = found;
  problem.expected = expected;
  problem.mend = mend;
  throw InputError(problem);
}

void check_new(const SignerRegister& signers, const Signer& signer) {
  const std::string why = unfit_signer_name(signer.name);
  if (!why.empty()) {
    refuse("the signer's name " + in_quotes(signer.name) + ": " + why,
           "a person's name", "");
  }
  if (!is_public_key(signer.public_key)) {
    refuse("no public key", "64 lower-case hex digits", "");
  }
  if (signers.with_name(signer.name) != nullptr) {
    refuse("the name " + in_quotes(signer.name) + ", registered already",
           "a name for one key", "remove the signer first");
  }
  if (const Signer* other = signers.with_key(signer.public_key)) {
    refuse("a key registered already for " + in_quotes(other->name),
           "a key of the person's own", "make a new pair of keys");
  }
}

// The line comes first: it says all that is needed to write the file, and the
// next writer does so where this one is interrupted.
LedgerPlace carry_out(OpenLedger& ledger, const SignerRegister& signers,
                      const std::string& change, const Signer& signer,
                      const std::string& reason) {
  const std::string text = signers.text_with(change, signer);
  const LedgerPlace place = ledger.append(
      {"signer-" + change,
       signer.name,
       "",
       reason,
       {{"public_key", signer.public_key}, {"register", sha256_hex(text)}}});
  replace_file(ledger.layout().signers(), text);
  return place;
}

}  // namespace

LedgerPlace add_signer(const PublicationPlace& place, const std::string& name,
                       const std::string& public_key) {
  return halt_on_failure([&] {
    const Signer signer{name, public_key, 0, ""};
    // Before OUT is created for what can never be registered.
    check_new(SignerRegister{}, signer);
    OpenLedger ledger(place, std::max(place.wait, kLeastPatience));
    recover_runs(ledger);
    const SignerRegister signers = collect_signers(ledger.lines());
    check_new(signers, signer);
    return carry_out(ledger, signers, "added", signer, "");
  });
}

LedgerPlace remove_signer(const PublicationPlace& place,
                          const std::string& name, const std::string& reason) {
  return halt_on_failure([&] {
    if (!is_there(OutLayout{place.out}.ledger())) {
      refuse(place.out.string() + ", which has no ledger", "a published OUT",
             "");
    }
    OpenLedger ledger(place, std::max(place.wait, kLeastPatience));
    recover_runs(ledger);
    const SignerRegister signers = collect_signers(ledger.lines());
    const Signer* signer = signers.with_name(name);
    if (signer == nullptr) {
      std::vector<std::string> names;
      for (const Signer& known : signers.signers()) names.push_back(known.name);
      const std::string near = nearest_name(name, names);
      refuse("no signer of the name " + in_quotes(name), "a registered name",
             near.empty() ? "see loqsmith signers list"
                          : "did you mean " + in_quotes(near) + "?");
    }
    return carry_out(ledger, signers, "removed", *signer, reason);
  });
}

// The file is read first, so that a writer at work leaves it at most behind.
std::vector<Signer> list_signers(const std::filesystem::path& out) {
  return halt_on_failure([&] {
    const OutLayout layout{out};
    std::optional<std::string> file;
    if (is_there(layout.signers())) file = read_file(layout.signers());
    const Chain chain = read_chain(read_file(layout.ledger()));
    const SignerRegister signers = collect_signers(chain.lines);
    if (!chain.deviations.empty() || !signers.deviations().empty() ||
        register_file(file, signers) == RegisterFile::Damaged) {
      throw Halt(ExitStatus::IoFailed,
                 "the register and the ledger do not agree: see loqsmith "
                 "verify " +
                     out.string());
    }
    return signers.signers();
  });
}

}  // namespace loqsmith
