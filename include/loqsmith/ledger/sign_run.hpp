#pragma once

#include <filesystem>
#include <string>

#include "loqsmith/base/ed25519.hpp"
#include "loqsmith/ledger/ledger.hpp"
#include "loqsmith/ledger/publication.hpp"
#include "loqsmith/ledger/signatures.hpp"

namespace loqsmith {

struct SigningRequest {
  std::string run;      ///< "well-water-0412/run-0001"
  std::string meaning;  ///< one of signature_meanings()
  std::string reason;   ///< must be given where the run is rejected
};

/// Appends a line `signature`: the run, the SHA-256 of its manifest, the
/// meaning, and the name under which the key is registered. The run is held
/// against its manifest first: what has changed is not signed.
///
/// @return what was signed, with the name and the time of the line
/// @throws InputError where nobody is registered with this key, the run was
///         never published, or the meaning is unknown or lacks its reason;
///         Halt 74 where the run or the ledger is not as the ledger says
RunSignature sign_run(const PublicationPlace& place,
                      const SigningRequest& request, const SigningKey& key);

/// A published run's folder as OUT and the run's name below it.
struct RunPlace {
  std::filesystem::path out;
  std::string run;
};

/// @throws InputError where no folder above holds a ledger
RunPlace find_run_place(const std::filesystem::path& folder);

}  // namespace loqsmith
