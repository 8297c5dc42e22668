#pragma once

#include "loqsmith/sheets/method_tree.hpp"

namespace loqsmith {

/// The rules between elements and attributes: ids given twice, references to
/// what is not there, attributes that exclude or demand each other, units that
/// demand a factor, and what the limits of each analyte need. Values that are
/// wrong in themselves are reported already and pass here.
void check_method_rules(MethodDocument& document);

/// The rules of single elements, from the vocabulary's tables.
void check_identities(MethodDocument& document);
void check_groups(MethodDocument& document);

/// The check of established limits: `<established>` and the procedure that it
/// names stand in the limits of every analyte that it concerns.
void check_established_limit_rule(MethodDocument& document);

}  // namespace loqsmith
