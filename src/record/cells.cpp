#include "loqsmith/record/cells.hpp"

#include <cmath>

#include "loqsmith/base/csv.hpp"
#include "loqsmith/base/numbers.hpp"
#include "loqsmith/base/text.hpp"

namespace loqsmith {

std::string text_cell(std::string_view text) { return csv_text_cell(text); }

std::string number_cell(double number) {
  return std::isfinite(number) ? shortest(number) : std::string{};
}

std::string number_cell(const std::optional<double>& number) {
  return number ? number_cell(*number) : std::string{};
}

std::string yes_no_cell(bool yes) { return yes ? "yes" : "no"; }

std::string count_cell(std::size_t count) { return std::to_string(count); }

std::string injection_cell(int injection) { return std::to_string(injection); }

std::string words_cell(const std::vector<std::string>& words) {
  return text_cell(join(words, ";"));
}

}  // namespace loqsmith
