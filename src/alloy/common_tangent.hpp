// Equilibrium of phases of a binary: one straight line that touches the Gibbs energy of each.
#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "palier/alloy/binary_equilibrium.hpp"

namespace palier::alloy {

using Phases = std::vector<SolidPhase>;  ///< the liquid first, then the solids

/// Where the tangent touches a phase.
struct Contact {
  std::size_t phase;   ///< index
  double z;            ///< ln(y / (1 - y)) of the composition; without meaning for a phase of fixed composition
  double x = 0;        ///< mole fraction
  double x_slope = 0;  ///< dx/dT with two phases at a fixed temperature [1/K]
};

struct CommonTangent {
  double temperature;
  std::vector<Contact> contacts;
};

/// What the equilibrium is asked to be.
enum class Condition {
  two_phases,    ///< at the temperature of the guess
  three_phases,  ///< at the temperature at which they coexist
  congruent      ///< two phases of one composition, at the temperature at which they coexist
};

/// Newton's method from a guess, to 1e-12 in the mole fractions and 1e-9 K. Nothing where it does not converge, or
/// converges to one phase that is in equilibrium with itself.
std::optional<CommonTangent> touch(const Phases& phases, CommonTangent guess, Condition condition);

Phases phases_of(const BinarySystem& system);
IsothermalEnergy energy_at(const SolidPhase& phase, double T);
const std::string& name_of(const SolidPhase& phase);

}  // namespace palier::alloy
