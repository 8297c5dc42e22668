#include <algorithm>
#include <ostream>
#include <vector>

#include "loqsmith/record/figures.hpp"
#include "loqsmith/record/html.hpp"
#include "loqsmith/record/report_parts.hpp"
#include "loqsmith/record/svg.hpp"

namespace loqsmith {
namespace {

using Curves = std::vector<const FigureCurve*>;

Curves curves_of(const PublishedRun& run, const std::string& analyte) {
  Curves curves;
  for (const FigureCurve& curve : run.curves) {
    if (curve.analyte == analyte && curve.curve.minutes.size() > 1) {
      curves.push_back(&curve);
    }
  }
  return curves;
}

// One height of the signal axis for all, so that a blank's noise is seen at
// the size it has beside a low peak; given up where that would flatten one.
double shared_span(const Curves& curves) {
  double least = signal_span(curves.front()->curve);
  double most = least;
  for (const FigureCurve* curve : curves) {
    least = std::min(least, signal_span(curve->curve));
    most = std::max(most, signal_span(curve->curve));
  }
  return most > 25.0 * least ? 0.0 : most;
}

bool any(const Curves& curves, auto&& condition) {
  return std::any_of(
      curves.begin(), curves.end(),
      [&](const FigureCurve* figure) { return condition(figure->curve); });
}

// What the strokes of these figures mean; only those that are there.
void legend(std::ostream& out, const Curves& curves) {
  out << "<p class=\"reading\">";
  svg_swatch(out, "trace", "signal");
  if (any(curves, [](const PeakCurve& c) { return !c.smoothed.empty(); })) {
    svg_swatch(out, "smoothed", "smoothed, only to find peaks");
  }
  svg_swatch(out, "baseline", "baseline between the feet of the shaded window");
  if (any(curves, [](const PeakCurve& c) { return !c.feet.empty(); })) {
    svg_swatch(out, "foot", "points whose mean holds it");
  }
  if (any(curves, [](const PeakCurve& c) {
        return c.fit == PeakCurve::Fit::Template;
      })) {
    svg_swatch(out, "fitted", "template, scaled");
  }
  if (any(curves,
          [](const PeakCurve& c) { return c.fit == PeakCurve::Fit::Model; })) {
    svg_swatch(out, "fitted", "model of all peaks");
    svg_swatch(out, "part", "each peak alone");
  }
  if (any(curves, [](const PeakCurve& c) { return !c.noise.source.empty(); })) {
    svg_swatch_area(out, "noise", "noise: h largest minus smallest, or sd");
  }
  out << "</p>\n";
}

std::string fit_words(const PeakCurve& curve) {
  const std::string below =
      curve.noise.source.empty()
          ? " Below: what it leaves."
          : " Below: what it leaves; shaded, two standard deviations of the "
            "noise to either side.";
  switch (curve.fit) {
    case PeakCurve::Fit::None:
      return {};
    case PeakCurve::Fit::Template:
      return (curve.fit_stands
                  ? " The response is the template's."
                  : " <b>The template does not fit</b>: the area stands in "
                    "for it.") +
             below;
    case PeakCurve::Fit::Model:
      return " The response is the model's." + below;
  }
  return {};
}

std::string response_words(const Peak& peak) {
  std::string words =
      "area " + html_number(peak.area) + ", height " + html_number(peak.height);
  if (peak.template_response) {
    words += ", template response " + html_number(*peak.template_response);
  }
  if (peak.signal_to_noise) {
    words += ", S/N " + html_number(*peak.signal_to_noise, 3);
  }
  return words + (peak.found ? "." : "; no peak seen.");
}

void trace_figure(std::ostream& out, const FigureCurve& curve, double span) {
  out << "<figure>\n";
  figure_trace(out, curve, span);
  out << "<figcaption>Injection " << std::to_string(curve.injection) << ", "
      << html_text(curve.caption) << ": " << response_words(curve.peak)
      << fit_words(curve.curve) << "</figcaption>\n</figure>\n";
}

}  // namespace

void report_traces(std::ostream& out, const PublishedRun& run,
                   const std::string& analyte) {
  const Curves curves = curves_of(run, analyte);
  if (curves.empty()) return;
  const double span = shared_span(curves);
  out << "<h3>Traces</h3>\n";
  legend(out, curves);
  out << "<div class=\"figures\">\n";
  for (const FigureCurve* curve : curves) trace_figure(out, *curve, span);
  out << "</div>\n";
}

void report_template(std::ostream& out, const PublishedRun& run,
                     const std::string& analyte) {
  for (const TargetRecord& record : run.targets) {
    if (record.target != analyte || !record.window) continue;
    const TemplateShape& shape = record.window->shape;
    if (shape.empty()) continue;
    out << "<h3>Template</h3>\n<div class=\"figures\">\n<figure>\n";
    figure_shape(out, analyte, shape);
    out << "<figcaption>Mean shape of " << std::to_string(shape.lessons)
        << (shape.lessons == 1 ? " peak" : " peaks")
        << " of standards, brought to one apex and to unit area; they differ "
           "from it by "
        << html_number(100.0 * shape.scatter, 2)
        << " % of it beyond their noise.</figcaption>\n</figure>\n</div>\n";
  }
}

}  // namespace loqsmith
