// Flux through a contact between two layers or a boundary at an end, with its derivatives.
#pragma once

#include "palier/heat/boundary.hpp"

namespace palier::heat {

/// What a face sees of the cell beside it: a temperature behind a resistance, and how both change with the unknown of
/// the cell (its enthalpy, or the latent enthalpy where a front lies in it).
struct Terminal {
  double temperature = 0;        ///< [K]
  double temperature_slope = 0;  ///< per unknown
  double resistance = 0;         ///< from there to the face [m2 K/W]
  double resistance_slope = 0;
};

/// Flux through a face and its derivatives with respect to the unknowns on both sides.
struct FaceFlow {
  double flux = 0;       ///< positive from the first to the second side [W/m2]
  double by_first = 0;   ///< d flux / d unknown of the first side
  double by_second = 0;  ///< d flux / d unknown of the second side
  double surface = 0;    ///< temperature of the first side's face [K]
};

/// The state a contact law may look at, besides the face temperature it finds itself.
struct ContactState {
  double time = 0;                  ///< [s]
  double fraction_solid = 0;        ///< of the metal's cell at the contact
  double fraction_solid_slope = 0;  ///< per its unknown
};

/// Flux from the side nearer to the metal to the other side.
FaceFlow contact_flow(const Contact& contact, const Terminal& from, const Terminal& to, const ContactState& state);

/// Flux out of the body through a film with radiation: q = h (Ts - Ta) + e sigma (Ts^4 - Ta^4), Ts of the face.
FaceFlow film_flow(const Boundary& film, const Terminal& from);

}  // namespace palier::heat
