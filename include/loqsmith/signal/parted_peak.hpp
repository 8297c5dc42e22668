#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/signal/choose_apex.hpp"
#include "loqsmith/signal/fit_overlap.hpp"
#include "loqsmith/signal/learn.hpp"
#include "loqsmith/signal/place_window.hpp"
#include "loqsmith/signal/settings.hpp"
#include "loqsmith/signal/summits.hpp"

namespace loqsmith {

/// Peaks and a line fitted together to the points [first, last) of a stretch.
struct FittedStretch {
  OverlapFit fit;
  std::size_t first = 0;
  std::size_t last = 0;
};

/// A target taken out of its overlap otherwise than by a perpendicular drop.
struct PartedPeak {
  std::string overlap;  ///< "skim", "model"
  double apex = 0.0;    ///< the expected time of a peak not seen
  double area = 0.0;
  double height = 0.0;
  PlacedWindow window;               ///< its feet and baseline
  std::vector<double> area_weights;  ///< one a point of the stretch
  std::vector<double> height_weights;
  /// The stretch less the fitted neighbours, where there are any.
  std::optional<SmoothedStretch> alone;
  std::optional<FittedStretch> model;  ///< the target first
  std::vector<std::string> reasons;
};

/// What the settings ask for where a neighbour bounds the window.
///
/// @param apex     as placed; the expected time where no peak is seen
/// @param reasons  "model-not-converged" is added where the fit fails
/// @return nothing where the perpendicular drop stands: it is asked for, no
///         neighbour bounds the window, none is so much higher or lower that
///         it is skimmed, or the fit failed
std::optional<PartedPeak> part_overlap(const SmoothedStretch& stretch,
                                       const ChosenApex& chosen,
                                       const PlacedWindow& placed,
                                       const WindowTemplate& window,
                                       IntegrationSettings::Overlap overlap,
                                       double apex, double noise,
                                       std::vector<std::string>& reasons);

}  // namespace loqsmith
