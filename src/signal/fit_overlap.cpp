#include "loqsmith/signal/fit_overlap.hpp"

#include <algorithm>
#include <cmath>

#include "loqsmith/numerics/least_squares.hpp"
#include "loqsmith/numerics/levenberg_marquardt.hpp"

namespace loqsmith {
namespace {

// Where each parameter stands. The line has the first two.
struct Places {
  std::size_t area = 0;
  std::size_t mean = 0;   // 0: not free
  std::size_t shape = 0;  // ln w, then (tau / w)^3; 0: not free
};

double spread_of(const EmgShape& shape) {
  return std::hypot(shape.sigma, shape.tau);
}

EmgShape shape_of(const EmgGuess& guess) {
  EmgShape shape{0.0, guess.sigma, guess.tau};
  shape.mu = guess.apex_minutes - emg_apex(shape);
  return shape;
}

// The problem in its own units: time in widths about the middle, signal in its
// largest distance from zero.
class Cluster {
 public:
  Cluster(std::span<const double> minutes, std::span<const double> signal,
          const std::vector<EmgGuess>& guesses, double width_half)
      : width_(width_half), guesses_(guesses) {
    middle_ = 0.5 * (minutes.front() + minutes.back());
    for (const double y : signal) scale_ = std::max(scale_, std::abs(y));
    if (!(scale_ > 0.0)) scale_ = 1.0;
    for (const double t : minutes) x_.push_back((t - middle_) / width_);
    for (const double y : signal) y_.push_back(y / scale_);
    lay_out();
  }

  // Areas and line by the linear fit at the guessed times and shapes.
  Outcome<std::vector<double>> start() const {
    std::vector<std::vector<double>> columns(2 + guesses_.size());
    columns[0].assign(x_.size(), 1.0);
    columns[1] = x_;
    for (std::size_t k = 0; k < guesses_.size(); ++k) {
      for (const double x : x_) columns[2 + k].push_back(emg(starts_[k], x));
    }
    const Outcome<LeastSquaresFit> linear = fit_columns(columns, y_);
    if (!linear) return NotApplicable{linear.reason()};
    std::vector<double> p(parameters_, 0.0);
    p[0] = linear->coefficients[0];
    p[1] = linear->coefficients[1];
    for (std::size_t k = 0; k < guesses_.size(); ++k) {
      p[places_[k].area] = linear->coefficients[2 + k];
      const EmgShape& shape = starts_[k];
      if (places_[k].mean) p[places_[k].mean] = shape.mu + shape.tau;
      if (!places_[k].shape) continue;
      const double share = shape.tau / spread_of(shape);
      p[places_[k].shape] = std::log(spread_of(shape));
      p[places_[k].shape + 1] = share * share * share;
    }
    return p;
  }

  NonlinearProblem problem() const {
    NonlinearProblem problem;
    problem.residuals = x_.size();
    problem.residuals_at = [this](std::span<const double> p,
                                  std::span<double> r) { residuals(p, r); };
    problem.derivatives_at = [this](std::span<const double> p,
                                    std::span<double> j) { derivatives(p, j); };
    return problem;
  }

  FittedEmg peak(std::span<const double> p, std::size_t k) const {
    const EmgShape shape = shape_at(p, k);
    return {
        {middle_ + width_ * shape.mu, width_ * shape.sigma, width_ * shape.tau},
        p[places_[k].area] * scale_ * width_};
  }

  OverlapFit result(const NonlinearFit& fit, const AreaWindow& window) const {
    const std::vector<double>& p = fit.parameters;
    OverlapFit found;
    for (std::size_t k = 0; k < guesses_.size(); ++k) {
      found.peaks.push_back(peak(p, k));
    }
    found.middle_minutes = middle_;
    found.intercept = p[0] * scale_;
    found.slope = p[1] * scale_ / width_;
    const auto freedom = static_cast<double>(x_.size() - parameters_);
    found.residual_deviation = scale_ * std::sqrt(fit.residual_sum / freedom);
    found.evaluations = fit.evaluations;
    found.area_weights = weights(fit, window);
    return found;
  }

 private:
  void lay_out() {
    parameters_ = 2;
    for (const EmgGuess& guess : guesses_) {
      EmgShape start = shape_of(guess);
      start.mu = (start.mu - middle_) / width_;
      start.sigma /= width_;
      start.tau /= width_;
      starts_.push_back(start);
      Places place;
      place.area = parameters_++;
      if (guess.free_time) place.mean = parameters_++;
      if (guess.shape == EmgGuess::Shape::Own) {
        place.shape = parameters_;
        parameters_ += 2;
      }
      if (guess.shape == EmgGuess::Shape::AsFirst) {
        place.shape = places_.front().shape;
      }
      places_.push_back(place);
    }
  }

  EmgShape shape_at(std::span<const double> p, std::size_t k) const {
    EmgShape shape = starts_[k];
    const double mean =
        places_[k].mean ? p[places_[k].mean] : shape.mu + shape.tau;
    if (places_[k].shape) {
      const double spread = std::exp(p[places_[k].shape]);
      const double share = std::cbrt(p[places_[k].shape + 1]);
      shape.tau = spread * share;
      // Not a number beyond the pure decay: the fit steps back from there.
      shape.sigma = spread * std::sqrt(1.0 - share * share);
    }
    shape.mu = mean - shape.tau;
    return shape;
  }

