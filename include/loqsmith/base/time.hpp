#pragma once

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>

namespace loqsmith {

/// A moment read from RFC 3339 or xs:dateTime text. Without a zone it is kept
/// as given and never takes the local zone.
struct Moment {
  std::int64_t microseconds = 0;  ///< since 1970-01-01T00:00:00, UTC if zoned
  bool has_zone = false;
};

/// "2026-03-01T08:15:00Z", with an offset, fractions, or (xs:dateTime) without
/// zone; a plain date means its midnight without zone. Nothing when malformed
/// or not in the calendar.
std::optional<Moment> parse_moment(std::string_view text);

/// "2026-03-01T08:15:00.123Z".
std::string format_utc(std::int64_t microseconds_since_epoch);

/// The system clock as format_utc() text: only for the edges.
std::string now_utc();

}  // namespace loqsmith
