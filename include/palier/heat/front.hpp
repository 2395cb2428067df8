// The front of the last arrest, placed inside the cell that freezes isothermally.
#pragma once

#include <array>

#include "palier/base/table.hpp"
#include "palier/heat/body.hpp"

namespace palier::heat {

/// A front at the temperature of the last arrest inside a cell of the metal, solid on one side and liquid (or mush) on
/// the other. Its unknown is the latent enthalpy: what the cell would hold with all of it at the arrest's temperature.
/// It may lie outside the cell a little while the neighbor is not yet ready to take it over.
struct Front {
  int cell = -1;
  int solid_side = 0;  ///< +1: solid at the larger radius; -1: at the smaller
};

/// At most one front from each wall.
struct Fronts {
  std::array<Front, 2> front;
  int count = 0;

  const Front* in_cell(int cell) const {
    for (int i = 0; i < count; ++i)
      if (front[static_cast<std::size_t>(i)].cell == cell) return &front[static_cast<std::size_t>(i)];
    return nullptr;
  }
  const Front* with_solid_side(int side) const {
    for (int i = 0; i < count; ++i)
      if (front[static_cast<std::size_t>(i)].solid_side == side) return &front[static_cast<std::size_t>(i)];
    return nullptr;
  }
  void add(Front f) { front[static_cast<std::size_t>(count++)] = f; }
  void remove(int cell) {
    int kept = 0;
    for (int i = 0; i < count; ++i)
      if (front[static_cast<std::size_t>(i)].cell != cell)
        front[static_cast<std::size_t>(kept++)] = front[static_cast<std::size_t>(i)];
    count = kept;
  }
};

/// What a front needs to know of its metal at the last arrest; `exists` is false where freezing ends without one.
struct LastArrest {
  explicit LastArrest(const alloy::EnthalpyCurve& metal);
  bool exists = false;
  double temperature = 0;                                  ///< [K]
  double potential = 0;                                    ///< [W/m]
  double cold = 0, hot = 0;                                ///< enthalpy completed and begun [J/m3]
  double solid_conductivity = 0, liquid_conductivity = 0;  ///< on both sides [W/m/K]
  double solid_capacity = 0;                               ///< dH/dT just below [J/m3/K]
  base::Table hot_enthalpy;                                ///< enthalpy over temperature above [J/m3]
};

/// Where a front lies in its cell and how that changes with its unknown.
struct FrontPlace {
  double solid_share = 0;  ///< of the cell's volume
  double radius = 0;       ///< of the front [m]
  /// From where the flows are taken, with its change per unknown: the front, but not all the way to the center of a
  /// cylinder or sphere, where the flow to a front of vanishing radius vanishes and the front would never get there.
  double flow_radius = 0, flow_radius_slope = 0;
  double solid_depth = 0, liquid_depth = 0;  ///< from there to the cell's face on either side [m]
};
FrontPlace place(const Body& body, const LastArrest& arrest, const Front& front, double unknown);

/// Derivatives of a flow toward larger radius between the front and the center of a neighbor inside the metal.
struct FrontFlow {
  double flow = 0;         ///< toward larger radius [W]
  double by_front = 0;     ///< per unknown of the front's cell
  double by_neighbor = 0;  ///< per unknown of the neighbor
};
FrontFlow flow_to_neighbor(const Body& body, const LastArrest& arrest, const Front& front, const FrontPlace& where,
                           int side, double neighbor_potential, double neighbor_potential_slope);

}  // namespace palier::heat
