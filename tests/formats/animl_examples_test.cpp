// Documents made for trying readers. Registered only where they stand beside
// the checkout.

#include <gtest/gtest.h>

#include <filesystem>
#include <fstream>
#include <iterator>
#include <string>
#include <utility>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::agrees_to_digits;

FileContents read(const std::string& name) {
  const auto path = std::filesystem::path(LOQSMITH_EXAMPLES) / "animl" / name;
  std::ifstream in(path, std::ios::binary);
  EXPECT_TRUE(in.good()) << path;
  const std::string bytes{std::istreambuf_iterator<char>(in), {}};
  return read_chromatogram_file(bytes, name, {});
}

// Trapezoids above the baseline of 0.5 mAU between two times.
double area(const Trace& trace, double from, double to) {
  double sum = 0.0;
  for (std::size_t i = 1; i < trace.minutes.size(); ++i) {
    if (trace.minutes[i - 1] < from || trace.minutes[i] > to) continue;
    sum += (trace.minutes[i] - trace.minutes[i - 1]) *
           (0.5 * (trace.signal[i] + trace.signal[i - 1]) - 0.5);
  }
  return sum;
}

TEST(AnimlExamples, TheSoundOneHoldsTwoPeaks) {
  const FileContents contents = read("a_auto_enc.animl");
  EXPECT_TRUE(contents.warnings.empty());
  EXPECT_TRUE(contents.refused.empty());
  ASSERT_EQ(contents.traces.size(), 1U);
  const Trace& trace = contents.traces.front();
  EXPECT_EQ(contents.runs.at(0).sample_name, "Standard 3");
  ASSERT_EQ(trace.minutes.size(), 601U);
  // Gaussians of height 120 and standard deviation 0.05 at 2.5 min, of 80 and
  // 0.07 at 4 min: height * deviation * sqrt(2 pi).
  EXPECT_TRUE(agrees_to_digits(area(trace, 1.5, 3.2), 15.0398, 6));
  EXPECT_TRUE(agrees_to_digits(area(trace, 3.2, 5.5), 14.0371, 6));
}

TEST(AnimlExamples, TheBrokenOnesAreRefusedAsFiles) {
  const std::pair<std::string, std::string> cases[] = {
      {"n_dupsample", "sampleID \"STD-3\""},
      {"n_dupseries", "seriesID \"t\""},
      {"n_dupstep", "experimentStepID \"inj-1\""},
      {"n_iddup", "id \"s1\""},
      {"n_v1", "version \"1.0\""},
  };
  for (const auto& [name, says] : cases) {
    try {
      read(name + ".animl");
      ADD_FAILURE() << name << " was read";
    } catch (const InputError& error) {
      EXPECT_NE(std::string(error.what()).find(says), std::string::npos)
          << error.what();
    }
  }
}

TEST(AnimlExamples, TheBrokenOnesAreRefusedAsTraces) {
  const std::pair<std::string, std::string> cases[] = {
      {"n_badref", "the sample \"NOPE\""},
      {"n_len", "endIndex \"600\""},
      {"n_mixed", "one kind of value sets"},
      {"n_type", "the seriesType \"Float\""},
      {"n_unitfirst", "too late inside <Series>"},
  };
  for (const auto& [name, says] : cases) {
    const FileContents contents = read(name + ".animl");
    EXPECT_TRUE(contents.traces.empty()) << name;
    ASSERT_EQ(contents.refused.size(), 1U) << name;
    const std::string text = describe(contents.refused.front().problem);
    EXPECT_NE(text.find(says), std::string::npos) << text;
  }
}

}  // namespace
}  // namespace loqsmith
