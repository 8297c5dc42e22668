#include "loqsmith/judgement/calibration_sets.hpp"

#include <algorithm>
#include <cstddef>
#include <utility>

namespace loqsmith {
namespace {

using Sets = CalibrationSettings::Sets;

// Indices into the night's injections.
struct Block {
  std::vector<std::size_t> standards;
  bool above_zero = false;
};

bool is_standard(const InjectionResponse& one) {
  return one.injection->role == Role::Standard && one.nominal;
}

std::vector<Block> runs_of_standards(const MeasuredAnalyte& night) {
  std::vector<Block> blocks;
  bool open = false;
  for (std::size_t i = 0; i < night.injections.size(); ++i) {
    const InjectionResponse& one = night.injections[i];
    if (ends_a_block(one.injection->role)) open = false;
    if (!is_standard(one)) continue;
    if (!open) blocks.emplace_back();
    open = true;
    blocks.back().standards.push_back(i);
    if (*one.nominal > 0.0) blocks.back().above_zero = true;
  }
  return blocks;
}

void join(Block& block, const Block& more) {
  block.standards.insert(block.standards.end(), more.standards.begin(),
                         more.standards.end());
  std::sort(block.standards.begin(), block.standards.end());
}

std::vector<Block> blocks_of(const MeasuredAnalyte& night) {
  std::vector<Block> blocks;
  Block before_the_first;
  for (Block& block : runs_of_standards(night)) {
    if (block.above_zero) {
      blocks.push_back(std::move(block));
    } else {
      join(blocks.empty() ? before_the_first : blocks.back(), block);
    }
  }
  if (!blocks.empty()) join(blocks.front(), before_the_first);
  return blocks;
}

// Of the latest block that began before the injection; 0 before the first.
std::size_t block_before(const std::vector<Block>& blocks, std::size_t index) {
  std::size_t found = 0;
  for (std::size_t i = 1; i < blocks.size(); ++i) {
    if (blocks[i].standards.front() < index) found = i;
  }
  return found;
}

SetMembers whole_night(const MeasuredAnalyte& night) {
  SetMembers all;
  all.name = "1";
  all.analyte = night;
  return all;
}

// The settings without injections.
MeasuredAnalyte nobody_of(const MeasuredAnalyte& night) {
  return {night.settings, night.units, night.sequence, {}};
}

std::vector<SetMembers> sets_of(const MeasuredAnalyte& night,
                                const std::vector<Block>& blocks,
                                std::size_t blocks_a_set) {
  const std::size_t last = blocks.size() - blocks_a_set;
  std::vector<std::vector<std::size_t>> members(last + 1);
  for (std::size_t set = 0; set <= last; ++set) {
    for (std::size_t i = 0; i < blocks_a_set; ++i) {
      const std::vector<std::size_t>& more = blocks[set + i].standards;
      members[set].insert(members[set].end(), more.begin(), more.end());
    }
  }
  for (std::size_t i = 0; i < night.injections.size(); ++i) {
    if (is_standard(night.injections[i])) continue;
    members[std::min(block_before(blocks, i), last)].push_back(i);
  }
  std::vector<SetMembers> sets;
  for (std::vector<std::size_t>& one : members) {
    std::sort(one.begin(), one.end());
    SetMembers set;
    set.name = std::to_string(sets.size() + 1);
    set.analyte = nobody_of(night);
    for (const std::size_t i : one) {
      set.analyte.injections.push_back(night.injections[i]);
    }
    sets.push_back(std::move(set));
  }
  return sets;
}

std::vector<SetMembers> brackets_of(const MeasuredAnalyte& night,
                                    const std::vector<Block>& blocks) {
  const auto number = [&](std::size_t index) {
    return night.injections[index].injection->number;
  };
  const std::size_t joined = std::min<std::size_t>(2, blocks.size());
  std::vector<SetMembers> sets = sets_of(night, blocks, joined);
  for (std::size_t i = 0; i < sets.size(); ++i) {
    const Block& second = blocks[i + joined - 1];
    sets[i].opens = number(blocks[i].standards.front());
    sets[i].closes = number(second.standards.back());
    if (joined == 1) continue;
    sets[i].name += "+" + std::to_string(i + 2);
    for (const std::size_t index : second.standards) {
      sets[i].closing.push_back(number(index));
    }
  }
  return sets;
}

}  // namespace

bool ends_a_block(Role role) {
  switch (role) {
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
    case Role::MethodBlank:
    case Role::Standard:
    case Role::SecondSource:
    case Role::CheckStandard:
      return false;
  }
  return false;
}

std::vector<SetMembers> divide_into_sets(const MeasuredAnalyte& night) {
  const std::vector<Block> blocks = blocks_of(night);
  const Sets sets = night.settings->calibration.sets;
  if (blocks.empty()) return {whole_night(night)};
  switch (sets) {
    case Sets::One:
      return {whole_night(night)};
    case Sets::Latest:
      return sets_of(night, blocks, 1);
    case Sets::Bracketing:
      return brackets_of(night, blocks);
  }
  return {whole_night(night)};
}

}  // namespace loqsmith
