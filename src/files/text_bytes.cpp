#include "palier/files/text_bytes.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "palier/base/error.hpp"
#include "palier/files/source_tree.hpp"

namespace palier::files {
namespace {

bool continues(std::string_view text, std::size_t byte) {
  return byte < text.size() && (static_cast<unsigned char>(text[byte]) & 0xC0U) == 0x80U;
}

[[noreturn]] void fail(std::string_view text, std::size_t byte, const std::string& file, const std::string& problem,
                       const std::string& hint) {
  const TextPlace at = place_of_byte(text, byte);
  throw base::InputError({file, at.line, at.column}, "", problem, hint);
}

void check_characters(std::string_view text, const std::string& file) {
  for (std::size_t i = 0; i < text.size();) {
    const auto c = static_cast<unsigned char>(text[i]);
    const bool control = (c < 0x20 && c != '\n' && c != '\r' && c != '\t') || c == 0x7F;
    if (control)
      fail(text, i, file, fmt::format("found the control byte 0x{:02X}; expected a text file", c),
           "is this a binary file?");
    const std::size_t length = utf8_length(text, i);
    if (length == 0)
      fail(text, i, file, fmt::format("found the byte 0x{:02X}, which is not UTF-8; expected a UTF-8 text", c),
           "save the file as UTF-8");
    i += length;
  }
}

void check_tabs(std::string_view text, const std::string& file) {
  for (std::size_t start = 0; start < text.size();) {
    const std::size_t end = std::min(text.find('\n', start), text.size());
    const std::string_view line = text.substr(start, end - start);
    const std::size_t first = line.find_first_not_of(" \t\r");
    const std::size_t tab = line.find('\t');
    if (first != std::string_view::npos && tab < first && line[first] != '#')
      fail(text, start + tab, file, "found a tab in the indentation; expected spaces", "indent with spaces");
    start = end + 1;
  }
}

void check_indicators(std::string_view text, const std::string& file) {
  static constexpr std::string_view indicators = "[]{},:?-&*!|>'\"%@`";
  int count = 0;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if (indicators.find(text[i]) == std::string_view::npos) continue;
    if (++count > SourceLimits::indicators)
      fail(text, i, file,
           fmt::format("found more than {} of the characters {}; expected a smaller file", SourceLimits::indicators,
                       indicators),
           "shorten its tables");
  }
}

}  // namespace

TextPlace place_of_byte(std::string_view text, std::size_t byte) {
  TextPlace at;
  for (std::size_t i = 0; i < std::min(byte, text.size()); ++i) {
    if (text[i] == '\n') {
      ++at.line;
      at.column = 1;
    } else if (!continues(text, i)) {
      ++at.column;
    }
  }
  return at;
}

std::size_t utf8_length(std::string_view text, std::size_t byte) {
  const auto at = [&](std::size_t i) { return static_cast<unsigned char>(text[byte + i]); };
  const unsigned char first = at(0);
  if (first < 0x80) return 1;
  if (first < 0xC2 || first > 0xF4) return 0;
  const std::size_t length = first < 0xE0 ? 2 : first < 0xF0 ? 3 : 4;
  for (std::size_t i = 1; i < length; ++i)
    if (!continues(text, byte + i)) return 0;
  const bool overlong = (first == 0xE0 && at(1) < 0xA0) || (first == 0xF0 && at(1) < 0x90);
  const bool surrogate = first == 0xED && at(1) > 0x9F;
  const bool too_large = first == 0xF4 && at(1) > 0x8F;
  return overlong || surrogate || too_large ? 0 : length;
}

void check_text(std::string_view text, const std::string& file) {
  if (text.size() > SourceLimits::bytes)
    throw base::InputError({file, 0, 0}, "",
                           fmt::format("found more than {} bytes; expected a smaller file", SourceLimits::bytes));
  check_characters(text, file);
  if (text.find_first_not_of(" \t\r\n") == std::string_view::npos)
    throw base::InputError({file, 0, 0}, "", "found an empty file; expected keys with values",
                           "an input file begins with its version, such as 'palier: 1'");
  check_tabs(text, file);
  check_indicators(text, file);
}

}  // namespace palier::files
