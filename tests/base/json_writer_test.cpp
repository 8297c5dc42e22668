#include "loqsmith/base/json_writer.hpp"

#include <gtest/gtest.h>

#include <limits>
#include <locale>
#include <nlohmann/json.hpp>
#include <sstream>

namespace loqsmith {
namespace {

TEST(JsonWriter, WritesOneLineInTheOrderGiven) {
  std::ostringstream out;
  JsonWriter json(out);
  json.begin_object();
  json.member("b", 1.5);
  json.member("a", "x");
  json.begin_array("list");
  json.value(std::int64_t{1});
  json.value(true);
  json.begin_object();
  json.end_object();
  json.end_array();
  json.member("none", std::optional<double>{});
  json.member("some", std::optional<double>{2.0});
  json.member_null("nothing");
  json.end_object();
  EXPECT_EQ(out.str(),
            R"({"b":1.5,"a":"x","list":[1,true,{}],"none":null,"some":2,)"
            R"("nothing":null})");
}

TEST(JsonWriter, IndentsWhereAsked) {
  std::ostringstream out;
  JsonWriter json(out, 2);
  json.begin_object();
  json.begin_array("a");
  json.value("x");
  json.value("y");
  json.end_array();
  json.begin_array("empty");
  json.end_array();
  json.end_object();
  EXPECT_EQ(out.str(),
            "{\n  \"a\": [\n    \"x\",\n    \"y\"\n  ],\n  \"empty\": []\n}");
}

TEST(JsonWriter, EscapesQuotesBackslashesAndControlCharacters) {
  EXPECT_EQ(json_text("a\"b\\c\n\t\r\b\f"), R"("a\"b\\c\n\t\r\b\f")");
  EXPECT_EQ(json_text(std::string_view("\0\x1f\x7f", 3)),
            "\"\\u0000\\u001f\\u007f\"");
  EXPECT_EQ(json_text("µg/L 水 🜁"), "\"µg/L 水 🜁\"");
}

TEST(JsonWriter, ReplacesBytesThatAreNoUtf8) {
  EXPECT_EQ(json_text("a\xFFz"), "\"a\xEF\xBF\xBDz\"");
  // A surrogate, an overlong form and a sequence cut short.
  for (const char* bad : {"\xED\xA0\x80", "\xC0\xAF", "\xE6\xB0"}) {
    const auto parsed = nlohmann::json::parse(json_text(bad));
    EXPECT_NE(parsed.get<std::string>().find("\xEF\xBF\xBD"),
              std::string::npos);
  }
}

TEST(JsonWriter, NumbersReadBackAsTheSameBits) {
  for (const double number :
       {0.1, 1.0 / 3.0, 5e-324, 1.7976931348623157e308, -2.5e-7, 1e21}) {
    std::ostringstream out;
    JsonWriter json(out);
    json.value(number);
    EXPECT_EQ(nlohmann::json::parse(out.str()).get<double>(), number);
  }
}

TEST(JsonWriter, WhatIsNotFiniteIsNoValue) {
  std::ostringstream out;
  JsonWriter json(out);
  json.begin_array();
  json.value(std::numeric_limits<double>::quiet_NaN());
  json.value(std::numeric_limits<double>::infinity());
  json.end_array();
  EXPECT_EQ(out.str(), "[null,null]");
}

struct GroupedDigits : std::numpunct<char> {
  char do_thousands_sep() const override { return '.'; }
  char do_decimal_point() const override { return ','; }
  std::string do_grouping() const override { return "\3"; }
};

TEST(JsonWriter, TheStreamsLocaleChangesNothing) {
  std::ostringstream out;
  out.imbue(std::locale(std::locale::classic(), new GroupedDigits));
  JsonWriter json(out);
  json.begin_array();
  json.value(std::int64_t{1234567});
  json.value(1234.5);
  json.end_array();
  EXPECT_EQ(out.str(), "[1234567,1234.5]");
}

}  // namespace
}  // namespace loqsmith
