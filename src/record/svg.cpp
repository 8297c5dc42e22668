#include "loqsmith/record/svg.hpp"

#include <ostream>

#include "loqsmith/record/html.hpp"

namespace loqsmith {

void svg_begin(std::ostream& out, double width, double height,
               std::string_view description) {
  out << "<svg class=\"figure\" viewBox=\"0 0 " << px(width) << ' '
      << px(height) << "\" role=\"img\" aria-label=\"" << html_text(description)
      << "\">\n";
}

void svg_end(std::ostream& out) { out << "</svg>\n"; }

void svg_line(std::ostream& out, std::string_view css, double x1, double y1,
              double x2, double y2) {
  out << "<line class=\"" << css << "\" x1=\"" << px(x1) << "\" y1=\"" << px(y1)
      << "\" x2=\"" << px(x2) << "\" y2=\"" << px(y2) << "\"/>\n";
}

void svg_rect(std::ostream& out, std::string_view css, double x, double y,
              double width, double height) {
  out << "<rect class=\"" << css << "\" x=\"" << px(x) << "\" y=\"" << px(y)
      << "\" width=\"" << px(width) << "\" height=\"" << px(height) << "\"/>\n";
}

void svg_circle(std::ostream& out, std::string_view css, double x, double y,
                double radius) {
  out << "<circle class=\"" << css << "\" cx=\"" << px(x) << "\" cy=\"" << px(y)
      << "\" r=\"" << px(radius) << "\"/>\n";
}

void svg_cross(std::ostream& out, std::string_view css, double x, double y,
               double size) {
  out << "<path class=\"" << css << "\" d=\"M" << px(x - size) << ' '
      << px(y - size) << 'L' << px(x + size) << ' ' << px(y + size) << 'M'
      << px(x - size) << ' ' << px(y + size) << 'L' << px(x + size) << ' '
      << px(y - size) << "\"/>\n";
}

void svg_diamond(std::ostream& out, std::string_view css, double x, double y,
                 double size) {
  out << "<path class=\"" << css << "\" d=\"M" << px(x - size) << ' ' << px(y)
      << 'L' << px(x) << ' ' << px(y - size) << 'L' << px(x + size) << ' '
      << px(y) << 'L' << px(x) << ' ' << px(y + size) << "Z\"/>\n";
}

void svg_polyline(std::ostream& out, std::string_view css,
                  const std::vector<std::pair<double, double>>& points) {
  out << "<polyline class=\"" << css << "\" points=\"";
  bool first = true;
  for (const auto& [x, y] : points) {
    if (!first) out << ' ';
    first = false;
    out << px(x) << ',' << px(y);
  }
  out << "\"/>\n";
}

void svg_polygon(std::ostream& out, std::string_view css,
                 const std::vector<std::pair<double, double>>& points) {
  out << "<polygon class=\"" << css << "\" points=\"";
  for (const auto& [x, y] : points) out << px(x) << ',' << px(y) << ' ';
  out << "\"/>\n";
}

void svg_text(std::ostream& out, std::string_view css, double x, double y,
              std::string_view anchor, std::string_view text) {
  out << "<text class=\"" << css << "\" x=\"" << px(x) << "\" y=\"" << px(y)
      << "\" text-anchor=\"" << anchor << "\">" << html_text(text)
      << "</text>\n";
}

void svg_swatch(std::ostream& out, std::string_view css,
                std::string_view meaning) {
  out << "<span class=\"meaning\"><svg class=\"figure swatch\" viewBox=\"0 0 "
         "26 12\" aria-hidden=\"true\">";
  svg_line(out, css, 1, 6, 25, 6);
  out << "</svg>" << html_text(meaning) << "</span> ";
}

void svg_swatch_area(std::ostream& out, std::string_view css,
                     std::string_view meaning) {
  out << "<span class=\"meaning\"><svg class=\"figure swatch\" viewBox=\"0 0 "
         "26 12\" aria-hidden=\"true\">";
  svg_rect(out, css, 1, 1, 24, 10);
  out << "</svg>" << html_text(meaning) << "</span> ";
}

void svg_swatch_mark(std::ostream& out, std::string_view shape,
                     std::string_view css, std::string_view meaning) {
  out << "<span class=\"meaning\"><svg class=\"figure swatch scale-strip\" "
         "viewBox=\"0 0 26 12\" aria-hidden=\"true\"><use href=\"#"
      << shape << "\" class=\"" << css
      << "\" x=\"7\" y=\"0\" width=\"12\" height=\"12\"/></svg>"
      << html_text(meaning) << "</span> ";
}

void svg_bottom_axis(std::ostream& out, const Axis& axis, double y, double top,
                     std::string_view title) {
  for (std::size_t i = 0; i < axis.ticks.size(); ++i) {
    const double x = axis.place(axis.ticks[i]);
    svg_line(out, "grid", x, y, x, top);
    svg_line(out, "axis", x, y, x, y + 5);
    svg_text(out, "tick", x, y + 18, "middle", axis.labels[i]);
  }
  for (const double tick : axis.minor_ticks) {
    const double x = axis.place(tick);
    svg_line(out, "axis", x, y, x, y + 3);
  }
  svg_line(out, "axis", axis.from, y, axis.to, y);
  svg_text(out, "title", axis.to, y + 34, "end", title);
}

void svg_left_axis(std::ostream& out, const Axis& axis, double x, double right,
                   std::string_view title) {
  for (std::size_t i = 0; i < axis.ticks.size(); ++i) {
    const double y = axis.place(axis.ticks[i]);
    svg_line(out, "grid", x, y, right, y);
    svg_line(out, "axis", x - 4, y, x, y);
    svg_text(out, "tick", x - 7, y + 4, "end", axis.labels[i]);
  }
  svg_line(out, "axis", x, axis.from, x, axis.to);
  svg_text(out, "title", x - 40, axis.to - 10, "start", title);
}

}  // namespace loqsmith
