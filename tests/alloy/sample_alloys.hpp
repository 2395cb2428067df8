// Alloys that the tests of this layer share.
#pragma once

#include <memory>

#include "palier/alloy/diagram.hpp"
#include "palier/alloy/enthalpy_curve.hpp"

namespace palier::samples {

using Diagram = std::shared_ptr<const alloy::PhaseDiagram>;

inline Diagram straight(double melting_celsius, double eutectic_celsius, double eutectic, double k) {
  return alloy::make_diagram(alloy::BinaryLines::straight(
      melting_celsius + 273.15, (eutectic_celsius - melting_celsius) / eutectic, k, eutectic_celsius + 273.15));
}

/// Textbook lines of Al-Cu, 660 degC to 548 degC at 33 % Cu, k = 0.17; from memory of M.C. Flemings (1974).
inline Diagram al_cu() { return straight(660, 548, 33, 0.17); }
/// J.L. Murray, A.J. McAlister, Bull. Alloy Phase Diagrams 5 (1984) 74: 577 degC, 12.6 and 1.65 % Si, from memory.
inline Diagram al_si() { return straight(660.323, 577, 12.6, 1.65 / 12.6); }
/// I. Karakaya, W.T. Thompson, J. Phase Equilibria 9 (1988) 144: 183 degC, 38.1 and 2.2 % Pb, from memory.
inline Diagram sn_pb() { return straight(231.928, 183, 38.1, 2.2 / 38.1); }
/// The lead side of the same: 61.9 and 18.3 % Sn, from memory; lead 327.5 degC, A.T. Dinsdale, Calphad 15 (1991) 317.
inline Diagram pb_sn() { return straight(327.5, 183, 61.9, 18.3 / 61.9); }

/// Aluminum-like, constant: round numbers for a test; latent heat 397.01 kJ/kg, A.T. Dinsdale, Calphad 15 (1991) 317.
inline alloy::MetalProperties constant_metal() {
  return {2500, {base::Table(1000), base::Table(200)}, {base::Table(1100), base::Table(90)}, 397010};
}

/// Aluminum over temperature. Heat capacities 901.54 (300 K), 985.6 (466.7 K), 1257.8 and 1176.6 J/kg/K (melting
/// point) computed from A.T. Dinsdale, Calphad 15 (1991) 317; conductivities 237, 211 and 91 to 100 W/m/K from memory.
inline alloy::MetalProperties table_metal() {
  return {2500,
          {base::Table({300, 466.7, 933.47}, {901.54, 985.6, 1257.8}), base::Table({300, 933.47}, {237, 211})},
          {base::Table(1176.6), base::Table({933.47, 1200}, {91, 100})},
          397010};
}

}  // namespace palier::samples
