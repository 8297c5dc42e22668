// The committed sample runs are what the generator makes, to the byte; mzML
// point by point after decoding, because a compressor of another version may
// pack the same points differently.

#include <gtest/gtest.h>

#include <cmath>

#include "generator/nights.hpp"
#include "generator/random_stream.hpp"
#include "generator/write_night.hpp"
#include "golden/processed.hpp"
#include "loqsmith/base/files.hpp"
#include "loqsmith/formats/chromatogram_file.hpp"
#include "support/temp_folder.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

// Another C library may round a point to the neighbouring detector step.
void expect_same_trace(const Trace& made, const Trace& kept, double step) {
  ASSERT_EQ(made.header.id, kept.header.id);
  ASSERT_EQ(made.minutes, kept.minutes);
  ASSERT_EQ(made.signal.size(), kept.signal.size());
  std::size_t moved = 0;
  for (std::size_t i = 0; i < made.signal.size(); ++i) {
    const double apart = std::abs(made.signal[i] - kept.signal[i]);
    if (apart > 0.0) ++moved;
    ASSERT_LE(apart, step) << kept.header.id << ", point " << i;
  }
  EXPECT_LE(moved, 2U) << kept.header.id;
}

void expect_same_file(const fs::path& made, const fs::path& kept, double step) {
  const FileContents one =
      read_chromatogram_file(read_file(made), made.string(), {});
  const FileContents other =
      read_chromatogram_file(read_file(kept), kept.string(), {});
  ASSERT_EQ(one.format, other.format);
  ASSERT_EQ(one.runs.size(), other.runs.size());
  for (std::size_t i = 0; i < one.runs.size(); ++i) {
    EXPECT_EQ(one.runs[i].sample_name, other.runs[i].sample_name);
    EXPECT_EQ(one.runs[i].start_time, other.runs[i].start_time);
  }
  EXPECT_TRUE(one.refused.empty() && other.refused.empty());
  EXPECT_TRUE(one.warnings.empty() && other.warnings.empty());
  ASSERT_GE(one.traces.size(), 1U);
  ASSERT_EQ(one.traces.size(), other.traces.size());
  for (std::size_t i = 0; i < one.traces.size(); ++i) {
    expect_same_trace(one.traces[i], other.traces[i], step);
  }
}

void expect_same_night(const fs::path& made, const SimulatedNight& night) {
  const fs::path kept = sample_run(night.name);
  const std::vector<std::string> files = files_below(made / night.name);
  std::vector<std::string> wanted = files_below(kept);
  std::erase(wanted, "method.xml");
  ASSERT_EQ(files, wanted);
  for (const std::string& file : files) {
    if (file.ends_with(".mzML")) {
      expect_same_file(made / night.name / file, kept / file,
                       night.detector.step);
    } else {
      EXPECT_EQ(read_file(made / night.name / file), read_file(kept / file));
    }
  }
  const std::string truth = "truth/" + night.name + ".csv";
  EXPECT_EQ(read_file(made / truth), read_file(sample_run(truth)));
}

TEST(Regeneration, WellWaterIsWhatTheGeneratorMakes) {
  const TempFolder made;
  write_well_water(made.path());
  expect_same_night(made.path(), well_water_night());
}

TEST(Regeneration, TabletCoatingIsWhatTheGeneratorMakes) {
  const TempFolder made;
  write_tablet_coating(made.path());
  expect_same_night(made.path(), tablet_coating_night());
}

// The C library's erfc is the other way round.
TEST(RandomStreams, TheQuantileInvertsTheNormalDistribution) {
  for (double p = 1e-12; p < 1.0; p = p < 0.01 ? p * 10.0 : p + 0.01) {
    const double back = 0.5 * std::erfc(-normal_quantile(p) / std::sqrt(2.0));
    EXPECT_TRUE(agrees_to_digits(back, p, 13)) << p;
  }
}

}  // namespace
}  // namespace loqsmith::test
