#include <gtest/gtest.h>

#include "judgement/checked_night.hpp"
#include "support/tolerance.hpp"

namespace loqsmith {
namespace {

using test::checked_night;
using test::marked;
using test::NightBuilder;
using test::outcomes;
using test::result_of;
using test::rows_of;
using test::same_bits;
using test::sample;

using Kind = BlankMaximum::Kind;

NightBuilder with_solvent_blanks(BlankMaximum maximum = {}) {
  NightBuilder night = checked_night();
  night.settings.acceptance.solvent_blank.emplace();
  night.settings.acceptance.solvent_blank->maximum = maximum;
  // Few blanks of their own, so that contaminated ones change no limit.
  night.settings.limits.procedures[0].name = "established";
  night.settings.limits.procedures[0].detection = 0.25;
  night.settings.limits.procedures[0].quantitation = 1.0;
  return night;
}

TEST(SolventBlank, Passes) {
  NightBuilder night = with_solvent_blanks();
  sample(night, 5.0);
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "solvent-blank"), "+++++++");
  EXPECT_EQ(marked(judgement, "solvent-blank-failed"), "");
  const CheckRow row = rows_of(judgement.checks, "solvent-blank")[1];
  EXPECT_EQ(row.injection, 2);
  EXPECT_EQ(row.unit, "ug/L");
  EXPECT_EQ(row.action, "flag");
  EXPECT_TRUE(same_bits(row.high.value(), 0.25));
}

// It reaches back to the last blank that passed and on to the next.
TEST(SolventBlank, FlagsWhatWasDetectedAroundAFailedOne) {
  NightBuilder night = with_solvent_blanks();
  sample(night, 5.0);                  // 15
  night.add(Role::SolventBlank, 0.6);  // 16
  sample(night, 5.0);                  // 17
  sample(night, 0.1);                  // 18: nothing detected
  sample(night, 5.0).peak = NotApplicable{"file-refused: cut off"};  // 19
  night.add(Role::SolventBlank, 0.02);                               // 20
  sample(night, 5.0);                                                // 21
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "solvent-blank"), "+++++++-+");
  EXPECT_EQ(marked(judgement, "solvent-blank-failed"), "15 17");
  EXPECT_EQ(result_of(judgement, 15).status, Status::Reportable);
  EXPECT_EQ(result_of(judgement, 15).qualifier, "");
}

TEST(SolventBlank, WithholdsWhereTheMethodSaysSo) {
  NightBuilder night = with_solvent_blanks();
  night.settings.acceptance.solvent_blank->action = CheckAction::Withhold;
  night.add(Role::SolventBlank, 0.6);
  sample(night, 5.0);
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(result_of(judgement, 16).status, Status::Withheld);
  EXPECT_EQ(result_of(judgement, 16).qualifier, "R");
}

// At a limit a blank counts as having reached it; a number is allowed.
TEST(SolventBlank, ExactlyAtTheMaximum) {
  const auto at = [](BlankMaximum maximum, double concentration) {
    NightBuilder night = with_solvent_blanks(maximum);
    night.add(Role::SolventBlank, night.sensitivity * concentration);
    return outcomes(night.judge(), "solvent-blank").back();
  };
  EXPECT_EQ(at({Kind::DetectionLimit}, 0.25), '-');
  EXPECT_EQ(at({Kind::DetectionLimit}, 0.2499), '+');
  EXPECT_EQ(at({Kind::QuantitationLimit}, 1.0), '-');
  EXPECT_EQ(at({Kind::QuantitationLimit}, 0.999), '+');
  EXPECT_EQ(at({Kind::Number, 0.5}, 0.5), '+');
  EXPECT_EQ(at({Kind::Number, 0.5}, 0.5001), '-');
}

