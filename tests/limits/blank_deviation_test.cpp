#include "loqsmith/limits/blank_deviation.hpp"

#include "limits/evidence_builders.hpp"
#include "loqsmith/limits/blanks.hpp"
#include "support/tolerance.hpp"

namespace loqsmith::test {
namespace {

const std::vector<double> kSamples = {5.0, 5.0, 5.2, 4.2, 4.6, 6.0, 4.9};
const std::vector<double> kBlanks = {1.4, 2.2, 1.7, 0.9, 0.4, 1.5, 0.7};

Outcome<LimitEstimate> limit(const LimitEvidence& evidence,
                             const ProcedureSettings& settings = {},
                             const LimitSettings& limits = {}) {
  return blank_deviation(evidence, limits, settings);
}

// Harris, Quantitative Chemical Analysis, detection-limit example (data and
// printed values from memory): slope 0.229 nA/uM, replicates near the limit
// with s 0.56 nA give 7.3 and 24 uM.
TEST(BlankDeviation, HarrisReplicatesNearTheLimit) {
  const auto found = limit(evidence_of(kSamples, known_line(5.0, 0.229, 10)));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of the blanks"), 0.56, 2));
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of the blanks"), 0.5550632740, 10));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 7.3, 2));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 7.2715712745, 11));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 24, 2));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 24.2385709151, 12));
  EXPECT_EQ(found->n, 7U);
  EXPECT_EQ(found->degrees_of_freedom, 6.0);
}

// The same example with the spread of its seven blanks (mean printed 1.26).
TEST(BlankDeviation, HarrisBlanks) {
  const auto found = limit(evidence_of(kBlanks, known_line(1.25, 0.229, 10)));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*term(*found, "mean of the blanks"), 1.26, 3));
  EXPECT_TRUE(
      agrees_to_digits(*term(*found, "mean of the blanks"), 1.2571428571, 11));
  EXPECT_TRUE(agrees_to_digits(
      *term(*found, "standard deviation of the blanks"), 0.6241184259, 10));
  EXPECT_TRUE(agrees_to_digits(*found->detection, 8.1762239198, 11));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation, 27.2540797328, 12));
  EXPECT_EQ(found->grade(), Grade::Valid);
}

// Signal at the limit, mean + 3 s: 2.9 nA printed for the mean of the blanks
// and the spread of the replicates; here both of the blanks, through a line
// that passes zero.
TEST(BlankDeviation, OffsetOfTheBlanksMean) {
  ProcedureSettings settings;
  settings.offset_blank_mean = true;
  const auto found =
      limit(evidence_of(kBlanks, known_line(0.0, 0.229, 10)), settings);
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->detection * 0.229,
                               1.2571428571 + 3 * 0.6241184259, 10));
  EXPECT_TRUE(agrees_to_digits(*found->quantitation * 0.229,
                               1.2571428571 + 10 * 0.6241184259, 10));
  // Not proportional to s: bounds are drawn, not chi-square.
  EXPECT_LT(*found->detection_lower, *found->detection);
  EXPECT_GT(*found->quantitation_upper, *found->quantitation);
  EXPECT_FALSE(finding(*found, "blank-differs-from-intercept"));
}

// 95 % bounds, n = 7: 0.644393 and 2.202066 times the limit.
TEST(BlankDeviation, ConfidenceBounds) {
  const auto found = limit(evidence_of(kBlanks, known_line(1.25, 0.229, 10)));
  ASSERT_TRUE(found);
  EXPECT_TRUE(agrees_to_digits(*found->detection_lower / *found->detection,
                               0.644393, 6));
  EXPECT_TRUE(agrees_to_digits(*found->detection_upper / *found->detection,
                               2.202066, 7));
  EXPECT_TRUE(agrees_to_digits(
      *found->quantitation_upper / *found->quantitation, 2.202066, 7));
}

