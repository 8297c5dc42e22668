// A sample run in which people decided otherwise than the program.

#include <gtest/gtest.h>

#include <fstream>
#include <nlohmann/json.hpp>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

const std::string kHead = "when,who,why,what,injection,analyte,value\n";
const std::string kWho = "2026-05-02T09:00:00Z,M. Weber,";
const std::string kRows =
    kWho + "\"wrong flask, see the book\",exclude-standard,12,diuron,\n" +
    kWho + "shoulder was cut off,integration-bounds,25,simazine,3.30 3.56\n" +
    kWho + "the needle bent,invalid-injection,26,,\n" + kWho +
    "scatter grows with amount,calibration-model,,atrazine,linear 1/x2\n" +
    kWho + "sample was warm,override-status,27,simazine,withheld\n";

void write(const fs::path& path, const std::string& text) {
  std::ofstream(path, std::ios::binary | std::ios::trunc) << text;
}

class AmendedNight : public testing::Test {
 protected:
  void SetUp() override {
    folder_ = copy_of_sample_run(kWellWater, place_ / "in");
    std::string method = read_file(folder_ / "method.xml");
    const std::string end = "</method>";
    method.insert(method.find(end), "<amendments unsigned=\"accepted\"/>");
    write(folder_ / "method.xml", method);
  }

  ProgramRun amend(const std::string& rows) {
    write(folder_ / "amendments.csv", kHead + rows);
    return process(folder_, place_ / "out");
  }

  fs::path run(const std::string& out, int number) const {
    return place_ / out / kWellWater / ("run-000" + std::to_string(number));
  }

  TempFolder place_;
  fs::path folder_;
};

bool has_word(const SheetRow& row, const std::string& word) {
  return holds(";" + row.at("reasons") + ";", ";" + word + ";");
}

// Every row is either that of the night without amendments, or says so and
// shows that night's number and status beside its own.
TEST_F(AmendedNight, ShowsBothNumbersOfEachResultThatItTouches) {
  ASSERT_LE(process(folder_, place_ / "plain").status, 1);
  const ProgramRun done = amend(kRows);
  ASSERT_EQ(done.status, 1) << done.out << done.err;
  const auto plain = by_key(read_sheet(run("plain", 1) / "results.csv"));
  const auto amended = by_key(read_sheet(run("out", 1) / "results.csv"));
  ASSERT_EQ(plain.size(), amended.size());
  std::size_t touched = 0;
  for (const auto& [key, row] : amended) {
    const SheetRow& before = plain.at(key);
    if (!has_word(row, "amended-unsigned")) {
      EXPECT_EQ(row, before) << key;
      continue;
    }
    ++touched;
    EXPECT_EQ(row.at("automatic_result"), before.at("result")) << key;
    EXPECT_EQ(row.at("automatic_status"), before.at("status")) << key;
  }
  EXPECT_GT(touched, 100U);  // all of diuron and atrazine
  EXPECT_FALSE(has_word(amended.at("28/simazine"), "amended-unsigned"));

  const SheetRow& cut = amended.at("25/simazine");
  EXPECT_TRUE(has_word(cut, "manual-bounds"));
  EXPECT_NE(cut.at("response"), plain.at("25/simazine").at("response"));
  const SheetRow& invalid = amended.at("26/simazine");
  EXPECT_EQ(invalid.at("status"), "withheld");
  EXPECT_EQ(invalid.at("reasons"), "invalid-injection;amended-unsigned");
  const SheetRow& warm = amended.at("27/simazine");
  EXPECT_EQ(warm.at("status"), "withheld");
  EXPECT_EQ(warm.at("result"), plain.at("27/simazine").at("result"));
  EXPECT_TRUE(has_word(warm, "status-overridden"));

  const auto peaks = by_key(read_sheet(run("out", 1) / "peaks.csv"));
  EXPECT_EQ(peaks.at("25/simazine").at("manual"), "yes");
  EXPECT_EQ(peaks.at("25/simazine").at("start"), "3.3");
  EXPECT_EQ(peaks.at("25/simazine").at("end"), "3.56");
  EXPECT_EQ(peaks.at("25/atrazine").at("manual"), "no");
  std::size_t excluded = 0;
  for (const SheetRow& row : read_sheet(run("out", 1) / "standards.csv")) {
    if (row.at("note") != "excluded-by-amendment") continue;
    ++excluded;
    EXPECT_EQ(row_key(row), "12/diuron");
    EXPECT_EQ(row.at("used"), "no");
  }
  EXPECT_EQ(excluded, 1U);
}

