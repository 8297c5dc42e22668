#include "loqsmith/ledger/publication.hpp"

#include <gtest/gtest.h>

#include "ledger_fixture.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/halt.hpp"
#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"
#include "loqsmith/ledger/chain.hpp"
#include "loqsmith/ledger/manifest.hpp"

namespace loqsmith {
namespace {

namespace fs = std::filesystem;
using namespace test;

std::vector<LedgerLine> lines_of(const fs::path& out) {
  const Chain chain = read_chain(read_file(out / "ledger.jsonl"));
  EXPECT_TRUE(chain.deviations.empty());
  return chain.lines;
}

std::string actions_of(const fs::path& out) {
  std::vector<std::string> actions;
  for (const LedgerLine& line : lines_of(out)) {
    actions.push_back(line.action + ' ' + line.object);
  }
  return join(actions, ", ");
}

int status_of(const std::function<void()>& action) {
  try {
    action();
  } catch (const Halt& halt) {
    return static_cast<int>(halt.status());
  }
  return 0;
}

std::string problem_of(const std::function<void()>& action) {
  try {
    action();
  } catch (const InputError& error) {
    return error.what();
  }
  return {};
}

TEST(Publication, PutsAWholeRunInPlaceAndSaysSo) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const fs::path out = folder / "new/out";
  const fs::path published = publish_run(place_at(out), "well");
  EXPECT_EQ(published, out / "well/run-0001");
  EXPECT_EQ(files_below(published),
            (std::vector<std::string>{"inputs/method.xml", "manifest.json",
                                      "results.csv"}));
  EXPECT_EQ(files_below(out / ".work"), std::vector<std::string>{"lock"});
  const auto lines = lines_of(out);
  ASSERT_EQ(lines.size(), 2U);
  EXPECT_EQ(lines[0].action, "run-begun");
  EXPECT_EQ(detail_of(lines[0], "folder"), "/in/well");
  EXPECT_EQ(lines[1].action, "run-published");
  EXPECT_EQ(lines[1].object, "well/run-0001");
  EXPECT_EQ(lines[1].operator_, "Ada Quill");
  EXPECT_EQ(lines[1].manifest,
            sha256_hex(read_file(published / "manifest.json")));
  EXPECT_EQ(detail_of(lines[1], "status"), "done");
}

TEST(Publication, WritesALineOfExactlyTheseFields) {
  const TempFolder folder(TempFolder::kept_in_memory());
  RunAtWork::begin(place_at(folder / "out"), "well", "/in/well",
                   {{"method", "\"\n\xFF"}});
  EXPECT_EQ(read_file(folder / "out/ledger.jsonl"),
            "{\"number\":1,\"time\":\"2026-03-01T08:15:01.000Z\","
            "\"actor\":\"night\",\"operator\":\"Ada Quill\","
            "\"host\":\"bench-3\",\"program\":\"loqsmith 0.1.0\","
            "\"action\":\"run-begun\",\"object\":\"well/run-0001\","
            "\"manifest\":\"\",\"reason\":\"\",\"detail\":{\"folder\":"
            "\"/in/well\",\"method\":\"\\\"\\n\xEF\xBF\xBD\"},\"previous\":"
            "\"" +
                std::string(64, '0') + "\"}\n");
  EXPECT_EQ(read_file(folder / "out/ledger.head"),
            "1:" + sha256_hex(read_file(folder / "out/ledger.jsonl")) + "\n");
}

TEST(Publication, ListsEveryFileInTheManifest) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const fs::path run = publish_run(place_at(folder / "out"), "a/b");
  EXPECT_EQ(
      read_file(run / "manifest.json"),
      "{\n  \"run\": \"a/b/run-0001\",\n  \"files\": [\n"
      "    {\"path\": \"inputs/method.xml\", \"bytes\": 10, \"sha256\": "
      "\"" +
          sha256_hex("<method/>\n") +
          "\"},\n"
          "    {\"path\": \"results.csv\", \"bytes\": 12, \"sha256\": \"" +
          sha256_hex("injection\n1\n") + "\"}\n  ]\n}\n");
}

TEST(Publication, CountsRunsOfEachSequence) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  EXPECT_EQ(publish_run(place, "a").filename(), "run-0001");
  EXPECT_EQ(publish_run(place, "a").filename(), "run-0002");
  EXPECT_EQ(publish_run(place, "b").filename(), "run-0001");
  EXPECT_EQ(publish_run(place, "a/below").filename(), "run-0001");
  EXPECT_EQ(deviations_of(verify_out(folder / "out")), "");
}

TEST(Publication, NeverUsesAnAbandonedNumberAgain) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  {
    const RunAtWork left = RunAtWork::begin(place, "a", "/in/a", {});
    write_new_file(left.staging() / "results.csv", "half");
  }
  const RunAtWork next = RunAtWork::begin(place, "a", "/in/a", {});
  EXPECT_EQ(next.run_number(), 2);
  ASSERT_EQ(next.recovered().size(), 2U);
  EXPECT_NE(next.recovered()[0].find("a/run-0001 was begun and not finished"),
            std::string::npos);
  EXPECT_EQ(actions_of(place.out),
            "run-begun a/run-0001, run-abandoned a/run-0001, "
            "run-begun a/run-0002");
  EXPECT_FALSE(fs::exists(place.out / ".work/staging-1"));
}

