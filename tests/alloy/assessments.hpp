// Published Gibbs energies of six binaries, as test data. J per mole of atoms, T in K.
//
// Elements: A.T. Dinsdale, SGTE data for pure elements, Calphad 15 (1991) 317. Marked "from memory" where not read.
// COST 507: I. Ansara, A.T. Dinsdale, M.H. Rand (eds.), Thermochemical database for light metal alloys, vol. 2,
// European Communities, 1998.
#pragma once

#include "palier/alloy/binary_equilibrium.hpp"

namespace samples {

using palier::alloy::BinarySystem;
using palier::alloy::EnergyTerms;
using palier::alloy::SolutionPhase;
using palier::alloy::UnaryEnergy;

// The ends of the ranges of temperature, 298.15 K (250 K of Sn) and the upper ones, are Dinsdale's, from memory.

inline UnaryEnergy al_fcc() {
  return {298.15,
          {{700, {-7976.15, 137.093038, -24.3671976, -1.884662e-3, -8.77664e-7, 74092}},
           {933.47, {-11276.24, 223.048446, -38.5844296, 0.018531982, -5.764227e-6, 74092}},
           {2900, {-11278.378, 188.684153, -31.748192, 0, 0, 0, 0, -1.230524e28}}}};
}
inline UnaryEnergy al_liquid() {
  return al_fcc() + UnaryEnergy(298.15, {{933.47, {11005.029, -11.841867, 0, 0, 0, 0, 7.934e-20}},
                                         {2900, {10482.382, -11.253974, 0, 0, 0, 0, 0, 1.231e28}}});
}
inline UnaryEnergy si_diamond() {
  return {298.15,
          {{1687, {-8162.609, 137.236859, -22.8317533, -1.912904e-3, -3.552e-9, 176667}},
           {3600, {-9457.642, 167.281367, -27.196, 0, 0, 0, 0, -4.20369e30}}}};
}
inline UnaryEnergy si_liquid() {
  return si_diamond() + UnaryEnergy(298.15, {{1687, {50696.4, -30.0994, 0, 0, 0, 0, 2.09307e-21}},
                                             {3600, {49828.2, -29.5591, 0, 0, 0, 0, 0, 4.20369e30}}});
}
inline UnaryEnergy cu_fcc() {
  return {298.15,
          {{1357.77, {-7770.458, 130.485235, -24.112392, -2.65684e-3, 1.29223e-7, 52478}},
           {3200, {-13542.026, 183.803828, -31.38, 0, 0, 0, 0, 3.64167e29}}}};
}
inline UnaryEnergy cu_liquid() {
  return {298.15,
          {{1357.77, {5194.277, 120.973331, -24.112392, -2.65684e-3, 1.29223e-7, 52478, -5.8489e-21}},
           {3200, {-46.545, 173.881484, -31.38}}}};
}
/// Without its magnetic part, which moves the liquidus of Cu-90Ni by less than 0.1 K.
inline UnaryEnergy ni_fcc() {
  return {298.15,
          {{1728, {-5179.159, 117.854, -22.096, -4.8407e-3}},
           {3000, {-27840.655, 279.135, -43.1, 0, 0, 0, 0, 1.12754e31}}}};
}
inline UnaryEnergy ni_liquid() {
  return ni_fcc() + UnaryEnergy(298.15, {{1728, {16414.686, -9.397, 0, 0, 0, 0, -3.82318e-21}},
                                         {3000, {18290.88, -10.537, 0, 0, 0, 0, 0, -1.12754e31}}});
}
inline UnaryEnergy zn_hcp() {
  return {298.15,
          {{692.68, {-7285.787, 118.470069, -23.701314, -1.712034e-3, -1.264963e-6}},
           {1700, {-11070.559, 172.34566, -31.38, 0, 0, 0, 0, 4.70514e26}}}};
}
inline UnaryEnergy zn_liquid() {
  return {298.15,
          {{692.68, {-128.574, 108.177079, -23.701314, -1.712034e-3, -1.264963e-6, 0, -3.58958e-19}},
           {1700, {-3620.391, 161.608594, -31.38}}}};
}
inline UnaryEnergy pb_fcc() {
  return {298.15,
          {{600.65, {-7650.085, 101.715188, -24.5242231, -3.65895e-3, -2.4395e-7}},
           {1200, {-10531.115, 154.258155, -32.4913959, 1.54613e-3, 0, 0, 0, 8.05644e25}}}};
}
inline UnaryEnergy pb_liquid() {
  return pb_fcc() + UnaryEnergy(298.15, {{600.65, {4672.124, -7.750683, 0, 0, 0, 0, -6.019e-19}},
                                         {1200, {4853.112, -8.066587, 0, 0, 0, 0, 0, -8.05644e25}}});
}
inline UnaryEnergy sn_bct() {
  return {250,
          {{505.08, {-5855.135, 65.443315, -15.961, -0.0188702, 3.121167e-6, -61960}},
           {800, {2524.724, 4.005269, -8.2590486, -0.016814429, 2.623131e-6, -1081244, 0, -1.2307e25}}}};
}
/// Above 505.08 K from memory.
inline UnaryEnergy sn_liquid() {
  return sn_bct() + UnaryEnergy(250, {{505.08, {7103.092, -14.087767, 0, 0, 0, 0, 1.47031e-18}},
                                      {800, {6971.587, -13.814382, 0, 0, 0, 0, 0, 1.2307e25}}});
}
inline UnaryEnergy ag_fcc() {
  return {298.15,
          {{1234.93, {-7209.512, 118.202013, -23.8463314, -1.790585e-3, -3.98587e-7, -12011}},
           {3000, {-15095.252, 190.266404, -33.472, 0, 0, 0, 0, 1.411773e29}}}};
}
/// Liquid less solid from memory.
inline UnaryEnergy ag_liquid() {
  return ag_fcc() + UnaryEnergy(298.15, {{1234.93, {11025.076, -8.891021, 0, 0, 0, 0, -1.034e-20}},
                                         {3000, {11508.141, -9.301747, 0, 0, 0, 0, 0, -1.412e29}}});
}

// Standard atomic weights [g/mol].
inline constexpr double kAl = 26.982, kSi = 28.0855, kCu = 63.546, kNi = 58.693, kZn = 65.38, kAg = 107.868,
                        kPb = 207.2, kSn = 118.71;

/// H.L. Lukas in COST 507 (1998).
inline BinarySystem al_si_energies() {
  return {"Al",
          "Si",
          kAl,
          kSi,
          SolutionPhase("liquid", al_liquid(), si_liquid(), {{-11340.10, -1.23394}, {-3530.93, 1.35993}, {2265.39}}),
          {SolutionPhase("fcc", al_fcc(), si_diamond() + EnergyTerms{51000, -21.8}, {{-3143.78, 0.39297}}),
           SolutionPhase("diamond", al_fcc() + EnergyTerms{0, 30}, si_diamond(), {{113246.16, -47.55509}})}};
}

/// N. Saunders in COST 507 (1998); only the phases of the aluminum side up to theta. Theta is (Al)2(Al,Cu)1, its
/// energies given for 3 atoms, with Al as bcc in Al:Al.
inline BinarySystem al_cu_energies() {
  const double third = 1.0 / 3;
  const UnaryEnergy al_al = al_fcc() + EnergyTerms{10083, -4.813};
  const UnaryEnergy al_cu = third * (EnergyTerms{-47406, 6.75} + (2.0 * al_fcc() + cu_fcc()));
  return {"Al",
          "Cu",
          kAl,
          kCu,
          SolutionPhase("liquid", al_liquid(), cu_liquid(), {{-66622, 8.1}, {46800, -90.8, 10}, {-2812}}),
          {SolutionPhase("fcc", al_fcc(), cu_fcc(), {{-53520, 2}, {38590, -2}, {1170}}),
           SolutionPhase("theta", al_al, al_cu, 0, third, {{2211}})}};
}

/// S. an Mey, Z. Metallkd. 84 (1993) 451.
inline BinarySystem al_zn_energies() {
  return {
      "Al",
      "Zn",
      kAl,
      kZn,
      SolutionPhase("liquid", al_liquid(), zn_liquid(), {{10465.55, -3.39259}}),
      {SolutionPhase("fcc", al_fcc(), zn_hcp() + EnergyTerms{2969.82, -1.56968},
                     {{7297.5, 0.47512}, {6612.9, -4.5911}, {-3097.2, 3.30635}}),
       SolutionPhase("hcp", al_fcc() + EnergyTerms{5481, -1.8}, zn_hcp(), {{18820.95, -8.95255}, {}, {}, {-702.79}})}};
}

/// S. an Mey, Calphad 16 (1992) 255, without the magnetic part.
inline BinarySystem cu_ni_energies() {
  return {"Cu",
          "Ni",
          kCu,
          kNi,
          SolutionPhase("liquid", cu_liquid(), ni_liquid(), {{12048.61, 1.29893}, {-1861.61, 0.94201}}),
          {SolutionPhase("fcc", cu_fcc(), ni_fcc(), {{8047.72, 3.42217}, {-2041.3, 0.99714}})}};
}

/// From a public copy of an SGTE-type set; whose assessment it is could not be made sure.
inline BinarySystem ag_cu_energies() {
  return {"Ag",
          "Cu",
          kAg,
          kCu,
          SolutionPhase("liquid", ag_liquid(), cu_liquid(), {{17384.37, -4.46438}, {1660.74, -2.31516}}),
          {SolutionPhase("fcc", ag_fcc(), cu_fcc(), {{36772.58, -11.02847}, {-4612.43, 0.28869}})}};
}

/// From a public copy of an SGTE-type set; whose assessment it is could not be made sure.
inline BinarySystem pb_sn_energies() {
  return {"Pb",
          "Sn",
          kPb,
          kSn,
          SolutionPhase("liquid", pb_liquid(), sn_liquid(), {{6204.5, -0.67981}, {791.7, -1.5219}}),
          {SolutionPhase("fcc", pb_fcc(), sn_bct() + EnergyTerms{5510, -8.46}, {{7145.3, -2.30237}}),
           SolutionPhase("bct", pb_fcc() + EnergyTerms{489, 3.52}, sn_bct(), {{19700, -15.89}})}};
}

}  // namespace samples
