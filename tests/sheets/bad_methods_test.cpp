#include <algorithm>

#include "loqsmith/base/input_error.hpp"
#include "loqsmith/sheets/read_sheets.hpp"
#include "sheets/example.hpp"
#include "sheets/method_cases.hpp"

namespace loqsmith {
namespace {

using test::kExampleMethod;
using test::MethodCase;
using test::WantedProblem;

std::vector<InputProblem> problems_of(const std::string& text) {
  try {
    read_method(text, "method.xml");
  } catch (const InputError& error) {
    return error.problems();
  }
  return {};
}

std::string all_of(const std::vector<InputProblem>& problems) {
  std::string text;
  for (const InputProblem& one : problems) text += describe(one) + '\n';
  return text;
}

// "method.xml:LINE:COLUMN: " of the first place where `at` stands.
std::string place_of(const std::string& text, const std::string& at) {
  const std::size_t offset = text.find(at);
  if (offset == std::string::npos) return "no such text: " + at;
  std::size_t line = 1;
  std::size_t column = 1;
  for (std::size_t i = 0; i < offset; ++i) {
    const bool ends_line = text[i] == '\n';
    line += ends_line ? 1 : 0;
    column = ends_line ? 1 : column + 1;
  }
  return "method.xml:" + std::to_string(line) + ':' + std::to_string(column) +
         ": ";
}

bool is_said(const std::vector<InputProblem>& problems, const MethodCase& one,
             const WantedProblem& wanted) {
  const std::string place =
      wanted.at.empty() ? "method.xml" : place_of(one.text, wanted.at);
  return std::any_of(problems.begin(), problems.end(),
                     [&](const InputProblem& problem) {
                       const std::string text = describe(problem);
                       return text.starts_with(place) &&
                              text.find(wanted.words) != std::string::npos;
                     });
}

TEST(BadMethods, EachIsRefusedWithItsPlaceAndWords) {
  for (const MethodCase& one : test::bad_methods()) {
    const std::vector<InputProblem> problems = problems_of(one.text);
    ASSERT_FALSE(one.problems.empty()) << one.name;
    for (const WantedProblem& wanted : one.problems) {
      EXPECT_TRUE(is_said(problems, one, wanted))
          << one.name << ": wanted " << wanted.words << " at "
          << place_of(one.text, wanted.at) << "\nsaid:\n"
          << all_of(problems);
    }
  }
}

TEST(BadMethods, NothingElseIsSaid) {
  for (const MethodCase& one : test::bad_methods()) {
    const auto problems = problems_of(one.text);
    EXPECT_EQ(problems.size(), one.problems.size()) << one.name << '\n'
                                                    << all_of(problems);
  }
}

TEST(BadMethods, GoodOnesAreNotRefused) {
  for (const MethodCase& one : test::good_methods()) {
    const auto problems = problems_of(one.text);
    EXPECT_TRUE(problems.empty()) << one.name << '\n' << all_of(problems);
  }
}

TEST(BadMethods, AllProblemsAreSaidAtOnceInTheirOrder) {
  std::string text = kExampleMethod;
  text = test::replaced(text, "response=\"area\"", "respons=\"area\"");
  text = test::replaced(text, "baseline=\"valley\"", "bounds=\"feet\"");
  text = test::replaced(text, "trace=\"uv220\"", "trace=\"uv\"");
  text = test::replaced(text, "weight=\"1/x\"", "weight=\"1/y\"");
  text = test::replaced(text, "85 115", "85");
  const auto problems = problems_of(text);
  ASSERT_EQ(problems.size(), 5U) << all_of(problems);
  EXPECT_EQ(describe(problems[0]),
            "method.xml:8:16: expected one of response, bounds, baseline, "
            "overlap, smoothing-points, smoothing-order, threshold, "
            "minimum-width, hold-up-time in <integration>, found the attribute "
            "\"respons\"; did you mean \"response\"?");
  EXPECT_EQ(describe(problems[1]),
            "method.xml:8:31: expected \"template\" or \"own\", found "
            "bounds=\"feet\"");
  EXPECT_EQ(problems[2].line, 11U);
  EXPECT_EQ(problems[3].line, 16U);
  EXPECT_EQ(problems[4].line, 27U);
}

TEST(BadMethods, EveryCutIsRefused) {
  for (std::size_t end = 0; end + 1 < kExampleMethod.size(); ++end) {
    if (kExampleMethod.compare(end, std::string::npos, "\n") == 0) continue;
    ASSERT_FALSE(problems_of(kExampleMethod.substr(0, end)).empty()) << end;
  }
}

TEST(BadMethods, EveryChangedByteIsReadOrRefusedInWords) {
  for (std::size_t i = 0; i < kExampleMethod.size(); ++i) {
    for (const char c : {'\0', '<', '"', '&', '9', '\x80', ' '}) {
      std::string text = kExampleMethod;
      text[i] = c;
      for (const InputProblem& problem : problems_of(text)) {
        ASSERT_GT(problem.line, 0U) << i << ' ' << describe(problem);
        ASSERT_FALSE(problem.found.empty()) << i;
      }
    }
  }
}

TEST(BadMethods, EndlessProblemsEnd) {
  std::string text = "<method xmlns=\"urn:loqsmith:method\">";
  for (int i = 0; i < 20000; ++i) text += "<nonsense/>";
  EXPECT_EQ(problems_of(text + "</method>").size(), 1000U);
  EXPECT_EQ(problems_of(std::string(5U << 20U, ' ')).size(), 1U);
}

}  // namespace
}  // namespace loqsmith
