#include "loqsmith/signal/manual_bounds.hpp"

#include "loqsmith/signal/estimated_baseline.hpp"

namespace loqsmith {

TargetSettings between_bounds(TargetSettings target,
                              const ManualBounds& bounds) {
  using S = IntegrationSettings;
  target.window_minutes = 0.5 * (bounds.end_minutes - bounds.start_minutes);
  target.integration.bounds = S::Bounds::Template;
  target.integration.overlap = S::Overlap::Drop;
  if (target.integration.response == S::Response::Template) {
    target.integration.response = S::Response::Area;
  }
  return target;
}

Outcome<PlacedWindow> place_by_hand(const SmoothedStretch& stretch,
                                    const ManualBounds& bounds,
                                    double width_half, double noise) {
  const double half = 0.5 * (bounds.end_minutes - bounds.start_minutes);
  Outcome<PlacedWindow> placed = place_window_above(
      stretch, {}, {bounds.middle(), half, half, width_half, true, noise});
  if (!placed) return placed;
  placed.value().left.minutes = bounds.start_minutes;
  placed.value().right.minutes = bounds.end_minutes;
  return placed;
}

}  // namespace loqsmith
