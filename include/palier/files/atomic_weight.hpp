// Standard atomic weights, to turn at% into mass %.
#pragma once

#include <optional>
#include <string>

namespace palier::files {

/// Standard atomic weight [g/mol] of an element by its symbol; nothing for elements that no casting alloy holds.
/// Source: T. Prohaska et al., Pure and Applied Chemistry 94 (2022) 573, values abridged to five figures; from memory.
std::optional<double> atomic_weight(const std::string& symbol);

/// Mass % of the solute of a binary. @param at_percent of the solute, 0..100
/// Source: definition of the two, w = x M_s / (x M_s + (1 - x) M_b).
double mass_percent(double at_percent, double solute_weight, double base_weight);

}  // namespace palier::files
