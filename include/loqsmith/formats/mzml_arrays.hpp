#pragma once

#include <string>
#include <vector>

#include "loqsmith/formats/mzml_chromatogram.hpp"

namespace loqsmith {

/// Finds the one time array and the one signal array of a <chromatogram> by
/// their accessions, and reads how they are stored and in which units; other
/// arrays are stepped over.
/// @throws InputError: type, kind or compression missing, doubled, unknown or
///         not read by this version; lengths missing, wrong or different; no
///         time unit where the policy gives none
/// @throws WholeFileError for lengths below zero
void read_mzml_arrays(const MzmlNode& chromatogram, const ParamGroups& groups,
                      DocumentSource& source, MzmlChromatogram& result);

/// The array's numbers: text joined, base64, zlib, widened.
/// @throws InputError for every disagreement between what is written and what
///         is there
std::vector<double> decode_mzml_array(const MzmlArray& array,
                                      DocumentSource& source,
                                      std::vector<std::string>& warnings);

}  // namespace loqsmith
