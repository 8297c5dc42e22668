// Bad chromatogram files cost their own results and nothing else.

#include <gtest/gtest.h>

#include <fstream>
#include <set>

#include "golden/processed.hpp"
#include "golden/sheet.hpp"
#include "loqsmith/base/digest.hpp"
#include "loqsmith/base/files.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

namespace fs = std::filesystem;

void overwrite(const fs::path& path, const std::string& text) {
  std::ofstream out(path, std::ios::binary | std::ios::trunc);
  out << text;
}

void cut_in_half(const fs::path& path) {
  fs::resize_file(path, fs::file_size(path) / 2);
}

// Another wavelength in a file that is right in everything else, its SHA-1
// included.
void rename_trace(const fs::path& path) {
  std::string text = read_file(path);
  for (std::size_t at = text.find("220 nm"); at != std::string::npos;
       at = text.find("220 nm", at)) {
    text.replace(at, 6, "254 nm");
  }
  const std::size_t digits = text.find("<fileChecksum>") + 14;
  const std::string_view covered(text.data(), digits);
  overwrite(path, text.replace(digits, 40, sha1_hex(covered)));
}

// The line of a message that names the file; empty: there is none.
std::string line_about(const std::string& message, const std::string& file) {
  const std::size_t at = message.find(file);
  if (at == std::string::npos) return {};
  return message.substr(at, message.find('\n', at) - at);
}

// The file of the first injection of a sample.
std::string file_of(const fs::path& folder, const std::string& sample) {
  for (const SheetRow& row : read_sheet(folder / "sequence.csv")) {
    if (row.at("sample") == sample) return row.at("file");
  }
  throw std::runtime_error("no sample " + sample);
}

class DamagedFolder : public testing::Test {
 protected:
  TempFolder place_;
  fs::path folder_ = copy_of_sample_run(kWellWater, place_ / "in");
  fs::path run_ = place_ / "out" / kWellWater / "run-0001";
};

TEST_F(DamagedFolder, BadFilesAreNamedAndTheRestIsPublished) {
  ASSERT_EQ(process(folder_, place_ / "whole").status, 0);
  const auto whole =
      read_sheet(place_ / "whole" / kWellWater / "run-0001" / "results.csv");

  const std::string truncated = file_of(folder_, "W-102");
  const std::string unreadable = file_of(folder_, "W-104");
  const std::string missing = file_of(folder_, "W-110");
  const std::string other_trace = file_of(folder_, "W-106");
  cut_in_half(folder_ / truncated);
  fs::remove(folder_ / unreadable);
  fs::create_directory(folder_ / unreadable);
  fs::remove(folder_ / missing);
  rename_trace(folder_ / other_trace);

  const ProgramRun done = process(folder_, place_ / "out");
  EXPECT_EQ(done.status, 1) << done.err;
  const std::set<std::string> bad{truncated, unreadable, missing, other_trace};
  std::set<std::string> bad_injections;
  for (const SheetRow& row : read_sheet(folder_ / "sequence.csv")) {
    if (bad.contains(row.at("file")))
      bad_injections.insert(row.at("injection"));
  }
  for (const std::string& file : bad) {
    const std::string line = line_about(done.err, file);
    EXPECT_TRUE(holds(line, ": expected ") && holds(line, ", found ") &&
                holds(line, "; "))
        << "no place, finding and mend for " << file << " in: " << done.err;
  }
  EXPECT_TRUE(holds(done.err, "UV 254 nm")) << done.err;

  const auto found = read_sheet(run_ / "results.csv");
  ASSERT_EQ(found.size(), whole.size());
  for (std::size_t i = 0; i < found.size(); ++i) {
    if (bad_injections.contains(found[i].at("injection"))) {
      EXPECT_EQ(found[i].at("status"), "withheld") << row_key(found[i]);
      EXPECT_NE(found[i].at("reasons"), "") << row_key(found[i]);
      EXPECT_EQ(found[i].at("result"), "") << row_key(found[i]);
    } else {
      EXPECT_EQ(found[i], whole[i]) << row_key(found[i]);
    }
  }
}

TEST_F(DamagedFolder, WithoutUsableStandardsEverythingIsWithheld) {
  for (const SheetRow& row : read_sheet(folder_ / "sequence.csv")) {
    if (row.at("role") == "standard") cut_in_half(folder_ / row.at("file"));
  }
  const ProgramRun done = process(folder_, place_ / "out");
  EXPECT_EQ(done.status, 1) << done.err;
  const auto rows = read_sheet(run_ / "results.csv");
  EXPECT_GE(rows.size(), 72U);
  for (const SheetRow& row : rows) {
    EXPECT_EQ(row.at("status"), "withheld") << row_key(row);
    EXPECT_NE(row.at("reasons"), "") << row_key(row);
    EXPECT_EQ(row.at("result"), "") << row_key(row);
  }
}

TEST_F(DamagedFolder, AnUnlistedFileIsFlagged) {
  fs::copy_file(folder_ / file_of(folder_, "W-102"),
                folder_ / "data/forgotten.mzML");
  const ProgramRun done = process(folder_, place_ / "out");
  EXPECT_LE(done.status, 1) << done.err;
  EXPECT_TRUE(holds(read_file(run_ / "checks.csv"), "data/forgotten.mzML"));
}

}  // namespace
}  // namespace loqsmith::test
