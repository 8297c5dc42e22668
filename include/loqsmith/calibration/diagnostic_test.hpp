#pragma once

#include <optional>
#include <string>

#include "loqsmith/base/outcome.hpp"

namespace loqsmith {

/// One statistical test, held against its critical value.
struct DiagnosticTest {
  std::string name;  ///< "lack-of-fit", "mandel", ...
  double statistic = 0.0;
  double critical = 0.0;
  /// Probability of a statistic at least as extreme where all is well; absent
  /// where the statistic is held against a rule, not a distribution.
  std::optional<double> p;
  std::optional<double> degrees_1;  ///< degrees of freedom, or n of the test
  std::optional<double> degrees_2;
  bool passed = true;   ///< nothing against the model in use
  std::string meaning;  ///< plain language with figures, one or two sentences
  /// Where the test concerns one level or one standard.
  std::optional<double> concentration;
  std::optional<int> injection;
};

/// A test by name, done or not ("no-replicates: ...", "not-defined: ...").
struct NamedDiagnostic {
  std::string name;
  Outcome<DiagnosticTest> outcome = NotApplicable{"not computed"};
};

}  // namespace loqsmith
