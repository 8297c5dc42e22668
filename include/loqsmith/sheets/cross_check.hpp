#pragma once

#include "loqsmith/sheets/levels_sheet.hpp"
#include "loqsmith/sheets/method_tree.hpp"
#include "loqsmith/sheets/sequence_sheet.hpp"

namespace loqsmith {

/// The rules between the sheets: levels and analytes that do not exist,
/// standards that are all at one level, preparation columns without units.
void cross_check(SequenceSheet& sequence, LevelsSheet& levels,
                 MethodDocument& method);

}  // namespace loqsmith
