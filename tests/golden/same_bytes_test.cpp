// The same folder gives the same tables, whatever the surroundings.

#include <gtest/gtest.h>

#include <cstdlib>

#include "golden/processed.hpp"
#include "support/temp_folder.hpp"

namespace loqsmith::test {
namespace {

bool make_comma_locale(const std::filesystem::path& where) {
  const std::string command = "localedef -i de_DE -f UTF-8 '" +
                              (where / "de_DE.UTF-8").string() +
                              "' >/dev/null 2>&1";
  return std::system(command.c_str()) == 0;
}

// A locale with a decimal comma, made for this test: which ones a machine has
// is nobody's business. @return the folder for LOCPATH
std::filesystem::path comma_locale() {
  static const TempFolder folder;
  static const bool made = make_comma_locale(folder.path());
  EXPECT_TRUE(made) << "localedef failed; it needs the package locales";
  return folder.path();
}

class SameBytes : public testing::TestWithParam<std::string> {
 protected:
  void SetUp() override {
    const ProgramRun done =
        process(sample_run(GetParam()), place_ / "one", {"--jobs", "1"});
    ASSERT_LE(done.status, 1) << done.err;
    wanted_ = tables_of(place_ / "one" / GetParam() / "run-0001");
    ASSERT_EQ(names_of(wanted_), table_names());
  }

  void expect_same(const std::filesystem::path& out) {
    const auto found = tables_of(out / GetParam() / "run-0001");
    ASSERT_EQ(found.size(), wanted_.size());
    for (const auto& [name, bytes] : wanted_) {
      EXPECT_TRUE(found.at(name) == bytes) << name << " differs";
    }
  }

  TempFolder place_;
  std::map<std::string, std::string> wanted_;
};

TEST_P(SameBytes, WithTwoAndEightThreads) {
  for (const char* jobs : {"2", "8"}) {
    const std::filesystem::path out = place_ / (std::string("jobs-") + jobs);
    process(sample_run(GetParam()), out, {"--jobs", jobs});
    expect_same(out);
  }
}

TEST_P(SameBytes, FromAnotherFolderInAnotherLocaleAndZone) {
  std::filesystem::create_directory(place_ / "elsewhere");
  process(sample_run(GetParam()), place_ / "abroad", {},
          {"LOCPATH=" + comma_locale().string(), "LC_ALL=de_DE.UTF-8",
           "LANG=de_DE.UTF-8", "TZ=Asia/Kathmandu"},
          (place_ / "elsewhere").string());
  expect_same(place_ / "abroad");
}

TEST_P(SameBytes, FromACopyReachedByARelativePath) {
  copy_of_sample_run(GetParam(), place_ / "copied");
  process(GetParam(), "out", {}, {}, (place_ / "copied").string());
  expect_same(place_ / "copied" / "out");
}

INSTANTIATE_TEST_SUITE_P(Nights, SameBytes,
                         testing::Values(kWellWater, kTabletCoating),
                         [](const auto& tested) {
                           return tested.index == 0 ? "WellWater"
                                                    : "TabletCoating";
                         });

}  // namespace
}  // namespace loqsmith::test