TEST(Publication, HoldsTheSequenceWhileARunIsAtWork) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  RunAtWork first = RunAtWork::begin(place, "a", "/in/a", {});
  EXPECT_EQ(status_of([&] { RunAtWork::begin(place, "a", "/in/a", {}); }), 75);
  EXPECT_EQ(recover(place), std::vector<std::string>{});
  publish_run(place, "b");
  write_run(first, "1");
  first.publish({});
  EXPECT_EQ(publish_run(place, "a").filename(), "run-0002");
  EXPECT_EQ(actions_of(place.out).find("abandoned"), std::string::npos);
}

TEST(Publication, GivesUpWhenTheLedgersLockIsNotToBeHad) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  recover(place);
  FileLock lock;
  ASSERT_TRUE(lock.try_lock(place.out / ".work/lock"));
  EXPECT_EQ(status_of([&] { recover(place); }), 75);
  lock.release();
  EXPECT_EQ(status_of([&] { recover(place); }), 0);
}

TEST(Publication, SaysWhenOutCannotBeCreated) {
  const TempFolder folder(TempFolder::kept_in_memory());
  write_new_file(folder / "file", "");
  EXPECT_EQ(status_of([&] { recover(place_at(folder / "file")); }), 73);
  EXPECT_EQ(status_of([&] { recover(place_at(folder / "file/out")); }), 73);
}

TEST(Publication, RefusesANameUsedForAnotherFolder) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  publish_run(place, "a");
  const std::string problem =
      problem_of([&] { RunAtWork::begin(place, "a", "/elsewhere/a", {}); });
  EXPECT_NE(problem.find("already used for \"/in/a\""), std::string::npos);
  EXPECT_NE(problem.find("--as NAME"), std::string::npos);
  EXPECT_EQ(publish_run(place, "a").filename(), "run-0002");
}

TEST(Publication, KnowsAFolderWhicheverWayItIsNamed) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  make_folders(folder / "in/a");
  fs::create_directory_symlink(folder / "in", folder / "way");
  for (const char* way : {"in/a", "way/a", "in/../in/a/."}) {
    RunAtWork run = RunAtWork::begin(place, "a", (folder / way).string(), {});
    run.publish({});
  }
  EXPECT_EQ(lines_of(place.out).size(), 6U);
}

TEST(Publication, RefusesNamesThatAreNoSafePath) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  for (const std::string name :
       {"", ".", "..", "../a", "a/../b", "/a", "a/", "a//b", ".work", "a/.b",
        "a\nb", "a\x7F", "ledger.jsonl", "ledger.head", "ledger.head.new/a",
        "run-0001", "a/run-1", "\xFF"}) {
    EXPECT_NE(problem_of([&] { RunAtWork::begin(place, name, "/in/a", {}); }),
              "")
        << name;
  }
  EXPECT_FALSE(fs::exists(place.out));
  for (const std::string name : {"a b", "\xC3\xA4", "run", "run-a", "a..b"}) {
    EXPECT_EQ(publish_run(place, name).parent_path().filename(), name);
  }
}

TEST(Publication, TouchesNothingThatTheLedgerDoesNotKnow) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  make_folders(place.out / "a/run-0001");
  EXPECT_EQ(status_of([&] { publish_run(place, "a"); }), 74);
  EXPECT_FALSE(fs::exists(place.out / "ledger.jsonl"));
  fs::create_directory_symlink(folder.path(), place.out / "b");
  EXPECT_EQ(status_of([&] { publish_run(place, "b"); }), 74);
}

TEST(Publication, PublishesOnceAndOnlyRegularFiles) {
  const TempFolder folder(TempFolder::kept_in_memory());
  const PublicationPlace place = place_at(folder / "out");
  RunAtWork run = RunAtWork::begin(place, "a", "/in/a", {});
  run.publish({});
  EXPECT_EQ(status_of([&] { run.publish({}); }), 74);
  RunAtWork linked = RunAtWork::begin(place, "b", "/in/b", {});
  fs::create_symlink("/etc/hostname", linked.staging() / "results.csv");
  EXPECT_EQ(status_of([&] { linked.publish({}); }), 70);
}

TEST(Publication, KeepsTimeInTheLedgerFromGoingBack) {
  const TempFolder folder(TempFolder::kept_in_memory());
  PublicationPlace place = place_at(folder / "out");
  publish_run(place, "a");
  place.clock = [] { return std::string("2020-01-01T00:00:00.000Z"); };
  publish_run(place, "a");
  const auto lines = lines_of(place.out);
  EXPECT_EQ(lines[2].time, lines[1].time);
  EXPECT_EQ(detail_of(lines[2], "clock"), "2020-01-01T00:00:00.000Z");
  EXPECT_EQ(detail_of(lines[1], "clock"), "");
}

TEST(Publication, NeverWritesALineThatCouldNotBeReadBack) {
  const TempFolder folder(TempFolder::kept_in_memory());
  PublicationPlace place = place_at(folder / "out");
  place.clock = [] { return std::string("half past nine"); };
  EXPECT_EQ(status_of([&] { publish_run(place, "a"); }), 70);
  EXPECT_FALSE(fs::exists(place.out / "ledger.jsonl"));
}

}  // namespace
}  // namespace loqsmith
