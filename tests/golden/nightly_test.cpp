#include <gtest/gtest.h>

#include <filesystem>
#include <fstream>
#include <string>
#include <thread>

#include "loqsmith/base/files.hpp"
#include "processed.hpp"
#include "small_night.hpp"
#include "support/temp_folder.hpp"

// `loqsmith nightly` on folders as they come and change.

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

const std::string kMethod =
    R"(<method xmlns="urn:loqsmith:method" id="zinol" revision="1">
  <title>Zinol</title>
  <units concentration="ug/L" result="ug/L"/>
  <traces><trace id="uv" kind="any" name="uv"/></traces>
  <analytes>
    <analyte id="zinol" trace="uv" retention-time="3.0" window="0.2"/>
  </analytes>
  <limits><signal-to-noise/></limits>
</method>
)";

class Nightly : public testing::Test {
 protected:
  Nightly() { fs::create_directories(root()); }

  fs::path root() const { return place_ / "root"; }
  fs::path out() const { return place_ / "out"; }

  void write_night(const std::string& name) const {
    SmallNight night;
    night.method = kMethod;
    night.noise_sd = 0.2;
    night.levels = {{"S1", 1.0}, {"S2", 2.0}, {"S3", 5.0}, {"S4", 10.0}};
    night.injections = {{"water", "solvent-blank"}};
    for (const auto& [level, amount] : night.levels) {
      night.injections.push_back({.sample = level,
                                  .role = "standard",
                                  .level = level,
                                  .area = amount});
    }
    night.injections.push_back(
        {.sample = "river", .role = "sample", .area = 3.0});
    night.write(root() / name);
  }

  ProgramRun nightly(std::vector<std::string> more = {"--settle", "0"}) const {
    more.insert(more.begin(),
                {"nightly", root().string(), "--out", out().string()});
    return run_program(LOQSMITH_PROGRAM, more);
  }

  std::string ledger() const { return read_file(out() / "ledger.jsonl"); }

  TempFolder place_{TempFolder::kept_in_memory()};
};

TEST_F(Nightly, FindsFoldersAtAnyDepthOnce) {
  write_night("monday");
  write_night("line-2/week-5/tuesday");
  const ProgramRun first = nightly();
  EXPECT_EQ(first.status, 0) << first.out << first.err;
  EXPECT_TRUE(holds(first.out, "monday: published as run-0001, new\n"));
  EXPECT_TRUE(
      holds(first.out, "line-2/week-5/tuesday: published as run-0001, new\n"));
  EXPECT_TRUE(fs::exists(out() / "line-2/week-5/tuesday/run-0001"));
  const ProgramRun second = nightly();
  EXPECT_EQ(second.status, 0);
  EXPECT_TRUE(
      holds(second.out, "monday: unchanged, processed before, unchanged since"))
      << second.out;
  EXPECT_FALSE(fs::exists(out() / "monday/run-0002"));
  EXPECT_TRUE(holds(ledger(), "\"action\":\"night\""));
  const std::string told = read_file(out() / ".work/last-night.json");
  EXPECT_TRUE(holds(told, "\"outcome\": \"unchanged\"")) << told;
  EXPECT_EQ(run_program(LOQSMITH_PROGRAM, {"verify", out().string()}).status,
            0);
}

TEST_F(Nightly, TakesATouchedFileForUnchangedAndAChangedOneForNews) {
  write_night("monday");
  ASSERT_EQ(nightly().status, 0);
  const fs::path sheet = root() / "monday/levels.csv";
  fs::last_write_time(sheet,
                      fs::last_write_time(sheet) - std::chrono::hours(1));
  EXPECT_TRUE(holds(nightly().out, "unchanged, processed before, the same"));
  std::string levels = read_file(sheet);
  levels.replace(levels.find("S4,zinol,10"), 11, "S4,zinol,20");
  std::ofstream(sheet) << levels;
  EXPECT_TRUE(
      holds(nightly().out, "monday: published as run-0002, files changed"));
  EXPECT_TRUE(holds(ledger(), "\"cause\":\"files changed\""));
}

// Sizes and times may lie; the contents do not.
TEST_F(Nightly, RehashLooksAtTheContents) {
  write_night("monday");
  ASSERT_EQ(nightly().status, 0);
  const fs::path sheet = root() / "monday/levels.csv";
  const auto before = fs::last_write_time(sheet);
  std::string levels = read_file(sheet);
  levels.replace(levels.find("S4,zinol,10"), 11, "S4,zinol,20");
  std::ofstream(sheet) << levels;
  fs::last_write_time(sheet, before);
  EXPECT_TRUE(holds(nightly().out, "monday: unchanged"));
  EXPECT_TRUE(holds(nightly({"--settle", "0", "--rehash"}).out, "as run-0002"));
}

