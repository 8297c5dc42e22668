#include "loqsmith/signal/own_feet.hpp"

#include <algorithm>

namespace loqsmith {
namespace {

constexpr double kFirstWidths = 3.0;
constexpr double kRelativeFloor = 0.001;
constexpr double kStillFalling = 0.1;

// One peak at work.
class Walker {
 public:
  Walker(const SmoothedStretch& stretch, const std::vector<Summit>& summits,
         double apex, double width_half, double noise)
      : stretch_(stretch),
        summits_(summits),
        apex_(apex),
        width_half_(width_half),
        noise_(noise) {}

  Outcome<PlacedWindow> place(double left, double right) const {
    // A straight line also where a baseline has been taken off: what that left
    // below the noise must not keep the signal above the level of a foot.
    return place_window(stretch_, summits_,
                        {apex_, left, right, width_half_, true, noise_});
  }

  // The longest first window that leaves room for a baseline.
  double first_reach(bool left) const {
    const double room = left ? apex_ - stretch_.minutes.front()
                             : stretch_.minutes.back() - apex_;
    return std::min(kFirstWidths * width_half_, room - 0.5 * width_half_);
  }

  // Distance of the foot on one side; the placed window holds the valley.
  double foot(const PlacedWindow& window, bool left) const {
    const double height =
        smoothed_at(stretch_, apex_) - window.baseline_at(apex_);
    const double level =
        std::max(stretch_.gain * noise_, kRelativeFloor * height);
    const double end =
        left ? apex_ - window.left.minutes : window.right.minutes - apex_;
    const double step = 0.02 * width_half_;
    double out = 0.5 * width_half_;
    for (; out < end; out += step) {
      const double here = above(window, out, left);
      if (here <= level) return refine(window, out, step, level, left);
      const double before = above(window, out - 0.5 * width_half_, left);
      if (here < kStillFalling * height && before - here < level) return out;
    }
    return end;
  }

 private:
  double above(const PlacedWindow& window, double out, bool left) const {
    const double t = left ? apex_ - out : apex_ + out;
    return smoothed_at(stretch_, t) - window.baseline_at(t);
  }

  // Where the level was crossed between the last two looks.
  double refine(const PlacedWindow& window, double out, double step,
                double level, bool left) const {
    const double here = above(window, out, left);
    const double before = above(window, out - step, left);
    if (!(before > here)) return out;
    const double share = (before - level) / (before - here);
    return out - step + std::clamp(share, 0.0, 1.0) * step;
  }

  const SmoothedStretch& stretch_;
  const std::vector<Summit>& summits_;
  double apex_;
  double width_half_;
  double noise_;
};

}  // namespace

Outcome<PlacedWindow> place_at_own_feet(const SmoothedStretch& stretch,
                                        const std::vector<Summit>& summits,
                                        double apex, double width_half,
                                        double noise) {
  const Walker walker(stretch, summits, apex, width_half, noise);
  Outcome<PlacedWindow> window =
      walker.place(walker.first_reach(true), walker.first_reach(false));
  for (int round = 0; round < 2 && window; ++round) {
    window =
        walker.place(walker.foot(*window, true), walker.foot(*window, false));
  }
  return window;
}

}  // namespace loqsmith