TEST(BlankDeviation, TermsGiveTheLimitBack) {
  const auto found =
      limit(evidence_of(kBlanks, known_line(1.25, 0.229, 10)),
            with_factors(procedure("blank-deviation"), 3.3, 10.0));
  ASSERT_TRUE(found);
  const double by_hand = *term(*found, "detection factor") *
                         *term(*found, "standard deviation of the blanks") /
                         *term(*found, "slope at zero");
  EXPECT_TRUE(within_condition(*found->detection, by_hand, 4));
  EXPECT_TRUE(within_condition(*term(*found, "detection factor"), 3.3, 1));
}

TEST(BlankDeviation, NotApplicable) {
  LimitEvidence evidence = evidence_of(kBlanks, known_line(1.25, 0.229));
  evidence.calibration.reset();
  EXPECT_TRUE(contains(limit(evidence).reason(), "no-calibration"));

  evidence = evidence_of({1.0, 2.0}, known_line(0, 1));
  EXPECT_EQ(limit(evidence).reason(),
            "few-blanks: 2 solvent blanks, at least 3 are needed");

  evidence = evidence_of({}, known_line(0, 1));
  EXPECT_TRUE(contains(limit(evidence).reason(), "0 solvent blanks"));

  evidence = evidence_of({0.3, 0.3, 0.3, 0.3}, known_line(0, 1));
  EXPECT_TRUE(contains(limit(evidence).reason(), "blanks-all-equal: "));

  evidence = evidence_of(kBlanks, known_line(0, -0.2));
  EXPECT_TRUE(contains(limit(evidence).reason(), "slope-not-positive: "));

  ProcedureSettings settings;
  settings.offset_blank_mean = true;
  evidence = evidence_of(kBlanks, known_line(50, 0.229));
  EXPECT_TRUE(
      contains(limit(evidence, settings).reason(), "limit-not-positive: "));
}

TEST(BlankDeviation, FewerThanTheMinimumIsNotValid) {
  const auto found =
      limit(evidence_of({1.4, 2.2, 1.7, 0.9}, known_line(1.5, 0.229, 10)));
  ASSERT_TRUE(found);
  EXPECT_EQ(found->grade(), Grade::NotValid);
  ASSERT_TRUE(finding(*found, "few-blanks"));
  EXPECT_EQ(finding(*found, "few-blanks")->text,
            "4 usable blanks, the method asks for at least 7");

  LimitSettings limits;
  limits.minimum_blanks = 4;
  EXPECT_EQ(limit(evidence_of({1.4, 2.2, 1.7, 0.9}, known_line(1.5, 0.229, 10)),
                  {}, limits)
                ->grade(),
            Grade::Valid);
}

TEST(BlankDeviation, BlanksAfterHighInjectionsAreLeftOut) {
  LimitEvidence evidence = evidence_of(kBlanks, known_line(1.25, 0.229, 10));
  BlankResponse carried = evidence.blanks[0];
  carried.response = 40.0;
  carried.after_high = true;
  evidence.blanks.push_back(carried);
  const auto without = limit(evidence);
  ASSERT_TRUE(without);
  EXPECT_TRUE(agrees_to_digits(*without->detection, 8.1762239198, 11));
  ASSERT_TRUE(finding(*without, "after-high"));
  EXPECT_EQ(without->grade(), Grade::Note);

  evidence.carry_over_passed = true;
  const auto with = limit(evidence);
  ASSERT_TRUE(with);
  EXPECT_EQ(with->n, 8U);
  EXPECT_GT(*with->detection, 100.0);

  evidence.carry_over_passed = false;
  evidence.blanks.resize(3);
  evidence.blanks[0].after_high = true;
  EXPECT_EQ(limit(evidence).reason(),
            "few-blanks: 2 solvent blanks (1 left out: after-high), at least "
            "3 are needed");
}

TEST(BlankDeviation, KindsOfBlanks) {
  LimitEvidence evidence = evidence_of(kBlanks, known_line(1.25, 0.229, 10));
  for (BlankResponse blank :
       blanks_of({0.1, 0.2, 0.3, 0.1, 0.2, 0.3, 0.1, 0.2}, BlankKind::Method))
    evidence.blanks.push_back(blank);
  EXPECT_EQ(limit(evidence)->n, 7U);  // solvent blanks by default

  LimitSettings limits;
  limits.blanks = BlankKind::Method;
  EXPECT_EQ(limit(evidence, {}, limits)->n, 8U);

  ProcedureSettings settings;
  settings.blanks = BlankKind::All;  // the procedure's own word goes first
  EXPECT_EQ(limit(evidence, settings, limits)->n, 15U);

  settings.blanks = BlankKind::ZeroStandard;
  EXPECT_TRUE(contains(limit(evidence, settings).reason(), "0 zero standards"));
}

