// A sequence that cannot be processed: status 65 and nothing published.

#include <gtest/gtest.h>

#include <fstream>

#include "golden/processed.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

struct Spoilt {
  const char* name;
  const char* file;
  const char* text;     ///< the first place of it ...
  const char* instead;  ///< ... is replaced
  const char* said;     ///< what the message must hold
};

void PrintTo(const Spoilt& spoilt, std::ostream* out) { *out << spoilt.name; }

class RefusedFolder : public testing::TestWithParam<Spoilt> {};

TEST_P(RefusedFolder, NothingIsPublished) {
  const TempFolder place;
  const fs::path folder = copy_of_sample_run(kWellWater, place / "in");
  const Spoilt& spoilt = GetParam();
  std::string text = read_file(folder / spoilt.file);
  const std::size_t at = text.find(spoilt.text);
  ASSERT_NE(at, std::string::npos);
  text.replace(at, std::string(spoilt.text).size(), spoilt.instead);
  std::ofstream(folder / spoilt.file, std::ios::binary) << text;

  const ProgramRun done = process(folder, place / "out");
  EXPECT_EQ(done.status, 65) << done.err;
  EXPECT_TRUE(holds(done.err, spoilt.file)) << done.err;
  EXPECT_TRUE(holds(done.err, spoilt.said)) << done.err;
  EXPECT_FALSE(fs::exists(place / "out" / kWellWater));
}

INSTANTIATE_TEST_SUITE_P(
    Sheets, RefusedFolder,
    testing::Values(
        Spoilt{"UnknownLevel", "sequence.csv", "standard,S3", "standard,S33",
               "S33"},
        Spoilt{"InjectionTwice", "sequence.csv", "\n26,", "\n25,", "25"},
        Spoilt{"PathOut", "sequence.csv", "data/026-", "../026-", "../026-"},
        Spoilt{"AbsolutePath", "sequence.csv", "data/026-", "/data/026-",
               "/data/026-"},
        Spoilt{"QuoteNeverClosed", "sequence.csv", "data/026-", "\"data/026-",
               "quote"},
        Spoilt{"UnknownColumn", "sequence.csv", "dilution", "dilutoin",
               "dilution"},
        Spoilt{"UnknownRole", "sequence.csv", "solvent-blank", "solvent-blnk",
               "solvent-blank"},
        Spoilt{"LevelTwice", "levels.csv", "S2,simazine", "S1,simazine",
               "simazine"},
        Spoilt{"DecimalComma", "levels.csv", "simazine,0.5", "simazine,\"0,5\"",
               "0,5"},
        Spoilt{"BrokenMethod", "method.xml", "</analytes>", "", "analytes"},
        Spoilt{"UnknownAttribute", "method.xml", "retention-time",
               "retention-tiem", "retention-time"},
        Spoilt{"NotYetThere", "method.xml", "kind=\"absorption\"",
               "kind=\"extracted\"", "not available in this version"}),
    [](const auto& tested) { return std::string(tested.param.name); });

TEST(RefusedFolders, AllProblemsOfTheSheetsAreListedAtOnce) {
  const TempFolder place;
  const fs::path folder = copy_of_sample_run(kWellWater, place / "in");
  std::string sequence = read_file(folder / "sequence.csv");
  sequence.replace(sequence.find("standard,S3"), 11, "standard,S33");
  sequence.replace(sequence.find("\n26,"), 4, "\n25,");
  std::ofstream(folder / "sequence.csv", std::ios::binary) << sequence;
  std::string levels = read_file(folder / "levels.csv");
  levels.replace(levels.find("S2,diuron"), 9, "S2,diuran");
  std::ofstream(folder / "levels.csv", std::ios::binary) << levels;

  const ProgramRun done = process(folder, place / "out");
  EXPECT_EQ(done.status, 65);
  for (const char* part : {"S33", "25", "diuran", "sequence.csv:9:"}) {
    EXPECT_TRUE(holds(done.err, part)) << part << " in: " << done.err;
  }
  EXPECT_FALSE(fs::exists(place / "out" / kWellWater));
}

TEST(RefusedFolders, ALinkOutOfTheFolderIsRefused) {
  const TempFolder place;
  const fs::path folder = copy_of_sample_run(kWellWater, place / "in");
  const fs::path file = folder / "data/026-W-102.mzML";
  fs::rename(file, place / "outside.mzML");
  fs::create_symlink(place / "outside.mzML", file);
  const ProgramRun done = process(folder, place / "out");
  EXPECT_EQ(done.status, 65) << done.err;
  EXPECT_TRUE(holds(done.err, "data/026-W-102.mzML")) << done.err;
  EXPECT_FALSE(fs::exists(place / "out" / kWellWater));
}

}  // namespace
}  // namespace loqsmith::test
