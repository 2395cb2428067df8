#include "palier/files/unit_text.hpp"

#include <fmt/format.h>

#include <array>
#include <cctype>
#include <utility>

namespace palier::files {
namespace {

constexpr std::size_t longest_unit = 60;
constexpr int deepest_parentheses = 4;
constexpr std::size_t longest_exponent = 1;

bool is_letter(char c) {
  return std::isalpha(static_cast<unsigned char>(c)) != 0 && static_cast<unsigned char>(c) < 128;
}
bool is_digit(char c) { return c >= '0' && c <= '9'; }

/// Superscripts and typographic signs and what they stand for.
constexpr std::array<std::pair<std::string_view, char>, 13> superscripts{{{"⁰", '0'},
                                                                          {"¹", '1'},
                                                                          {"²", '2'},
                                                                          {"³", '3'},
                                                                          {"⁴", '4'},
                                                                          {"⁵", '5'},
                                                                          {"⁶", '6'},
                                                                          {"⁷", '7'},
                                                                          {"⁸", '8'},
                                                                          {"⁹", '9'},
                                                                          {"⁻", '-'},
                                                                          {"⁺", '+'},
                                                                          {"−", '-'}}};

class UnitParser {
 public:
  explicit UnitParser(std::string_view text) : text_(text) { result_.written = std::string(text); }

  UnitText parse() {
    unit(0);
    if (at_ < text_.size()) fault();
    return std::move(result_);
  }

 private:
  [[noreturn]] void fault(const std::string& hint = {}) const {
    throw QuantityFault(fmt::format("found the unit '{}', which cannot be read", text_),
                        hint.empty() ? "write units as in W/m2/K or kJ/kg" : hint);
  }
  bool take(std::string_view token) {
    if (text_.substr(at_, token.size()) != token) return false;
    at_ += token.size();
    return true;
  }
  void spaces() {
    while (take(" ")) {
    }
  }

  void unit(int depth) {
    if (depth > deepest_parentheses) fault("use fewer parentheses");
    bool quotient = false;
    factor(depth);
    for (;;) {
      spaces();
      if (at_ >= text_.size() || text_[at_] == ')') return;
      if (take("/")) {
        quotient = true;
        result_.normal += '/';
      } else {
        // Every product sign is optional: a space will do.
        const bool sign = take("**") || take("*") || take("·") || take("⋅") || take(".");
        if (quotient) result_.product_after_quotient = true;
        result_.normal += '*';
        if (sign && at_ < text_.size() && is_digit(text_[at_])) fault("exponents must be whole, units hold no numbers");
      }
      spaces();
      factor(depth);
    }
  }

  void factor(int depth) {
    if (take("(")) {
      result_.normal += '(';
      spaces();
      unit(depth + 1);
      if (!take(")")) fault("close the parenthesis");
      result_.normal += ')';
    } else {
      name();
    }
    exponent();
  }

  void name() {
    std::string found;
    while (at_ < text_.size()) {
      if (take("°"))
        found += "deg";
      else if (take("µ") || take("μ"))
        found += 'u';
      else if (is_letter(text_[at_]))
        found += text_[at_++];
      else
        break;
    }
    const bool percent = take("%") || ((found == "wt" || found == "at" || found == "mass") && take(" %"));
    if (percent) found += '%';
    if (found.empty()) {
      const bool number = at_ < text_.size() && is_digit(text_[at_]);
      fault(number ? "a unit holds no numbers but whole exponents" : "");
    }
    result_.normal += percent ? "percent" : found;
    result_.names.push_back(std::move(found));
  }

  void exponent() {
    const std::string digits = superscript();
    if (!digits.empty()) {
      append_exponent(digits);
      return;
    }
    const bool power = take("^") || (text_.substr(at_, 2) == "**" && take("**"));
    std::string written;
    const std::size_t before = at_;
    if (take("-"))
      written += '-';
    else
      take("+");
    while (at_ < text_.size() && is_digit(text_[at_])) written += text_[at_++];
    const bool any = !written.empty() && is_digit(written.back());
    if (!any && (power || at_ != before)) fault("an exponent is a whole number, as in m2 or m^2");
    if (any) append_exponent(written);
  }

  std::string superscript() {
    std::string digits;
    for (bool found = true; found;) {
      found = false;
      for (const auto& [sign, plain] : superscripts) {
        if (sign == "−" || !take(sign)) continue;
        digits += plain;
        found = true;
      }
    }
    return digits;
  }

  void append_exponent(const std::string& digits) {
    const std::size_t count = digits.size() - (digits[0] == '-' || digits[0] == '+' ? 1 : 0);
    const bool sign_inside = digits.find_first_of("+-", 1) != std::string::npos;
    const bool decimal = at_ + 1 < text_.size() && text_[at_] == '.' && is_digit(text_[at_ + 1]);
    const bool slash_half = at_ + 1 < text_.size() && text_[at_] == '/' && is_digit(text_[at_ + 1]);
    if (decimal || slash_half) fault("exponents must be whole numbers");
    if (count == 0 || count > longest_exponent || sign_inside) fault("an exponent has one digit, as in m2 or K-1");
    result_.normal += '^' + (digits[0] == '+' ? digits.substr(1) : digits);
  }

  std::string_view text_;
  std::size_t at_ = 0;
  UnitText result_;
};

}  // namespace

UnitText parse_unit_text(std::string_view text) {
  if (text.size() > longest_unit)
    throw QuantityFault(fmt::format("found a unit of {} characters; expected at most {}", text.size(), longest_unit),
                        "write units as in W/m2/K");
  return UnitParser(text).parse();
}

}  // namespace palier::files
