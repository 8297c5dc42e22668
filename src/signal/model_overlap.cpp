#include "loqsmith/signal/model_overlap.hpp"

#include <algorithm>
#include <cmath>
#include <span>
#include <utility>

#include "loqsmith/signal/point_noise.hpp"

namespace loqsmith {
namespace {

using Shape = EmgGuess::Shape;

constexpr double kTellingHeight = 50.0;
constexpr double kTellingValley = 0.5;
constexpr double kGaussianWidth = 2.354820045030949;  // in sigma
constexpr double kFarthestWidths = 1.0;
constexpr double kMostWider = 3.0;
constexpr double kMisfit = 3.0;
constexpr double kFootShare = 0.001;

// What the template says, or a Gaussian of its width.
struct KnownShape {
  double sigma = 0.0;
  double tau = 0.0;
};

struct Points {
  std::size_t first = 0;
  std::size_t last = 0;  // one beyond
};

// From the points that hold the baseline on one side to those on the other;
// to the end of the stretch where a side has none.
Points points_of_fit(const SmoothedStretch& stretch,
                     const PlacedWindow& placed) {
  Points points{0, stretch.minutes.size()};
  if (placed.left.points() > 0) points.first = placed.left.first;
  if (placed.right.points() > 0) points.last = placed.right.last;
  return points;
}

class Overlap {
 public:
  Overlap(const SmoothedStretch& stretch, const PlacedWindow& placed,
          double apex, bool found, double width_half, double noise)
      : stretch_(stretch),
        placed_(placed),
        apex_(apex),
        found_(found),
        width_half_(width_half),
        points_(points_of_fit(stretch, placed)) {
    noise_ = std::max(noise, point_to_point_noise(signal()));
  }

  std::span<const double> minutes() const {
    return std::span(stretch_.minutes)
        .subspan(points_.first, points_.last - points_.first);
  }
  std::span<const double> signal() const {
    return std::span(stretch_.signal)
        .subspan(points_.first, points_.last - points_.first);
  }
  const Points& points() const { return points_; }
  double noise() const { return noise_; }

  // The target first, then its neighbours.
  std::vector<EmgGuess> guesses(const std::vector<Summit>& neighbours,
                                const KnownShape& known, bool teaching) const {
    const std::vector<double> others = within(neighbours);
    std::vector<double> all = others;
    if (found_) all.push_back(apex_);
    std::sort(all.begin(), all.end());
    const auto shape = [&](double apex) {
      if (tells(all, apex)) return Shape::Own;
      return teaching ? Shape::AsFirst : Shape::Given;
    };
    EmgGuess target{apex_, known.sigma, known.tau, found_, Shape::Given};
    if (found_) target.shape = teaching ? Shape::Own : shape(apex_);
    std::vector<EmgGuess> guesses{target};
    for (const double other : others) {
      guesses.push_back({other, known.sigma, known.tau, true, shape(other)});
    }
    return guesses;
  }

  bool sound(const OverlapFit& fit, const std::vector<EmgGuess>& guesses,
             const KnownShape& known) const {
    for (std::size_t k = 0; k < fit.peaks.size(); ++k) {
      const FittedEmg& peak = fit.peaks[k];
      if ((k > 0 || found_) && !(peak.area > 0.0)) return false;
      if (!(std::abs(peak.apex() - guesses[k].apex_minutes) <=
            kFarthestWidths * width_half_)) {
        return false;
      }
      const double wider = spread(peak.shape.sigma, peak.shape.tau) /
                           spread(known.sigma, known.tau);
      if (!(wider <= kMostWider && wider >= 1.0 / kMostWider)) return false;
    }
    return true;
  }

 private:
  static double spread(double sigma, double tau) {
    return std::hypot(sigma, tau);
  }

  std::vector<double> within(const std::vector<Summit>& neighbours) const {
    const double least = (found_ ? 0.5 : 0.75) * width_half_;
    std::vector<double> apexes;
    for (const Summit& summit : neighbours) {
      if (std::abs(summit.minutes - apex_) > least &&
          summit.minutes > minutes().front() &&
          summit.minutes < minutes().back()) {
        apexes.push_back(summit.minutes);
      }
    }
    return apexes;
  }

  double above(double at) const {
    return smoothed_at(stretch_, at) - placed_.baseline_at(at);
  }

  // Whether a peak is high enough and stands clear enough of those beside it.
  bool tells(const std::vector<double>& all, double apex) const {
    const double height = above(apex);
    if (!(height >= kTellingHeight * noise_)) return false;
    return std::all_of(all.begin(), all.end(), [&](double other) {
      if (other == apex) return true;
      const double valley = lowest_between(stretch_, std::min(apex, other),
                                           std::max(apex, other));
      return above(valley) <= kTellingValley * height;
    });
  }

