#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace loqsmith {

std::string_view trim(std::string_view text);
std::vector<std::string> split(std::string_view text, char separator);
std::string join(const std::vector<std::string>& parts,
                 std::string_view separator);

/// The known name with the smallest edit distance to `name`, for "did you
/// mean"; empty when none is near (distance above a third of the length + 1).
std::string nearest_name(std::string_view name,
                         const std::vector<std::string>& known);

/// The text in double quotes, control characters and bytes that are no UTF-8
/// written as \xHH, cut after 80 characters: for messages about hostile input.
std::string in_quotes(std::string_view text);

/// True when every byte belongs to well-formed UTF-8 (no surrogates, no
/// overlong forms, nothing above U+10FFFF).
bool is_utf8(std::string_view text);

}  // namespace loqsmith
