#pragma once

#include <iosfwd>

#include "loqsmith/record/published_run.hpp"

namespace loqsmith {

/// record.json, written as a stream: what is needed beside inputs/ to compute
/// the run again, and why each decision was taken.
void write_record(std::ostream& out, const PublishedRun& run);

}  // namespace loqsmith
