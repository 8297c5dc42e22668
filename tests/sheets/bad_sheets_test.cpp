#include "loqsmith/base/input_error.hpp"
#include "loqsmith/sheets/read_sheets.hpp"
#include "sheets/example.hpp"

namespace loqsmith {
namespace {

using test::kExampleLevels;
using test::kExampleMethod;
using test::kExampleSequence;

/// Sheets with one thing wrong, and the whole of what is said then.
struct BadSheets {
  std::string sequence;
  std::string levels;
  std::string message;
};

const std::string kHead =
    "injection,file,sample,role,level,parent,prep,sample_amount,final_volume,"
    "acquired\n";
const std::string kStandards =
    "1,a,S1,standard,L1,,,,,\n2,b,S2,standard,L2,,,,,\n";

BadSheets with_rows(const std::string& rows, const std::string& message) {
  return {kHead + kStandards + rows, kExampleLevels, message};
}

BadSheets with_levels(const std::string& rows, const std::string& message) {
  return {kHead + kStandards, kExampleLevels + rows, message};
}

BadSheets with_sequence(const std::string& from, const std::string& to,
                        const std::string& message) {
  return {test::replaced(kExampleSequence, from, to), kExampleLevels, message};
}

std::string said_of(const BadSheets& sheets) {
  try {
    read_sheets({sheets.sequence, sheets.levels, kExampleMethod}, "night");
  } catch (const InputError& error) {
    return error.what();
  }
  return "nothing";
}

void expect_said(const std::vector<BadSheets>& table) {
  for (const BadSheets& one : table) EXPECT_EQ(said_of(one), one.message);
}

TEST(BadSheets, Columns) {
  expect_said({
      with_sequence(
          "dilution\n", "dilutoin\n",
          "sequence.csv:1:34: expected one of injection, file, run, sample, "
          "role, level, dilution, internal_standard_dilution, sample_amount, "
          "final_volume, parent, prep, group, acquired, found the column "
          "\"dilutoin\"; did you mean \"dilution\"?"),
      with_sequence("dilution\n", "sample\n",
                    "sequence.csv:1:34: expected each column once, found the "
                    "column \"sample\" a second time; remove one of them"),
      {"injection,file,sample\n1,a,b\n", kExampleLevels,
       "sequence.csv:1:1: expected the column \"role\", found no such column; "
       "add it"},
      {"", kExampleLevels,
       "sequence.csv:1:1: expected a header row with injection,file,run,"
       "sample,role,level,dilution,internal_standard_dilution,sample_amount,"
       "final_volume,parent,prep,group,acquired, found an empty sheet; add "
       "the header row"},
      {"injection,file,sample,role\n", kExampleLevels,
       "sequence.csv:1:1: expected at least one, found no injections; add a "
       "row for each injection"},
  });
}

TEST(BadSheets, Rows) {
  expect_said({
      with_sequence("1,data/b1.mzML", "\n1,data/b1.mzML",
                    "sequence.csv:2:1: expected a filled one, found an empty "
                    "row; delete it"),
      with_sequence("solvent-blank,,", "solvent-blank,",
                    "sequence.csv:2:1: expected 6 cells, as in the header row, "
                    "found 5 cells; look for a missing or unquoted comma"),
      with_sequence("W-1", "",
                    "sequence.csv:5:16: expected something in the column "
                    "\"sample\", found an empty cell; fill it in"),
      with_sequence("W-1", "W-1 ",
                    "sequence.csv:5:16: expected no blanks at the ends of a "
                    "cell, found \"W-1 \"; remove them"),
      with_sequence("W-1", "\"W-1",
                    "sequence.csv:5:16: expected a closing quote, found a "
                    "quote that is never closed; close the quote or remove "
                    "it"),
  });
}

TEST(BadSheets, Numbers) {
  const std::string whole = "expected a whole number from 1, found injection ";
  expect_said({
      with_sequence("\n4,", "\n0,",
                    "sequence.csv:5:1: " + whole +
                        "\"0\"; number the injections in run order"),
      with_sequence("\n4,", "\n4.0,",
                    "sequence.csv:5:1: " + whole +
                        "\"4.0\"; number the injections in run order"),
      with_sequence("\n4,", "\n99999999999,",
                    "sequence.csv:5:1: " + whole +
                        "\"99999999999\"; number the injections in run order"),
      with_sequence("\n4,", "\n2,",
                    "sequence.csv:5:1: expected each injection once, found "
                    "injection 2 a second time; it stands in line 3 already"),
      with_sequence(",10\n", ",0\n",
                    "sequence.csv:5:28: expected a number above 0, found "
                    "dilution \"0\"; write a plain decimal number"),
      with_sequence(",10\n", ",\"1,5\"\n",
                    "sequence.csv:5:28: expected a number above 0, found "
                    "dilution \"1,5\"; write a decimal point, not a comma"),
      with_sequence(",10\n", ",nan\n",
                    "sequence.csv:5:28: expected a number above 0, found "
                    "dilution \"nan\"; write a plain decimal number"),
      with_rows("3,c,W,sample,,,,5,0,\n",
                "sequence.csv:4:19: expected a number above 0, found "
                "final_volume \"0\"; write a plain decimal number\n"
                "method.xml:3:3: expected the factor and both units, since "
                "the sequence uses sample_amount and final_volume, found "
                "<units> without factor, sample-amount, final-volume; add "
                "them: result = vial x dilution x final volume / sample "
                "amount x factor"),
  });
}

TEST(BadSheets, Paths) {
  const auto path = [](const std::string& written, const std::string& wanted,
                       const std::string& mend) {
    return with_sequence("data/b1.mzML", written,
                         "sequence.csv:2:3: expected " + wanted +
                             ", found file \"" + written + "\"; " + mend);
  };
  const std::string mend = "give the path below the sequence folder";
  expect_said({
      path("/etc/passwd", "a relative path", mend),
      path("C:/night/b1.mzML", "a relative path", mend),
      path("../b1.mzML", "a path that stays in the folder", mend),
      path("data/../../b1.mzML", "a path that stays in the folder", mend),
      path("data/..", "a path that stays in the folder", mend),
      path("data/", "a file", mend),
      path(".", "a file", mend),
      path("data\\b1.mzML", "a path with / between its parts",
           "write / in place of \\"),
  });
}

TEST(BadSheets, RolesAndLevels) {
  expect_said({
      with_sequence(
          "solvent-blank", "solvent_blank",
          "sequence.csv:2:22: expected one of conditioning, solvent-blank, "
          "method-blank, standard, second-source, check-standard, low-spike, "
          "control, fortified, fortified-duplicate, duplicate, "
          "added-standard, sample, found role \"solvent_blank\"; did you "
          "mean \"solvent-blank\"?"),
      with_sequence("S2,standard,L2", "S2,check-standard,",
                    "sequence.csv:4:34: expected a level for the role "
                    "check-standard, found level empty; name a level of "
                    "levels.csv"),
      with_sequence("W-1,sample,", "W-1,sample,L1",
                    "sequence.csv:5:27: expected no level for the role "
                    "sample, found level \"L1\"; empty the cell or correct "
                    "the role"),
      with_rows("3,c,Q,control,L22,,,,,\n",
                "sequence.csv:4:15: expected a level of levels.csv, found "
                "level \"L22\"; did you mean \"L2\"?"),
      with_rows("3,c,Q,control,high,,,,,\n",
                "sequence.csv:4:15: expected a level of levels.csv, found "
                "level \"high\"; add it to levels.csv"),
  });
}

TEST(BadSheets, Parents) {
  const std::string wanted =
      "expected the name of another sample, control or fortified sample, "
      "found parent ";
  expect_said({
      with_rows("3,c,W,sample,,,,,,\n4,d,W2,duplicate,,,,,,\n",
                "sequence.csv:5:19: expected a parent for the role duplicate, "
                "found parent empty; name the sample that was repeated or "
                "fortified"),
      with_rows(
          "3,c,W-1,sample,,,,,,\n4,d,W2,duplicate,,W_1,,,,\n",
          "sequence.csv:5:19: " + wanted + "\"W_1\"; did you mean \"W-1\"?"),
      with_rows("3,c,W,fortified,L1,W,,,,\n",
                "sequence.csv:4:20: " + wanted +
                    "\"W\"; name the sample that was repeated or fortified"),
      with_rows("3,c,W,added-standard,L1,S1,,,,\n",
                "sequence.csv:4:25: " + wanted +
                    "\"S1\"; name the sample that was repeated or fortified"),
      with_rows("3,c,W,sample,,S1,,,,\n",
                "sequence.csv:4:15: expected no parent for the role sample, "
                "found parent \"S1\"; empty the cell or correct the role"),
  });
}

TEST(BadSheets, AmountsAndTimes) {
  const std::string units =
      "method.xml:3:3: expected the factor and both units, since the sequence "
      "uses sample_amount and final_volume, found <units> without factor, "
      "sample-amount, final-volume; add them: result = vial x dilution x "
      "final volume / sample amount x factor";
  expect_said({
      with_rows("3,c,W,sample,,,,5,,\n",
                "sequence.csv:4:19: expected both sample_amount and "
                "final_volume, or neither, found final_volume empty; fill in "
                "the other one\n" +
                    units),
      with_rows("3,c,W,sample,,,p,5,10,\n4,d,B,method-blank,,,p,,,\n"
                "5,e,B,solvent-blank,,,p,,,\n6,f,V,sample,,,q,,,\n",
                "sequence.csv:5:24: expected an amount, since others of the "
                "batch \"p\" have one, found sample_amount empty; fill in "
                "sample_amount and final_volume\n" +
                    units),
      with_rows("3,c,W,sample,,,,,,2026-03-01\n",
                "sequence.csv:4:19: expected a time with its zone (RFC 3339), "
                "found acquired \"2026-03-01\"; write it like "
                "2026-03-01T08:15:00Z or 2026-03-01T09:15:00+01:00"),
      with_rows("3,c,W,sample,,,,,,2026-02-30T08:15:00Z\n",
                "sequence.csv:4:19: expected a time with its zone (RFC 3339), "
                "found acquired \"2026-02-30T08:15:00Z\"; write it like "
                "2026-03-01T08:15:00Z or 2026-03-01T09:15:00+01:00"),
  });
}

TEST(BadSheets, Levels) {
  expect_said({
      with_levels("L3,atrazin,1\n",
                  "levels.csv:6:4: expected the id of an analyte of the "
                  "method, found analyte \"atrazin\"; did you mean "
                  "\"atrazine\"?"),
      with_levels("L2,atrazine,6\n",
                  "levels.csv:6:1: expected each analyte once in a level, "
                  "found level \"L2\" with \"atrazine\" a second time; it "
                  "stands in line 5 already"),
      with_levels("L3,atrazine,-1\n",
                  "levels.csv:6:13: expected a number from 0 up, found "
                  "concentration \"-1\"; write a plain decimal number"),
      with_levels("L3,atrazine,inf\n",
                  "levels.csv:6:13: expected a number from 0 up, found "
                  "concentration \"inf\"; write a plain decimal number"),
      {kHead + kStandards,
       "level,analyte,concentration,expires\n"
       "L1,simazine,1,soon\nL2,simazine,2,2026-05-01\n",
       "levels.csv:2:15: expected a date or time (RFC 3339), found expires "
       "\"soon\"; write it like 2026-03-01"},
      {kHead + kStandards, "level,analyte\nL1,a\nL2,atrazine\n",
       "levels.csv:1:1: expected the column \"concentration\", found no such "
       "column; add it\n"
       "levels.csv:2:4: expected the id of an analyte of the method, found "
       "analyte \"a\"; add it to the method or remove it"},
  });
}

TEST(BadSheets, StandardsAtOneLevel) {
  expect_said({
      {kHead + "1,a,S1,standard,L2,,,,,\n2,b,S2,standard,L2,,,,,\n",
       "level,analyte,concentration\nL1,simazine,1\nL2,simazine,2\n",
       "sequence.csv:2:17: expected at least two concentrations above 0, "
       "found level standards of \"simazine\" at 2 alone; add standards of "
       "another level"},
      // The calibration blank counts for none.
      {kHead + kStandards,
       "level,analyte,concentration\nL1,simazine,0\nL2,simazine,2\n",
       "sequence.csv:2:17: expected at least two concentrations above 0, "
       "found level standards of \"simazine\" at 2 alone; add standards of "
       "another level"},
  });
}

TEST(BadSheets, NoStandardsAtAllAreJudgedLater) {
  EXPECT_EQ(said_of({kHead + "1,a,W,sample,,,,,,\n", kExampleLevels, ""}),
            "nothing");
}

}  // namespace
}  // namespace loqsmith
