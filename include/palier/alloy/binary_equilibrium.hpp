// Phase diagram of a binary from the Gibbs energies of its phases: lines between liquid and solids, and invariants.
#pragma once

#include <array>
#include <memory>
#include <string>
#include <variant>
#include <vector>

#include "palier/alloy/diagram.hpp"
#include "palier/alloy/gibbs_energy.hpp"

namespace palier::alloy {

using SolidPhase = std::variant<SolutionPhase, CompoundPhase>;

/// Two elements and the phases they form. Mole fractions are of the second element.
struct BinarySystem {
  std::string first, second;                   ///< names of the elements
  double first_weight = 0, second_weight = 0;  ///< atomic weights [g/mol]
  SolutionPhase liquid;                        ///< mixes at any composition
  std::vector<SolidPhase> solids;
  /// Mass % of the second element at a mole fraction, and its derivative in the mole fraction.
  double mass_percent(double mole_fraction) const;
  double mass_percent_slope(double mole_fraction) const;
};

/// A phase at the composition at which it takes part in an equilibrium.
struct PhaseAt {
  std::string phase;
  double mole_fraction;  ///< of the second element
  double mass_percent;
};

/// Two phases in equilibrium, by rising mole fraction. Both have one name in a miscibility gap.
using TwoPhases = std::array<PhaseAt, 2>;

/// All stable equilibria of two phases at a temperature [K], by rising mole fraction.
/// Throws NoSolution where a common tangent is not found, InputError outside the range of a Gibbs energy.
std::vector<TwoPhases> equilibria_at(const BinarySystem& system, double T);

/// Liquid and solid in equilibrium.
struct BranchPoint {
  double temperature;                    ///< [K]
  double liquid, solid;                  ///< mole fraction of the second element
  double liquid_slope, solid_slope;      ///< d(mole fraction)/dT [1/K]; infinite at a congruent point
  double liquid_percent, solid_percent;  ///< mass % of the second element
};

/// What a branch of the diagram meets at one of its ends.
enum class BranchEnd { end_of_range, first_melts, second_melts, congruent, invariant };

/// One stretch of liquidus and solidus between a solid and the liquid.
struct Branch {
  std::string solid;
  BranchEnd hot_end, cold_end;
  std::vector<BranchPoint> points;  ///< by falling temperature, at least two
};

/// Three phases in equilibrium, or two of one composition.
struct BinaryInvariant {
  /// "eutectic", "peritectic", "monotectic", "metatectic", "syntectic" or "congruent"
  std::string reaction;
  double temperature;           ///< [K]
  std::vector<PhaseAt> phases;  ///< by rising mole fraction
};

struct BinaryEquilibrium {
  double first_melting_point, second_melting_point;  ///< [K]
  std::vector<Branch> branches;                      ///< by falling temperature of the hot end
  std::vector<BinaryInvariant> invariants;           ///< with liquid, by falling temperature
};

/// Lines and invariants with liquid between two temperatures [K], which must hold both melting points.
/// Method: convex hull of sampled Gibbs energies, refined by Newton's method on the common tangent.
/// Throws InputError where a melting point is not in the range or a Gibbs energy not given all over it; NoSolution
/// where equilibria change in a way that is not understood.
BinaryEquilibrium binary_equilibrium(const BinarySystem& system, double low, double high);

/// Which of the two elements is the base metal.
enum class BaseElement { first, second };

/// The base metal's side, from its melting point to the first invariant, as a diagram in mass % of the other element.
///
/// Its invariant is the eutectic that ends the branch, or where both elements mix in any proportion the "melting point"
/// of the other element; none where the branch ends otherwise. Between the points of the branch the lines are cubics
/// with the slopes of the equilibrium.
/// Throws InputError where the liquidus does not fall all the way from the base metal's melting point.
std::shared_ptr<const PhaseDiagram> diagram_from(const BinarySystem& system, const BinaryEquilibrium& equilibrium,
                                                 BaseElement base);

}  // namespace palier::alloy
