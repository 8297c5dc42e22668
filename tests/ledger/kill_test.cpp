// Kills a publication, and the recovery after it, at every file operation.

#include <gtest/gtest.h>

#include <set>

#include "child_process.hpp"
#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/damage.hpp"
#include "loqsmith/ledger/out_layout.hpp"
#include "loqsmith/ledger/run_history.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;
using std::chrono::milliseconds;

// Everything that can be seen of a folder, in one text.
std::string state_of(const fs::path& folder) {
  std::string text;
  for (const auto& entry : fs::recursive_directory_iterator(folder)) {
    if (!entry.is_directory()) continue;
    text += entry.path().lexically_relative(folder).string() + "/\n";
  }
  for (const std::string& name : files_below(folder)) {
    text += name + ' ' + digest_file(folder / name).sha256 + '\n';
  }
  return text;
}

std::string remarks_on(const fs::path& out) {
  if (!fs::exists(out / "ledger.jsonl")) return {};
  const VerifyReport report = verify_out(out, milliseconds{0});
  return deviations_of(report) + join(report.notes, "\n");
}

int highest_begun(const fs::path& out) {
  int count = 0;
  for (const auto& line : read_chain(read_file(out / "ledger.jsonl")).lines) {
    if (line.action == "run-begun") ++count;
  }
  return count;
}

// Lines of a recovery as short texts: those that the ledger has.
std::set<std::string> told_lines(const fs::path& out) {
  std::set<std::string> told;
  if (!fs::exists(out / "ledger.jsonl")) return told;
  for (const auto& line : read_chain(read_file(out / "ledger.jsonl")).lines) {
    told.insert(line.action + ' ' + line.object + detail_of(line, "torn"));
  }
  return told;
}

// And those that this state demands, however often recovery is interrupted.
std::set<std::string> owed_lines(const fs::path& out) {
  std::set<std::string> owed;
  if (!fs::exists(out / "ledger.jsonl")) return owed;
  const Chain chain = read_chain(read_file(out / "ledger.jsonl"));
  if (!chain.torn.empty()) {
    owed.insert("recovery ledger.jsonl" + sha256_hex(chain.torn));
  }
  for (const RunEvents& run : collect_runs(chain.lines).runs) {
    if (run.pending()) owed.insert("run-abandoned " + run.object);
    if (is_out_of_place({out}, run)) owed.insert("recovery " + run.object);
  }
  return owed;
}

// What must hold after a kill: the next start says what it found, and leaves
// OUT with the whole run or without it, and able to take the next one.
void expect_recovers(const fs::path& out, const std::string& when,
                     const std::set<std::string>& owed) {
  const bool something_to_say = !remarks_on(out).empty();
  const auto found = recover(place_at(out));
  if (something_to_say) {
    EXPECT_FALSE(found.empty()) << when;
  }
  const auto told = told_lines(out);
  for (const std::string& line : owed) {
    EXPECT_EQ(told.count(line), 1U) << when << ": " << line;
  }
  if (fs::exists(out / "ledger.jsonl")) {
    EXPECT_EQ(remarks_on(out), "") << when << ' ' << join(found, "; ");
  }
  EXPECT_EQ(files_below(out / ".work"), std::vector<std::string>{"lock"})
      << when;
  EXPECT_TRUE(recover(place_at(out)).empty()) << when;
  const fs::path next = publish_run(place_at(out), "a", "next");
  EXPECT_EQ(remarks_on(out), "") << when;
  // All runs here are of one sequence, so its number counts the beginnings.
  EXPECT_EQ(next.filename(), run_folder_name(highest_begun(out))) << when;
}

class Kills : public ::testing::Test {
 protected:
  Kills() : folder_(TempFolder::kept_in_memory()) {}

  // A copy of an earlier state under a name of its own.
  fs::path copy_of(const fs::path& state) {
    const fs::path copy = folder_ / ("copy-" + std::to_string(++copies_));
    fs::copy(state, copy, fs::copy_options::recursive);
    return copy;
  }

  void kill_recovery_everywhere(const fs::path& state, const std::string& when);

  // Whether this state, with these lines owed, was not met before.
  bool is_new(const fs::path& out, const std::set<std::string>& owed) {
    std::string key = state_of(out);
    for (const std::string& line : owed) key += line + '\n';
    return states_.insert(key).second;
  }

  TempFolder folder_;
  int copies_ = 0;
  std::set<std::string> states_;
};

void Kills::kill_recovery_everywhere(const fs::path& state,
                                     const std::string& when) {
  const auto owed = owed_lines(state);
  for (const bool torn : {false, true}) {
    for (int m = 1;; ++m) {
      const fs::path out = copy_of(state);
      const ChildEnd end =
          run_and_kill({m, torn}, [&] { recover(place_at(out)); });
      if (!end.killed) {
        EXPECT_EQ(end.status, 0) << when;
        fs::remove_all(out);
        break;
      }
      const std::string again =
          when + ", recovery killed at operation " + std::to_string(m);
      if (is_new(out, owed)) expect_recovers(out, again, owed);
      fs::remove_all(out);
    }
  }
}

TEST_F(Kills, AtEveryOperationLeaveTheWholeRunOrNone) {
  const fs::path first = folder_ / "out";
  publish_run(place_at(first), "a");
  int kills = 0;
  int with_run = 0;
  for (const bool torn : {false, true}) {
    for (int n = 1;; ++n) {
      const fs::path out = folder_ / "work";
      fs::copy(first, out, fs::copy_options::recursive);
      const ChildEnd end = run_and_kill(
          {n, torn}, [&] { publish_run(place_at(out), "a", "2"); });
      const std::string when = "killed at operation " + std::to_string(n);
      if (is_new(out, {}) && !remarks_on(out).empty()) {
        kill_recovery_everywhere(out, when);
      }
      expect_recovers(out, when, owed_lines(out));
      if (fs::exists(out / "a/run-0002/results.csv")) ++with_run;
      fs::remove_all(out);
      if (!end.killed) {
        EXPECT_EQ(end.status, 0);
        break;
      }
      ++kills;
    }
  }
  // The loop must have met both outcomes, or it has proved nothing.
  EXPECT_GT(kills, 70);
  EXPECT_GT(with_run, 2);
  EXPECT_LT(with_run, kills);
}

TEST_F(Kills, OfTheVeryFirstRunLeaveTheWholeRunOrNone) {
  for (const bool torn : {false, true}) {
    for (int n = 1;; ++n) {
      const fs::path out = folder_ / "work";
      const ChildEnd end =
          run_and_kill({n, torn}, [&] { publish_run(place_at(out), "a"); });
      expect_recovers(out, "first run killed at " + std::to_string(n),
                      owed_lines(out));
      fs::remove_all(out);
      if (!end.killed) break;
    }
  }
}

}  // namespace
}  // namespace loqsmith
