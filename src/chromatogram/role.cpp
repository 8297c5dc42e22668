#include "loqsmith/chromatogram/role.hpp"

#include <array>
#include <utility>

namespace loqsmith {
namespace {

constexpr std::array<std::pair<Role, std::string_view>, 13> kRoles{{
    {Role::Conditioning, "conditioning"},
    {Role::SolventBlank, "solvent-blank"},
    {Role::MethodBlank, "method-blank"},
    {Role::Standard, "standard"},
    {Role::SecondSource, "second-source"},
    {Role::CheckStandard, "check-standard"},
    {Role::LowSpike, "low-spike"},
    {Role::Control, "control"},
    {Role::Fortified, "fortified"},
    {Role::FortifiedDuplicate, "fortified-duplicate"},
    {Role::Duplicate, "duplicate"},
    {Role::AddedStandard, "added-standard"},
    {Role::Sample, "sample"},
}};

}  // namespace

std::string role_name(Role role) {
  for (const auto& [known, name] : kRoles) {
    if (known == role) return std::string(name);
  }
  return {};
}

std::optional<Role> role_from_name(std::string_view name) {
  for (const auto& [role, known] : kRoles) {
    if (known == name) return role;
  }
  return std::nullopt;
}

std::vector<std::string> role_names() {
  std::vector<std::string> names;
  for (const auto& entry : kRoles) names.emplace_back(entry.second);
  return names;
}

bool contains_known_amount(Role role) {
  switch (role) {
    case Role::Standard:
    case Role::SecondSource:
    case Role::CheckStandard:
    case Role::LowSpike:
    case Role::Control:
    case Role::Fortified:
    case Role::FortifiedDuplicate:
    case Role::AddedStandard:
      return true;
    case Role::Conditioning:
    case Role::SolventBlank:
    case Role::MethodBlank:
    case Role::Duplicate:
    case Role::Sample:
      return false;
  }
  return false;
}

bool repeats_another(Role role) {
  switch (role) {
    case Role::Fortified:
    case Role::FortifiedDuplicate:
    case Role::Duplicate:
    case Role::AddedStandard:
      return true;
    case Role::Conditioning:
    case Role::SolventBlank:
    case Role::MethodBlank:
    case Role::Standard:
    case Role::SecondSource:
    case Role::CheckStandard:
    case Role::LowSpike:
    case Role::Control:
    case Role::Sample:
      return false;
  }
  return false;
}

}  // namespace loqsmith
