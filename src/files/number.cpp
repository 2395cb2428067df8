// The strict grammar of numbers. yaml-cpp's own conversion would read 010 as 8 and take .inf, .nan and yes.
#include <fmt/format.h>

#include <charconv>
#include <cmath>
#include <system_error>

#include "palier/files/quantity.hpp"

namespace palier::files {
namespace {

bool is_digit(std::string_view text, std::size_t at) { return at < text.size() && text[at] >= '0' && text[at] <= '9'; }

std::size_t digits(std::string_view text, std::size_t at) {
  while (is_digit(text, at)) ++at;
  return at;
}

[[noreturn]] void fault(std::string_view text, const std::string& hint) {
  throw QuantityFault(fmt::format("found '{}', which does not begin with a number", text), hint);
}

void refuse_other_notations(std::string_view text, std::size_t start, std::size_t end) {
  const auto written = [&] { return fmt::format("found the number '{}'", text); };
  if (end - start > 1 && text[start] == '0')
    throw QuantityFault(written() + " with a leading zero", "write it without the leading zero");
  if (end - start == 1 && text[start] == '0' && end < text.size() && (text[end] == 'x' || text[end] == 'X'))
    throw QuantityFault(written() + " in hexadecimal", "write a decimal number");
  if (end < text.size() && text[end] == ',' && is_digit(text, end + 1))
    throw QuantityFault(written() + " with a comma", "write a decimal point and no separators of thousands");
  if (end < text.size() && text[end] == '_')
    throw QuantityFault(written() + " with an underscore", "write the digits without separators");
}

}  // namespace

double parse_number(std::string_view text, std::size_t& length) {
  const std::size_t start = !text.empty() && (text[0] == '-' || text[0] == '+') ? 1 : 0;
  const std::size_t whole = digits(text, start);
  if (whole == start) {
    if (text.substr(start, 1) == "." && is_digit(text, start + 1)) fault(text, "write a zero before the point");
    if (text.substr(0, 3) == "−") fault(text, "write the minus sign as -");
    fault(text, "");
  }
  refuse_other_notations(text, start, whole);
  std::size_t end = whole;
  if (end < text.size() && text[end] == '.') {
    if (!is_digit(text, end + 1))
      throw QuantityFault(fmt::format("found '{}' with no digit after the point", text), "write a digit or no point");
    end = digits(text, end + 1);
    if (end < text.size() && (text[end] == '.' || text[end] == ','))
      throw QuantityFault(fmt::format("found '{}' with two points", text), "write no separators of thousands");
  }
  if (end < text.size() && (text[end] == 'e' || text[end] == 'E')) {
    const bool sign = end + 1 < text.size() && (text[end + 1] == '-' || text[end + 1] == '+');
    const std::size_t exponent = end + (sign ? 2 : 1);
    if (is_digit(text, exponent)) end = digits(text, exponent);
  }
  const std::size_t from = text[0] == '+' ? 1 : 0;  // from_chars takes no plus sign
  double value = 0;
  const auto [stop, error] = std::from_chars(text.data() + from, text.data() + end, value);
  if (error != std::errc() || stop != text.data() + end || !std::isfinite(value))
    throw QuantityFault(fmt::format("found the number '{}', which is too large or too small", text.substr(0, end)), "");
  length = end;
  return value;
}

}  // namespace palier::files
