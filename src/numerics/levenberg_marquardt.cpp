#include "loqsmith/numerics/levenberg_marquardt.hpp"

#include <Eigen/QR>
#include <algorithm>
#include <cmath>
#include <limits>
#include <unsupported/Eigen/NonLinearOptimization>

namespace loqsmith {
namespace {

using Matrix = Eigen::MatrixXd;
using Vector = Eigen::VectorXd;
using Eigen::LevenbergMarquardtSpace::Status;

// Stands for "infinitely bad"; its square is still a number.
constexpr double kForbidden = 1e120;
// The first step may not go farther than the parameters' own size.
constexpr double kFirstReach = 1.0;

std::size_t to_size(Eigen::Index index) {
  return static_cast<std::size_t>(index);
}

bool all_finite(const double* values, Eigen::Index n) {
  return std::all_of(values, values + n,
                     [](double value) { return std::isfinite(value); });
}

// The face that the solver wants to see.
class Functor {
 public:
  explicit Functor(const NonlinearProblem& problem) : problem_(problem) {}

  Eigen::Index values() const {
    return static_cast<Eigen::Index>(problem_.residuals);
  }

  int operator()(const Vector& parameters, Vector& residuals) const {
    problem_.residuals_at({parameters.data(), to_size(parameters.size())},
                          {residuals.data(), to_size(residuals.size())});
    if (!all_finite(residuals.data(), residuals.size())) {
      residuals.setConstant(kForbidden);
    }
    return 0;
  }

  int df(const Vector& parameters, Matrix& derivatives) const {
    problem_.derivatives_at({parameters.data(), to_size(parameters.size())},
                            {derivatives.data(), to_size(derivatives.size())});
    return all_finite(derivatives.data(), derivatives.size()) ? 0 : -1;
  }

 private:
  const NonlinearProblem& problem_;
};

NotApplicable why_not(Status status) {
  if (status == Status::TooManyFunctionEvaluation) {
    return {"the fit still moves after all its evaluations"};
  }
  if (status == Status::UserAsked) {
    return {"the model has no derivatives at some parameters"};
  }
  return {"the fit could not be started"};
}

// Rounding that stops the search (the TooSmall ones) is convergence too.
bool converged(Status status) {
  return status == Status::RelativeReductionTooSmall ||
         status == Status::RelativeErrorTooSmall ||
         status == Status::RelativeErrorAndReductionTooSmall ||
         status == Status::CosinusTooSmall || status == Status::FtolTooSmall ||
         status == Status::XtolTooSmall || status == Status::GtolTooSmall;
}

// (J'J)^-1 from the QR of J with columns brought to length 1; false where the
// columns depend on each other.
bool fill_inverse(Matrix derivatives, NonlinearFit& fit) {
  const Eigen::Index p = derivatives.cols();
  Vector scale(p);
  for (Eigen::Index j = 0; j < p; ++j) {
    scale(j) = derivatives.col(j).stableNorm();
    if (!(scale(j) > 0.0)) return false;
    derivatives.col(j) /= scale(j);
  }
  Eigen::ColPivHouseholderQR<Matrix> qr(derivatives);
  qr.setThreshold(std::sqrt(std::numeric_limits<double>::epsilon()));
  if (qr.rank() < p) return false;
  const Matrix triangle =
      qr.matrixR().topLeftCorner(p, p).triangularView<Eigen::Upper>().solve(
          Matrix::Identity(p, p));
  const Matrix root = scale.cwiseInverse().asDiagonal() *
                      Matrix(qr.colsPermutation() * triangle);
  const Matrix inverse = root * root.transpose();
  for (Eigen::Index i = 0; i < p; ++i) {
    for (Eigen::Index j = 0; j < p; ++j) fit.inverse.push_back(inverse(i, j));
  }
  return all_finite(fit.inverse.data(), p * p);
}

}  // namespace

Outcome<NonlinearFit> minimise_squares(const NonlinearProblem& problem,
                                       const std::vector<double>& start,
                                       int most_evaluations, double tolerance) {
  if (start.empty() || problem.residuals <= start.size()) {
    return NotApplicable{"more points than parameters are needed"};
  }
  Vector parameters = Eigen::Map<const Vector>(
      start.data(), static_cast<Eigen::Index>(start.size()));
  Functor functor(problem);
  Vector first(functor.values());
  functor(parameters, first);
  if (!(first.maxCoeff() < kForbidden)) {
    return NotApplicable{"the model is not finite at the start"};
  }
  Eigen::LevenbergMarquardt<Functor> solver(functor);
  solver.parameters.factor = kFirstReach;
  solver.parameters.maxfev = most_evaluations;
  solver.parameters.ftol = tolerance;
  solver.parameters.xtol = tolerance;
  const Status status = solver.minimize(parameters);
  if (!converged(status)) return why_not(status);
  if (!all_finite(parameters.data(), parameters.size()) ||
      !std::isfinite(solver.fnorm)) {
    return NotApplicable{"the fit left the range of numbers"};
  }
  NonlinearFit fit;
  fit.parameters.assign(parameters.data(),
                        parameters.data() + parameters.size());
  fit.residual_sum = solver.fnorm * solver.fnorm;
  fit.evaluations = static_cast<int>(solver.nfev);
  Matrix derivatives(functor.values(), parameters.size());
  if (functor.df(parameters, derivatives) < 0 ||
      !fill_inverse(std::move(derivatives), fit)) {
    return NotApplicable{"the points do not determine the parameters"};
  }
  return fit;
}

}  // namespace loqsmith
