#include "loqsmith/signal/trace_at_hand.hpp"

#include "loqsmith/signal/point_noise.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

constexpr double kMarginWidths = 10.0;

}  // namespace

Trace surroundings(const Trace& trace, const TargetSettings& target,
                   const WindowTemplate& window, double expected) {
  const double margin =
      target.window_minutes + kMarginWidths * window.width_half_minutes;
  return cut_trace(trace, expected - 2.0 * window.left_minutes - margin,
                   expected + 2.0 * window.right_minutes + margin);
}

NoiseModel noise_of_this_trace(const Trace& near,
                               const Outcome<NoiseEstimate>& noise) {
  if (!noise) return white_noise(point_to_point_noise(near.signal));
  const double known = noise->model.point_to_point();
  if (is_surely_quieter(near.signal, known)) return noise->model;
  const double own = point_to_point_noise(near.signal);
  if (own <= known) return noise->model;
  return known > 0.0 ? noise->model.scaled(own / known) : white_noise(own);
}

NoiseModel colour_of_noise(const Outcome<NoiseEstimate>& noise,
                           const NoiseModel& here) {
  if (!noise || !noise->whole) return here;
  const double known = noise->whole->point_to_point();
  const double seen = here.point_to_point();
  if (!(seen > known) || !(known > 0.0)) return *noise->whole;
  return noise->whole->scaled(seen / known);
}

}  // namespace loqsmith
