#include <algorithm>
#include <cstdint>
#include <optional>

#include "loqsmith/base/time.hpp"
#include "loqsmith/sheets/amendments_sheet.hpp"

namespace loqsmith {
namespace {

using What = Amendment::What;

std::int64_t moment_of(const Amendment& amendment) {
  const auto moment = parse_moment(amendment.when);
  return moment ? moment->microseconds : 0;
}

What about(const Amendment& amendment) {
  return amendment.what == What::Withdraw ? amendment.withdrawn
                                          : amendment.what;
}

bool is_about_the_same(const Amendment& a, const Amendment& b) {
  return about(a) == about(b) && a.injection == b.injection &&
         a.analyte == b.analyte;
}

// Rows by time; those of one moment as they stand.
std::vector<std::size_t> in_time(const std::vector<Amendment>& entries) {
  std::vector<std::size_t> order(entries.size());
  for (std::size_t i = 0; i < order.size(); ++i) order[i] = i;
  std::stable_sort(order.begin(), order.end(),
                   [&](std::size_t a, std::size_t b) {
                     return moment_of(entries[a]) < moment_of(entries[b]);
                   });
  return order;
}

void settle(AmendmentsSheet& sheet, std::size_t row,
            const std::vector<std::size_t>& earlier) {
  Amendment& own = sheet.entries[row];
  bool replaced = false;
  for (const std::size_t other : earlier) {
    Amendment& before = sheet.entries[other];
    if (!is_about_the_same(own, before)) continue;
    if (moment_of(own) == moment_of(before)) {
      sheet.add(row, "when", "is that of line " + std::to_string(before.line),
                "a later time for a row that replaces another",
                "say when it was decided, or remove one of the two");
    }
    replaced = replaced || before.in_force;
    before.in_force = false;
  }
  if (own.what != What::Withdraw) return;
  own.in_force = false;
  if (replaced) return;
  sheet.add(row, "value", "withdraws nothing: " + describe(own),
            "an earlier row with that word, injection and analyte",
            "look for it, and for its time");
}

}  // namespace

void settle_amendments(AmendmentsSheet& sheet) {
  std::vector<std::size_t> earlier;
  for (const std::size_t row : in_time(sheet.entries)) {
    settle(sheet, row, earlier);
    earlier.push_back(row);
  }
}

}  // namespace loqsmith
