// Freezing limited by the sand alone: the casting stays at its melting point, the mold is endless.
// Sources: N. Chvorinov, Giesserei 27 (1940) 177; Adams & Taylor, Trans. AFS 65 (1957) 170; Flemings, Solidification
// Processing, 1974, ch. 1 (citations from memory). Conduction around the cylinder: Carslaw & Jaeger 1959, sec. 13.5.
#pragma once

#include "exact/solutions/phase.hpp"

namespace palier::exact {

/// Superheat counts as latent heat; the mold's face is at the melting point from t = 0.
struct SandLimited {
  double density = 0;      ///< of the metal [kg/m3]
  double latent_heat = 0;  ///< [J/kg]
  double superheat = 0;    ///< heat of it [J/kg], c_l (pouring temperature - T_m)
  double melting_point = 0;
  Phase sand;
  double sand_start = 0;

  double heat_of_freezing() const { return density * (latent_heat + superheat); }  ///< [J/m3]
  double chvorinov_constant() const;                                               ///< C of t = C M^2 [s/m2]
  double plate_time(double modulus) const;  ///< [s], modulus = half thickness [m]
  /// Plate with a contact conductance [W/m2/K] between metal and sand. Source: the half space cooled through a film,
  /// Carslaw & Jaeger 1959, ch. II, integrated over time.
  double plate_time(double modulus, double conductance) const;
  double cylinder_time(double modulus) const;               ///< exact, radius = 2 modulus
  double sphere_time(double modulus) const;                 ///< exact (Adams & Taylor), radius = 3 modulus
  double adams_taylor_cylinder_time(double modulus) const;  ///< short-time form

  /// Heat that a mold around a face held at the melting point has taken up [J/m2].
  double plate_heat(double t) const;
  double plate_heat(double t, double conductance) const;
  double cylinder_heat(double t, double radius) const;
  double sphere_heat(double t, double radius) const;

 private:
  double step() const { return melting_point - sand_start; }
  double shape_time(double modulus, int n) const;
};

}  // namespace palier::exact
