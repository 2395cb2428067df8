// Data of the worked cases. Round numbers of the right order for the substance named, chosen for checking arithmetic
// (no measured material): "-like". VC81: the freezing problem of Voller & Cross, Int. J. Heat Mass Transfer 24 (1981)
// 545 (data from memory). Temperatures in degC.
#pragma once

#include "exact/solutions/alloy_similarity.hpp"
#include "exact/solutions/freezing_range.hpp"
#include "exact/solutions/sand_limited.hpp"
#include "exact/solutions/stefan_neumann.hpp"

namespace palier::exact {

inline PureMetal ice_like() { return {{1000, 2.2, 2000}, {1000, 0.6, 4200}, 334e3, 0}; }
inline PureMetal aluminum_like() { return {{2500, 210, 1100}, {2500, 95, 1080}, 397e3, 660}; }
inline PureMetal iron_like() { return {{7200, 30, 700}, {7200, 35, 800}, 247e3, 1538}; }
inline PureMetal copper_like() { return {{8000, 330, 480}, {8000, 165, 515}, 205e3, 1084.62}; }
inline PureMetal voller_cross() { return {{1, 2, 2.5e6}, {1, 2, 2.5e6}, 1e8, 0}; }

inline Phase sand_for_aluminum() { return {1600, 0.6, 1100}; }
inline Phase sand_for_steel() { return {1600, 0.9, 1150}; }
inline Phase steel_mold() { return {7700, 28, 560}; }
inline Phase copper_mold() { return {8900, 380, 390}; }
inline Phase graphite_mold() { return {1750, 100, 1500}; }

/// Alloy with fraction solid linear in temperature; pouring temperature of its cases: 700 degC.
inline LinearAlloy linear_alloy(double eutectic) {
  return {{2600, 180, 1050}, {2600, 130, 1100}, {2600, 90, 1150}, 390e3, 645, 548, eutectic};
}

/// The same with the properties of the mush everywhere.
inline LinearAlloy uniform_linear_alloy(double eutectic) {
  LinearAlloy alloy = linear_alloy(eutectic);
  alloy.solid = alloy.liquid = alloy.mush;
  return alloy;
}

/// The metal of aluminum_like() written as an alloy without freezing range.
inline LinearAlloy pure_linear_alloy() {
  const PureMetal metal = aluminum_like();
  return {metal.solid, metal.solid, metal.liquid, metal.latent_heat, metal.melting_point, metal.melting_point, 1.0};
}

/// Al-4.5Cu-like binary. @param phases_differ false: both phases have one conductivity and heat capacity
inline BinaryAlloy al_cu_like(BinaryAlloy::Rule rule, bool phases_differ,
                              BinaryAlloy::LatentHeat latent = BinaryAlloy::LatentHeat::of_phases) {
  const Phase solid = phases_differ ? Phase{2600, 180, 1050} : Phase{2600, 120, 1100};
  const Phase liquid = phases_differ ? Phase{2600, 90, 1150} : Phase{2600, 120, 1100};
  return {rule, solid, liquid, latent, 390e3, 660, -112.0 / 33, 0.17, 4.5, 548};
}

/// Superheat 40 K.
inline SandLimited aluminum_in_sand() { return {2500, 397e3, 1080.0 * 40, 660, sand_for_aluminum(), 25}; }
/// Superheat 50 K.
inline SandLimited steel_in_sand() { return {7200, 272e3, 800.0 * 50, 1500, sand_for_steel(), 25}; }

}  // namespace palier::exact
