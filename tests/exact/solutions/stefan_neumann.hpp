// Freezing of a semi-infinite melt from a wall at fixed temperature.
// Source: Carslaw & Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, ch. XI (Neumann's solution; Stefan's where the
// melt has no superheat).
#pragma once

#include "exact/solutions/phase.hpp"

namespace palier::exact {

/// A metal that freezes at one temperature.
struct PureMetal {
  Phase solid, liquid;       ///< of one density
  double latent_heat = 0;    ///< [J/kg]
  double melting_point = 0;  ///< same scale as the other temperatures
};

class StefanNeumann {
 public:
  /// @param wall below, @param start at or above the melting point. Throws std::domain_error otherwise.
  StefanNeumann(const PureMetal& metal, double wall, double start);

  double lambda() const { return lambda_; }      ///< front at 2 lambda sqrt(alpha_s t)
  double front(double t) const;                  ///< [m] from the wall
  double arrival(double x) const;                ///< [s] when the front passes x
  double temperature(double x, double t) const;  ///< x >= 0, t > 0
  double wall_flux(double t) const;              ///< [W/m2] leaving through the wall
  double heat_through_wall(double t) const;      ///< [J/m2] from 0 to t

 private:
  PureMetal metal_;
  double wall_, start_, lambda_;
};

/// What is left over in the heat balance at the front, divided by the density and 2/sqrt(t), for a trial lambda; its
/// root is Neumann's constant.
double front_balance(const PureMetal& metal, double wall, double start, double lambda);

}  // namespace palier::exact
