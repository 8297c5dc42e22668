#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

/// What an injection is for. The words of the sequence sheet.
enum class Role {
  Conditioning,
  SolventBlank,
  MethodBlank,
  Standard,
  SecondSource,
  CheckStandard,
  LowSpike,
  Control,
  Fortified,
  FortifiedDuplicate,
  Duplicate,
  AddedStandard,
  Sample,
};

std::string role_name(Role role);
std::optional<Role> role_from_name(std::string_view name);
std::vector<std::string> role_names();

/// Roles whose vial or sample holds an amount that a level states.
bool contains_known_amount(Role role);

/// Roles that repeat or fortify another sample, the sheet's `parent`.
bool repeats_another(Role role);

}  // namespace loqsmith
