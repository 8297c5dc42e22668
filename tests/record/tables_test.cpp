#include "loqsmith/record/tables.hpp"

#include <gtest/gtest.h>

#include <sstream>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/record/reportable.hpp"
#include "record/example_run.hpp"

namespace loqsmith {
namespace {

using Writer = void (*)(std::ostream&, const PublishedRun&);

std::string table(Writer write, const PublishedRun& run) {
  std::ostringstream out;
  write(out, run);
  return out.str();
}

TEST(Tables, ResultsComeInRunOrderWithTextsMadeHarmless) {
  EXPECT_EQ(
      table(write_results_table, test::small_run()),
      "injection,sample,role,analyte,set,found,retention_time,response,"
      "signal_to_noise,vial_concentration,dilution,result,unit,"
      "calibration_uncertainty,detection_limit,quantitation_limit,"
      "detection_procedure,quantitation_procedure,status,reported,qualifier,"
      "reasons,automatic_result,automatic_status\n"
      "2,blank,solvent-blank,toluene,1,no,,,,,1,,mg/kg,,,,,,withheld,,R,"
      "file-refused,,\n"
      "3,\"'=1+1, \"\"well\"\"\",sample,toluene,1,yes,2.5,6,,1.625,10,8.125,"
      "mg/kg,0.75,1.5,10,blank-deviation,lowest-standard,estimated,8.12,J,"
      "below-quantitation-limit;overlapped,,\n");
}

TEST(Tables, LimitsSayWhyAProcedureDoesNotApply) {
  EXPECT_EQ(table(write_limits_table, test::small_run()),
            "analyte,set,procedure,critical_value,detection_limit,"
            "quantitation_limit,unit,detection_lower,detection_upper,"
            "quantitation_lower,quantitation_upper,degrees_of_freedom,n,"
            "governing,grade,note\n"
            "toluene,1,blank-deviation,,0.3,1,ug/L,0.2,0.6,,,6,7,detection,"
            "caution,\"drifting: blanks rise by 3 %, from first to last; "
            "slope 4 response/concentration\"\n"
            "toluene,1,spike-replicates,,,,ug/L,,,,,,,quantitation,"
            "not-applicable,no low spikes in the sequence\n");
}

TEST(Tables, CalibrationGivesTheFitAndTheAcceptedRange) {
  EXPECT_EQ(table(write_calibration_table, test::small_run()),
            "analyte,set,model,weight,intercept,slope,curvature,residual_sd,"
            "r2,relative_standard_error,levels,points,lowest,highest,accepted,"
            "note\n"
            "toluene,1,linear,none,-0.5,4,,0.25,0.9995,2.5,1,1,2,5,yes,"
            "zero-level-unweighted-only;accepted range 2 to 2\n");
}

TEST(Tables, ACalibrationThatIsNotThereHasARowThatSaysWhy) {
  PublishedRun run = test::small_run();
  run.method.analytes[0].calibration.weight =
      CalibrationSettings::Weight::InverseXSquared;
  run.analytes[0].sets[0].calibration = NotApplicable{"only 1 level, of 3"};
  run.analytes[0].sets[0].standards = {
      {1, "L1", 2, 10.25, true, "", 0, {}, {}}};
  const std::string text = table(write_calibration_table, run);
  EXPECT_TRUE(text.ends_with(
      "toluene,1,linear,1/x2,,,,,,,,,,,no,\"only 1 level, of 3\"\n"))
      << text;
  EXPECT_TRUE(table(write_standards_table, run)
                  .ends_with("toluene,1,1,L1,2,10.25,,,,no,\n"));
}

TEST(Tables, AFailedCalibrationCheckMakesItNotAccepted) {
  PublishedRun run = test::small_run();
  CheckRow check;
  check.check = "calibration";
  check.passed = false;
  run.analytes[0].checks.push_back(check);
  // A level that fails has no action: it narrows the range.
  EXPECT_NE(table(write_calibration_table, run).find(",2,5,yes,"),
            std::string::npos);
  run.analytes[0].checks.back().action = "withhold";
  EXPECT_NE(table(write_calibration_table, run).find(",2,5,no,"),
            std::string::npos);
}

TEST(Tables, StandardsShowWhichWereUsed) {
  EXPECT_EQ(table(write_standards_table, test::small_run()),
            "analyte,set,injection,level,concentration,response,weight,"
            "back_calculated,deviation_percent,used,note\n"
            "toluene,1,1,L1,2,10.25,1,2.6875,34.375,yes,\n"
            "toluene,1,9,L2,5,99,,,,no,saturated\n");
}

TEST(Tables, AStandardWithoutAResponseKeepsItsPlaceInRunOrder) {
  PublishedRun run = test::small_run();
  run.analytes[0].sets[0].unmeasured = {{4, "L3", 1, "file-refused"},
                                        {12, "L2", 5, "no-signal"}};
  EXPECT_TRUE(table(write_standards_table, run)
                  .ends_with("toluene,1,4,L3,1,,,,,no,file-refused\n"
                             "toluene,1,9,L2,5,99,,,,no,saturated\n"
                             "toluene,1,12,L2,5,,,,,no,no-signal\n"))
      << table(write_standards_table, run);
}

TEST(Tables, PeaksHaveARowForEveryTargetAndInjection) {
  EXPECT_EQ(table(write_peaks_table, test::small_run()),
            "injection,analyte,found,retention_time,start,end,area,height,"
            "template_response,width_half,tailing,asymmetry,plates,resolution,"
            "signal_to_noise,noise,noise_source,response_noise,baseline,"
            "overlap,manual,note,capacity_factor\n"
            "1,toluene,yes,2.5,2.25,2.75,10.25,100,,0.1,1.125,,,,40,5,blank 2,"
            ",valley,drop,no,overlapped;noise-stretch-short,\n"
            "2,toluene,no,2.5,2.25,2.75,-0.0625,-1,,,,,,,,,,,valley,,no,,\n"
            "3,toluene,,,,,,,,,,,,,,,,,,,,too-few-points: 3 points,\n"
            "4,toluene,,,,,,,,,,,,,,,,,,,,not-measured,\n");
}

TEST(Tables, ChecksOfTheSequenceComeFirst) {
  EXPECT_EQ(table(write_checks_table, test::small_run()),
            "check,analyte,injection,value,low,high,unit,passed,action,affects,"
            "note\n"
            "unlisted-file,,,,,,,no,flag,,\"data/extra, 1.mzML\"\n"
            "second-source,,,,,,,,,,not in the method\n"
            "check-standard,toluene,7,93.5,85,115,percent,yes,withhold,4 to 9,"
            "\n");
}

constexpr Writer kAllTables[] = {write_results_table,     write_limits_table,
                                 write_calibration_table, write_standards_table,
                                 write_peaks_table,       write_checks_table,
                                 write_reportable_table};

TEST(Tables, AllRowsAreAsLongAsTheHead) {
  for (const Writer write : kAllTables) {
    const auto rows = read_csv(table(write, test::example_run()), "table.csv");
    ASSERT_GT(rows.size(), 1U);
    for (const CsvRow& row : rows) {
      EXPECT_EQ(row.cells.size(), rows.front().cells.size())
          << rows.front().cells.front().text << " line " << row.line;
    }
  }
}

TEST(Tables, HostileTextsStayInTheirCells) {
  const auto rows =
      read_csv(table(write_results_table, test::example_run()), "results.csv");
  bool markup = false;
  bool formula = false;
  for (const CsvRow& row : rows) {
    const std::string& sample = row.cells[1].text;
    markup = markup || sample == test::kHostileMarkup;
    formula = formula || sample == "'" + std::string(test::kHostileFormula);
    EXPECT_NE(sample.front(), '=');
  }
  EXPECT_TRUE(markup);
  EXPECT_TRUE(formula);
}

TEST(Tables, NoCellSaysNan) {
  for (const Writer write : kAllTables) {
    for (const CsvRow& row :
         read_csv(table(write, test::example_run()), "table.csv")) {
      for (const CsvCell& cell : row.cells) {
        EXPECT_NE(cell.text, "nan");
        EXPECT_NE(cell.text, "-nan");
        EXPECT_NE(cell.text, "inf");
      }
    }
  }
}

TEST(NeedsAPerson, OnlyWhereSomethingIsWrong) {
  PublishedRun run = test::small_run();
  run.analytes[0].results = {run.analytes[0].results[0]};
  run.sequence_checks.clear();
  EXPECT_FALSE(needs_a_person(run));

  PublishedRun withheld = run;
  withheld.analytes[0].results[0].status = Status::Withheld;
  EXPECT_TRUE(needs_a_person(withheld));

  PublishedRun failed = run;
  failed.analytes[0].checks[0].passed = false;
  EXPECT_TRUE(needs_a_person(failed));

  PublishedRun not_checked = run;
  not_checked.analytes[0].checks[0].passed = std::nullopt;
  EXPECT_FALSE(needs_a_person(not_checked));

  PublishedRun refused = run;
  refused.problems.push_back({3, InputProblem{}});
  EXPECT_TRUE(needs_a_person(refused));

  PublishedRun no_limits = run;
  no_limits.analytes[0].sets[0].limits.governing = NotApplicable{"none"};
  EXPECT_TRUE(needs_a_person(no_limits));
}

}  // namespace
}  // namespace loqsmith
