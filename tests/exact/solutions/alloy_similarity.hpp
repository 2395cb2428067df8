// A binary alloy that freezes by the lever rule or Scheil's rule from the wall of a half space.
// Idea: V.R. Voller, Int. J. Heat Mass Transfer 40 (1997) 2869 (citation from memory). Without flow and without solute
// transport on the scale of the casting it is heat conduction with enthalpy h(T), self-similar in sigma = x / sqrt(t).
#pragma once

#include <optional>
#include <vector>

#include "exact/solutions/phase.hpp"

namespace palier::exact {

/// A binary with straight liquidus and constant partition coefficient.
struct BinaryAlloy {
  enum class Rule { lever, scheil };
  Rule rule = Rule::lever;
  Phase solid, liquid;  ///< of one density; conductivity of the mush by fraction solid
  /// Heat that a mass sets free as it freezes at T: the same at any T, or so that enthalpy is a function of T and
  /// fraction solid alone (latent heat at the eutectic, corrected by the difference of the heat capacities).
  enum class LatentHeat { constant, of_phases };
  LatentHeat latent_heat_rule = LatentHeat::constant;
  double latent_heat = 0;            ///< [J/kg]
  double melting_point = 0;          ///< of the pure base metal
  double slope = 0;                  ///< of the liquidus [K/mass %], negative
  double partition_coefficient = 0;  ///< below 1
  double composition = 0;            ///< [mass %]
  double eutectic = 0;               ///< temperature

  double liquidus() const { return melting_point + slope * composition; }
  double end_of_freezing() const;               ///< lever: its solidus, or the eutectic if that is higher
  double last_fraction() const;                 ///< share that freezes at the end of freezing in an arrest, 0..1
  double fraction_solid(double T) const;        ///< 0 above the liquidus, 1 below the end, before the arrest at it
  double fraction_solid_slope(double T) const;  ///< between the ends [1/K]
  double conductivity(double T) const;          ///< [W/m/K]
  double heat_set_free(double T) const;         ///< by freezing at T [J/kg]
  double enthalpy_slope(double T) const;        ///< of the mush, latent heat included [J/kg/K]
  double arrest_heat() const;                   ///< of the arrest [J/kg]
};

/// Wall of the half space: held at a temperature, or a semi-infinite mold in perfect contact.
struct HalfSpaceWall {
  std::optional<Phase> mold;  ///< none: temperature held
  double temperature = 0;     ///< of the wall, or of the mold at the start
};

class AlloySimilarity {
 public:
  /// Shoots on the place of the end-of-freezing front, or on the wall temperature where no skin freezes.
  /// @param start above the liquidus. Throws std::domain_error where no solution lies between the bounds.
  AlloySimilarity(const BinaryAlloy& alloy, const HalfSpaceWall& wall, double start);

  bool has_skin() const { return end_ > 0; }    ///< false: the wall stays at a fixed fraction solid
  double end_constant() const { return end_; }  ///< end-of-freezing front at end_constant sqrt(t) [m/s^1/2]; 0: none
  double start_constant() const { return start_front_; }         ///< start-of-freezing front likewise [m/s^1/2]
  double end_front(double t) const;                              ///< [m]
  double start_front(double t) const;                            ///< [m]
  double end_arrival(double x) const;                            ///< [s]; infinite without a skin
  double start_arrival(double x) const;                          ///< [s]
  double wall_temperature() const { return wall_temperature_; }  ///< of the casting's face
  double temperature(double x, double t) const;                  ///< mold (where there is one) at x < 0; t > 0
  double fraction_solid(double x, double t) const;               ///< x >= 0
  double wall_flux(double t) const;                              ///< [W/m2] leaving through the wall
  double heat_through_wall(double t) const;                      ///< [J/m2] from 0 to t

 private:
  struct Node {
    double T, sigma, flux;  ///< flux: times sqrt(t)
  };
  std::vector<Node> march(double T, double sigma, double flux) const;
  double mismatch_at_liquidus(const std::vector<Node>& nodes) const;
  double skin_wall_temperature(double end) const;
  std::vector<Node> shoot_with_skin(double end) const;
  std::vector<Node> shoot_without_skin(double wall_temperature) const;
  double mush_temperature(double sigma) const;

  BinaryAlloy alloy_;
  HalfSpaceWall wall_;
  double start_;
  double end_ = 0, start_front_ = 0, wall_temperature_ = 0, wall_flux_ = 0;
  std::vector<Node> mush_;  ///< by rising temperature
};

}  // namespace palier::exact
