// The state of a march at one time, and of a stage of a step under way; for all lanes.
#pragma once

#include <array>
#include <limits>
#include <vector>

#include "palier/base/lanes.hpp"
#include "palier/heat/front.hpp"

namespace palier::heat {

/// Fronts of all lanes.
template <class Real>
using LaneFronts = std::array<Fronts, base::lane_count<Real>>;

/// What is worth interpolating within a step besides enthalpies.
struct Marks {
  double inner_surface = 0, outer_surface = 0;  ///< temperature of the metal's faces [K]
  /// Radius of the front with its solid side at the smaller (0) and at the larger radius (1) [m]; NaN: none.
  std::array<double, 2> front_radius{std::numeric_limits<double>::quiet_NaN(),
                                     std::numeric_limits<double>::quiet_NaN()};
};

/// State of all lanes at one time each.
template <class Real>
struct State {
  std::vector<Real> enthalpy;  ///< of each cell [J/m3]
  std::vector<Real> unknown;   ///< the same but where a front lies in the cell: its latent enthalpy
  std::vector<Real> flow;      ///< toward larger radius through each face [W]
  LaneFronts<Real> fronts;
  std::array<Marks, base::lane_count<Real>> marks;
};

/// What Newton works on within a stage: unknown + excess of fronts - weight * gain = base.
template <class Real>
struct Stage {
  std::vector<Real> unknown;
  std::vector<Real> base;  ///< what earlier stages give [J/m3]
  LaneFronts<Real> fronts;
  Real weight;  ///< of the implicit part [s]
};

}  // namespace palier::heat
