#pragma once

#include "loqsmith/ledger/ledger.hpp"
#include "loqsmith/ledger/publication.hpp"
#include "loqsmith/ledger/verify.hpp"

namespace loqsmith {

/// Appends the outcome of a verification as a line `verification`: lines,
/// runs and files looked at, the head that was found, what else was asked
/// for, the number of deviations and the first of them.
///
/// @throws Halt 74 where OUT has no ledger, and where the ledger is damaged:
///         it is then never appended to, and the outcome stands nowhere but
///         on the terminal.
LedgerPlace note_verification(const PublicationPlace& place,
                              const VerifyRequest& request,
                              const VerifyReport& report);

}  // namespace loqsmith
