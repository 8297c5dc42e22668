#include "loqsmith/judgement/reasons.hpp"

#include <algorithm>
#include <array>
#include <cstddef>

namespace loqsmith {
namespace {

// Most serious first. First why there is no number, then why the number may
// not be used, then why to be careful with it.
constexpr auto kDoubtful = std::to_array<std::string_view>({
    "peak-not-found",
    "invalid-injection",
    "file-refused",
    "trace-missing",
    "not-learned",
    "mixed-units",
    "window-not-covered",
    "peak-cut",
    "too-few-points",
    "no-signal",
    "not-measured",
    "internal-standard-missing",
    "no-calibration",
    "no-sample-response",
    "few-additions",
    "slope-not-positive",
    "no-fit",
    "no-concentration",
    "no-accepted-level",
    "no-valid-limit",
    "calibration-failed",
    "check-standard-failed",
    "second-source-failed",
    "control-failed",
    "surrogate-failed",
    "fortified-failed",
    "duplicate-failed",
    "internal-standard-failed",
    "second-trace-failed",
    "method-blank-failed",
    "solvent-blank-failed",
    "carry-over-failed",
    "retention-time-failed",
    "suitability-failed",
    "established-limit-failed",
    "confirmation-failed",
    "dilutions-disagree",
    "response-without-peak",
    "status-overridden",
    "override-not-possible",
    "amended-unsigned",
    "saturated",
    "internal-standard-saturated",
    "above-range",
    "beyond-curve",
    "beyond-additions",
    "slope-uncertain",
    "no-closing-check",
    "brackets-differ",
    "no-opening-standards",
    "no-closing-standards",
    "excluded-by-amendment",
    "manual-bounds",
    "window-cut-short",
    "several-peaks",
    "overlapped",
    "internal-standard-overlapped",
    "model-not-converged",
    "model-misfit",
    "model-shape-assumed",
    "shape-differs",
    "template-not-fitted",
    "spike",
    "gap-in-time",
    "negative-peak",
    "few-points",
    "weak-template",
    "baseline-unsettled",
    "baseline-at-valley",
    "baseline-one-sided",
    "baseline-shortened",
    "mean-internal-standard",
    "flat-signal",
    "no-noise",
    "noise-zero",
    "noise-from-same-trace",
    "noise-stretch-short",
});

// They say nothing against the number, only which status it has.
constexpr std::array<std::string_view, 3> kExplaining{
    "below-detection-limit",
    "below-critical-value",
    "below-quantitation-limit",
};

std::size_t rank(const std::string& word) {
  const auto* doubtful = std::find(kDoubtful.begin(), kDoubtful.end(), word);
  if (doubtful != kDoubtful.end()) {
    return static_cast<std::size_t>(doubtful - kDoubtful.begin());
  }
  const auto* explaining =
      std::find(kExplaining.begin(), kExplaining.end(), word);
  const auto behind =
      static_cast<std::size_t>(explaining - kExplaining.begin());
  return explaining == kExplaining.end() ? kDoubtful.size()
                                         : kDoubtful.size() + 1 + behind;
}

}  // namespace

std::string reason_word(std::string_view reason) {
  std::string word(reason.substr(0, reason.find(':')));
  std::replace(word.begin(), word.end(), ' ', '-');
  return word;
}

std::vector<std::string> most_serious_first(std::vector<std::string> words) {
  std::stable_sort(words.begin(), words.end(),
                   [](const std::string& a, const std::string& b) {
                     return rank(a) < rank(b);
                   });
  return without_repetition(std::move(words));
}

std::vector<std::string> without_repetition(std::vector<std::string> words) {
  std::vector<std::string> once;
  for (std::string& word : words) {
    if (word.empty()) continue;
    if (std::find(once.begin(), once.end(), word) == once.end()) {
      once.push_back(std::move(word));
    }
  }
  return once;
}

}  // namespace loqsmith