TEST_F(AmendedNight, IsNamedInReportRecordAndLedger) {
  ASSERT_EQ(amend(kRows).status, 1);
  EXPECT_EQ(read_file(run("out", 1) / "inputs" / "amendments.csv"),
            kHead + kRows);
  const std::string ledger = read_file(place_ / "out" / "ledger.jsonl");
  EXPECT_TRUE(holds(ledger, "\"amendments\":\"5\"")) << ledger;
  EXPECT_TRUE(holds(ledger, sha256_hex(kHead + kRows)));
  const auto record =
      nlohmann::json::parse(read_file(run("out", 1) / "record.json"));
  ASSERT_EQ(record["amendments"].size(), 5U);
  EXPECT_EQ(record["amendments"][0]["why"], "wrong flask, see the book");
  EXPECT_EQ(record["amendments"][4]["value"], "withheld");
  const std::string report = read_file(run("out", 1) / "report.html");
  const std::size_t amendments = report.find("id=\"amendments\"");
  ASSERT_NE(amendments, std::string::npos);
  EXPECT_LT(amendments, report.find("id=\"attention\""));
  EXPECT_TRUE(holds(report, "override-status, injection 27, simazine"));
}

// A decision that was published once is taken back by a row, never by leaving
// it out; and the report says what that changes.
TEST_F(AmendedNight, DecisionsAreNotForgotten) {
  const std::string warm =
      kWho + "sample was warm,override-status,27,simazine,withheld\n";
  ASSERT_EQ(amend(warm).status, 1);
  const ProgramRun without = amend("");
  EXPECT_EQ(without.status, 65) << without.out;
  EXPECT_TRUE(holds(without.err, "override-status, injection 27, simazine"))
      << without.err;
  fs::remove(folder_ / "amendments.csv");
  EXPECT_EQ(process(folder_, place_ / "out").status, 65);
  EXPECT_FALSE(fs::exists(run("out", 2)));

  const ProgramRun done =
      amend(warm + "2026-05-03T09:00:00Z,A. Roth,it was cooled after all," +
            "withdraw,27,simazine,override-status\n");
  ASSERT_LE(done.status, 1) << done.err;
  const auto results = by_key(read_sheet(run("out", 2) / "results.csv"));
  EXPECT_FALSE(has_word(results.at("27/simazine"), "amended-unsigned"));
  const auto record =
      nlohmann::json::parse(read_file(run("out", 2) / "record.json"));
  EXPECT_EQ(record["earlier_runs"][0], kWellWater + "/run-0001");
  ASSERT_EQ(record["reported_changes"].size(), 1U);
  EXPECT_EQ(record["reported_changes"][0]["injection"], 27);
  EXPECT_EQ(record["reported_changes"][0]["was"], "withheld");
  EXPECT_EQ(record["reported_changes"][0]["is"],
            results.at("27/simazine").at("reported"));
  EXPECT_TRUE(holds(read_file(run("out", 2) / "report.html"),
                    "Earlier runs of this sequence"));
}

TEST_F(AmendedNight, IsRefusedWhereTheMethodAcceptsNoUnsignedOnes) {
  fs::copy(sample_run(kWellWater) / "method.xml", folder_ / "method.xml",
           fs::copy_options::overwrite_existing);
  const ProgramRun done = amend(kRows);
  EXPECT_EQ(done.status, 65);
  EXPECT_TRUE(holds(done.err, "unsigned amendments")) << done.err;
  EXPECT_FALSE(fs::exists(place_ / "out"));
}

}  // namespace
}  // namespace loqsmith::test
