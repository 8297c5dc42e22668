#include <algorithm>
#include <map>
#include <set>
#include <string>

#include "loqsmith/base/text.hpp"
#include "loqsmith/sheets/sequence_sheet.hpp"

namespace loqsmith {
namespace {

// What a sample can be repeated or fortified from.
bool may_be_parent(Role role) {
  return role == Role::Sample || role == Role::Control ||
         role == Role::Fortified;
}

void check_numbers(SequenceSheet& sheet) {
  std::map<int, std::size_t> first;
  for (const SequenceRow& row : sheet.rows) {
    if (!row.number_known) continue;
    const int number = row.injection.number;
    const auto [place, is_new] = first.emplace(number, row.injection.line);
    if (is_new) continue;
    sheet.add(
        row.row, "injection", std::to_string(number) + " a second time",
        "each injection once",
        "it stands in line " + std::to_string(place->second) + " already");
  }
}

void check_levels(SequenceSheet& sheet) {
  for (const SequenceRow& row : sheet.rows) {
    if (!row.role_known) continue;
    const std::string role = role_name(row.injection.role);
    const bool wanted = contains_known_amount(row.injection.role);
    if (wanted && row.injection.level.empty()) {
      sheet.add(row.row, "level", "empty", "a level for the role " + role,
                "name a level of levels.csv");
    } else if (!wanted && !row.injection.level.empty()) {
      sheet.add(row.row, "level", in_quotes(row.injection.level),
                "no level for the role " + role,
                "empty the cell or correct the role");
    }
  }
}

// How often each name stands for something that can be a parent.
using ParentNames = std::map<std::string, std::size_t>;

ParentNames parent_names(const SequenceSheet& sheet) {
  ParentNames names;
  for (const SequenceRow& row : sheet.rows) {
    if (row.role_known && may_be_parent(row.injection.role)) {
      ++names[row.injection.sample];
    }
  }
  return names;
}

// No row is its own parent.
void check_parent(SequenceSheet& sheet, const SequenceRow& row,
                  const ParentNames& names) {
  const std::string& parent = row.injection.parent;
  const bool names_itself =
      may_be_parent(row.injection.role) && row.injection.sample == parent;
  const auto place = names.find(parent);
  if (place != names.end() && place->second > (names_itself ? 1U : 0U)) return;
  std::vector<std::string> known;
  for (const auto& entry : names) {
    if (entry.first != parent) known.push_back(entry.first);
  }
  const std::string near = nearest_name(parent, known);
  sheet.add(row.row, "parent", in_quotes(parent),
            "the name of another sample, control or fortified sample",
            near.empty() ? "name the sample that was repeated or fortified"
                         : "did you mean \"" + near + "\"?");
}

void check_parents(SequenceSheet& sheet) {
  const ParentNames names = parent_names(sheet);
  for (const SequenceRow& row : sheet.rows) {
    if (!row.role_known) continue;
    const std::string role = role_name(row.injection.role);
    const bool wanted = repeats_another(row.injection.role);
    if (wanted && row.injection.parent.empty()) {
      sheet.add(row.row, "parent", "empty", "a parent for the role " + role,
                "name the sample that was repeated or fortified");
    } else if (wanted) {
      check_parent(sheet, row, names);
    } else if (!row.injection.parent.empty()) {
      sheet.add(row.row, "parent", in_quotes(row.injection.parent),
                "no parent for the role " + role,
                "empty the cell or correct the role");
    }
  }
}

bool is_filled(const SequenceSheet& sheet, const SequenceRow& row,
               std::string_view column) {
  return !sheet.table.cell(row.row, column).text.empty();
}

void check_amounts(SequenceSheet& sheet) {
  std::set<std::string> batches;
  for (const SequenceRow& row : sheet.rows) {
    const bool amount = is_filled(sheet, row, "sample_amount");
    const bool volume = is_filled(sheet, row, "final_volume");
    if (amount && volume) batches.insert(row.injection.prep);
    if (amount == volume) continue;
    sheet.add(row.row, amount ? "final_volume" : "sample_amount", "empty",
              "both sample_amount and final_volume, or neither",
              "fill in the other one");
  }
  batches.erase("");
  for (const SequenceRow& row : sheet.rows) {
    if (!row.role_known || !is_prepared(row.injection.role) ||
        !batches.contains(row.injection.prep) ||
        is_filled(sheet, row, "sample_amount") ||
        is_filled(sheet, row, "final_volume")) {
      continue;
    }
    sheet.add(row.row, "sample_amount", "empty",
              "an amount, since others of the batch " +
                  in_quotes(row.injection.prep) + " have one",
              "fill in sample_amount and final_volume");
  }
}

}  // namespace

bool is_prepared(Role role) {
  switch (role) {
    case Role::MethodBlank:
    case Role::LowSpike:
    case Role::Control:
    case Role::Fortified:
    case Role::FortifiedDuplicate:
    case Role::Duplicate:
    case Role::AddedStandard:
    case Role::Sample:
      return true;
    case Role::Conditioning:
    case Role::SolventBlank:
    case Role::Standard:
    case Role::SecondSource:
    case Role::CheckStandard:
      return false;
  }
  return false;
}

void check_sequence_rows(SequenceSheet& sheet) {
  check_numbers(sheet);
  check_levels(sheet);
  check_parents(sheet);
  check_amounts(sheet);
}

}  // namespace loqsmith
