// Checks on the raw bytes of an input file, before any parser sees them.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>

namespace palier::files {

/// Line and column (both from 1, the column in characters) of a byte in a text.
struct TextPlace {
  int line = 1;
  int column = 1;
};
TextPlace place_of_byte(std::string_view text, std::size_t byte);

/// Length in bytes of the UTF-8 character that starts here, 0 where there is none (RFC 3629: no overlong forms, no
/// surrogates, nothing past U+10FFFF).
std::size_t utf8_length(std::string_view text, std::size_t byte);

/// Throws base::InputError where the text is no YAML text we take: too large, binary, not UTF-8, a tab as indentation,
/// or so many indicators that yaml-cpp would need gigabytes.
void check_text(std::string_view text, const std::string& file);

}  // namespace palier::files
