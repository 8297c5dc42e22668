#pragma once

#include "loqsmith/formats/mzml_chromatogram.hpp"

namespace loqsmith {

/// Unit of the time array into result.unit and header.time_unit. A unit is
/// never inferred: without one the policy's is used, with a warning, or the
/// chromatogram is refused. Milliseconds and hours convert exactly but stand
/// outside the vocabulary's list: a warning.
/// @throws InputError: none, a name without accession, a unit that is not read
void read_time_unit(const CvParam& kind, DocumentSource& source,
                    MzmlChromatogram& result);

/// Unit of the signal into header.signal_unit; empty where none is stated.
/// @throws InputError for a name without accession
void read_signal_unit(const CvParam& kind, DocumentSource& source,
                      MzmlChromatogram& result);

}  // namespace loqsmith
