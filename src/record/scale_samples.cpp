#include <algorithm>
#include <cmath>
#include <map>
#include <ostream>

#include "loqsmith/record/html.hpp"
#include "loqsmith/record/limits_scale.hpp"
#include "loqsmith/record/report_parts.hpp"

namespace loqsmith {
namespace {

constexpr double kMark = 9;
constexpr double kStep = 9;      ///< from one mark to the one on top of it
constexpr double kColumn = 1.4;  ///< percent: how near marks are piled up
constexpr int kMostHigh = 8;     ///< more than these are counted only

using Pile = std::vector<const ResultRow*>;

std::map<int, Pile> piles_of(const LimitsScale& scale) {
  std::map<int, Pile> piles;
  for (const ResultRow* row : scale.samples) {
    const double x = scale.axis.place(*row->vial_concentration);
    piles[static_cast<int>(std::floor(x / kColumn))].push_back(row);
  }
  return piles;
}

std::string words(const ResultRow& row) {
  return "injection " + std::to_string(row.injection) + ", " + row.sample +
         ": " + short_number(*row.vial_concentration) + " in the vial, " +
         status_words(row.status);
}

void draw_pile(std::ostream& out, const LimitsScale& scale, const Pile& pile,
               double floor) {
  int level = 0;
  for (const ResultRow* row : pile) {
    const double x = scale.axis.place(*row->vial_concentration);
    const double y = floor - kStep * level;
    if (++level > kMostHigh) {
      out << "<text class=\"small\" x=\"" << percent(x) << "\" y=\"" << px(y)
          << "\" text-anchor=\"middle\">+"
          << std::to_string(pile.size() - kMostHigh) << "</text>";
      return;
    }
    out << scale_mark("mark-" + status_name(row->status),
                      "sample " + status_name(row->status), x, y, kMark,
                      words(*row));
  }
}

}  // namespace

void scale_samples(std::ostream& out, const LimitsScale& scale) {
  const std::map<int, Pile> piles = piles_of(scale);
  std::size_t high = 1;
  for (const auto& [column, pile] : piles) {
    high = std::max(high, pile.size());
  }
  const auto levels = static_cast<double>(
      std::min(high, static_cast<std::size_t>(kMostHigh) + 1));
  const double height = kStep * levels + 12;
  out << "<div class=\"scale-row scale-others\"><div "
         "class=\"scale-name\"><span>samples";
  if (scale.samples_below > 0) {
    out << ", and " << std::to_string(scale.samples_below)
        << " near or below zero";
  }
  out << "</span></div><svg class=\"figure scale-strip\" height=\""
      << px(height) << "\" aria-hidden=\"true\">";
  for (const auto& [column, pile] : piles) {
    draw_pile(out, scale, pile, height - 10);
  }
  out << "</svg></div>\n";
}

}  // namespace loqsmith
