#pragma once

#include <iosfwd>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "loqsmith/record/axis.hpp"

namespace loqsmith {

// Strokes of the report's figures. Colours come from the page's style by class
// alone, so that a figure follows light, dark and print.

/// Opens a figure of the given size with a text for those who do not see it.
void svg_begin(std::ostream& out, double width, double height,
               std::string_view description);
void svg_end(std::ostream& out);

void svg_line(std::ostream& out, std::string_view css, double x1, double y1,
              double x2, double y2);
void svg_rect(std::ostream& out, std::string_view css, double x, double y,
              double width, double height);
void svg_circle(std::ostream& out, std::string_view css, double x, double y,
                double radius);
/// A diagonal cross, a diamond: marks of half width `size`.
void svg_cross(std::ostream& out, std::string_view css, double x, double y,
               double size);
void svg_diamond(std::ostream& out, std::string_view css, double x, double y,
                 double size);
void svg_polyline(std::ostream& out, std::string_view css,
                  const std::vector<std::pair<double, double>>& points);

void svg_polygon(std::ostream& out, std::string_view css,
                 const std::vector<std::pair<double, double>>& points);

/// @param anchor  "start", "middle", "end"; the text is escaped here
void svg_text(std::ostream& out, std::string_view css, double x, double y,
              std::string_view anchor, std::string_view text);

/// A sample of a stroke or an area with its meaning, for legends in text.
void svg_swatch(std::ostream& out, std::string_view css,
                std::string_view meaning);
void svg_swatch_area(std::ostream& out, std::string_view css,
                     std::string_view meaning);
/// One of the page's marks (kReportMarks).
void svg_swatch_mark(std::ostream& out, std::string_view shape,
                     std::string_view css, std::string_view meaning);

/// The axis along the bottom at height y, with strokes, labels and title; grid
/// lines up to `top`.
void svg_bottom_axis(std::ostream& out, const Axis& axis, double y, double top,
                     std::string_view title);
/// The axis along the left at x with grid lines to `right`; its title stands
/// above it.
void svg_left_axis(std::ostream& out, const Axis& axis, double x, double right,
                   std::string_view title);

}  // namespace loqsmith
