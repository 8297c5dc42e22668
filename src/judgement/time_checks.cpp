#include <cstdint>
#include <map>
#include <tuple>
#include <utility>

#include "loqsmith/base/time.hpp"
#include "loqsmith/judgement/sequence_checks.hpp"

namespace loqsmith {
namespace {

constexpr std::int64_t kSecond = 1'000'000;  // microseconds
constexpr std::int64_t kDay = 86'400 * kSecond;
constexpr std::size_t kDateLength = 10;  // "2026-03-01"

std::string injections(std::size_t count) {
  return std::to_string(count) + (count == 1 ? " injection" : " injections");
}

std::map<int, std::string> start_times(const SequenceFacts& facts) {
  std::map<int, std::string> times;
  for (const SequenceFacts::FileFact& file : facts.files) {
    times[file.injection] = file.start_time;
  }
  return times;
}

struct LatestStart {
  int injection = 0;
  std::int64_t microseconds = 0;
};

/// The end of the time in which a lot may be used, exclusive.
std::optional<std::int64_t> end_of_use(const std::string& expires) {
  const std::optional<Moment> moment = parse_moment(expires);
  if (!moment) return std::nullopt;
  const bool whole_day = expires.size() == kDateLength;
  return moment->microseconds + (whole_day ? kDay : 0);
}

struct ExpiredUse {
  int first = 0;
  int last = 0;
  std::size_t count = 0;
};

}  // namespace

std::vector<CheckRow> check_order(const SequenceFacts& facts) {
  Findings findings("order-differs");
  std::map<bool, LatestStart> latest;  // by whether the times have a zone
  for (const SequenceFacts::FileFact& file : facts.files) {
    const std::optional<Moment> start = parse_moment(file.start_time);
    if (!start) continue;
    const auto [before, is_first] = latest.emplace(
        start->has_zone, LatestStart{file.injection, start->microseconds});
    if (is_first) continue;
    if (start->microseconds < before->second.microseconds) {
      findings.add(file.injection,
                   "started " + file.start_time + ", before injection " +
                       std::to_string(before->second.injection));
    } else {
      before->second = {file.injection, start->microseconds};
    }
  }
  if (latest.empty()) {
    findings.not_compared("no file states when it was started");
  } else if (latest.size() > 1) {
    findings.not_compared("some start times have a zone and some have none");
  }
  return findings.rows();
}

std::vector<CheckRow> check_acquired_times(const Sequence& sequence,
                                           const SequenceFacts& facts) {
  Findings findings("time-differs");
  std::map<int, std::string> starts = start_times(facts);
  std::size_t incomparable = 0;
  for (const Injection& injection : sequence.injections) {
    const std::string& start_text = starts[injection.number];
    if (injection.acquired.empty() || start_text.empty()) continue;
    const std::optional<Moment> sheet = parse_moment(injection.acquired);
    const std::optional<Moment> file = parse_moment(start_text);
    if (!sheet || !file || sheet->has_zone != file->has_zone) {
      ++incomparable;
      continue;
    }
    const std::int64_t apart = sheet->microseconds - file->microseconds;
    if (apart >= -kSecond && apart <= kSecond) continue;
    findings.add(injection.number, "the file says " + start_text +
                                       ", the sheet " + injection.acquired);
  }
  if (incomparable > 0) {
    findings.not_compared(injections(incomparable) +
                          ": only one of the two times has a zone, or the "
                          "file's is malformed");
  }
  return findings.rows();
}

std::vector<CheckRow> check_expired_lots(const Sequence& sequence,
                                         const SequenceFacts& facts) {
  Findings findings("expired-lot");
  std::map<int, std::string> starts = start_times(facts);
  std::map<std::tuple<std::string, std::string, std::string>, ExpiredUse> late;
  std::size_t without_time = 0;
  for (const Injection& injection : sequence.injections) {
    const std::optional<Moment> used =
        parse_moment(injection.acquired.empty() ? starts[injection.number]
                                                : injection.acquired);
    bool dated = false;
    for (const LevelEntry& entry : sequence.levels) {
      if (entry.level != injection.level || entry.expires.empty()) continue;
      dated = true;
      const std::optional<std::int64_t> end = end_of_use(entry.expires);
      if (!used || !end || used->microseconds < *end) continue;
      ExpiredUse& use = late[{entry.level, entry.lot, entry.expires}];
      if (use.count > 0 && use.last == injection.number) continue;
      if (use.count == 0) use.first = injection.number;
      use.last = injection.number;
      ++use.count;
    }
    if (dated && !used) ++without_time;
  }
  for (const auto& [what, use] : late) {
    const auto& [level, lot, expires] = what;
    findings.add(use.first, "level " + level +
                                (lot.empty() ? "" : ", lot " + lot) +
                                ", expired " + expires + ", used in " +
                                injections(use.count));
  }
  if (without_time > 0) {
    findings.not_compared(injections(without_time) +
                          " of levels that expire: no time stated");
  }
  return findings.rows();
}

}  // namespace loqsmith
