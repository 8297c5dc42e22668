#pragma once

#include "loqsmith/record/published_run.hpp"

namespace loqsmith::test {

/// Three injections of one analyte, small enough to write its tables by hand.
PublishedRun small_run();

/// A night with something of everything: every status, a dilution, procedures
/// that do not apply, a file that was refused, an analyte without calibration
/// and names that try to break out of cells and pages.
PublishedRun example_run();

/// Sample names of example_run() that are hostile.
extern const char* const kHostileMarkup;
extern const char* const kHostileFormula;

}  // namespace loqsmith::test
