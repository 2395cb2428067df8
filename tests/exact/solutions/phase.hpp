// Constant properties of one phase, or of a mold material, for the exact solutions.
#pragma once

#include <cmath>

namespace palier::exact {

/// Constant properties. Temperatures may be on any scale throughout palier::exact: only differences matter.
struct Phase {
  double density = 0;        ///< [kg/m3]
  double conductivity = 0;   ///< [W/m/K]
  double heat_capacity = 0;  ///< [J/kg/K]

  double diffusivity() const { return conductivity / (density * heat_capacity); }          ///< [m2/s]
  double effusivity() const { return std::sqrt(conductivity * density * heat_capacity); }  ///< [W s^1/2/m2/K]
};

}  // namespace palier::exact
