// Solidification paths between Scheil's rule and the lever rule: diffusion back into the solid while it freezes.
#pragma once

#include <memory>

#include "palier/alloy/diagram.hpp"
#include "palier/alloy/path.hpp"

namespace palier::alloy {

/// Rules for the solute that diffuses back into a dendrite arm. All have complete mixing in the liquid, one partition
/// coefficient k and the same form,
///   C_liquid / C_alloy = [1 - (1 - 2 p k) fs]^((k - 1) / (1 - 2 p k)),
/// and differ in p, the back-diffusion parameter: 0 is Scheil's rule, 1/2 the lever rule.
enum class BackDiffusion {
  /// p = a; too much diffuses back from a = 1/2 on. H.D. Brody, M.C. Flemings, Trans. AIME 236 (1966) 615.
  brody_flemings,
  /// p = a (1 - exp(-1/a)) - exp(-1/(2 a)) / 2. T.W. Clyne, W. Kurz, Metall. Trans. A 12 (1981) 965.
  clyne_kurz,
  /// p = a / (1 + 2 a), plates. I. Ohnaka, Trans. ISIJ 26 (1986) 1045.
  ohnaka,
  /// p = 2 a / (1 + 4 a), columnar dendrites, which take up twice as much. I. Ohnaka, as above.
  ohnaka_columnar
};

/// The parameter p of a rule, 0 to 1/2.
/// @param diffusion_number a = 4 D t / spacing^2 with the diffusivity in the solid, the local solidification time and
///                         the arm spacing; 0 or more
/// Throws InputError for a diffusion number that is negative or not finite, and for Brody and Flemings above 1/2.
double back_diffusion_parameter(BackDiffusion rule, double diffusion_number);

/// Path under a rule of back-diffusion. What is left at the invariant freezes there; where back-diffusion is strong
/// enough nothing is left, and freezing ends above it. The path is named "brody-flemings", "clyne-kurz", "ohnaka" or
/// "ohnaka-columnar".
///
/// Each rule gives the liquid, not the profile of the solid: solute is conserved only with the mean composition of
/// solid that the rule implies. The solid as it formed, k C_liquid, adds up to too little.
///
/// Accuracy, measured against the numerical arm (freeze_arm, parabolic growth): over diffusion numbers of 0.01 to 10
/// and k of 0.05 to 0.8, Clyne-Kurz and Ohnaka are within 0.04 in fraction solid at one composition of the liquid.
/// The difference lies late in freezing, where a small eutectic share comes out too small: for Al-4.5Cu at a = 0.1
/// they give 0.067 and 0.071 for 0.077, at a = 1 0.008 and 0.006 for 0.035.
/// @param composition      of the alloy [mass %]
/// @param diffusion_number as for back_diffusion_parameter()
/// Throws InputError as back_diffusion_parameter() does, where k is not the same at every temperature, and where
/// freezing does not end within the diagram.
SolidificationPath back_diffusion_path(const std::shared_ptr<const PhaseDiagram>& diagram, double composition,
                                       BackDiffusion rule, double diffusion_number);

}  // namespace palier::alloy
