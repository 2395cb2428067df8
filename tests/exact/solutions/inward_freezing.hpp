// Plate, cylinder and sphere that freeze inward through a film, the melt at its melting point from the start.
// Sources: R. Plank, Z. ges. Kaelte-Ind. 20 (1913) and Z. VDI Beih. Verfahrenstechnik (1941) (citations from memory).
// The bounds and the first-order correction are derived here: the heat equation times the positive harmonic weight that
// meets the outer boundary condition, integrated over body and time.
#pragma once

#include "exact/solutions/phase.hpp"

namespace palier::exact {

struct InwardFreezing {
  int shape = 0;  ///< 0 plate, 1 cylinder, 2 sphere
  Phase solid;
  double latent_heat = 0;   ///< [J/kg]
  double radius = 0;        ///< or half thickness [m]
  double film = 0;          ///< [W/m2/K]; infinite: surface held
  double undercooling = 0;  ///< melting point less surroundings [K]

  double biot() const { return film * radius / solid.conductivity; }
  double stefan() const { return solid.heat_capacity * undercooling / latent_heat; }
  double plank_time() const;                                            ///< without sensible heat: a lower bound [s]
  double latest_time() const { return plank_time() * (1 + stefan()); }  ///< upper bound [s]
  /// Plate only: first order in the Stefan number, front at a depth below the surface [s].
  double plate_time_first_order(double depth) const;
};

}  // namespace palier::exact
