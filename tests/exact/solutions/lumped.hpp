// A casting so thin, or so poorly cooled, that it has one temperature (Biot number h M / k far below 1).
// Source: heat balance rho M dh/dt = -h (T - surroundings); for a pure metal at an interface also Flemings,
// Solidification Processing, 1974, ch. 1 (citation from memory).
#pragma once

#include <functional>

namespace palier::exact {

struct LumpedCasting {
  double density = 0;  ///< [kg/m3]
  double modulus = 0;  ///< volume over cooled area [m]
  double film = 0;     ///< [W/m2/K]
  double surroundings = 0;

  /// Time to fall from one temperature to another at constant heat capacity [J/kg/K].
  double cooling_time(double heat_capacity, double from, double to) const;
  /// The same with a heat capacity (latent heat included) that depends on temperature.
  double cooling_time(const std::function<double(double)>& heat_capacity, double from, double to) const;
  /// Time of an arrest that sets free `heat` [J/kg] at T.
  double arrest_time(double heat, double T) const;
};

}  // namespace palier::exact
