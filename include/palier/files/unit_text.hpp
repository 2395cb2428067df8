// The strict grammar of unit texts, before UDUNITS-2 sees them.
//
// UDUNITS-2 reads `m/s^0.5` as 5 m and accepts times, logarithms and numbers inside units. This grammar admits names,
// products, quotients, parentheses and whole exponents only:
//
//   unit   = factor { [ "*" | "." | "·" | "/" ] factor }
//   factor = ( name | "(" unit ")" ) [ [ "^" | "**" ] [ "+" | "-" ] digits | superscript digits ]
#pragma once

#include <stdexcept>
#include <string>
#include <string_view>
#include <vector>

namespace palier::files {

/// A text that is no quantity, without its place; the reader of the file adds that.
class QuantityFault : public std::runtime_error {
 public:
  QuantityFault(const std::string& problem, std::string hint) : std::runtime_error(problem), hint_(std::move(hint)) {}
  const std::string& hint() const { return hint_; }

 private:
  std::string hint_;
};

/// A unit as written, taken apart.
struct UnitText {
  std::string written;                  ///< trimmed
  std::string normal;                   ///< in UDUNITS-2's spelling, e.g. "W/m^2/K"
  std::vector<std::string> names;       ///< unit names in order, e.g. W, m, K; "wt%", "at%", "%" count as names
  bool product_after_quotient = false;  ///< as in `W/m2 K`, which is (W/m2) times K
};

/// Throws QuantityFault where the text is no unit by the grammar above.
UnitText parse_unit_text(std::string_view text);

}  // namespace palier::files