TEST(SolventBlank, NotCheckedWithoutBlankOrResult) {
  NightBuilder night = with_solvent_blanks();
  night.rows[0].peak = NotApplicable{"file-refused: cut off"};
  const std::vector<CheckRow> rows =
      rows_of(night.judge().checks, "solvent-blank");
  EXPECT_FALSE(rows[0].passed.has_value());
  EXPECT_EQ(rows[0].note, "not checked: file-refused");
  for (int i = 0; i < 7; ++i) night.rows[i].injection.role = Role::Sample;
  EXPECT_EQ(outcomes(night.judge(), "solvent-blank"), "?");
}

NightBuilder with_method_blank(double concentration) {
  NightBuilder night = checked_night();
  night.settings.acceptance.method_blank.emplace();
  night.add(Role::MethodBlank, night.sensitivity * concentration)
      .injection.prep = "A";  // 15
  return night;
}

void prepared(NightBuilder& night, double concentration,
              const std::string& prep) {
  sample(night, concentration).injection.prep = prep;
}

TEST(MethodBlank, Passes) {
  NightBuilder night = with_method_blank(0.1);
  prepared(night, 0.2, "A");
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "method-blank"), "+");
  EXPECT_EQ(marked(judgement, "method-blank-failed"), "");
}

// Blank at 0.25, so that up to 2.5 is affected.
TEST(MethodBlank, FlagsItsPrepUpToTheRatioWithB) {
  NightBuilder night = with_method_blank(0.25);
  prepared(night, 2.5, "A");    // 16: at the ratio
  prepared(night, 2.6, "A");    // 17: above it
  prepared(night, 0.3, "A");    // 18: estimated
  prepared(night, 0.1, "A");    // 19: not detected
  prepared(night, 1.0, "B");    // 20: other prep
  prepared(night, 200.0, "A");  // 21: above the range
  night.add_level(Role::CheckStandard, 1.0, 2.0).injection.prep = "A";  // 22
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "method-blank"), "-?");
  EXPECT_EQ(marked(judgement, "method-blank-failed"), "16 18");
  const CheckRow row = rows_of(judgement.checks, "method-blank")[0];
  EXPECT_EQ(row.affects,
            "detected results of prep \"A\" up to 10 times the "
            "blank");
  EXPECT_EQ(result_of(judgement, 16).qualifier, "B");
  EXPECT_EQ(result_of(judgement, 16).status, Status::Reportable);
  EXPECT_EQ(result_of(judgement, 17).qualifier, "");
  EXPECT_EQ(result_of(judgement, 18).status, Status::Estimated);
  EXPECT_EQ(result_of(judgement, 18).qualifier, "JB");
  EXPECT_EQ(result_of(judgement, 19).qualifier, "U");
  EXPECT_EQ(result_of(judgement, 21).qualifier, "E");
}

// In the sample the blank, diluted by nothing, lies at 0.25; the sample at 20.
TEST(MethodBlank, ComparesInTheSample) {
  NightBuilder night = with_method_blank(0.25);
  prepared(night, 2.0, "A");
  night.rows.back().injection.dilution = 10.0;
  EXPECT_EQ(marked(night.judge(), "method-blank-failed"), "");
}

TEST(MethodBlank, WithheldIsStillR) {
  NightBuilder night = with_method_blank(0.25);
  night.settings.acceptance.method_blank->action = CheckAction::Withhold;
  prepared(night, 1.0, "A");
  EXPECT_EQ(result_of(night.judge(), 16).qualifier, "R");
}

// Every method blank holds a surrogate.
TEST(MethodBlank, NotCheckedForASurrogate) {
  NightBuilder night = with_method_blank(5.0);
  night.settings.surrogate_concentration = 5.0;
  prepared(night, 5.0, "A");
  const AnalyteJudgement judgement = night.judge();
  EXPECT_EQ(outcomes(judgement, "method-blank"), "?");
  EXPECT_EQ(marked(judgement, "method-blank-failed"), "");
}

TEST(MethodBlank, NotCheckedWithoutOne) {
  NightBuilder night = checked_night();
  night.settings.acceptance.method_blank.emplace();
  sample(night, 1.0);
  EXPECT_EQ(outcomes(night.judge(), "method-blank"), "?");
}

}  // namespace
}  // namespace loqsmith
