#include "loqsmith/sheets/amendments_sheet.hpp"

#include <gtest/gtest.h>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/sheets/read_sheets.hpp"
#include "sheets/example.hpp"

namespace loqsmith {
namespace {

using What = Amendment::What;

const std::string kHead = "when,who,why,what,injection,analyte,value\n";
const std::string kDecided = "2026-05-02T09:00:00Z,M. Weber,vial was empty,";

const std::string kAccepting =
    test::replaced(test::kExampleMethod, "</method>",
                   "<amendments unsigned=\"accepted\"/></method>");

SheetTexts with_rows(const std::string& rows) {
  return {test::kExampleSequence, test::kExampleLevels, kAccepting,
          kHead + rows};
}

Sheets read(const std::string& rows) {
  return read_sheets(with_rows(rows), "night");
}

std::string said_of(const SheetTexts& texts) {
  try {
    read_sheets(texts, "night");
  } catch (const InputError& error) {
    return error.what();
  }
  return "nothing";
}

struct Refused {
  std::string rows;
  std::string said;  // part of the message
};

void expect_refused(const std::vector<Refused>& table) {
  for (const Refused& one : table) {
    const std::string said = said_of(with_rows(one.rows));
    EXPECT_NE(said.find(one.said), std::string::npos)
        << one.rows << "is answered with " << said;
  }
}

TEST(Amendments, AreWorkedIntoTheMethod) {
  const Sheets sheets =
      read(kDecided + "exclude-standard,2,simazine,\n" + kDecided +
           "integration-bounds,4,is1,5.0 5.25\n" + kDecided +
           "invalid-injection,1,,\n" + kDecided +
           "calibration-model,,atrazine,quadratic none zero\n" + kDecided +
           "override-status,4,atrazine,estimated\n");
  ASSERT_EQ(sheets.amendments.size(), 5U);
  EXPECT_EQ(sheets.amendments[1].who, "M. Weber");
  EXPECT_EQ(describe(sheets.amendments[1]),
            "integration-bounds, injection 4, is1: 5.0 5.25");
  EXPECT_TRUE(sheets.method.decisions.empty());

  const Method method = amended(sheets.method, sheets.amendments);
  const AnalyteSettings& simazine = method.analytes[0];
  const AnalyteSettings& atrazine = method.analytes[1];
  EXPECT_EQ(simazine.decisions.excluded_standards, std::set<int>{2});
  EXPECT_TRUE(atrazine.decisions.excluded_standards.empty());
  EXPECT_EQ(method.decisions.at("simazine").never_teach, (std::set<int>{1, 2}));
  EXPECT_EQ(method.decisions.at("is1").never_teach, std::set<int>{1});
  EXPECT_EQ(method.decisions.at("is1").bounds.at(4).start_minutes, 5.0);
  EXPECT_EQ(method.decisions.at("is1").bounds.at(4).end_minutes, 5.25);
  EXPECT_EQ(atrazine.decisions.invalid_injections, std::set<int>{1});
  EXPECT_EQ(atrazine.decisions.statuses.at(4), Status::Estimated);
  EXPECT_EQ(atrazine.calibration.model, CalibrationSettings::Model::Quadratic);
  EXPECT_EQ(atrazine.calibration.weight, CalibrationSettings::Weight::None);
  EXPECT_EQ(atrazine.calibration.intercept,
            CalibrationSettings::Intercept::Zero);
  EXPECT_EQ(simazine.calibration.model, CalibrationSettings::Model::Linear);
}

TEST(Amendments, TheLatestOfTheSameKindHolds) {
  const Sheets sheets = read(
      "2026-05-03T09:00:00Z,A,a second look,override-status,4,simazine,"
      "reportable\n"
      "2026-05-02T09:00:00Z,A,a first look,override-status,4,simazine,"
      "withheld\n");
  EXPECT_TRUE(sheets.amendments[0].in_force);
  EXPECT_FALSE(sheets.amendments[1].in_force);
  const Method method = amended(sheets.method, sheets.amendments);
  EXPECT_EQ(method.analytes[0].decisions.statuses.at(4), Status::Reportable);
}

TEST(Amendments, AreTakenBackByALaterRow) {
  const Sheets sheets =
      read(kDecided + "invalid-injection,4,,\n" +
           "2026-05-03T09:00:00Z,A,the wrong vial,withdraw,4,,"
           "invalid-injection\n");
  const Method method = amended(sheets.method, sheets.amendments);
  EXPECT_TRUE(method.decisions.empty());
  EXPECT_TRUE(method.analytes[0].decisions.invalid_injections.empty());
}

TEST(Amendments, NeedWhoWhenAndAReason) {
  expect_refused({
      {"2026-05-02T09:00:00Z,,vial empty,invalid-injection,4,,\n",
       "amendments.csv:2:22: expected something in the column \"who\""},
      {"2026-05-02T09:00:00Z,A,,invalid-injection,4,,\n",
       "something in the column \"why\""},
      {"2026-05-02T09:00:00Z,A,empty,invalid-injection,4,,\n",
       "a reason of at least two words, found why \"empty\""},
      {"2026-05-02T09:00:00Z,A,empty - .,invalid-injection,4,,\n",
       "a reason of at least two words"},
      {"2026-05-02 morning,A,vial empty,invalid-injection,4,,\n",
       "a time with its zone (RFC 3339), found when \"2026-05-02 morning\""},
      {"2026-05-02T09:00:00,A,vial empty,invalid-injection,4,,\n",
       "a time with its zone"},
  });
}

TEST(Amendments, OfAnUnknownOrUnfitKindAreRefused) {
  expect_refused({
      {kDecided + "delete-standard,2,,\n", "what \"delete-standard\""},
      {kDecided + "exclude-standard,,simazine,\n", "injection is empty"},
      {kDecided + "exclude-standard,2,simazine,yes\n", "value \"yes\""},
      {kDecided + "invalid-injection,4,simazine,\n", "analyte \"simazine\""},
      {kDecided + "integration-bounds,4,,3.3 3.5\n", "analyte is empty"},
      {kDecided + "integration-bounds,4,simazine,3.5 3.3\n",
       "value \"3.5 3.3\""},
      {kDecided + "integration-bounds,4,simazine,\"3,3 3,5\"\n",
       "value \"3,3 3,5\""},
      {kDecided + "integration-bounds,4,simazine,3.3\n", "value \"3.3\""},
      {kDecided + "calibration-model,2,simazine,linear none\n",
       "injection \"2\""},
      {kDecided + "calibration-model,,simazine,cubic none\n",
       "value \"cubic none\""},
      {kDecided + "calibration-model,,simazine,linear\n", "value \"linear\""},
      {kDecided + "calibration-model,,simazine,linear none any\n",
       "value \"linear none any\""},
      {kDecided + "override-status,4,simazine,fine\n", "value \"fine\""},
      {kDecided + "override-status,x,simazine,withheld\n", "injection \"x\""},
  });
}

TEST(Amendments, ThatMatchNothingAreNamed) {
  expect_refused({
      {kDecided + "invalid-injection,9,,\n",
       "amendments.csv:2:64: expected an injection of the sequence, found "
       "injection 9 (invalid-injection, injection 9)"},
      {kDecided + "override-status,4,simazin,withheld\n",
       "an analyte of the method, found analyte \"simazin\""},
      {kDecided + "override-status,4,is1,withheld\n",
       "an analyte of the method, found analyte \"is1\""},
      {kDecided + "exclude-standard,4,simazine,\n",
       "a standard that contains the analyte, found injection 4, a sample"},
      {kDecided + "exclude-standard,1,,\n", "injection 1, a solvent-blank"},
      {kDecided + "override-status,2,simazine,withheld\n",
       "an injection that has a result, found injection 2, a standard"},
      {kDecided + "withdraw,4,,invalid-injection\n", "withdraws nothing"},
      {kDecided + "withdraw,4,,withdraw\n", "value \"withdraw\""},
      {kDecided + "invalid-injection,4,,\n" + kDecided +
           "invalid-injection,4,,\n",
       "when is that of line 2"},
  });
}

TEST(Amendments, WithoutSignatureNeedAMethodThatAcceptsThem) {
  SheetTexts texts = with_rows(kDecided + "invalid-injection,4,,\n");
  EXPECT_EQ(said_of(texts), "nothing");
  texts.method_xml = test::kExampleMethod;
  EXPECT_EQ(said_of(texts),
            "amendments.csv:1:1: expected none, since the method refuses them, "
            "found unsigned amendments; give the method <amendments "
            "unsigned=\"accepted\"/>, or take the sheet out of the folder");
}

}  // namespace
}  // namespace loqsmith
