// Several processes publish into one OUT.

#include <gtest/gtest.h>

#include <array>

#include "child_process.hpp"
#include "ledger_fixture.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/signers.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

// One process tells another that it has come so far.
class Message {
 public:
  Message() {
    if (::pipe(ends_.data()) != 0) throw std::runtime_error("no pipe");
  }
  ~Message() {
    ::close(ends_[0]);
    ::close(ends_[1]);
  }
  Message(const Message&) = delete;
  Message& operator=(const Message&) = delete;

  void give() const {
    const char byte = 'x';
    if (::write(ends_[1], &byte, 1) != 1) ::_exit(98);
  }
  void wait() const {
    char byte = 0;
    if (::read(ends_[0], &byte, 1) != 1) ::_exit(97);
  }

 private:
  std::array<int, 2> ends_{};
};

TEST(SideBySide, ProcessesPublishDifferentSequencesIntoOneOut) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const fs::path out = folder / "out";
  constexpr int kProcesses = 3;
  constexpr int kRuns = 8;
  std::vector<pid_t> children;
  for (int i = 0; i < kProcesses; ++i) {
    children.push_back(start_child([&] {
      PublicationPlace place = place_at(out);
      place.wait = std::chrono::seconds{60};
      for (int run = 0; run < kRuns; ++run) {
        publish_run(place, "s" + std::to_string(i));
      }
    }));
  }
  for (const pid_t child : children) EXPECT_EQ(wait_for(child).status, 0);
  const VerifyReport report = verify_out(out);
  EXPECT_EQ(deviations_of(report), "");
  EXPECT_TRUE(report.notes.empty());
  EXPECT_EQ(report.lines, 2U * kProcesses * kRuns);
  EXPECT_EQ(report.runs, 1U * kProcesses * kRuns);
}

TEST(SideBySide, VerifyMayLookWhileOthersWrite) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const fs::path out = folder / "out";
  publish_run(place_at(out), "a");
  const pid_t child = start_child([&] {
    for (int run = 0; run < 20; ++run) {
      publish_run(place_at(out), "a");
      add_signer(place_at(out), "Ada Quill", std::string(64, '1'));
      remove_signer(place_at(out), "Ada Quill", "left");
    }
  });
  for (int look = 0; look < 40; ++look) {
    ASSERT_EQ(deviations_of(verify_out(out, std::chrono::seconds{10})), "");
  }
  EXPECT_EQ(wait_for(child).status, 0);
}

TEST(SideBySide, TheSameSequenceTwiceIsRefusedUntilTheFirstHasEnded) {
  const TempFolder folder;
  const PublicationPlace place = place_at(folder / "out");
  const Message begun;
  const Message go_on;
  const pid_t child = start_child([&] {
    RunAtWork run = RunAtWork::begin(place, "a", "/in/a", {});
    begun.give();
    go_on.wait();
    write_run(run, "1");
    run.publish({});
  });
  begun.wait();
  const auto second = [&] { publish_run(place, "a"); };
  EXPECT_EQ(wait_for(start_child(second)).status, 75);
  publish_run(place, "b");
  go_on.give();
  EXPECT_EQ(wait_for(child).status, 0);
  EXPECT_EQ(wait_for(start_child(second)).status, 0);
  EXPECT_TRUE(fs::exists(place.out / "a/run-0002"));
  EXPECT_EQ(deviations_of(verify_out(place.out)), "");
}

TEST(SideBySide, WaitsForTheSameSequenceWhereAskedTo) {
  const TempFolder folder;
  PublicationPlace place = place_at(folder / "out");
  place.wait = std::chrono::seconds{30};
  const Message begun;
  const pid_t child = start_child([&] {
    RunAtWork run = RunAtWork::begin(place, "a", "/in/a", {});
    begun.give();
    ::usleep(300'000);
    run.publish({});
  });
  begun.wait();
  EXPECT_EQ(publish_run(place, "a").filename(), "run-0002");
  EXPECT_EQ(wait_for(child).status, 0);
}

TEST(SideBySide, ALockThatIsHeldTooLongGives75) {
  const TempFolder folder;
  const PublicationPlace place = place_at(folder / "out");
  recover(place);
  FileLock lock;
  ASSERT_TRUE(lock.try_lock(place.out / ".work/lock"));
  EXPECT_EQ(wait_for(start_child([&] { publish_run(place, "a"); })).status, 75);
}

}  // namespace
}  // namespace loqsmith
