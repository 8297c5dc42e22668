#pragma once

#include <optional>
#include <string>
#include <string_view>

namespace loqsmith {

// Texts and numbers of the report. Whatever comes from sheets or files passes
// through html_text() or html_id().

/// Safe as text and inside double-quoted attributes: & < > " ' as entities,
/// control characters and bytes that are no UTF-8 as U+FFFD.
std::string html_text(std::string_view text);

/// A name of the user's, kept apart from the writing direction around it.
std::string html_name(std::string_view name);

/// `prefix` and the name as an id: letters, digits and '-', every other byte
/// as '_' and two hex digits.
std::string html_id(std::string_view prefix, std::string_view name);

/// The number with `digits` significant digits for the eye; the element's
/// value is the very text of the tables.
std::string html_number(double number, int digits = 4);

/// The same; a dash where there is none.
std::string html_number(const std::optional<double>& number, int digits = 4);

/// "1.2e-7": at most so many digits, none that say nothing.
std::string power_number(double number, int digits);

/// Four significant digits or so, as power_number() where plain digits would be
/// long.
std::string short_number(double number, int digits = 4);

}  // namespace loqsmith
