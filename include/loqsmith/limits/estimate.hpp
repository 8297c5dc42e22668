#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

enum class Grade { Valid, Note, Caution, NotValid, NotApplicable };
std::string grade_name(Grade grade);

/// Something to know of an estimate.
struct LimitFinding {
  Grade grade = Grade::Note;  ///< Note, Caution or NotValid
  std::string word;           ///< "few-blanks"
  std::string text;           ///< with figures, for people
};

/// One number that went into an estimate.
struct LimitTerm {
  std::string name;  ///< "standard deviation of the blanks"
  double value = 0.0;
  std::string unit;  ///< "response", "concentration", "response/concentration"
};

/// What a procedure says of one analyte, as vial concentrations. Every present
/// number is finite; limits are above zero.
struct LimitEstimate {
  std::optional<double> critical_value;
  std::optional<double> detection;
  std::optional<double> quantitation;
  std::optional<double> detection_lower;  ///< 95 % confidence bounds
  std::optional<double> detection_upper;
  std::optional<double> quantitation_lower;
  std::optional<double> quantitation_upper;
  std::optional<double> degrees_of_freedom;
  std::size_t n = 0;  ///< observations
  std::vector<LimitFinding> findings;
  std::vector<LimitTerm> terms;

  Grade grade() const;  ///< the worst finding; Valid where there is none
};

}  // namespace loqsmith
