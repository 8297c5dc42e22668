// Killed at any moment, OUT holds either nothing of the run or all of it.

#include <gtest/gtest.h>
#include <signal.h>
#include <spawn.h>
#include <sys/wait.h>
#include <unistd.h>

#include <chrono>
#include <thread>

#include "generator/random_stream.hpp"
#include "golden/processed.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;
using Clock = std::chrono::steady_clock;

// Starts the program with its output thrown away, kills it after a while.
void start_and_kill(const fs::path& folder, const fs::path& out,
                    Clock::duration after) {
  std::vector<std::string> words{LOQSMITH_PROGRAM, "process", folder.string(),
                                 "--out", out.string()};
  std::vector<char*> arguments;
  for (std::string& word : words) arguments.push_back(word.data());
  arguments.push_back(nullptr);
  posix_spawn_file_actions_t quiet;
  posix_spawn_file_actions_init(&quiet);
  posix_spawn_file_actions_addopen(&quiet, 1, "/dev/null", 1, 0);
  posix_spawn_file_actions_addopen(&quiet, 2, "/dev/null", 1, 0);
  pid_t child = 0;
  ASSERT_EQ(posix_spawn(&child, LOQSMITH_PROGRAM, &quiet, nullptr,
                        arguments.data(), environ),
            0);
  posix_spawn_file_actions_destroy(&quiet);
  std::this_thread::sleep_for(after);
  kill(child, SIGKILL);
  int state = 0;
  ASSERT_EQ(waitpid(child, &state, 0), child);
}

std::size_t count(const std::string& text, const std::string& part) {
  std::size_t times = 0;
  for (std::size_t at = text.find(part); at != std::string::npos;
       at = text.find(part, at + part.size())) {
    ++times;
  }
  return times;
}

std::string ledger_of(const fs::path& out) {
  const fs::path ledger = out / "ledger.jsonl";
  return fs::exists(ledger) ? read_file(ledger) : std::string{};
}

std::vector<fs::path> published_runs(const fs::path& out) {
  std::vector<fs::path> runs;
  if (!fs::exists(out / kTabletCoating)) return runs;
  for (const auto& entry : fs::directory_iterator(out / kTabletCoating)) {
    runs.push_back(entry.path());
  }
  return runs;
}

TEST(KilledRun, LeavesTheWholeRunOrNone) {
  const TempFolder place;
  const fs::path folder = sample_run(kTabletCoating);
  const Clock::time_point start = Clock::now();
  ASSERT_LE(process(folder, place / "wanted").status, 1);
  const Clock::duration whole = Clock::now() - start;
  const auto wanted = tables_of(place / "wanted" / kTabletCoating / "run-0001");
  const std::vector<std::string> files =
      files_below(place / "wanted" / kTabletCoating / "run-0001");

  const fs::path out = place / "out";
  RandomStream moments("moments of a kill");
  for (int i = 0; i < 15; ++i) {
    const auto after = std::chrono::duration_cast<Clock::duration>(
        whole * 1.1 * moments.uniform());
    start_and_kill(folder, out, after);
    for (const fs::path& run : published_runs(out)) {
      EXPECT_EQ(files_below(run), files) << run;
      EXPECT_TRUE(tables_of(run) == wanted) << run;
    }
  }

  const std::size_t begun = count(ledger_of(out), "\"run-begun\"");
  const std::size_t abandoned = count(ledger_of(out), "\"run-abandoned\"");
  const std::size_t published = count(ledger_of(out), "\"run-published\"");
  const ProgramRun next = process(folder, out);
  ASSERT_LE(next.status, 1) << next.err;
  if (begun > abandoned + published) {
    EXPECT_TRUE(holds(next.err, "abandoned")) << next.err;
  }
  const ProgramRun verified =
      run_program(LOQSMITH_PROGRAM, {"verify", out.string()});
  EXPECT_EQ(verified.status, 0) << verified.out << verified.err;
  const std::string ledger = ledger_of(out);
  EXPECT_EQ(
      count(ledger, "\"run-begun\""),
      count(ledger, "\"run-abandoned\"") + count(ledger, "\"run-published\""));
  EXPECT_EQ(published_runs(out).size(), count(ledger, "\"run-published\""));
}

}  // namespace
}  // namespace loqsmith::test