TEST_F(Nightly, RecognisesWhatWasProcessedByHand) {
  write_night("deep/monday");
  ASSERT_EQ(process(root() / "deep/monday", out()).status, 0);
  EXPECT_TRUE(holds(nightly().out, "monday: unchanged"));
  std::ofstream(root() / "deep/monday/levels.csv", std::ios::app)
      << "S9,zinol,7\n";
  EXPECT_TRUE(holds(nightly().out, "monday: published as run-0002"));
  EXPECT_FALSE(fs::exists(out() / "deep"));
}

TEST_F(Nightly, DoesNotTryARefusedFolderAgainUntilItChanges) {
  write_night("monday");
  write_night("tuesday");
  const fs::path method = root() / "monday/method.xml";
  std::ofstream(method) << "<method/>";
  const ProgramRun first = nightly();
  EXPECT_EQ(first.status, 65);
  EXPECT_TRUE(holds(first.out, "monday: refused"));
  EXPECT_TRUE(holds(first.out, "tuesday: published"));
  EXPECT_TRUE(holds(first.err, "method.xml:1"));
  EXPECT_TRUE(holds(ledger(), "\"action\":\"sequence-refused\""));
  const ProgramRun second = nightly();
  EXPECT_EQ(second.status, 0);
  EXPECT_TRUE(holds(second.out, "monday: unchanged, refused before"));
  std::ofstream(method) << kMethod;
  EXPECT_TRUE(holds(nightly().out,
                    "monday: published as run-0001, changed since it was "
                    "refused"));
}

TEST_F(Nightly, WaitsForFilesThatAreStillComing) {
  write_night("monday");
  EXPECT_TRUE(holds(nightly({}).out,
                    "monday: waiting, files changed a short while ago"));
  EXPECT_FALSE(fs::exists(out() / "monday"));
  std::string missing;
  for (const auto& entry : fs::recursive_directory_iterator(root())) {
    if (entry.path().extension() == ".mzML") missing = entry.path().string();
  }
  ASSERT_FALSE(missing.empty());
  fs::remove(missing);
  EXPECT_TRUE(holds(nightly().out, "monday: waiting, 1 file missing"));
  const ProgramRun given_up = nightly({"--settle", "0", "--give-up", "0"});
  EXPECT_TRUE(
      holds(given_up.out, "published as run-0001, new, 1 file still missing"));
  EXPECT_TRUE(holds(given_up.err, fs::path(missing).filename().string()));
}

TEST_F(Nightly, NeverWritesIntoASequenceFolder) {
  write_night("monday");
  const ProgramRun run = run_program(
      LOQSMITH_PROGRAM, {"nightly", root().string(), "--out",
                         (root() / "monday/out").string(), "--settle", "0"});
  EXPECT_EQ(run.status, 64);
  EXPECT_TRUE(holds(run.err, "which is only read"));
  // OUT below ROOT is no sequence folder and is not searched.
  const fs::path inside = root() / "results";
  for (int night = 0; night < 2; ++night) {
    const ProgramRun again =
        run_program(LOQSMITH_PROGRAM, {"nightly", root().string(), "--out",
                                       inside.string(), "--settle", "0"});
    EXPECT_EQ(again.status, 0) << again.err;
    EXPECT_FALSE(holds(again.out, "inputs"));
  }
}

TEST_F(Nightly, TwoAtOnceDoNoHarm) {
  for (const char* name : {"a", "b", "c", "d"}) write_night(name);
  ProgramRun other;
  std::thread beside([&] { other = nightly(); });
  const ProgramRun own = nightly();
  beside.join();
  EXPECT_EQ(own.status, 0) << own.out << own.err;
  EXPECT_EQ(other.status, 0) << other.out << other.err;
  for (const char* name : {"a", "b", "c", "d"}) {
    EXPECT_TRUE(fs::exists(out() / name / "run-0001/results.csv"));
  }
  EXPECT_EQ(run_program(LOQSMITH_PROGRAM, {"verify", out().string()}).status,
            0);
  EXPECT_FALSE(holds(nightly().out, "published"));
}

// The units of the sample runs, with the program that was built.
TEST_F(Nightly, ServiceAndTimerAreSound) {
  const fs::path units = fs::path(LOQSMITH_SOURCE_DIR) / "sample-runs/systemd";
  std::string service = read_file(units / "loqsmith-nightly.service");
  const std::string installed = "/usr/local/bin/loqsmith";
  service.replace(service.find(installed), installed.size(), LOQSMITH_PROGRAM);
  const fs::path changed = place_ / "loqsmith-nightly.service";
  std::ofstream(changed) << service;
  const ProgramRun run = run_program(
      "/usr/bin/systemd-analyze", {"verify", changed.string(),
                          (units / "loqsmith-nightly.timer").string()});
  EXPECT_EQ(run.status, 0) << run.out << run.err;
  const ProgramRun spoilt = run_program(
      "/usr/bin/systemd-analyze", {"verify", (units / "README.md").string()});
  EXPECT_NE(spoilt.status, 0);
}

}  // namespace
}  // namespace loqsmith::test
