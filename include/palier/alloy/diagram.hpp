// Phase diagrams behind one small interface, and the rules that make solidification paths from them.
#pragma once

#include <memory>
#include <optional>
#include <string>

#include "palier/alloy/path.hpp"
#include "palier/base/table.hpp"

namespace palier::alloy {

/// Liquid and solid in equilibrium at one temperature [mass % of solute].
struct TieLine {
  double liquid;
  double solid;
};

/// An invariant reaction that ends the range of two phases.
struct Invariant {
  std::string reaction;  ///< "eutectic", or "melting point" of the solute where both elements mix in any proportion
  double temperature;    ///< [K]
  double liquid;         ///< composition of the liquid that takes part [mass %]
};

/// The part of a phase diagram that the rules of solidification need: primary solid and liquid of a binary.
class PhaseDiagram {
 public:
  virtual ~PhaseDiagram() = default;
  /// Temperature at which the first solid forms [K]. Throws InputError outside the range of composition.
  virtual double liquidus(double composition) const = 0;
  /// Phases in equilibrium at T, between the invariant (or the end of the lines) and the melting point.
  virtual TieLine tie_line(double T) const = 0;
  virtual double melting_point() const = 0;                ///< of the pure base metal [K]
  virtual std::optional<Invariant> invariant() const = 0;  ///< reaction in which the last liquid freezes, if any
  virtual double largest_composition() const = 0;          ///< end of the range of validity [mass %]
  /// Solid to liquid composition where it is the same at every temperature; rules then have closed forms.
  virtual std::optional<double> constant_partition() const { return std::nullopt; }
};

/// Liquidus and solidus of the base metal's side of a binary, as lines.
struct BinaryLines {
  double melting_point = 0;          ///< [K]
  base::Table liquidus;              ///< temperature [K] over composition [mass %], falling from the melting point
  double partition_coefficient = 0;  ///< solid/liquid composition, 0 < k < 1
  std::optional<double> eutectic_temperature;  ///< [K]
  /// A straight liquidus. @param slope [K per mass %], negative
  static BinaryLines straight(double melting_point, double slope, double k, std::optional<double> eutectic);
};

/// Throws InputError where the lines make no diagram (rising liquidus, eutectic above the melting point, k outside
/// 0..1).
std::shared_ptr<const PhaseDiagram> make_diagram(BinaryLines lines);

/// Lever rule: both phases of uniform composition at any time. Source: mass balance, any textbook of solidification.
SolidificationPath lever_path(const std::shared_ptr<const PhaseDiagram>& diagram, double composition);

/// Scheil's rule: no diffusion in the solid, uniform liquid. Source: E. Scheil, Z. Metallkunde 34 (1942) 70.
/// A closed form where the partition coefficient is constant, integrated along the lines where it varies.
/// Without an invariant it never ends and is refused with InputError.
SolidificationPath scheil_path(const std::shared_ptr<const PhaseDiagram>& diagram, double composition);

}  // namespace palier::alloy
