#include "loqsmith/formats/trace_checks.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "loqsmith/base/numbers.hpp"

namespace loqsmith {
namespace {

constexpr double kGapFactor = 5.0;

std::optional<std::size_t> first_not_finite(const std::vector<double>& values) {
  const auto it = std::find_if(values.begin(), values.end(), [](double value) {
    return !std::isfinite(value);
  });
  if (it == values.end()) return std::nullopt;
  return static_cast<std::size_t>(it - values.begin());
}

std::string not_finite(double value, std::size_t index,
                       const std::string& array) {
  const std::string word = std::isnan(value) ? "not a number"
                           : value > 0.0     ? "plus infinity"
                                             : "minus infinity";
  return word + " at index " + std::to_string(index) + " of the " + array;
}

// Of the lower of the two middle intervals where their number is even.
double median_interval(const std::vector<double>& minutes) {
  std::vector<double> intervals;
  intervals.reserve(minutes.size() - 1);
  for (std::size_t i = 1; i < minutes.size(); ++i) {
    intervals.push_back(minutes[i] - minutes[i - 1]);
  }
  const auto middle = intervals.begin() +
                      static_cast<std::ptrdiff_t>((intervals.size() - 1) / 2);
  std::nth_element(intervals.begin(), middle, intervals.end());
  return *middle;
}

void warn_of_gaps(const std::vector<double>& minutes,
                  std::vector<std::string>& warnings) {
  if (minutes.size() < 3) return;
  const double limit = kGapFactor * median_interval(minutes);
  std::size_t gaps = 0;
  std::size_t longest = 1;
  for (std::size_t i = 1; i < minutes.size(); ++i) {
    const double interval = minutes[i] - minutes[i - 1];
    if (interval > limit) ++gaps;
    if (interval > minutes[longest] - minutes[longest - 1]) longest = i;
  }
  if (gaps == 0) return;
  warnings.push_back("gap: " + std::to_string(gaps) +
                     (gaps == 1 ? " interval is" : " intervals are") +
                     " longer than 5 times the median one, the longest from " +
                     shortest(minutes[longest - 1]) + " to " +
                     shortest(minutes[longest]) + " min");
}

bool counts_ions(const std::string& unit) {
  return unit == "number of detector counts" || unit == "counts per second" ||
         unit == "count unit" || unit == "counts per minute";
}

}  // namespace

bool is_wanted(const std::vector<TraceSelector>* wanted,
               const TraceHeader& header) {
  return wanted == nullptr || std::any_of(wanted->begin(), wanted->end(),
                                          [&](const TraceSelector& selector) {
                                            return matches(selector, header);
                                          });
}

std::optional<PointFault> find_point_fault(const std::vector<double>& minutes,
                                           const std::vector<double>& signal) {
  if (minutes.size() != signal.size()) {
    return PointFault{
        std::to_string(signal.size()) + " signal values",
        "as many as the " + std::to_string(minutes.size()) + " times"};
  }
  if (const auto index = first_not_finite(minutes)) {
    return PointFault{not_finite(minutes[*index], *index, "time array"),
                      "finite times"};
  }
  if (const auto index = first_not_finite(signal)) {
    return PointFault{not_finite(signal[*index], *index, "signal array"),
                      "finite signal values"};
  }
  for (std::size_t i = 1; i < minutes.size(); ++i) {
    if (!(minutes[i] > minutes[i - 1])) {
      return PointFault{shortest(minutes[i]) + " min at index " +
                            std::to_string(i) + " after " +
                            shortest(minutes[i - 1]) + " min",
                        "times that strictly increase"};
    }
  }
  return std::nullopt;
}

std::vector<std::string> point_warnings(const Trace& trace) {
  std::vector<std::string> warnings;
  if (trace.header.signal_unit.empty()) {
    warnings.emplace_back("unit of the signal not stated");
  }
  warn_of_gaps(trace.minutes, warnings);
  if (counts_ions(trace.header.signal_unit) &&
      std::any_of(trace.signal.begin(), trace.signal.end(),
                  [](double value) { return value < 0.0; })) {
    warnings.emplace_back("negative ion counts");
  }
  return warnings;
}

}  // namespace loqsmith
