#include "loqsmith/signal/template_shape.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/signal/summits.hpp"

namespace loqsmith {
namespace {

constexpr double kGridPerStep = 4.0;
constexpr double kMostGridPoints = 4000.0;
constexpr double kEqualPrecision = 0.01;

using Values = std::vector<double>;

// The cubic through the four points around a place (fewer where there are no
// more), in Lagrange's form.
double cubic_at(const Values& x, const Values& y, double at) {
  const std::size_t n = x.size();
  const std::size_t used = std::min<std::size_t>(4, n);
  const auto next = static_cast<std::size_t>(
      std::upper_bound(x.begin(), x.end(), at) - x.begin());
  const std::size_t first = std::min(next < 2 ? 0 : next - 2, n - used);
  double sum = 0.0;
  for (std::size_t i = first; i < first + used; ++i) {
    double factor = 1.0;
    for (std::size_t j = first; j < first + used; ++j) {
      if (j != i) factor *= (at - x[j]) / (x[i] - x[j]);
    }
    sum += factor * y[i];
  }
  return sum;
}

double trapezoids(const Values& values, double step) {
  double sum = -0.5 * (values.front() + values.back());
  for (const double value : values) sum += value;
  return sum * step;
}

double energy(const Values& values, double step) {
  double sum = 0.0;
  for (const double value : values) sum += value * value;
  return sum * step;
}

// A lesson on the grid, of unit area.
struct Sampled {
  Values values;
  double noise = 0.0;   // of a point, per minute
  double weight = 0.0;  // not yet of unit sum
};

class Grid {
 public:
  Grid(const std::vector<ShapeLesson>& lessons, double left, double right)
      : left_(left) {
    const double wanted =
        typical_step(lessons.front().slice.offsets) / kGridPerStep;
    const double steps =
        std::clamp(std::ceil((left + right) / wanted), 8.0, kMostGridPoints);
    points_ = static_cast<std::size_t>(steps) + 1;
    step_ = (left + right) / steps;
  }

  double step() const { return step_; }
  std::size_t points() const { return points_; }

  Outcome<Sampled> sample(const ShapeLesson& lesson) const {
    Sampled sampled;
    const PeakSlice& slice = lesson.slice;
    for (std::size_t k = 0; k < points_; ++k) {
      const double at = -left_ + static_cast<double>(k) * step_;
      const bool inside =
          at >= -lesson.left_minutes && at <= lesson.right_minutes;
      sampled.values.push_back(
          inside ? cubic_at(slice.offsets, slice.signal, at) : 0.0);
    }
    const double area = trapezoids(sampled.values, step_);
    if (!(area > 0.0)) return NotApplicable{"a peak without area"};
    for (double& value : sampled.values) value /= area;
    sampled.noise = lesson.noise / area;
    const double height =
        *std::max_element(sampled.values.begin(), sampled.values.end());
    const double relative = sampled.noise / height;
    sampled.weight =
        1.0 / (relative * relative + kEqualPrecision * kEqualPrecision);
    return sampled;
  }

 private:
  double left_;
  double step_ = 0.0;
  std::size_t points_ = 0;
};

// Scatter of the lessons about their mean beyond their noise.
double scatter_of(const std::vector<Sampled>& lessons,
                  const TemplateShape& shape) {
  if (lessons.size() < 2) return 0.0;
  const double step = shape.step_minutes;
  const double length = step * static_cast<double>(shape.values.size() - 1);
  double sum = 0.0;
  for (const Sampled& lesson : lessons) {
    Values apart = lesson.values;
    for (std::size_t k = 0; k < apart.size(); ++k) apart[k] -= shape.values[k];
    sum += energy(apart, step) - lesson.noise * lesson.noise * length;
  }
  const double n = static_cast<double>(lessons.size());
  return std::sqrt(std::max(0.0, sum / (n - 1.0)) / energy(shape.values, step));
}

}  // namespace

double TemplateShape::right_minutes() const {
  return step_minutes * static_cast<double>(values.size() - 1) - left_minutes;
}

PeakSlice slice_of_peak(const Trace& trace, const TeacherFeet& feet) {
  const Trace near =
      cut_trace(trace, feet.apex - feet.left, feet.apex + feet.right);
  PeakSlice slice;
  const double length = feet.left + feet.right;
  for (std::size_t i = 0; i < near.minutes.size(); ++i) {
    const double offset = near.minutes[i] - feet.apex;
    const double share = (offset + feet.left) / length;
    const double baseline =
        feet.baseline_left + share * (feet.baseline_right - feet.baseline_left);
    slice.offsets.push_back(offset);
    slice.signal.push_back(near.signal[i] - baseline);
  }
  return slice;
}

Outcome<TemplateShape> mean_shape(const std::vector<ShapeLesson>& lessons,
                                  double left, double right) {
  if (lessons.empty()) return NotApplicable{"no peak to learn a shape from"};
  const Grid grid(lessons, left, right);
  std::vector<Sampled> sampled;
  double weights = 0.0;
  for (const ShapeLesson& lesson : lessons) {
    Outcome<Sampled> one = grid.sample(lesson);
    if (!one) continue;
    weights += one->weight;
    sampled.push_back(std::move(one.value()));
  }
  if (sampled.empty()) return NotApplicable{"no peak has an area above zero"};
  TemplateShape shape;
  shape.left_minutes = left;
  shape.step_minutes = grid.step();
  shape.lessons = sampled.size();
  shape.values.assign(grid.points(), 0.0);
  double variance = 0.0;
  for (const Sampled& one : sampled) {
    const double share = one.weight / weights;
    for (std::size_t k = 0; k < one.values.size(); ++k) {
      shape.values[k] += share * one.values[k];
    }
    variance += share * share * one.noise * one.noise;
  }
  shape.noise = std::sqrt(variance);
  shape.scatter = scatter_of(sampled, shape);
  return shape;
}

double shape_at(const TemplateShape& shape, double offset_minutes) {
  const double place =
      (offset_minutes + shape.left_minutes) / shape.step_minutes;
  const double last = static_cast<double>(shape.values.size() - 1);
  if (!(place >= 0.0) || !(place <= last)) return 0.0;
  // Between grid points by the cubic through the four around.
  const std::size_t n = shape.values.size();
  const auto below = static_cast<std::size_t>(place);
  const std::size_t first = std::min(below < 1 ? 0 : below - 1, n - 4);
  const double u = place - static_cast<double>(first);
  const double* y = shape.values.data() + first;
  return -y[0] * (u - 1.0) * (u - 2.0) * (u - 3.0) / 6.0 +
         y[1] * u * (u - 2.0) * (u - 3.0) / 2.0 -
         y[2] * u * (u - 1.0) * (u - 3.0) / 2.0 +
         y[3] * u * (u - 1.0) * (u - 2.0) / 6.0;
}

double shape_slope_at(const TemplateShape& shape, double offset_minutes) {
  const double h = 2.0 * shape.step_minutes;
  return (shape_at(shape, offset_minutes + h) -
          shape_at(shape, offset_minutes - h)) /
         (2.0 * h);
}

}  // namespace loqsmith
