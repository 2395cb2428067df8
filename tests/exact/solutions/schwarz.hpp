// A superheated melt against a semi-infinite mold in perfect contact.
// Source: C. Schwarz, Arch. Eisenhuettenwes. 5 (1931); in R.W. Ruddle, The Solidification of Castings, 1957 (citations
// from memory, formulas derived again from the heat balances at face and front).
#pragma once

#include <optional>

#include "exact/solutions/stefan_neumann.hpp"

namespace palier::exact {

/// Metal in x > 0, mold in x < 0.
class Schwarz {
 public:
  /// Throws std::domain_error where the mold does not start below the melting point or the melt starts below it.
  Schwarz(const PureMetal& metal, double start, const Phase& mold, double mold_start);

  /// A skin freezes only where e_l (start - T_m) < e_M (T_m - mold start).
  bool freezes() const { return metal_part_.has_value(); }
  double lambda() const;                           ///< throws std::bad_optional_access where nothing freezes
  double interface() const { return interface_; }  ///< temperature of the face, constant
  double front(double t) const;                    ///< [m] from the face; 0 where nothing freezes
  double temperature(double x, double t) const;    ///< mold at x < 0, metal at x > 0; t > 0
  double wall_flux(double t) const;                ///< [W/m2] into the mold
  double heat_through_wall(double t) const;        ///< [J/m2] into the mold from 0 to t

 private:
  Phase liquid_, mold_;
  double start_, mold_start_, interface_ = 0;
  std::optional<StefanNeumann> metal_part_;
};

}  // namespace palier::exact
