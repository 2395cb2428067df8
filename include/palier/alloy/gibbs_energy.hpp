// Gibbs energies of the phases of a binary, in the forms in which thermodynamic assessments give them.
#pragma once

#include <string>
#include <vector>

namespace palier::alloy {

/// The gas constant that assessments of the 1990s are fitted with [J/mol/K]. Source: A.T. Dinsdale, Calphad 15 (1991)
/// 317.
inline constexpr double kGasConstant = 8.31451;

/// a + b T + c T ln T + d T^2 + e T^3 + f/T + g T^7 + h T^-9 [J/mol], T in K.
struct EnergyTerms {
  double a = 0, b = 0, c = 0, d = 0, e = 0, f = 0, g = 0, h = 0;
  double value(double T) const;  ///< [J/mol]
  double slope(double T) const;  ///< [J/mol/K]
};

/// Gibbs energy of an element in one structure, or of a compound of fixed composition, in pieces over temperature.
/// Source of the form: A.T. Dinsdale, Calphad 15 (1991) 317.
class UnaryEnergy {
 public:
  struct Piece {
    double high;  ///< end of the piece [K]; a temperature at an end belongs to the colder piece
    EnergyTerms terms;
  };
  /// One piece for every temperature above 0 K.
  UnaryEnergy(const EnergyTerms& terms);  // NOLINT(google-explicit-constructor): a difference is written as terms
  /// @param low beginning of the first piece [K]; @param pieces by rising end. Throws InputError otherwise.
  UnaryEnergy(double low, std::vector<Piece> pieces);

  double value(double T) const;     ///< [J/mol]; throws InputError outside the pieces
  double slope(double T) const;     ///< minus the entropy [J/mol/K]
  double enthalpy(double T) const;  ///< [J/mol]
  double low() const { return low_; }
  double high() const { return pieces_.back().high; }

  friend UnaryEnergy operator+(const UnaryEnergy& a, const UnaryEnergy& b);
  friend UnaryEnergy operator*(double factor, const UnaryEnergy& energy);

 private:
  const EnergyTerms& terms(double T) const;
  double low_;
  std::vector<Piece> pieces_;
};

/// Gibbs energy per mole of atoms at a composition, and its derivatives in the mole fraction of the second element.
struct MolarEnergy {
  double value, slope, curvature;  ///< [J/mol]
};

/// Where the tangent to the Gibbs energy passes over the two end members of a phase: its potentials [J/mol], and their
/// derivatives in z.
struct Tangent {
  double first, second;
  double first_slope, second_slope;
};

/// Gibbs energy of one phase at one temperature, or its derivative in temperature.
///
/// The phase mixes two end members; y, from 0 to 1, is the share of the second. z = ln(y / (1 - y)) tells compositions
/// close to an end member apart that y no longer can. A phase of fixed composition has equal ends and no y.
class IsothermalEnergy {
 public:
  /// @param first, second       Gibbs energies of the end members, per mole of atoms [J/mol]
  /// @param first_x, second_x   mole fractions of the second element in them; equal for a phase of fixed composition
  /// @param ideal               R T, or R for the derivative in temperature, per mole of sites that mix
  /// @param interaction         Redlich-Kister coefficients per mole of sites that mix
  IsothermalEnergy(double first, double second, double first_x, double second_x, double ideal,
                   std::vector<double> interaction);

  bool fixed_composition() const { return first_x_ == second_x_; }
  double first_x() const { return first_x_; }
  double second_x() const { return second_x_; }
  double first() const { return first_; }
  double second() const { return second_; }
  double x(double z) const;         ///< mole fraction of the second element
  double x_slope(double z) const;   ///< its derivative in z
  MolarEnergy at(double x) const;   ///< x strictly between the end members
  Tangent tangent(double z) const;  ///< not for a phase of fixed composition
  /// Gibbs energy at y, where y ln y + (1 - y) ln(1 - y) is known; y = 0 and 1 are allowed.
  double value(double y, double mixing) const;

 private:
  struct Excess {
    double value, slope, curvature;  ///< in y
  };
  Excess excess(double y, double one_minus_y) const;

  double first_, second_, first_x_, second_x_;
  double ideal_;
  std::vector<double> interaction_;
};

/// A solution of two elements on one lattice, or on the one of several that both occupy.
///
/// G = (1 - y) G_1 + y G_2 + n [R T (y ln y + (1 - y) ln(1 - y)) + y (1 - y) sum L_v (1 - 2 y)^v], where y is the share
/// of the second element on the sites that mix and n the number of these per atom: 1 for a plain solution, in which y
/// is the mole fraction. Source: O. Redlich, A.T. Kister, Ind. Eng. Chem. 40 (1948) 345; sublattices: M. Hillert,
/// L.-I. Staffansson, Acta Chem. Scand. 24 (1970) 3618.
class SolutionPhase {
 public:
  /// @param first, second energies of the end members per mole of atoms: of a plain solution, the elements in its
  /// structure. @param interaction L_0, L_1, ... per mole of sites that mix
  SolutionPhase(std::string name, UnaryEnergy first, UnaryEnergy second, std::vector<EnergyTerms> interaction);
  /// @param first_x, second_x mole fractions of the second element in the end members, 0 <= first_x < second_x <= 1.
  /// Throws InputError otherwise. Each site that mixes holds either element, so there are second_x - first_x of them
  /// per atom.
  SolutionPhase(std::string name, UnaryEnergy first, UnaryEnergy second, double first_x, double second_x,
                std::vector<EnergyTerms> interaction);

  const std::string& name() const { return name_; }
  IsothermalEnergy at(double T) const;
  /// Derivative of at(T) in temperature.
  IsothermalEnergy slope_at(double T) const;

 private:
  std::string name_;
  UnaryEnergy first_, second_;
  double first_x_, second_x_;
  std::vector<EnergyTerms> interaction_;
};

/// A phase of fixed composition.
class CompoundPhase {
 public:
  /// @param x mole fraction of the second element, 0..1; @param energy per mole of atoms. Throws InputError otherwise.
  CompoundPhase(std::string name, double x, UnaryEnergy energy);
  /// @param formation energy of formation per mole of atoms from both elements in the structures given
  static CompoundPhase formed_from(std::string name, double x, const UnaryEnergy& first, const UnaryEnergy& second,
                                   const UnaryEnergy& formation);

  const std::string& name() const { return name_; }
  IsothermalEnergy at(double T) const;
  IsothermalEnergy slope_at(double T) const;

 private:
  std::string name_;
  double x_;
  UnaryEnergy energy_;
};

}  // namespace palier::alloy
