// The command line as a user meets it: the real program in a fresh process.

#include "support/run_program.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

ProgramRun run(const std::vector<std::string>& arguments) {
  return run_program(LOQSMITH_PROGRAM, arguments);
}

bool holds(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

TEST(CommandLine, HelpGoesToStandardOutputWithExamplesFirst) {
  const ProgramRun help = run({"--help"});
  EXPECT_EQ(help.status, 0);
  EXPECT_TRUE(help.out.starts_with("Examples:")) << help.out;
  EXPECT_TRUE(help.err.empty());
  for (const char* verb : {"process", "nightly", "inspect", "explain", "verify",
                           "signers", "sign"}) {
    EXPECT_TRUE(holds(help.out, verb)) << verb;
    const ProgramRun own = run({verb, "--help"});
    EXPECT_EQ(own.status, 0);
    EXPECT_TRUE(own.out.starts_with("Example:")) << own.out;
  }
}

TEST(CommandLine, HelpNamesNoVerbThatIsNotThereYet) {
  const ProgramRun help = run({"--help"});
  for (const char* later : {"replay", "draft"}) {
    EXPECT_FALSE(holds(help.out, later)) << later;
  }
}

TEST(CommandLine, VersionIsThatOfTheBuild) {
  const ProgramRun version = run({"--version"});
  EXPECT_EQ(version.status, 0);
  EXPECT_TRUE(version.out.starts_with("loqsmith " LOQSMITH_VERSION "\n"))
      << version.out;
}

TEST(CommandLine, WrongUseIsSaidWithTheNearestName) {
  struct Case {
    std::vector<std::string> arguments;
    std::string said;
  };
  const std::vector<Case> cases{
      {{}, "a verb is missing"},
      {{"proces", "x"}, "did you mean process?"},
      {{"process", "x"}, "--out OUT is missing"},
      {{"process", "--out", "y"}, "a sequence folder is missing"},
      {{"process", "x", "--otu", "y"}, "did you mean --out?"},
      {{"process", "x", "--out", "y", "--jobs", "0"}, "found \"0\""},
      {{"process", "x", "--out", "y", "--jobs", "two"}, "found \"two\""},
      {{"process", "x", "--out", "y", "--out", "z"}, "given twice"},
      {{"process", "x", "z", "--out", "y", "--as", "n"}, "--as"},
      {{"process", "x", "--out", "y", "-q"}, "unknown option"},
      {{"inspect"}, "a file is missing"},
      {{"inspect", "f", "--time-unit", "hour"}, "minute or second"},
      {{"explain", "--sample", "s", "--analyte", "a"}, "OUT/SEQUENCE/run-N"},
      {{"explain", "x", "--analyte", "a"}, "--sample S is missing"},
      {{"explain", "x", "--sample", "s"}, "--analyte A is missing"},
      {{"verify"}, "OUT"},
  };
  for (const Case& wrong : cases) {
    const ProgramRun run_result = run(wrong.arguments);
    EXPECT_EQ(run_result.status, 64) << wrong.said;
    EXPECT_TRUE(run_result.out.empty()) << run_result.out;
    EXPECT_TRUE(holds(run_result.err, wrong.said))
        << wrong.said << " in: " << run_result.err;
  }
}

TEST(CommandLine, AFolderThatIsNotThereIsBadInput) {
  const TempFolder place;
  const ProgramRun run_result =
      run({"process", (place.path() / "nowhere").string(), "--out",
           (place.path() / "out").string()});
  EXPECT_EQ(run_result.status, 65);
  EXPECT_TRUE(holds(run_result.err, "no such folder")) << run_result.err;
  EXPECT_FALSE(std::filesystem::exists(place.path() / "out"));
}

TEST(CommandLine, AFileThatIsNotThereIsBadInput) {
  const ProgramRun run_result = run({"inspect", "no-such-file.mzML"});
  EXPECT_EQ(run_result.status, 65);
  EXPECT_TRUE(holds(run_result.err, "no-such-file.mzML")) << run_result.err;
}

TEST(CommandLine, ProgressIsSilentWithoutATerminal) {
  const TempFolder place;
  const ProgramRun run_result =
      run({"process", (place.path() / "nowhere").string(), "--out",
           (place.path() / "out").string()});
  EXPECT_FALSE(holds(run_result.err, "\r")) << run_result.err;
  EXPECT_FALSE(holds(run_result.err, "\x1b")) << run_result.err;
}

}  // namespace
}  // namespace loqsmith::test
