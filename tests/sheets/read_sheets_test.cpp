#include "loqsmith/sheets/read_sheets.hpp"

#include <filesystem>
#include <random>

#include "loqsmith/base/files.hpp"
#include "loqsmith/base/input_error.hpp"
#include "sheets/example.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::kExampleLevels;
using test::kExampleMethod;
using test::kExampleSequence;
using test::same_bits;

TEST(ReadSheets, ExampleIsReadWhole) {
  const Sheets sheets =
      read_sheets({kExampleSequence, kExampleLevels, kExampleMethod}, "night");
  EXPECT_EQ(sheets.sequence.name, "night");
  EXPECT_EQ(sheets.method.id, "well-water-herbicides");
  ASSERT_EQ(sheets.sequence.injections.size(), 4U);
  const Injection& blank = sheets.sequence.injections[0];
  EXPECT_EQ(blank.number, 1);
  EXPECT_EQ(blank.file, "data/b1.mzML");
  EXPECT_EQ(blank.role, Role::SolventBlank);
  EXPECT_TRUE(same_bits(blank.dilution, 1.0));
  EXPECT_TRUE(same_bits(blank.internal_standard_dilution, 1.0));
  EXPECT_FALSE(blank.sample_amount.has_value());
  EXPECT_EQ(blank.line, 2U);
  EXPECT_TRUE(same_bits(sheets.sequence.injections[3].dilution, 10.0));
  EXPECT_TRUE(same_bits(
      sheets.sequence.level_entry("L2", "atrazine")->concentration, 5.0));
  EXPECT_EQ(sheets.sequence.levels[3].line, 5U);
}

TEST(ReadSheets, EveryColumnInAnyOrder) {
  const auto injections = read_sequence_csv(
      "acquired,group,prep,parent,final_volume,sample_amount,"
      "internal_standard_dilution,dilution,level,role,sample,run,file,"
      "injection\n"
      "2026-03-01T08:15:00+01:00,g,p,W,10,5,2,4,,duplicate,\"W, again\",r2,"
      "./data//b.mzML,12\n"
      ",,p,,10,5.5,,,,sample,W,r1,data/b.mzML,3\n",
      "sequence.csv");
  ASSERT_EQ(injections.size(), 2U);
  EXPECT_EQ(injections[0].number, 3);  // in run order
  EXPECT_EQ(injections[0].line, 3U);
  const Injection& last = injections[1];
  EXPECT_EQ(last.number, 12);
  EXPECT_EQ(last.file, "data/b.mzML");
  EXPECT_EQ(last.run, "r2");
  EXPECT_EQ(last.sample, "W, again");
  EXPECT_EQ(last.role, Role::Duplicate);
  EXPECT_EQ(last.parent, "W");
  EXPECT_EQ(last.prep, "p");
  EXPECT_EQ(last.group, "g");
  EXPECT_EQ(last.acquired, "2026-03-01T08:15:00+01:00");
  EXPECT_TRUE(same_bits(last.dilution, 4.0));
  EXPECT_TRUE(same_bits(last.internal_standard_dilution, 2.0));
  EXPECT_EQ(last.sample_amount, 5.0);
  EXPECT_EQ(last.final_volume, 10.0);
}

TEST(ReadSheets, LevelsWithLotAndExpiry) {
  const auto levels = read_levels_csv(
      "\xEF\xBB\xBF"
      "expires,lot,concentration,analyte,level\r\n"
      "2026-05-01,A7,0,a,L0\r\n2026-05-01T00:00:00Z,,1e-3,a,L1\r\n",
      "levels.csv");
  ASSERT_EQ(levels.size(), 2U);
  EXPECT_EQ(levels[0].lot, "A7");
  EXPECT_EQ(levels[0].expires, "2026-05-01");
  EXPECT_TRUE(same_bits(levels[0].concentration, 0.0));
  EXPECT_TRUE(same_bits(levels[1].concentration, 0.001));
}

