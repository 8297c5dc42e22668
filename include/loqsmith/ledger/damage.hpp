#pragma once

#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/out_layout.hpp"
#include "loqsmith/ledger/run_history.hpp"

namespace loqsmith {

/// Looks, before anything in OUT is mended or appended, for what no
/// interruption explains: a broken chain, a head that does not belong to the
/// ledger, runs or signers in an impossible order, another register of signers,
/// a published run whose folder is gone and whose staging is gone too or is not
/// what its manifest says.
/// @throws Halt 74, naming the first of these
void halt_if_damaged(const OutLayout& layout, const Chain& chain,
                     const HeadCheck& head);

/// True where a published run is still in its staging folder.
bool is_out_of_place(const OutLayout& layout, const RunEvents& run);

}  // namespace loqsmith
