#include "loqsmith/record/html.hpp"

#include <gtest/gtest.h>

namespace loqsmith {
namespace {

TEST(HtmlText, EscapesEverythingThatMeansSomething) {
  EXPECT_EQ(html_text("<a href=\"x\">&'"),
            "&lt;a href=&quot;x&quot;&gt;&amp;&#39;");
  EXPECT_EQ(html_text("µg/L 水"), "µg/L 水");
}

TEST(HtmlText, ReplacesControlCharactersAndBadBytes) {
  const std::string replacement = "\xEF\xBF\xBD";
  EXPECT_EQ(html_text(std::string_view("a\0b\x1b", 4)),
            "a" + replacement + "b" + replacement);
  EXPECT_EQ(html_text("a\xFF<"), "a" + replacement + "&lt;");
}

TEST(HtmlId, KeepsNamesApart) {
  EXPECT_EQ(html_id("a-", "p,p'-DDE 2"), "a-p_2cp_27-DDE_202");
  EXPECT_NE(html_id("a-", "x y"), html_id("a-", "x_20y"));
}

TEST(HtmlNumber, ShowsFewDigitsAndKeepsAll) {
  EXPECT_EQ(html_number(0.123456789),
            "<data value=\"0.123456789\">0.1235</data>");
  EXPECT_EQ(html_number(1234567.5), "<data value=\"1234567.5\">1235000</data>");
  EXPECT_EQ(html_number(1.5e-7), "<data value=\"1.5e-07\">1.5e-7</data>");
  EXPECT_EQ(html_number(85.0), "<data value=\"85\">85</data>");
  EXPECT_EQ(html_number(0.1 + 0.2),
            "<data value=\"0.30000000000000004\">0.3000</data>");
  EXPECT_EQ(html_number(std::optional<double>{}), "\xE2\x80\x93");
}

TEST(PowerNumber, DropsWhatSaysNothing) {
  EXPECT_EQ(power_number(2e6, 3), "2e6");
  EXPECT_EQ(power_number(-1.25e-12, 3), "-1.25e-12");
  EXPECT_EQ(power_number(1e100, 1), "1e100");
  EXPECT_EQ(power_number(0.0, 3), "0");
}

}  // namespace
}  // namespace loqsmith
