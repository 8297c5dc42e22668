#include "edge_case.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <ostream>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith::test {
namespace {

bool contains(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

std::vector<std::string> all_warnings(const FileContents& contents) {
  std::vector<std::string> warnings = contents.warnings;
  for (const Trace& trace : contents.traces) {
    warnings.insert(warnings.end(), trace.warnings.begin(),
                    trace.warnings.end());
  }
  // Every plain document earns this one.
  if (contents.format == "mzML 1.1") {
    std::erase(warnings, "no integrity value in the file");
  }
  return warnings;
}

void expect_sound(const FileContents& contents) {
  EXPECT_FALSE(contents.traces.empty());
  for (const RefusedTrace& refused : contents.refused) {
    ADD_FAILURE() << "refused: " << describe(refused.problem);
  }
}

void expect_refused_trace(const EdgeCase& edge, const FileContents& contents) {
  EXPECT_TRUE(contents.traces.empty());
  ASSERT_EQ(contents.refused.size(), 1U);
  const InputProblem& problem = contents.refused.front().problem;
  EXPECT_TRUE(contains(describe(problem), edge.says)) << describe(problem);
  EXPECT_EQ(problem.file, edge.file);
  EXPECT_GT(problem.line, 0U);
  EXPECT_GT(problem.column, 0U);
}

void expect_file_refused(const EdgeCase& edge) {
  try {
    const FileContents contents =
        read_chromatogram_file(edge.document, edge.file, edge.policy);
    ADD_FAILURE() << "the file was read, " << contents.traces.size()
                  << " traces";
  } catch (const InputError& error) {
    EXPECT_TRUE(contains(error.what(), edge.says)) << error.what();
    EXPECT_EQ(error.problems().front().file, edge.file);
  }
}

}  // namespace

std::string case_words(const testing::TestParamInfo<EdgeCase>& info) {
  return info.param.words;
}

void PrintTo(const EdgeCase& edge, std::ostream* out) { *out << edge.words; }

void expect_behaviour(const EdgeCase& edge) {
  if (edge.behaviour == Behaviour::RefuseFile) {
    expect_file_refused(edge);
    return;
  }
  FileContents contents;
  ASSERT_NO_THROW(
      contents = read_chromatogram_file(edge.document, edge.file, edge.policy));
  if (edge.behaviour == Behaviour::RefuseTrace) {
    expect_refused_trace(edge, contents);
    return;
  }
  expect_sound(contents);
  const std::vector<std::string> warnings = all_warnings(contents);
  if (edge.behaviour == Behaviour::Accept) {
    EXPECT_TRUE(warnings.empty()) << join(warnings, "; ");
    return;
  }
  EXPECT_TRUE(std::any_of(
      warnings.begin(), warnings.end(),
      [&](const std::string& warning) { return contains(warning, edge.says); }))
      << edge.says << " is not among: " << join(warnings, "; ");
}

}  // namespace loqsmith::test