TEST(BlankDeviation, OwnBoundsAreNotValid) {
  LimitEvidence evidence = evidence_of(kBlanks, known_line(1.25, 0.229, 10));
  evidence.bounds_own = true;
  EXPECT_EQ(limit(evidence)->grade(), Grade::NotValid);
  EXPECT_TRUE(finding(*limit(evidence), "own-bounds"));
}

TEST(BlankDeviation, BiasedBaselineNeedsTheBlanksMean) {
  LimitEvidence evidence = evidence_of(kBlanks, known_line(1.25, 0.229, 10));
  evidence.baseline_biased = true;
  EXPECT_TRUE(finding(*limit(evidence), "baseline-biases-blanks"));
  EXPECT_EQ(limit(evidence)->grade(), Grade::NotValid);
  ProcedureSettings settings;
  settings.offset_blank_mean = true;
  EXPECT_EQ(limit(evidence, settings)->grade(), Grade::Valid);
}

TEST(BlankDeviation, SaysByHowMuchTheBaselineShiftsBlanks) {
  LimitEvidence evidence = evidence_of(kBlanks, known_line(1.25, 0.229, 10));
  evidence.baseline_biased = true;
  evidence.predicted_bias = PredictedBias{0.75, 0.0625, -0.5, 1.5};
  ProcedureSettings settings;
  settings.offset_blank_mean = true;
  const auto found = limit(evidence, settings);
  ASSERT_TRUE(found);
  const LimitFinding* shift = finding(*found, "baseline-shifts-blanks");
  ASSERT_TRUE(shift);
  EXPECT_TRUE(contains(shift->text, "by 0.75 "));
  EXPECT_TRUE(contains(shift->text, "standard error 0.0625"));
  const LimitFinding* favour = finding(*found, "baseline-favours-blanks");
  ASSERT_TRUE(favour);
  EXPECT_TRUE(contains(favour->text, "1.5 times"));
  EXPECT_TRUE(contains(favour->text, "lifted 1.25 less"));
  EXPECT_EQ(favour->grade, Grade::Caution);

  evidence.predicted_bias->spread_ratio = 1.1;
  EXPECT_EQ(limit(evidence, settings)->grade(), Grade::Note);
  settings.offset_blank_mean = false;
  EXPECT_EQ(limit(evidence, settings)->grade(), Grade::NotValid);
  evidence.baseline_biased = false;
  EXPECT_FALSE(finding(*limit(evidence), "baseline-shifts-blanks"));
}

TEST(BlankDeviation, FarBelowTheLowestStandard) {
  const auto near = limit(evidence_of(kBlanks, known_line(1.25, 0.229, 250)));
  const auto far = limit(evidence_of(kBlanks, known_line(1.25, 0.229, 300)));
  ASSERT_TRUE(near && far);
  EXPECT_FALSE(finding(*near, "far-below-standards"));  // 9.2 times
  ASSERT_TRUE(finding(*far, "far-below-standards"));    // 11.0 times
  EXPECT_EQ(far->grade(), Grade::Caution);
}

// Eleven blanks of mean zero.
const std::vector<double> kEleven = {0.0,  0.9,  -0.9, 0.7, -0.7, 1.1,
                                     -1.1, -1.0, 1.0,  0.3, -0.3};

