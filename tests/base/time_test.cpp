#include "loqsmith/base/time.hpp"

#include <gtest/gtest.h>

#include <clocale>
#include <cstdlib>

namespace loqsmith {
namespace {

constexpr std::int64_t kSecond = 1'000'000;

TEST(ParseMoment, ReadsTheExamplesOfRfc3339) {
  // RFC 3339 (2002), section 5.8.
  const auto britain = parse_moment("1985-04-12T23:20:50.52Z");
  ASSERT_TRUE(britain);
  EXPECT_EQ(format_utc(britain->microseconds), "1985-04-12T23:20:50.520Z");
  const auto pacific = parse_moment("1996-12-19T16:39:57-08:00");
  ASSERT_TRUE(pacific);
  EXPECT_EQ(format_utc(pacific->microseconds), "1996-12-20T00:39:57.000Z");
  const auto netherlands = parse_moment("1937-01-01T12:00:27.87+00:20");
  ASSERT_TRUE(netherlands);
  EXPECT_EQ(format_utc(netherlands->microseconds), "1937-01-01T11:40:27.870Z");
}

TEST(ParseMoment, CountsALeapSecondAsTheSecondAfter) {
  // RFC 3339 (2002), section 5.8.
  const auto leap = parse_moment("1990-12-31T15:59:60-08:00");
  ASSERT_TRUE(leap);
  EXPECT_EQ(format_utc(leap->microseconds), "1991-01-01T00:00:00.000Z");
}

TEST(ParseMoment, CountsFromTheEpoch) {
  EXPECT_EQ(parse_moment("1970-01-01T00:00:00Z")->microseconds, 0);
  EXPECT_EQ(parse_moment("1970-01-02T00:00:01Z")->microseconds,
            86'401 * kSecond);
  EXPECT_EQ(parse_moment("1969-12-31T23:59:59.5Z")->microseconds, -500'000);
  EXPECT_EQ(parse_moment("2000-01-01T00:00:00.1234567Z")->microseconds,
            946'684'800 * kSecond + 123'456);
}

TEST(ParseMoment, KeepsATimeWithoutZoneAsGiven) {
  ::setenv("TZ", "America/New_York", 1);
  ::tzset();
  const auto local = parse_moment("2026-03-01T08:15:00");
  const auto zoned = parse_moment("2026-03-01T08:15:00Z");
  ASSERT_TRUE(local && zoned);
  EXPECT_FALSE(local->has_zone);
  EXPECT_TRUE(zoned->has_zone);
  EXPECT_EQ(local->microseconds, zoned->microseconds);
  EXPECT_EQ(parse_moment("2026-03-01")->microseconds,
            parse_moment("2026-03-01T00:00:00")->microseconds);
  EXPECT_FALSE(parse_moment("2026-03-01")->has_zone);
  ::unsetenv("TZ");
  ::tzset();
}

TEST(ParseMoment, TakesTheEndOfADayAsXmlSchemaDoes) {
  EXPECT_EQ(parse_moment("2026-03-01T24:00:00")->microseconds,
            parse_moment("2026-03-02T00:00:00")->microseconds);
  EXPECT_FALSE(parse_moment("2026-03-01T24:00:01"));
}

TEST(ParseMoment, RefusesWhatIsMalformedOrNotInTheCalendar) {
  for (const char* text : {"",
                           "2026",
                           "2026-03",
                           "2026-02-29",
                           "2026-13-01",
                           "2026-00-10",
                           "2026-04-31",
                           "26-03-01",
                           "2026-3-1",
                           "2026-03-01T",
                           "2026-03-01T08:15",
                           "2026-03-01T25:00:00Z",
                           "2026-03-01T08:60:00Z",
                           "2026-03-01T08:15:60Z",
                           "2026-03-01T08:15:00.Z",
                           "2026-03-01T08:15:00,5Z",
                           "2026-03-01T08:15:00+0100",
                           "2026-03-01T08:15:00+24:00",
                           "2026-03-01T08:15:00+01:60",
                           "2026-03-01T08:15:00ZZ",
                           "2026-03-01 08:15:00Z",
                           " 2026-03-01",
                           "2026-03-01 ",
                           "01.03.2026",
                           "-026-03-01",
                           "2026-03-01T08:15:00+"}) {
    EXPECT_FALSE(parse_moment(text)) << text;
  }
  EXPECT_TRUE(parse_moment("2024-02-29"));
  EXPECT_FALSE(parse_moment("1900-02-29"));
}

TEST(FormatUtc, ReadsBackToTheMillisecond) {
  for (const std::int64_t moment :
       {std::int64_t{0}, std::int64_t{-1}, std::int64_t{1'772'352'900'123'999},
        std::int64_t{-2'208'988'800'000'001}}) {
    const auto read = parse_moment(format_utc(moment));
    ASSERT_TRUE(read) << format_utc(moment);
    EXPECT_TRUE(read->has_zone);
    EXPECT_LE(read->microseconds, moment);
    EXPECT_LT(moment - read->microseconds, 1000);
  }
  EXPECT_EQ(format_utc(1'772'352'900'123'999), "2026-03-01T08:15:00.123Z");
  EXPECT_EQ(format_utc(-1), "1969-12-31T23:59:59.999Z");
}

TEST(FormatUtc, FollowsNoLocale) {
  const std::string before = std::setlocale(LC_ALL, nullptr);
  std::setlocale(LC_ALL, "de_DE.UTF-8");
  EXPECT_EQ(format_utc(1'500'000), "1970-01-01T00:00:01.500Z");
  std::setlocale(LC_ALL, before.c_str());
}

TEST(NowUtc, LiesInThisCentury) {
  const auto now = parse_moment(now_utc());
  ASSERT_TRUE(now);
  EXPECT_GT(now->microseconds, parse_moment("2024-01-01")->microseconds);
  EXPECT_LT(now->microseconds, parse_moment("2100-01-01")->microseconds);
}

}  // namespace
}  // namespace loqsmith
