// Temperature and conduction potential as functions of volumetric enthalpy, for metals and mold materials alike.
#pragma once

#include <algorithm>
#include <array>
#include <cstddef>
#include <vector>

#include "palier/alloy/path.hpp"
#include "palier/base/table.hpp"

namespace palier::alloy {

/// Heat capacity [J/kg/K] and conductivity [W/m/K] of one phase over temperature [K].
struct PhaseProperties {
  base::Table heat_capacity;
  base::Table conductivity;
};

/// What the heat equation needs to know of a metal. One density: the mass of a cell is fixed.
struct MetalProperties {
  double density = 0;  ///< [kg/m3]
  PhaseProperties solid, liquid;
  double latent_heat = 0;  ///< [J/kg]
};

/// What the heat equation needs to know of a mold, core, chill, die or sleeve.
struct MoldProperties {
  double density = 0;  ///< [kg/m3]
  PhaseProperties body;
  double moisture = 0;  ///< water, mass fraction of the whole; it boils off in an arrest at 100 degC
};

/// A piece of T(H) that is flat: an arrest.
struct FlatPiece {
  double temperature;        ///< [K]
  double cold_end, hot_end;  ///< enthalpy when completed and when begun [J/m3]
  double fraction_before;    ///< fraction solid when begun
  double fraction_after;     ///< fraction solid when completed
};

/// Which end of an arrest an enthalpy at its temperature means.
enum class ArrestEnd { cold, hot };

/// T(H), its slope, and the conduction potential Theta(H), the integral of k dT, of one material.
///
/// H = rho [ integral of (fs cp_s + fl cp_l) dT + L fl ], H = 0 at the colder end of the range as solid. Pieces of
/// uniform spacing in H between the points where the curve changes character (arrests, liquidus), a cubic in each;
/// an arrest is one flat piece, exact. Outside the range given to the constructor the curve goes on straight, with the
/// properties of the end of the range.
class EnthalpyCurve {
 public:
  /// A metal that freezes along a path. @param low, high range of temperature it must cover [K], low < high
  EnthalpyCurve(const MetalProperties& metal, const SolidificationPath& path, double low, double high);
  /// A mold material.
  EnthalpyCurve(const MoldProperties& mold, double low, double high);

  /// Conduction potential [W/m] at H [J/m3] and its slope; the one function of the inner loop.
  void potential(double H, double& theta, double& slope) const {
    const Zone& z = zone(H);
    const double x = (H - z.begin) * z.per_spacing;
    // Through int, which the processor converts in one instruction each way.
    const int i = std::clamp(static_cast<int>(x), 0, z.pieces - 1);
    const double u = x - i;
    const std::array<double, 4>& c = theta_[z.first + static_cast<std::size_t>(i)];
    theta = c[0] + u * (c[1] + u * (c[2] + u * c[3]));
    slope = (c[1] + u * (2 * c[2] + 3 * u * c[3])) * z.per_spacing;
  }
  /// Constant properties and no arrest: potential(H) is straight.
  bool is_straight() const { return straight_; }
  double temperature(double H) const;        ///< [K]
  double temperature_slope(double H) const;  ///< dT/dH [K m3/J]; 0 in an arrest
  double conductivity(double H) const;       ///< [W/m/K]
  double conductivity_slope(double H) const;
  double fraction_solid(double H) const;  ///< 1 for a mold material
  double fraction_slope(double H) const;

  /// Enthalpy at T; at the temperature of an arrest the end asked for.
  double enthalpy(double T, ArrestEnd end = ArrestEnd::cold) const;
  /// Conduction potential at T.
  double potential_at(double T) const;

  const std::vector<FlatPiece>& arrests() const { return arrests_; }  ///< by rising temperature
  /// Enthalpies where the slope of T(H) jumps, rising: ends of arrests, liquidus.
  const std::vector<double>& kinks() const { return kinks_; }
  double liquidus_enthalpy() const { return liquidus_enthalpy_; }                ///< all liquid above; -inf for a mold
  double end_of_freezing_enthalpy() const { return end_of_freezing_enthalpy_; }  ///< all solid below; -inf for a mold

 private:
  struct Zone {
    double begin;        ///< [J/m3]
    double per_spacing;  ///< 1 / spacing of the pieces
    std::size_t first;   ///< index of its first piece
    int pieces;
  };
  /// Values at the two ends of a piece that are read off the hot path.
  struct Ends {
    std::array<double, 4> T;  ///< cubic of the temperature
    double k0, k1;            ///< conductivity at both ends
    double f0, f1;            ///< fraction solid at both ends
  };
  class Builder;

  const Zone& zone(double H) const {
    std::size_t i = 0;
    for (std::size_t j = 1; j < zones_.size(); ++j) i += H >= zones_[j].begin ? 1 : 0;
    return zones_[i];
  }
  const Ends& ends(double H, double& u, double& per_spacing) const;

  bool straight_ = false;
  std::vector<Zone> zones_;
  std::vector<std::array<double, 4>> theta_;
  std::vector<Ends> ends_;
  std::vector<FlatPiece> arrests_;
  std::vector<double> kinks_;
  double liquidus_enthalpy_;
  double end_of_freezing_enthalpy_;
};

}  // namespace palier::alloy
