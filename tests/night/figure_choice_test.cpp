#include "loqsmith/night/figure_choice.hpp"

#include <gtest/gtest.h>

namespace loqsmith {
namespace {

Injection injection(int number, Role role, const std::string& level) {
  Injection row;
  row.number = number;
  row.role = role;
  row.level = level;
  return row;
}

Sheets sheets() {
  Sheets sheets;
  AnalyteSettings analyte;
  analyte.target.id = "acetone";
  sheets.method.analytes.push_back(analyte);
  return sheets;
}

TEST(FigureChoice, TheFirstSolventBlankIsDrawn) {
  Sheets night = sheets();
  night.sequence.injections = {injection(1, Role::MethodBlank, ""),
                               injection(2, Role::SolventBlank, ""),
                               injection(3, Role::SolventBlank, "")};
  const FigureChoice choice(night);
  EXPECT_EQ(choice.caption("acetone", 2), "blank");
  EXPECT_EQ(choice.caption("acetone", 1), "");
  EXPECT_EQ(choice.caption("acetone", 3), "");
  EXPECT_EQ(choice.caption("ethanol", 2), "");
}

TEST(FigureChoice, OfPartedPeaksTheEarliestIsDrawnWhateverTheOrder) {
  FigureChoice choice(sheets());
  EXPECT_EQ(choice.claim_parted("acetone", 7, "drop"), "");
  EXPECT_EQ(choice.claim_parted("acetone", 7, ""), "");
  const std::string words = choice.claim_parted("acetone", 7, "model");
  EXPECT_FALSE(words.empty());
  EXPECT_EQ(choice.claim_parted("acetone", 9, "model"), "");
  EXPECT_EQ(choice.claim_parted("acetone", 5, "skim"), words);
  EXPECT_EQ(choice.claim_parted("acetone", 6, "model"), "");
  EXPECT_EQ(choice.claim_parted("ethanol", 9, "model"), words);
}

}  // namespace
}  // namespace loqsmith
