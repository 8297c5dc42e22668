#pragma once

#include <iosfwd>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// report.html: one self-contained page.
void write_report(std::ostream& out, const PublishedRun& run);

}  // namespace loqsmith
