#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "loqsmith/judgement/rows.hpp"
#include "loqsmith/judgement/settings.hpp"

namespace loqsmith {

/// Every child of `<acceptance>`, in the order of the method's vocabulary:
/// whether a method asks for it.
struct AcceptanceCheck {
  std::string_view name;
  bool (*asked_for)(const AcceptanceSettings&);
};
const std::vector<AcceptanceCheck>& acceptance_checks();

/// One row for each check that the method does not ask for, saying so.
std::vector<CheckRow> unchecked_rows(const AcceptanceSettings& acceptance,
                                     const std::string& analyte);

}  // namespace loqsmith
