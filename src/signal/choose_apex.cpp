#include "loqsmith/signal/choose_apex.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/signal/integrate.hpp"

namespace loqsmith {
namespace {

struct Candidate {
  Summit summit;
  double height = 0.0;
  double deviation = 0.0;
};

// Width of the smoothed peak at half height, as far as the window goes.
double smoothed_width(const SmoothedStretch& stretch,
                      const PlacedWindow& window, double apex, double height,
                      double width_half) {
  const double step = 0.02 * width_half;
  const auto reach = [&](double direction) {
    double out = 0.0;
    for (;; out += step) {
      const double t = apex + direction * out;
      if (t < window.left.minutes || t > window.right.minutes) return out;
      if (smoothed_at(stretch, t) - window.baseline_at(t) <= 0.5 * height) {
        return out;
      }
    }
  };
  return reach(-1.0) + reach(1.0);
}

// A summit beside a dip: one foot stands in the dip, so that the baseline is
// too low. The signal rises again beyond that foot, and hardly falls on the
// other side of the summit.
bool is_beside_dip(const SmoothedStretch& stretch, const PlacedWindow& window,
                   const Candidate& candidate) {
  constexpr double kShare = 0.3;
  const double least = kShare * candidate.height;
  if (candidate.summit.prominence >= least) return false;
  const double length = window.right.minutes - window.left.minutes;
  const auto rises_beyond = [&](const Foot& foot, double direction) {
    const double beyond = foot.anchor_minutes + direction * length;
    return smoothed_at(stretch, beyond) - foot.anchor_signal > least;
  };
  return rises_beyond(window.left, -1.0) || rises_beyond(window.right, 1.0);
}

std::optional<Candidate> examine(const SmoothedStretch& stretch,
                                 const TargetSettings& target,
                                 const WindowTemplate& window,
                                 const std::vector<Summit>& neighbours,
                                 const Summit& summit,
                                 const NoiseModel& noise) {
  const Outcome<PlacedWindow> placed = place_window(
      stretch, neighbours,
      {summit.minutes, window.left_minutes, window.right_minutes,
       window.width_half_minutes, true, noise.standard_deviation()});
  if (!placed) return {};
  Candidate candidate{summit, 0.0, 0.0};
  candidate.height = summit.value - placed->baseline_at(summit.minutes);
  if (!(candidate.height > 0.0)) return {};
  const double threshold = target.integration.threshold;
  if (!(candidate.height >=
        threshold * least_smoothed_height_noise(stretch, *placed,
                                                summit.minutes, noise))) {
    return {};
  }
  candidate.deviation =
      smoothed_height_noise(stretch, *placed, summit.minutes, noise);
  if (!(candidate.height >= threshold * candidate.deviation)) return {};
  if (is_beside_dip(stretch, *placed, candidate)) return {};
  const double least = target.integration.minimum_width_minutes;
  if (least > 0.0 &&
      smoothed_width(stretch, *placed, summit.minutes, candidate.height,
                     window.width_half_minutes) < least) {
    return {};
  }
  return candidate;
}

// Two summits are two peaks only where the valley between them is deeper than
// noise digs; the lower one of an unparted pair is a ripple of the higher.
bool is_ripple(const SmoothedStretch& stretch, const Candidate& candidate,
               const std::vector<Candidate>& all, double multiple,
               double noise) {
  const double least = multiple * std::sqrt(2.0) * stretch.gain * noise;
  return std::any_of(all.begin(), all.end(), [&](const Candidate& other) {
    if (!(other.summit.value > candidate.summit.value)) return false;
    const double a = std::min(candidate.summit.minutes, other.summit.minutes);
    const double b = std::max(candidate.summit.minutes, other.summit.minutes);
    const double valley = smoothed_at(stretch, lowest_between(stretch, a, b));
    return candidate.summit.value - valley < least;
  });
}

bool has_both_feet(const SmoothedStretch& stretch, const WindowTemplate& window,
                   const std::vector<Summit>& neighbours, double apex,
                   double noise) {
  return static_cast<bool>(
      place_window(stretch, neighbours,
                   {apex, window.left_minutes, window.right_minutes,
                    window.width_half_minutes, true, noise}));
}

// A peak in the window, nearer to the expected time than `least`, that the end
// of the trace cuts.
bool is_nearest_cut(const SmoothedStretch& stretch,
                    const WindowTemplate& window,
                    const std::vector<Summit>& neighbours, double expected,
                    double least, double noise) {
  return std::any_of(neighbours.begin(), neighbours.end(),
                     [&](const Summit& summit) {
                       return std::abs(summit.minutes - expected) < least &&
                              !has_both_feet(stretch, window, neighbours,
                                             summit.minutes, noise);
                     });
}

}  // namespace

ChosenApex choose_apex(const SmoothedStretch& stretch,
                       const TargetSettings& target,
                       const WindowTemplate& window, double expected,
                       const NoiseModel& noise) {
  const double deviation = noise.standard_deviation();
  const double multiple = target.integration.threshold;
  const std::vector<Summit> summits = find_summits(stretch);
  ChosenApex chosen;
  chosen.neighbours = significant_summits(stretch, summits, multiple, deviation,
                                          window.width_half_minutes);
  std::vector<Candidate> candidates;
  for (const Summit& summit : summits) {
    if (std::abs(summit.minutes - expected) > target.window_minutes) continue;
    const auto candidate =
        examine(stretch, target, window, chosen.neighbours, summit, noise);
    if (candidate) candidates.push_back(*candidate);
  }
  const std::vector<Candidate> all = candidates;
  std::erase_if(candidates, [&](const Candidate& candidate) {
    return is_ripple(stretch, candidate, all, multiple, deviation);
  });
  if (candidates.empty()) {
    chosen.cut = is_nearest_cut(stretch, window, chosen.neighbours, expected,
                                target.window_minutes, deviation);
    return chosen;
  }
  if (candidates.size() > 1) chosen.reasons.emplace_back("several-peaks");
  const Candidate& nearest =
      *std::min_element(candidates.begin(), candidates.end(),
                        [&](const Candidate& a, const Candidate& b) {
                          return std::abs(a.summit.minutes - expected) <
                                 std::abs(b.summit.minutes - expected);
                        });
  chosen.cut =
      is_nearest_cut(stretch, window, chosen.neighbours, expected,
                     std::abs(nearest.summit.minutes - expected), deviation);
  chosen.minutes = nearest.summit.minutes;
  chosen.height = nearest.height;
  chosen.height_deviation = nearest.deviation;
  return chosen;
}

}  // namespace loqsmith