TEST(ReadSheets, PreparationNeedsUnitsOfTheMethod) {
  const std::string sequence =
      "injection,file,sample,role,level,sample_amount,final_volume\n"
      "1,a,S1,standard,L1,,\n2,b,S2,standard,L2,,\n3,c,W,sample,,5,10\n";
  const std::string units = "result=\"ug/L\"";
  const std::string factor = units + " factor=\"1\"";
  const std::string whole = factor + " sample-amount=\"g\" final-volume=\"mL\"";
  const auto read = [&](const std::string& text) {
    return read_sheets(
        {sequence, kExampleLevels, test::replaced(kExampleMethod, units, text)},
        "night");
  };
  EXPECT_EQ(read(whole).method.units.sample_amount, "g");
  for (const std::string& text : {units, factor}) {
    try {
      read(text);
      ADD_FAILURE() << "accepted with " << text;
    } catch (const InputError& error) {
      ASSERT_EQ(error.problems().size(), 1U) << error.what();
      EXPECT_EQ(error.problems()[0].file, "method.xml");
      EXPECT_EQ(error.problems()[0].line, 3U);
      EXPECT_NE(error.problems()[0].found.find("sample-amount"),
                std::string::npos);
    }
  }
}

TEST(ReadSheets, SampleRunsAreRead) {
  for (const char* name :
       {"well-water-herbicides", "tablet-coating-solvents"}) {
    const auto folder =
        std::filesystem::path(LOQSMITH_SOURCE_DIR) / "sample-runs" / name;
    const Sheets sheets = read_sheets(
        {read_file(folder / "sequence.csv"), read_file(folder / "levels.csv"),
         read_file(folder / "method.xml")},
        name);
    EXPECT_EQ(sheets.method.id, name);
    EXPECT_GT(sheets.sequence.injections.size(), 20U);
  }
}

// Whatever happens to a sheet, it is read or refused in words.
TEST(ReadSheets, DamagedSheetsAreReadOrRefused) {
  const std::string letters = std::string("\0,\"\n\r9-.\xFFz", 10);
  std::mt19937_64 random(7);
  std::size_t refused = 0;
  for (int round = 0; round < 3000; ++round) {
    std::string sequence = kExampleSequence;
    std::string levels = kExampleLevels;
    std::string& damaged = round % 2 == 0 ? sequence : levels;
    if (round % 3 == 0) {
      damaged.resize(random() % damaged.size());
    } else {
      damaged[random() % damaged.size()] = letters[random() % letters.size()];
    }
    try {
      read_sheets({sequence, levels, kExampleMethod}, "night");
    } catch (const InputError& error) {
      ++refused;
      for (const InputProblem& problem : error.problems()) {
        ASSERT_GT(problem.line, 0U) << error.what();
        ASSERT_FALSE(problem.found.empty()) << error.what();
        ASSERT_FALSE(problem.expected.empty()) << error.what();
      }
    }
  }
  EXPECT_GT(refused, 1500U);
}

TEST(ReadSheets, ProblemsOfAllSheetsAreSaidAtOnce) {
  const SheetTexts texts{
      "injection,file,sample,role,level,dilution\n"
      "1,../b1.mzML,Blank,solvent-blank,,\n"
      "1,data/s1.mzML,S1,standard,L9,\n"
      "3,data/w1.mzML,W-1,sampel,,0\n",
      "level,analyte,concentration\nL1,simazin,-1\n",
      test::replaced(kExampleMethod, "response=\"area\"", "response=\"aera\"")};
  try {
    read_sheets(texts, "night");
    FAIL();
  } catch (const InputError& error) {
    std::vector<std::string> places;
    for (const InputProblem& one : error.problems()) {
      places.push_back(one.file + ':' + std::to_string(one.line) + ':' +
                       std::to_string(one.column));
    }
    const std::vector<std::string> wanted{
        "sequence.csv:2:3",  "sequence.csv:3:1",  "sequence.csv:3:28",
        "sequence.csv:4:20", "sequence.csv:4:28", "levels.csv:2:4",
        "levels.csv:2:12",   "method.xml:8:16"};
    EXPECT_EQ(places, wanted) << error.what();
  }
}

}  // namespace
}  // namespace loqsmith
