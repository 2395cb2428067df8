// Conduction without freezing: series for a body suddenly cooled, and half spaces.
// Sources: Carslaw & Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, ch. II, III, VII, IX; one-term tables for
// checking: Cengel, Heat and Mass Transfer, Table 4-2; Incropera & DeWitt, Table 5.1.
#pragma once

#include <vector>

#include "exact/solutions/phase.hpp"

namespace palier::exact {

/// Plate of half thickness R, long cylinder or sphere of radius R, at one temperature, cooled through a film from t =
/// 0.
class CoolingSeries {
 public:
  enum class Body { plate, cylinder, sphere };
  /// @param biot h R / k; infinite: surface held at the temperature of the surroundings
  /// @param terms of the series
  CoolingSeries(Body body, double biot, int terms = 40);

  const std::vector<double>& roots() const { return roots_; }
  const std::vector<double>& coefficients() const { return coefficients_; }
  /// (T - surroundings) / (T at the start - surroundings). @param place x / R from the center, @param fourier alpha
  /// t/R^2
  double theta(double place, double fourier) const;
  /// Heat lost over all there is to lose.
  double heat_lost(double fourier) const;
  /// Heat flux through the surface over k (T at the start - surroundings) / R.
  double surface_flux(double fourier) const;
  /// Fourier number at which theta at a place has fallen to a value, within [low, high].
  double time_of(double place, double theta_wanted, double low, double high) const;

 private:
  double shape(double zx) const;          ///< of one term
  double shape_gradient(double z) const;  ///< minus its derivative times R at the surface
  double root_of(int n) const;
  double coefficient_of(double z) const;

  Body body_;
  double biot_;
  std::vector<double> roots_, coefficients_;
};

/// Two half spaces brought together at t = 0 in perfect contact, body `right` in x > 0.
struct HalfSpaceContact {
  Phase left, right;
  double left_start = 0, right_start = 0;
  double interface() const;
  double temperature(double x, double t) const;
  double flux(double t) const;  ///< from right to left at the face [W/m2]
};

/// Half space heated or cooled through a film from t = 0.
struct HalfSpaceFilm {
  Phase body;
  double start = 0, surroundings = 0;
  double film = 0;  ///< [W/m2/K]
  double temperature(double x, double t) const;
};

/// Half space that takes a constant flux [W/m2] from t = 0.
struct HalfSpaceFlux {
  Phase body;
  double start = 0;
  double flux = 0;  ///< into the body
  double temperature(double x, double t) const;
};

/// exp(x^2) erfc(x), without overflow.
double scaled_erfc(double x);

}  // namespace palier::exact