  void residuals(std::span<const double> p, std::span<double> r) const {
    for (std::size_t i = 0; i < x_.size(); ++i) {
      r[i] = p[0] + p[1] * x_[i] - y_[i];
    }
    for (std::size_t k = 0; k < guesses_.size(); ++k) {
      const EmgShape shape = shape_at(p, k);
      const double area = p[places_[k].area];
      for (std::size_t i = 0; i < x_.size(); ++i) {
        r[i] += area * emg(shape, x_[i]);
      }
    }
  }

  void derivatives(std::span<const double> p, std::span<double> j) const {
    const std::size_t n = x_.size();
    std::fill(j.begin(), j.end(), 0.0);
    std::fill_n(j.begin(), n, 1.0);
    std::copy(x_.begin(), x_.end(), j.begin() + static_cast<std::ptrdiff_t>(n));
    for (std::size_t k = 0; k < guesses_.size(); ++k) {
      const EmgShape shape = shape_at(p, k);
      const Places& place = places_[k];
      const double area = p[place.area];
      const double cube = std::pow(spread_of(shape), 3.0);
      for (std::size_t i = 0; i < n; ++i) {
        const EmgDerivatives d = emg_derivatives(shape, x_[i]);
        j[place.area * n + i] += d.value;
        if (place.mean) j[place.mean * n + i] += area * d.by_mu;
        if (!place.shape) continue;
        j[place.shape * n + i] += area * (shape.sigma * d.by_sigma +
                                          shape.tau * (d.by_tau - d.by_mu));
        j[(place.shape + 1) * n + i] += area * cube * d.by_tau_cubed;
      }
    }
  }

  // Derivative of the first peak's windowed area by each parameter; its time
  // does not enter, because the window goes with it.
  std::vector<double> area_slopes(const std::vector<double>& p,
                                  const AreaWindow& window) const {
    const Places& place = places_.front();
    std::vector<double> slopes(parameters_, 0.0);
    const auto slope = [&](std::size_t index, double step) {
      std::vector<double> less = p;
      std::vector<double> more = p;
      less[index] -= step;
      more[index] += step;
      slopes[index] = (fitted_area(peak(more, 0), window) -
                       fitted_area(peak(less, 0), window)) /
                      (2.0 * step);
    };
    FittedEmg unit = peak(p, 0);
    unit.area = scale_ * width_;
    slopes[place.area] = fitted_area(unit, window);
    if (place.shape) {
      slope(place.shape, 1e-4);
      slope(place.shape + 1, 1e-4);
    }
    return slopes;
  }

  // The fit's answer to a small change of one point: J (J'J)^-1 c.
  std::vector<double> weights(const NonlinearFit& fit,
                              const AreaWindow& window) const {
    const std::vector<double> slopes = area_slopes(fit.parameters, window);
    const std::size_t n = x_.size();
    std::vector<double> j(n * parameters_);
    derivatives(fit.parameters, j);
    std::vector<double> weights(n, 0.0);
    for (std::size_t a = 0; a < parameters_; ++a) {
      double factor = 0.0;
      for (std::size_t b = 0; b < parameters_; ++b) {
        factor += fit.inverse[a * parameters_ + b] * slopes[b];
      }
      for (std::size_t i = 0; i < n; ++i) {
        weights[i] += factor * j[a * n + i] / scale_;
      }
    }
    return weights;
  }

  double width_;
  const std::vector<EmgGuess>& guesses_;
  double middle_ = 0.0;
  double scale_ = 0.0;
  std::vector<double> x_;
  std::vector<double> y_;
  std::vector<EmgShape> starts_;
  std::vector<Places> places_;
  std::size_t parameters_ = 0;
};

}  // namespace

double fitted_area(const FittedEmg& peak, const AreaWindow& window) {
  const double apex = peak.apex();
  return peak.area * (emg_area_until(peak.shape, apex + window.right) -
                      emg_area_until(peak.shape, apex - window.left));
}

Outcome<OverlapFit> fit_overlap(std::span<const double> minutes,
                                std::span<const double> signal,
                                const std::vector<EmgGuess>& guesses,
                                const AreaWindow& window, double width_half) {
  const auto failed = [](const std::string& why) {
    return NotApplicable{"model-not-converged: " + why};
  };
  if (minutes.size() < 3 || guesses.empty()) {
    return failed("there is nothing to fit");
  }
  const Cluster cluster(minutes, signal, guesses, width_half);
  const Outcome<std::vector<double>> start = cluster.start();
  if (!start) return failed(start.reason());
  const Outcome<NonlinearFit> fit = minimise_squares(cluster.problem(), *start);
  if (!fit) return failed(fit.reason());
  OverlapFit found = cluster.result(*fit, window);
  const bool finite =
      std::all_of(found.area_weights.begin(), found.area_weights.end(),
                  [](double weight) { return std::isfinite(weight); });
  if (!finite) return failed("a peak became a pure decay");
  return found;
}

}  // namespace loqsmith
