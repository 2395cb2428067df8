// Sections for the exact cases, put together from the data of the exact solutions (degC there, K here).
#pragma once

#include "exact/solutions/alloy_similarity.hpp"
#include "exact/solutions/freezing_range.hpp"
#include "exact/solutions/phase.hpp"
#include "exact/solutions/stefan_neumann.hpp"
#include "palier/freeze/section.hpp"

namespace palier::exact {

constexpr double kelvin(double celsius) { return celsius + 273.15; }

/// Metal and path; everything else is left for the caller to fill in.
freeze::Section section_of(const Phase& solid, const Phase& liquid, double latent_heat, alloy::SolidificationPath path);
freeze::Section section_of(const PureMetal& metal);
/// Only an alloy whose three regions have the same properties can be had from properties by phase.
freeze::Section section_of(const LinearAlloy& alloy);
freeze::Section section_of(const BinaryAlloy& alloy);

/// A body that does not freeze: its melting point lies far below all temperatures that occur (degC above -200).
freeze::Section section_without_freezing(const Phase& body);

/// Face held at a temperature [degC].
heat::Boundary held_at(double celsius);
/// Film [W/m2/K] to surroundings [degC].
heat::Boundary film_to(double film, double celsius);
/// Mold in perfect contact, adiabatic outside. @param start [degC]
freeze::Wall mold_wall(const Phase& mold, double thickness, double start);

/// Length at which a half space that ends there still answers as if it went on, up to time t [s]: 6 sqrt(alpha t). The
/// wave at the end is erfc(3) = 2e-5 of that at the face; back at the face it is erfc(6) = 2e-17.
double reach(const Phase& phase, double t);

/// Gives the part of a section that freezes within the run the resolution that a whole section gets by default: the
/// default number of cells within it, and a tolerance, which is a share of the heat of the whole section, by as much
/// smaller as the part is. @param frozen_depth [m] @param frozen_share of the volume, 0..1
void resolve_frozen_part(freeze::Section& section, double frozen_depth, double frozen_share);
/// Half space up to the depth that freezes.
void resolve_half_space(freeze::Section& section, double frozen_depth);

}  // namespace palier::exact
