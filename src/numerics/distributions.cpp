#include "loqsmith/numerics/distributions.hpp"

#include <boost/math/distributions/chi_squared.hpp>
#include <boost/math/distributions/fisher_f.hpp>
#include <boost/math/distributions/students_t.hpp>
#include <cmath>

namespace loqsmith {
namespace {

namespace bm = boost::math;
namespace bp = boost::math::policies;

// Errors come back as NaN or infinity. Promotion to long double is off: it
// costs time and the tails keep their digits without it.
using Quiet = bp::policy<
    bp::domain_error<bp::ignore_error>, bp::pole_error<bp::ignore_error>,
    bp::overflow_error<bp::ignore_error>, bp::underflow_error<bp::ignore_error>,
    bp::evaluation_error<bp::ignore_error>,
    bp::rounding_error<bp::ignore_error>,
    bp::indeterminate_result_error<bp::ignore_error>,
    bp::promote_double<false>>;
using StudentT = bm::students_t_distribution<double, Quiet>;
using ChiSquare = bm::chi_squared_distribution<double, Quiet>;
using FisherF = bm::fisher_f_distribution<double, Quiet>;

}  // namespace

double student_t_cdf(double t, double degrees_of_freedom) {
  return bm::cdf(StudentT(degrees_of_freedom), t);
}

double student_t_quantile(double p, double degrees_of_freedom) {
  return bm::quantile(StudentT(degrees_of_freedom), p);
}

double student_t_upper_tail(double t, double degrees_of_freedom) {
  return bm::cdf(bm::complement(StudentT(degrees_of_freedom), t));
}

double chi_square_cdf(double x, double degrees_of_freedom) {
  return bm::cdf(ChiSquare(degrees_of_freedom), x);
}

double chi_square_quantile(double p, double degrees_of_freedom) {
  return bm::quantile(ChiSquare(degrees_of_freedom), p);
}

double f_cdf(double x, double numerator_df, double denominator_df) {
  return bm::cdf(FisherF(numerator_df, denominator_df), x);
}

double f_quantile(double p, double numerator_df, double denominator_df) {
  return bm::quantile(FisherF(numerator_df, denominator_df), p);
}

double f_upper_tail(double x, double numerator_df, double denominator_df) {
  return bm::cdf(bm::complement(FisherF(numerator_df, denominator_df), x));
}

SpreadBounds standard_deviation_bounds(double degrees_of_freedom,
                                       double confidence) {
  const double nu = degrees_of_freedom;
  const double tail = 0.5 * (1.0 - confidence);
  return {std::sqrt(nu / chi_square_quantile(1.0 - tail, nu)),
          std::sqrt(nu / chi_square_quantile(tail, nu))};
}

}  // namespace loqsmith
