#include "loqsmith/base/time.hpp"

#include <array>
#include <chrono>
#include <cstdio>

namespace loqsmith {
namespace {

constexpr std::int64_t kMicrosecondsPerSecond = 1'000'000;

// Reads a text from the left; every step says whether it went well.
class Cursor {
 public:
  explicit Cursor(std::string_view text) : rest_(text) {}

  bool done() const { return rest_.empty(); }

  bool take(std::string_view either_of) {
    if (rest_.empty() || either_of.find(rest_.front()) == either_of.npos) {
      return false;
    }
    rest_.remove_prefix(1);
    return true;
  }

  bool digits(std::size_t count, int& value) {
    if (rest_.size() < count) return false;
    value = 0;
    for (std::size_t i = 0; i < count; ++i) {
      if (!is_digit(rest_[i])) return false;
      value = value * 10 + (rest_[i] - '0');
    }
    rest_.remove_prefix(count);
    return true;
  }

  // Any number of digits after the point; those below a microsecond are cut.
  bool fraction(std::int64_t& microseconds) {
    std::int64_t unit = kMicrosecondsPerSecond / 10;
    std::size_t count = 0;
    for (; count < rest_.size() && is_digit(rest_[count]); ++count) {
      microseconds += unit * (rest_[count] - '0');
      unit /= 10;
    }
    rest_.remove_prefix(count);
    return count > 0;
  }

  bool starts_with(char c) const {
    return !rest_.empty() && rest_.front() == c;
  }

 private:
  static bool is_digit(char c) { return c >= '0' && c <= '9'; }

  std::string_view rest_;
};

bool read_date(Cursor& cursor, std::int64_t& days) {
  int year = 0;
  int month = 0;
  int day = 0;
  if (!cursor.digits(4, year) || !cursor.take("-") ||
      !cursor.digits(2, month) || !cursor.take("-") || !cursor.digits(2, day)) {
    return false;
  }
  const std::chrono::year_month_day date(
      std::chrono::year{year}, std::chrono::month{static_cast<unsigned>(month)},
      std::chrono::day{static_cast<unsigned>(day)});
  if (!date.ok()) return false;
  days = std::chrono::sys_days{date}.time_since_epoch().count();
  return true;
}

// A leap second (RFC 3339 section 5.6 allows 60) counts as the second after.
bool read_time_of_day(Cursor& cursor, std::int64_t& microseconds) {
  int hour = 0;
  int minute = 0;
  int second = 0;
  std::int64_t fraction = 0;
  if (!cursor.digits(2, hour) || !cursor.take(":") ||
      !cursor.digits(2, minute) || !cursor.take(":") ||
      !cursor.digits(2, second)) {
    return false;
  }
  if (cursor.take(".") && !cursor.fraction(fraction)) return false;
  const bool leap = second == 60 && minute == 59;
  // xs:dateTime (XML Schema 1.0 part 2, 3.2.7) writes a day's end as 24:00:00.
  const bool end_of_day =
      hour == 24 && minute == 0 && second == 0 && fraction == 0;
  if ((hour > 23 && !end_of_day) || minute > 59 || (second > 59 && !leap)) {
    return false;
  }
  microseconds = ((hour * 60 + minute) * std::int64_t{60} + second) *
                     kMicrosecondsPerSecond +
                 fraction;
  return true;
}

// "Z", "+hh:mm" or "-hh:mm"; nothing at all means no zone.
bool read_zone(Cursor& cursor, Moment& moment) {
  if (cursor.done()) return true;
  moment.has_zone = true;
  if (cursor.take("Zz")) return true;
  const bool west = cursor.starts_with('-');
  int hours = 0;
  int minutes = 0;
  if (!cursor.take("+-") || !cursor.digits(2, hours) || !cursor.take(":") ||
      !cursor.digits(2, minutes) || hours > 23 || minutes > 59) {
    return false;
  }
  const std::int64_t offset =
      (hours * 60 + minutes) * std::int64_t{60} * kMicrosecondsPerSecond;
  moment.microseconds += west ? offset : -offset;
  return true;
}

}  // namespace

std::optional<Moment> parse_moment(std::string_view text) {
  Cursor cursor(text);
  Moment moment;
  std::int64_t days = 0;
  std::int64_t time_of_day = 0;
  if (!read_date(cursor, days)) return std::nullopt;
  const bool plain_date = cursor.done();
  if (!plain_date &&
      (!cursor.take("Tt") || !read_time_of_day(cursor, time_of_day))) {
    return std::nullopt;
  }
  moment.microseconds = days * 86'400 * kMicrosecondsPerSecond + time_of_day;
  if (!read_zone(cursor, moment) || !cursor.done()) return std::nullopt;
  return moment;
}

std::string format_utc(std::int64_t microseconds_since_epoch) {
  using std::chrono::floor;
  const std::chrono::sys_time<std::chrono::microseconds> time{
      std::chrono::microseconds{microseconds_since_epoch}};
  const auto day = floor<std::chrono::days>(time);
  const std::chrono::year_month_day date{day};
  const std::chrono::hh_mm_ss clock{floor<std::chrono::milliseconds>(time) -
                                    day};
  std::array<char, 64> text{};
  const int length = std::snprintf(
      text.data(), text.size(), "%04d-%02u-%02uT%02d:%02d:%02d.%03dZ",
      static_cast<int>(date.year()), static_cast<unsigned>(date.month()),
      static_cast<unsigned>(date.day()),
      static_cast<int>(clock.hours().count()),
      static_cast<int>(clock.minutes().count()),
      static_cast<int>(clock.seconds().count()),
      static_cast<int>(clock.subseconds().count()));
  return {text.data(), static_cast<std::size_t>(length)};
}

std::string now_utc() {
  const auto now = std::chrono::system_clock::now().time_since_epoch();
  return format_utc(
      std::chrono::duration_cast<std::chrono::microseconds>(now).count());
}

}  // namespace loqsmith
