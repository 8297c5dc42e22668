#include "loqsmith/ledger/open_ledger.hpp"

#include <algorithm>
#include <thread>

#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/time.hpp"
#include "loqsmith/ledger/damage.hpp"
#include "loqsmith/ledger/signatures.hpp"
#include "loqsmith/ledger/system_failures.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;

constexpr std::string_view kTorn = "torn-";

void create_out(const OutLayout& layout) {
  try {
    make_folders(layout.work());
  } catch (const std::system_error& error) {
    throw Halt(ExitStatus::CannotCreate, error.what());
  }
}

FileLock take_lock(const OutLayout& layout, std::chrono::seconds patience) {
  const auto deadline = std::chrono::steady_clock::now() + patience;
  FileLock lock;
  while (!lock.try_lock(layout.lock())) {
    if (std::chrono::steady_clock::now() >= deadline) {
      throw Halt(ExitStatus::Locked,
                 "another process holds " + layout.lock().string());
    }
    std::this_thread::sleep_for(std::chrono::milliseconds(20));
  }
  return lock;
}

std::optional<std::string> read_if_there(const fs::path& path) {
  if (!is_there(path)) return std::nullopt;
  return read_file(path);
}

// The clock's time, unless it stands before the last line's: time in the ledger
// never goes back, and what the clock said is then kept in the detail.
void set_time(LedgerLine& line, const std::string& clock, const Chain& chain) {
  line.time = clock;
  if (chain.lines.empty()) return;
  const auto now = parse_moment(clock);
  const auto last = parse_moment(chain.lines.back().time);
  if (!now || now->microseconds >= last->microseconds) return;
  line.time = chain.lines.back().time;
  line.detail.emplace_back("clock", clock);
}

}  // namespace

OpenLedger::OpenLedger(const PublicationPlace& place,
                       std::chrono::seconds patience)
    : place_(place), layout_{place.out} {
  create_out(layout_);
  halt_on_failure([&] {
    lock_ = take_lock(layout_, patience);
    chain_ = read_chain(read_if_there(layout_.ledger()).value_or(""));
    const auto head = read_if_there(layout_.head());
    const HeadCheck check = check_head(chain_, head);
    halt_if_damaged(layout_, chain_, check);
    if (check.one_behind) mend_head(head);
    mend_torn_line();
    report_torn_lines();
  });
}

void OpenLedger::mend_head(const std::optional<std::string>& head) {
  replace_file(layout_.head(), head_text(chain_.last()));
  say(head ? "ledger.head was one line behind: renewed"
           : "ledger.head was not written yet: renewed");
}

// The torn bytes are kept beside the lock until the line that gives their
// SHA-256 is written, so that a second interruption cannot lose the news.
void OpenLedger::mend_torn_line() {
  if (chain_.torn.empty()) return;
  const std::string name = std::string(kTorn) + sha256_hex(chain_.torn);
  replace_file(layout_.work() / name, chain_.torn);
  cut_file(layout_.ledger(), chain_.whole_bytes);
  chain_.torn.clear();
}

void OpenLedger::report_torn_lines() {
  std::vector<std::string> names;
  for (const auto& entry : fs::directory_iterator(layout_.work())) {
    const std::string name = entry.path().filename().string();
    if (name.rfind(kTorn, 0) == 0 && is_sha256(name.substr(kTorn.size()))) {
      names.push_back(name);
    }
  }
  std::sort(names.begin(), names.end());
  for (const std::string& name : names) {
    const std::string hash = name.substr(kTorn.size());
    const bool told = std::any_of(
        lines().begin(), lines().end(), [&](const LedgerLine& line) {
          return line.action == "recovery" && detail_of(line, "torn") == hash;
        });
    if (!told) {
      append({"recovery",
              "ledger.jsonl",
              "",
              "torn last line cut off",
              {{"torn", hash}}});
    }
    say("ledger.jsonl ended in the middle of a line: cut off, its SHA-256 is " +
        hash);
    remove_file(layout_.work() / name);
  }
}

LedgerPlace OpenLedger::append(const LedgerEntry& entry,
                               const SigningKey* key) {
  const LedgerPlace last = chain_.last();
  LedgerLine line;
  line.number = last.number + 1;
  line.actor = place_.actor.actor;
  line.operator_ = place_.actor.operator_;
  line.host = place_.actor.host;
  line.program = place_.actor.program;
  line.action = entry.action;
  line.object = entry.object;
  line.manifest = entry.manifest;
  line.reason = entry.reason;
  line.detail = entry.detail;
  line.previous = last.sha256;
  set_time(line, place_.clock(), chain_);
  if (key != nullptr) {
    line.detail.emplace_back(kSignature, key->sign(signed_text(line)));
  }
  const std::string text = ledger_line_text(line);
  // What could not be read back would make the ledger damaged for ever.
  const Chain one = read_chain(text);
  if (one.lines.size() != 1) {
    throw Halt(ExitStatus::ProgramFault,
               "unfit line for the ledger: " + one.deviations.front().what);
  }
  halt_on_failure([&] {
    append_to_file(layout_.ledger(), text);
    chain_.lines.push_back(one.lines.front());
    chain_.hashes.push_back(sha256_hex(text));
    chain_.whole_bytes += text.size();
    replace_file(layout_.head(), head_text(chain_.last()));
  });
  return chain_.last();
}

}  // namespace loqsmith
