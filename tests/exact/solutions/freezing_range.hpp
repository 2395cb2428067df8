// An alloy whose fraction solid is linear in temperature: constant effective heat capacity in the mushy zone.
// Around a plane wall at fixed temperature, a line sink and a point sink.
// Sources: Tien & Geiger, J. Heat Transfer 89 (1967) 230; Cho & Sunderland, J. Heat Transfer 91 (1969) 421; Ozisik &
// Uzzell, J. Heat Transfer 101 (1979) 331 (citations from memory). Formulas derived here: in each region the heat
// equation has the solution A - B F(u), u = r / (2 sqrt(alpha t)), F' = -exp(-u^2) u^-m.
#pragma once

#include <optional>

#include "exact/solutions/phase.hpp"

namespace palier::exact {

/// The share 1 - eutectic freezes evenly between liquidus and solidus, the share `eutectic` at the solidus.
struct LinearAlloy {
  Phase solid, mush, liquid;  ///< of one density; the mush's heat capacity without latent heat
  double latent_heat = 0;     ///< [J/kg]
  double liquidus = 0;
  double solidus = 0;   ///< equal to the liquidus: a pure metal, which has no mush
  double eutectic = 0;  ///< 0..1

  bool pure() const { return !(solidus < liquidus); }
  double mush_heat_capacity() const;  ///< with latent heat [J/kg/K]
};

/// Plane: per area, line: per length, point: whole.
enum class SinkShape { plane = 0, line = 1, point = 2 };

class LinearFreezing {
 public:
  /// Half space with its wall held at `wall` < solidus. @param start above the liquidus (pure: not below).
  static LinearFreezing fixed_wall(const LinearAlloy& alloy, double wall, double start);
  /// Line sink that takes `rate` [W/m] at r = 0.
  static LinearFreezing line_sink(const LinearAlloy& alloy, double rate, double start);
  /// Point sink that takes strength * sqrt(t) [W] at r = 0. @param strength [W s^-1/2]
  static LinearFreezing point_sink(const LinearAlloy& alloy, double strength, double start);

  double lambda() const { return lambda_; }      ///< end-of-freezing front at 2 lambda sqrt(alpha_s t)
  double mu() const { return mu_; }              ///< start-of-freezing front at 2 mu sqrt(alpha_m t); pure: NaN
  double end_front(double t) const;              ///< [m]
  double start_front(double t) const;            ///< [m]; pure: the same as end_front
  double end_arrival(double r) const;            ///< [s] when freezing ends at r
  double start_arrival(double r) const;          ///< [s] when freezing starts at r
  double temperature(double r, double t) const;  ///< r >= 0 (sinks: > 0), t > 0
  /// Heat flowing inward through radius r, within the solid: [W/m2], [W/m] or [W].
  double heat_rate(double r, double t) const;
  double wall_flux(double t) const;          ///< heat_rate at r = 0: what wall or sink takes
  double heat_through_wall(double t) const;  ///< from 0 to t: [J/m2], [J/m] or [J]

 private:
  LinearFreezing(const LinearAlloy& alloy, SinkShape shape, double start, std::optional<double> wall, double strength);
  double F(double u) const;
  double decay(double u) const;  ///< -F'(u)
  double amplitude_solid(double lambda) const;
  double outer_front(double lambda) const;
  double balance_at_end_front(double lambda) const;

  LinearAlloy alloy_;
  SinkShape shape_;
  double start_;
  std::optional<double> wall_;
  double solid_strength_ = 0;                       ///< B of the solid where a sink is given [K]
  double solid_width_, mush_width_, liquid_width_;  ///< 2 sqrt(alpha) of each region [m s^-1/2]
  double lambda_ = 0, mu_ = 0;
};

}  // namespace palier::exact
