// What the heat crosses between layers and at the ends: contacts, films, fixed temperature, symmetry.
#pragma once

#include "palier/base/table.hpp"

namespace palier::heat {

/// Shape of the section; the value is the exponent m of r^m in the heat equation.
enum class Shape { plate = 0, cylinder = 1, sphere = 2 };

/// Conductance between two layers [W/m2/K].
struct Contact {
  enum class Over {
    perfect,                ///< no resistance
    constant,               ///< conductance(0)
    time,                   ///< conductance(t), t [s] from pouring
    surface_temperature,    ///< conductance(T), T [K] of the casting's face at the contact
    surface_fraction_solid  ///< conductance(fs), fs of the casting's cell at the contact: the air gap that opens
  };
  Over over = Over::perfect;
  base::Table conductance;
};

/// What lies beyond the last layer.
struct Boundary {
  enum class Kind { adiabatic, film, fixed_temperature, heat_flux };
  Kind kind = Kind::adiabatic;
  double film_coefficient = 0;  ///< [W/m2/K], film
  double emissivity = 0;        ///< 0..1, film: radiates to the surroundings as a gray body
  double temperature = 0;       ///< of the surroundings (film) or of the face (fixed) [K]
  base::Table heat_flux;        ///< leaving through the face, over time [W/m2], heat_flux
};

}  // namespace palier::heat
