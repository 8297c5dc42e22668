#include "loqsmith/signal/parted_peak.hpp"

#include "loqsmith/signal/model_overlap.hpp"
#include "loqsmith/signal/skim.hpp"

namespace loqsmith {

std::optional<PartedPeak> part_overlap(const SmoothedStretch& stretch,
                                       const ChosenApex& chosen,
                                       const PlacedWindow& placed,
                                       const WindowTemplate& window,
                                       IntegrationSettings::Overlap overlap,
                                       double apex, double noise,
                                       std::vector<std::string>& reasons) {
  if (!placed.left.dropped && !placed.right.dropped) return {};
  switch (overlap) {
    case IntegrationSettings::Overlap::Drop:
      return {};
    case IntegrationSettings::Overlap::Skim:
      return skim_overlap(
          stretch, chosen.neighbours, placed,
          {apex, window.left_minutes, window.right_minutes,
           window.width_half_minutes, chosen.minutes.has_value(), noise});
    case IntegrationSettings::Overlap::Model: {
      Outcome<PartedPeak> peak =
          model_overlap(stretch, chosen, placed, window, apex, noise);
      if (peak) return std::move(peak.value());
      reasons.emplace_back("model-not-converged");
      return {};
    }
  }
  return {};
}

}  // namespace loqsmith
