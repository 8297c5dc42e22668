#include "loqsmith/ledger/out_layout.hpp"

#include <algorithm>
#include <limits>

#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {
namespace {

constexpr std::string_view kStaging = "staging-";
constexpr std::string_view kRun = "run-";

bool is_control(char c) {
  const auto byte = static_cast<unsigned char>(c);
  return byte < 0x20U || byte == 0x7FU;
}

std::optional<std::int64_t> number_after(const std::string& name,
                                         std::string_view prefix) {
  if (name.compare(0, prefix.size(), prefix) != 0) return std::nullopt;
  const auto number = parse_whole(std::string_view(name).substr(prefix.size()));
  return number && *number > 0 ? number : std::nullopt;
}

std::string unfit_part(const std::string& part) {
  constexpr std::size_t kMostBytes = 200;
  if (part.empty()) return "it has an empty part";
  if (part.front() == '.') return "a part of it begins with a dot";
  if (part.size() > kMostBytes) return "a part of it is too long";
  if (std::any_of(part.begin(), part.end(), is_control)) {
    return "it holds a control character";
  }
  // "a" and "a/run-0001" would publish one into the other.
  if (number_after(part, kRun)) return "a part of it is named like a run";
  return {};
}

}  // namespace

std::filesystem::path OutLayout::staging(std::uint64_t begun) const {
  return work() / (std::string(kStaging) + std::to_string(begun));
}

std::optional<std::uint64_t> OutLayout::staging_number(
    const std::string& name) {
  const auto number = number_after(name, kStaging);
  if (!number || std::string(kStaging) + std::to_string(*number) != name) {
    return std::nullopt;
  }
  return static_cast<std::uint64_t>(*number);
}

std::string run_folder_name(int number) {
  std::string digits = std::to_string(number);
  if (digits.size() < 4) digits.insert(0, 4 - digits.size(), '0');
  return std::string(kRun) + digits;
}

std::optional<int> run_folder_number(const std::string& name) {
  const auto number = number_after(name, kRun);
  if (!number || *number > std::numeric_limits<int>::max()) return std::nullopt;
  const int value = static_cast<int>(*number);
  if (run_folder_name(value) != name) return std::nullopt;
  return value;
}

std::string unfit_sequence_name(const std::string& sequence) {
  constexpr std::size_t kMostBytes = 1000;
  if (sequence.empty()) return "it is empty";
  if (sequence.size() > kMostBytes) return "it is too long";
  if (!is_utf8(sequence)) return "it is no UTF-8";
  const auto parts = split(sequence, '/');
  for (const std::string& part : parts) {
    const std::string why = unfit_part(part);
    if (!why.empty()) return why;
  }
  // ledger.jsonl, ledger.head and the name under which the head is renewed.
  if (parts.front().rfind("ledger.", 0) == 0) {
    return "the names ledger.* in OUT are the ledger's own";
  }
  if (parts.front().rfind("signers.", 0) == 0) {
    return "the names signers.* in OUT are the register's own";
  }
  return {};
}

}  // namespace loqsmith
