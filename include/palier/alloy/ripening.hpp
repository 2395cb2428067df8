// Spacing of secondary dendrite arms from the time that they had to ripen.
#pragma once

#include <cmath>
#include <string>

#include "palier/base/error.hpp"

namespace palier::alloy {

/// Ripening law, spacing = coefficient * time^exponent. The exponent 1/3 is that of coarsening controlled by diffusion
/// in the liquid: T.Z. Kattamis, J.C. Coughlin, M.C. Flemings, Trans. AIME 239 (1967) 1504, from memory; measured
/// exponents lie about it.
struct Ripening {
  double coefficient = 0;       ///< [m s^-exponent]
  double exponent = 1.0 / 3.0;  ///< 0 to 1
};

namespace detail {

inline void require_positive(double value, const std::string& name) {
  if (!(value > 0 && std::isfinite(value)))
    throw base::InputError(name + ": found " + std::to_string(value) + "; expected a finite number above 0");
}

}  // namespace detail

/// Time a place spends between liquidus and end of freezing [s].
/// @param freezing_range [K]
/// @param cooling_rate   mean rate over the range [K/s], counted positive
/// Throws InputError unless both are above 0.
inline double local_solidification_time(double freezing_range, double cooling_rate) {
  detail::require_positive(freezing_range, "freezing range");
  detail::require_positive(cooling_rate, "cooling rate");
  return freezing_range / cooling_rate;
}

/// Arm spacing [m] after a local solidification time [s]. Throws InputError unless the time and the coefficient are
/// above 0 and the exponent lies between 0 and 1.
inline double arm_spacing(const Ripening& law, double local_solidification_time) {
  detail::require_positive(law.coefficient, "coefficient of the ripening law");
  detail::require_positive(local_solidification_time, "local solidification time");
  if (!(law.exponent > 0 && law.exponent < 1))
    throw base::InputError("exponent of the ripening law: found " + std::to_string(law.exponent) +
                           "; expected a number between 0 and 1");
  return law.coefficient * std::pow(local_solidification_time, law.exponent);
}

/// The number that rules back-diffusion, 4 D t / spacing^2: time for diffusion over half an arm spacing.
/// @param diffusivity of the solute in the solid [m2/s]; 0 where it does not diffuse
/// @param time        local solidification time [s]
/// @param spacing     of the arms [m]
/// Throws InputError unless time and spacing are above 0 and the diffusivity is 0 or more.
inline double diffusion_number(double diffusivity, double time, double spacing) {
  if (!(diffusivity >= 0 && std::isfinite(diffusivity)))
    throw base::InputError("diffusivity: found " + std::to_string(diffusivity) +
                           "; expected a finite number, 0 or more");
  detail::require_positive(time, "local solidification time");
  detail::require_positive(spacing, "arm spacing");
  return 4 * diffusivity * time / (spacing * spacing);
}

}  // namespace palier::alloy
