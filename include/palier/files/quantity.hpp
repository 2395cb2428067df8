// A number with its unit, as written in input files: "40 mm", "700 degC", "800 W/m2/K", "7 wt%".
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "palier/files/unit_text.hpp"

namespace palier::files {

/// What a number measures; the key decides it. Internal units are SI, temperatures in kelvin.
enum class QuantityKind {
  temperature,             ///< of a thermometer: offsets apply, 20 degC is 293.15 K
  temperature_difference,  ///< superheat: 20 degC is 20 K
  length,
  time,
  conductance,    ///< also film coefficients [W/m2/K]
  conductivity,   ///< [W/m/K]
  diffusivity,    ///< [m2/s]
  cooling_rate,   ///< [K/s]
  heat_capacity,  ///< [J/kg/K]
  density,
  latent_heat,  ///< [J/kg]
  composition,  ///< [mass %]; at% is marked and converted by who knows the two elements
  slope,        ///< of a liquidus [K per mass %]
  fraction,     ///< 0..1, bare or in %
  percentage,   ///< of something that is named by the key; a fraction inside, % required
  mass_share,   ///< a mass fraction inside; %, wt% or mass% required
  ratio,        ///< a bare number
};

/// What the messages and the reference page say of a kind.
struct KindWords {
  std::string name;      ///< with its article: "a length"
  std::string si;        ///< SI unit in UDUNITS-2's spelling; empty where UDUNITS-2 is not asked
  std::string examples;  ///< "40 mm or 1.5 in"
};
const KindWords& words_of(QuantityKind kind);

struct Quantity {
  double value = 0;             ///< in the unit of the kind
  bool atomic_percent = false;  ///< a composition in at% [at%], still to be converted
};

/// A number by the strict grammar [sign] digits [. digits] [e [sign] digits]: no leading zeros, hexadecimals,
/// separators, infinities. @param length out: characters read. Throws QuantityFault.
double parse_number(std::string_view text, std::size_t& length);

/// Throws QuantityFault saying what was found and expected, with the units that would do.
Quantity parse_quantity(std::string_view text, QuantityKind kind);

}  // namespace palier::files