  const SmoothedStretch& stretch_;
  const PlacedWindow& placed_;
  double apex_;
  bool found_;
  double width_half_;
  Points points_;
  double noise_ = 0.0;
};

// The stretch as it would be without the neighbours.
SmoothedStretch without_neighbours(const SmoothedStretch& stretch,
                                   const OverlapFit& fit) {
  SmoothedStretch alone = stretch;
  for (std::size_t i = 0; i < alone.minutes.size(); ++i) {
    for (std::size_t k = 1; k < fit.peaks.size(); ++k) {
      const double neighbour = fit.peaks[k].signal_at(alone.minutes[i]);
      alone.signal[i] -= neighbour;
      alone.smoothed[i] -= neighbour;
    }
  }
  return alone;
}

Foot fitted_foot(const OverlapFit& fit, const Foot& placed, double minutes) {
  Foot foot;
  foot.minutes = minutes;
  foot.dropped = placed.dropped;
  foot.crowded = placed.crowded;
  foot.anchor_minutes = minutes;
  foot.anchor_signal = fit.baseline_at(minutes);
  return foot;
}

PartedPeak modelled(const SmoothedStretch& stretch, const PlacedWindow& placed,
                    const Points& points, const OverlapFit& fit,
                    const AreaWindow& window) {
  const FittedEmg& target = fit.peaks.front();
  PartedPeak peak;
  peak.overlap = "model";
  peak.apex = target.apex();
  peak.area = fitted_area(target, window);
  peak.height = target.signal_at(peak.apex);
  peak.alone = without_neighbours(stretch, fit);
  peak.window.left = fitted_foot(fit, placed.left, peak.apex - window.left);
  peak.window.right = fitted_foot(fit, placed.right, peak.apex + window.right);
  peak.area_weights.assign(stretch.minutes.size(), 0.0);
  std::copy(
      fit.area_weights.begin(), fit.area_weights.end(),
      peak.area_weights.begin() + static_cast<std::ptrdiff_t>(points.first));
  // Of a held shape the height is the area times a constant; of a free one
  // nearly so.
  const FittedEmg unit{target.shape, 1.0};
  const double factor = unit.signal_at(peak.apex) / fitted_area(unit, window);
  for (const double weight : peak.area_weights) {
    peak.height_weights.push_back(factor * weight);
  }
  return peak;
}

}  // namespace

Outcome<PartedPeak> model_overlap(const SmoothedStretch& stretch,
                                  const ChosenApex& chosen,
                                  const PlacedWindow& placed,
                                  const WindowTemplate& window, double expected,
                                  double noise) {
  KnownShape known{window.sigma_minutes, window.tau_minutes};
  const bool assumed = !(known.sigma > 0.0);
  if (assumed) known = {window.width_half_minutes / kGaussianWidth, 0.0};
  const bool found = chosen.minutes.has_value();
  const Overlap overlap(stretch, placed, chosen.minutes.value_or(expected),
                        found, window.width_half_minutes, noise);
  const std::vector<EmgGuess> guesses =
      overlap.guesses(chosen.neighbours, known, false);
  const AreaWindow area{window.left_minutes, window.right_minutes};
  Outcome<OverlapFit> fit = fit_overlap(overlap.minutes(), overlap.signal(),
                                        guesses, area,
                                        window.width_half_minutes);
  if (!fit) return NotApplicable{fit.reason()};
  if (!overlap.sound(*fit, guesses, known)) {
    return NotApplicable{"model-not-converged: the fit ran away"};
  }
  PartedPeak peak = modelled(stretch, placed, overlap.points(), *fit, area);
  const bool given = std::any_of(
      guesses.begin(), guesses.end(),
      [](const EmgGuess& one) { return one.shape == Shape::Given; });
  if (assumed && given) peak.reasons.emplace_back("model-shape-assumed");
  if (fit->residual_deviation > kMisfit * overlap.noise()) {
    peak.reasons.emplace_back("model-misfit");
  }
  peak.model = {std::move(fit.value()), overlap.points().first,
                overlap.points().last};
  return peak;
}

Outcome<TaughtShape> teach_shape(const SmoothedStretch& stretch,
                                 const std::vector<Summit>& neighbours,
                                 const PlacedWindow& placed, double apex,
                                 double width_half, double noise) {
  const KnownShape known{width_half / kGaussianWidth, 0.1 * width_half};
  const Overlap overlap(stretch, placed, apex, true, width_half, noise);
  const std::vector<EmgGuess> guesses =
      overlap.guesses(neighbours, known, true);
  const Outcome<OverlapFit> fit =
      fit_overlap(overlap.minutes(), overlap.signal(), guesses,
                  {width_half, width_half}, width_half);
  if (!fit) return NotApplicable{fit.reason()};
  if (!overlap.sound(*fit, guesses, known)) {
    return NotApplicable{"model-not-converged: the fit ran away"};
  }
  const EmgShape& shape = fit->peaks.front().shape;
  const double top = emg_apex(shape);
  const double width =
      emg_fallen_to(shape, 0.5, false) - emg_fallen_to(shape, 0.5, true);
  return TaughtShape{shape.sigma, shape.tau, width,
                     top - emg_fallen_to(shape, kFootShare, true),
                     emg_fallen_to(shape, kFootShare, false) - top};
}

}  // namespace loqsmith
