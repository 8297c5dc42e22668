#include "loqsmith/ledger/chain.hpp"

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/time.hpp"

namespace loqsmith {
namespace {

// A line of ours has some hundred bytes; what is longer was never written here.
constexpr std::size_t kMostLineBytes = std::size_t{1} << 20U;

std::int64_t moment_of(const LedgerLine& line) {
  return parse_moment(line.time)->microseconds;
}

std::string line_place(std::uint64_t number) {
  return "ledger.jsonl line " + std::to_string(number);
}

void check_link(Chain& chain, const LedgerLine& line) {
  const LedgerPlace above = chain.last();
  const std::string place = line_place(above.number + 1);
  if (line.number != above.number + 1) {
    chain.deviations.push_back(
        {place, "it is numbered " + std::to_string(line.number) +
                    ": lines were left out, added or moved"});
  }
  if (line.previous != above.sha256) {
    chain.deviations.push_back(
        {place, above.number == 0
                    ? "its previous should be zeros: lines before it are gone"
                    : "its previous is not the SHA-256 of " +
                          line_place(above.number) +
                          ": one of the two was changed"});
  }
  if (!chain.lines.empty() && moment_of(line) < moment_of(chain.lines.back())) {
    chain.deviations.push_back({place, "its time lies before the line above"});
  }
}

// @param text  the line with its line feed
void add_line(Chain& chain, std::string_view text) {
  const std::string_view content = text.substr(0, text.size() - 1);
  const auto line = text.size() > kMostLineBytes
                        ? Outcome<LedgerLine>(NotApplicable{"it is too long"})
                        : read_ledger_line(content);
  if (line) {
    check_link(chain, *line);
    chain.lines.push_back(*line);
  } else {
    chain.deviations.push_back(
        {line_place(chain.hashes.size() + 1), line.reason()});
  }
  chain.hashes.push_back(sha256_hex(text));
  chain.whole_bytes += text.size();
}

std::optional<LedgerPlace> read_head(std::string_view text) {
  if (text.empty() || text.back() != '\n') return std::nullopt;
  return read_ledger_place(text.substr(0, text.size() - 1));
}

HeadCheck damaged(std::string place, std::string what) {
  return {false, false, Deviation{std::move(place), std::move(what)}};
}

}  // namespace

LedgerPlace Chain::last() const {
  if (hashes.empty()) return {0, std::string(kNoLine)};
  return {hashes.size(), hashes.back()};
}

Chain read_chain(std::string_view bytes) {
  Chain chain;
  while (true) {
    const std::size_t end = bytes.find('\n');
    if (end == std::string_view::npos) break;
    add_line(chain, bytes.substr(0, end + 1));
    bytes.remove_prefix(end + 1);
  }
  chain.torn = std::string(bytes);
  return chain;
}

std::string head_text(const LedgerPlace& last) { return describe(last) + '\n'; }

HeadCheck check_head(const Chain& chain,
                     const std::optional<std::string>& head) {
  const std::size_t count = chain.hashes.size();
  if (!head) {
    if (count <= 1) return {count == 1, count == 1, std::nullopt};
    return damaged("ledger.head", "it is missing");
  }
  const auto named = read_head(*head);
  if (!named) return damaged("ledger.head", "it is malformed");
  const std::string both = "ledger.jsonl and ledger.head";
  const std::string ends = "the ledger ends with line " +
                           std::to_string(count) + ", its head names line " +
                           std::to_string(named->number);
  if (named->number > count) {
    return damaged(both, ends + ": lines were cut off, or the head changed");
  }
  if (named->sha256 != chain.hashes[named->number - 1]) {
    return damaged(both, "line " + std::to_string(named->number) +
                             " does not have the SHA-256 that the head gives: "
                             "one of the two was changed");
  }
  HeadCheck check;
  check.behind = named->number < count;
  check.one_behind = named->number + 1 == count;
  if (check.behind && !check.one_behind) {
    check.damage =
        Deviation{both, ends + ": lines were added, or the head is an old one"};
  }
  return check;
}

std::optional<Deviation> check_extends(const Chain& chain,
                                       const LedgerPlace& earlier) {
  const std::size_t count = chain.hashes.size();
  if (earlier.number > count) {
    return Deviation{"ledger.jsonl",
                     "it ends with line " + std::to_string(count) +
                         ", but line " + std::to_string(earlier.number) +
                         " was written down elsewhere: lines were cut off"};
  }
  if (chain.hashes[earlier.number - 1] == earlier.sha256) return std::nullopt;
  return Deviation{line_place(earlier.number),
                   "its SHA-256 is not the one written down elsewhere: the "
                   "ledger was written anew up to here, or it is another one"};
}

}  // namespace loqsmith
