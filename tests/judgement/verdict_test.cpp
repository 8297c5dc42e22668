#include "loqsmith/judgement/verdict.hpp"

#include <array>
#include <map>

#include "loqsmith/judgement/reasons.hpp"

namespace loqsmith {
namespace {

using Words = std::vector<std::string>;

VerdictFacts identified(Placing placing) {
  VerdictFacts facts;
  facts.identified = true;
  facts.placing = placing;
  return facts;
}

VerdictFacts unseen(Placing placing) {
  VerdictFacts facts = identified(placing);
  facts.identified = false;
  return facts;
}

VerdictFacts critical(VerdictFacts facts) {
  facts.decides_at_critical_value = true;
  return facts;
}

VerdictFacts withheld(VerdictFacts facts, Words words) {
  facts.withholding = std::move(words);
  return facts;
}

constexpr Placing kBelow{.below_threshold = true};
constexpr Placing kBetween{.below_quantitation = true};
constexpr Placing kWithin{};
constexpr Placing kAbove{.above_range = true};
/// A detection limit that lies beyond the highest standard.
constexpr Placing kBelowAndAbove{.below_threshold = true, .above_range = true};
constexpr Placing kBetweenAndAbove{.below_quantitation = true,
                                   .above_range = true};

struct Case {
  const char* name;
  VerdictFacts facts;
  std::size_t rule;  ///< place in the table of the rule that decides
  Status status;
  Words reasons;
};

std::vector<Case> cases() {
  const Words failed{"check-standard-failed"};
  return {
      {"reportable", identified(kWithin), 6, Status::Reportable, {}},
      {"estimated",
       identified(kBetween),
       5,
       Status::Estimated,
       {"below-quantitation-limit"}},
      {"above range",
       identified(kAbove),
       4,
       Status::AboveRange,
       {"above-range"}},
      {"quantitation limit beyond the range",
       identified(kBetweenAndAbove),
       4,
       Status::AboveRange,
       {"above-range", "below-quantitation-limit"}},
      {"below the critical value",
       critical(identified(kBelow)),
       3,
       Status::NotDetected,
       {"below-critical-value"}},
      {"below detection, seen",
       identified(kBelow),
       2,
       Status::NotDetected,
       {"below-detection-limit"}},
      {"below detection, unseen",
       unseen(kBelow),
       2,
       Status::NotDetected,
       {"below-detection-limit"}},
      {"detection limit beyond the range",
       identified(kBelowAndAbove),
       2,
       Status::NotDetected,
       {"above-range", "below-detection-limit"}},
      {"unseen at the threshold",
       unseen(kBetween),
       1,
       Status::Withheld,
       {"response-without-peak", "below-quantitation-limit"}},
      {"unseen within the range",
       unseen(kWithin),
       1,
       Status::Withheld,
       {"response-without-peak"}},
      {"unseen above the range",
       unseen(kAbove),
       1,
       Status::Withheld,
       {"response-without-peak", "above-range"}},
      {"no number",
       withheld({}, {"file-refused"}),
       0,
       Status::Withheld,
       {"file-refused"}},
      {"no number and no reason for it", {}, 0, Status::Withheld, {}},
      {"a failed check, otherwise reportable",
       withheld(identified(kWithin), failed), 0, Status::Withheld, failed},
      {"a failed check, otherwise estimated",
       withheld(identified(kBetween), failed),
       0,
       Status::Withheld,
       {"check-standard-failed", "below-quantitation-limit"}},
      {"a failed check, otherwise not detected",
       withheld(identified(kBelow), failed),
       0,
       Status::Withheld,
       {"check-standard-failed", "below-detection-limit"}},
      {"a failed check, otherwise above range",
       withheld(identified(kAbove), failed),
       0,
       Status::Withheld,
       {"check-standard-failed", "above-range"}},
      {"a failed check, no peak either",
       withheld(unseen(kWithin), failed),
       0,
       Status::Withheld,
       {"check-standard-failed", "response-without-peak"}},
  };
}

TEST(Verdict, EachRuleDecidesAsTheTableSays) {
  for (const Case& c : cases()) {
    const Verdict verdict = reach_verdict(c.facts);
    EXPECT_EQ(verdict.status, c.status) << c.name;
    EXPECT_EQ(verdict.reasons, c.reasons) << c.name;
  }
}

TEST(Verdict, EveryRuleHasACaseThatItDecides) {
  const std::vector<VerdictRule>& rules = verdict_rules();
  std::vector<int> decided(rules.size(), 0);
  for (const Case& c : cases()) {
    std::size_t first = 0;
    while (first < rules.size() && !rules[first].holds(c.facts)) ++first;
    EXPECT_EQ(first, c.rule) << c.name;
    ASSERT_LT(first, rules.size()) << c.name;
    ++decided[first];
  }
  for (std::size_t i = 0; i < rules.size(); ++i) {
    EXPECT_GT(decided[i], 0) << "no case for: " << rules[i].when;
  }
}

TEST(Verdict, CarefulWordsNeverChangeTheStatus) {
  const Words careful{"overlapped", "no-closing-check", "saturated",
                      "a-word-of-tomorrow"};
  for (const Case& c : cases()) {
    VerdictFacts facts = c.facts;
    facts.careful = careful;
    const Verdict verdict = reach_verdict(facts);
    EXPECT_EQ(verdict.status, c.status) << c.name;
    EXPECT_EQ(verdict.reasons.size(), c.reasons.size() + careful.size());
  }
}

TEST(Verdict, WhatWithholdsStandsBeforeAllElse) {
  VerdictFacts facts = identified(kBelow);
  facts.withholding = {"a-word-of-tomorrow"};
  facts.careful = {"overlapped", "saturated", "calibration-failed"};
  EXPECT_EQ(reach_verdict(facts).reasons,
            (Words{"a-word-of-tomorrow", "calibration-failed", "saturated",
                   "overlapped", "below-detection-limit"}));
}

TEST(Verdict, LettersOfTheTradeUnlessReplaced) {
  ReportingSettings settings;
  EXPECT_EQ(qualifier_letter(Status::NotDetected, settings), "U");
  EXPECT_EQ(qualifier_letter(Status::Estimated, settings), "J");
  EXPECT_EQ(qualifier_letter(Status::Reportable, settings), "");
  EXPECT_EQ(qualifier_letter(Status::AboveRange, settings), "E");
  EXPECT_EQ(qualifier_letter(Status::Withheld, settings), "R");
  settings.letters = {{"estimated", "T"}, {"reportable", "OK"}};
  EXPECT_EQ(qualifier_letter(Status::Estimated, settings), "T");
  EXPECT_EQ(qualifier_letter(Status::Reportable, settings), "OK");
  EXPECT_EQ(qualifier_letter(Status::Withheld, settings), "R");
}

TEST(Reasons, WordIsTakenFromTheHead) {
  EXPECT_EQ(reason_word("file-refused: a.mzML:3: cut off"), "file-refused");
  EXPECT_EQ(reason_word("no-signal"), "no-signal");
  EXPECT_EQ(reason_word("not measured"), "not-measured");
}

TEST(Reasons, MostSeriousFirstEachOnce) {
  EXPECT_EQ(
      most_serious_first({"below-quantitation-limit", "new-word", "overlapped",
                          "", "file-refused", "overlapped", "other-new-word"}),
      (Words{"file-refused", "overlapped", "new-word", "other-new-word",
             "below-quantitation-limit"}));
}

}  // namespace
}  // namespace loqsmith
