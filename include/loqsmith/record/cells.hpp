#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

// What the cells of the published tables have in common. All of these give
// finished cells for write_csv_row().

/// Quoted and made harmless for spreadsheets where needed.
std::string text_cell(std::string_view text);

/// Shortest round-trip form; empty for no value (one that is not finite is
/// none).
std::string number_cell(const std::optional<double>& number);
std::string number_cell(double number);

/// `yes` or `no`.
std::string yes_no_cell(bool yes);

/// A whole number.
std::string count_cell(std::size_t count);
std::string injection_cell(int injection);

/// Words separated by semicolons.
std::string words_cell(const std::vector<std::string>& words);

}  // namespace loqsmith