// The rate is that of t with n - 1 degrees of freedom, about the blanks' mean.
TEST(BlankDeviation, BlanksThatDifferFromTheIntercept) {
  const auto usable =
      usable_blanks(evidence_of(kEleven, known_line(0, 1)), BlankKind::Solvent);
  ASSERT_TRUE(usable);
  const double s = usable->sd;
  struct Row {
    double shift;  // of the intercept below the mean, in s
    std::optional<Grade> grade;
  };
  // 3 - shift over sqrt(1 + 1/11), 10 degrees of freedom, upper tail: 2 % lies
  // at 2.359, 5 % at 1.812.
  for (const Row& row : std::initializer_list<Row>{
           {0.0, std::nullopt},
           {0.5, std::nullopt},  // within chance: 2.228/sqrt(11) = 0.672
           {0.70, Grade::Caution},
           {1.0, Grade::Caution},
           {1.2, Grade::NotValid},
           {-1.0, Grade::Note}}) {
    const auto found =
        limit(evidence_of(kEleven, known_line(-row.shift * s, 1.0, 5.0)));
    ASSERT_TRUE(found);
    const LimitFinding* one = finding(*found, "blank-differs-from-intercept");
    ASSERT_EQ(one != nullptr, row.grade.has_value()) << row.shift;
    if (one == nullptr) continue;
    EXPECT_EQ(one->grade, *row.grade) << row.shift << one->text;
  }
}

TEST(FalsePositiveRate, IsTheTailOfStudentsT) {
  const auto usable = usable_blanks(
      evidence_of({-1.0, 0.0, 1.0}, known_line(0, 1)), BlankKind::Solvent);
  ASSERT_TRUE(usable);
  // Mean 0, s 1, n 3: t = x / sqrt(4/3), 2 degrees of freedom, t 4.302653 at
  // 2.5 %.
  EXPECT_TRUE(agrees_to_digits(
      false_positive_rate(*usable, 4.302653 * 1.1547005383792515), 0.025, 6));
  EXPECT_TRUE(agrees_to_digits(false_positive_rate(*usable, 0.0), 0.5, 15));
}

TEST(BlankFindings, OneFarFromTheOthers) {
  // Uranium isotope data of the NIST/SEMATECH e-Handbook 1.3.5.17.1, G 2.4687;
  // two-sided critical value at 1 % for n = 8: 2.2744.
  const std::vector<double> values = {199.31, 199.53, 200.19, 200.82,
                                      201.92, 201.95, 202.18, 245.57};
  const auto found = limit(evidence_of(values, known_line(206, 1)));
  ASSERT_TRUE(found);
  const LimitFinding* outlier = finding(*found, "blank-outlier");
  ASSERT_TRUE(outlier);
  EXPECT_EQ(outlier->text,
            "the blank of injection 8 lies 2.469 standard deviations from the "
            "mean (Grubbs, 1 %: 2.274); it stays in");
  EXPECT_EQ(found->n, 8U);  // never deleted
  EXPECT_FALSE(finding(*limit(evidence_of(kBlanks, known_line(1.25, 0.229))),
                       "blank-outlier"));
}

// Two heaps: no single one lies far off, and no drift.
TEST(BlankFindings, NotNormal) {
  const std::vector<double> heaps = {1.00, 2.00, 1.01, 2.01, 2.02, 1.02,
                                     1.03, 2.03, 2.00, 1.01, 1.02, 2.01};
  const auto found = limit(evidence_of(heaps, known_line(1.5, 1)));
  ASSERT_TRUE(found);
  ASSERT_TRUE(finding(*found, "blanks-not-normal"));
  EXPECT_EQ(finding(*found, "blanks-not-normal")->grade, Grade::Caution);
  EXPECT_FALSE(finding(*found, "blank-outlier"));
  EXPECT_FALSE(finding(*limit(evidence_of(kBlanks, known_line(1.25, 0.229))),
                       "blanks-not-normal"));
}

TEST(BlankFindings, Drift) {
  const auto found = limit(
      evidence_of({1.0, 1.2, 1.3, 1.55, 1.7, 1.8, 2.1}, known_line(1.5, 1)));
  ASSERT_TRUE(found);
  ASSERT_TRUE(finding(*found, "blanks-drift"));
  EXPECT_EQ(finding(*found, "blanks-drift")->grade, Grade::Caution);
  EXPECT_FALSE(finding(*limit(evidence_of(kBlanks, known_line(1.25, 0.229))),
                       "blanks-drift"));
}

}  // namespace
}  // namespace loqsmith::test
