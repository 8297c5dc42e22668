#include "golden/judged_truth.hpp"

#include <cmath>
#include <map>
#include <stdexcept>

#include "golden/sheet.hpp"

namespace loqsmith::test {
namespace {

using Keyed = std::map<std::string, SheetRow>;

// Of what the vials of this analyte that hold nothing were found to hold.
double deviation_at_zero(const Keyed& results, const Keyed& truth,
                         const std::string& analyte) {
  std::vector<double> found;
  for (const auto& [key, row] : results) {
    if (row.at("analyte") == analyte &&
        number(truth.at(key), "vial_concentration") == 0.0) {
      found.push_back(number(row, "vial_concentration"));
    }
  }
  if (found.size() < 10) throw std::runtime_error("too few empty vials");
  double sum = 0.0;
  for (const double value : found) sum += value;
  const double mean = sum / static_cast<double>(found.size());
  double squares = 0.0;
  for (const double value : found) squares += (value - mean) * (value - mean);
  return std::sqrt(squares / static_cast<double>(found.size() - 1));
}

double relative_error(const SimulatedNight& night) {
  // With an internal standard the common error cancels, and two peaks' own
  // errors enter.
  return night.internal_standard
             ? std::sqrt(2.0) * night.peak_error
             : std::hypot(night.injection_error, night.peak_error);
}

std::map<std::string, double> highest_accepted(
    const std::filesystem::path& run) {
  std::map<std::string, double> highest;
  for (const SheetRow& row : read_sheet(run / "calibration.csv")) {
    highest[row.at("analyte")] = number(row, "highest");
  }
  return highest;
}

}  // namespace

std::string JudgedResult::expected_status() const {
  if (truth > highest) return "above-range";
  if (truth >= quantitation_limit) return "reportable";
  return truth >= detection_limit ? "estimated" : "not-detected";
}

bool JudgedResult::clear_of_limits() const {
  for (const double limit : {detection_limit, quantitation_limit, highest}) {
    if (std::abs(truth - limit) <= 3.0 * response_sd) return false;
  }
  return true;
}

std::vector<JudgedResult> judged_results(const std::filesystem::path& run,
                                         const std::filesystem::path& truth,
                                         const SimulatedNight& night) {
  const Keyed results = by_key(read_sheet(run / "results.csv"));
  const Keyed truths = by_key(read_sheet(truth));
  const std::map<std::string, double> highest = highest_accepted(run);
  std::vector<JudgedResult> judged;
  for (const auto& [key, row] : results) {
    if (row.at("role") != "sample") continue;
    const std::string& analyte = row.at("analyte");
    const double true_vial = number(truths.at(key), "vial_concentration");
    const double result = number(row, "result");
    // What one unit in the vial is in the sample.
    const double factor = result / number(row, "vial_concentration");
    const double sd = std::hypot(deviation_at_zero(results, truths, analyte),
                                 relative_error(night) * true_vial);
    judged.push_back(
        {key, number(truths.at(key), "result"), result,
         number(row, "detection_limit"), number(row, "quantitation_limit"),
         highest.at(analyte) * factor, sd * factor, row.at("status")});
  }
  return judged;
}

}  // namespace loqsmith::test
