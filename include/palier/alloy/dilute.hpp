// Dilute multicomponent alloys: every element lowers (or lifts) the liquidus by itself and parts by itself.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "palier/alloy/path.hpp"

namespace palier::alloy {

class FreezingStages;

/// Diffusivity in the solid, D0 exp(-Q / (R T)).
struct Diffusivity {
  double D0;  ///< [m2/s]
  double Q;   ///< activation energy [J/mol]
  /// [m2/s] at T [K]. Throws InputError unless T > 0.
  double at(double T) const;
};

/// One alloying element, by straight lines.
struct DiluteElement {
  std::string name;
  double composition = 0;            ///< of the alloy [mass %]
  double liquidus_slope = 0;         ///< [K per mass % in the liquid]
  double partition_coefficient = 1;  ///< composition of the solid over that of the liquid, > 0; above 1 is allowed
  std::optional<Diffusivity> diffusivity;
  bool fast = false;  ///< diffuses fast in the solid (interstitial: C, N, H, B in steel)
};

/// Where the liquid that a rule never uses up is taken to freeze as the last liquid: at whichever comes first.
struct LastLiquid {
  std::optional<double> temperature;  ///< eutectic, or lowest temperature at which the lines may be trusted [K]
  /// Largest fraction solid, 0..1. Not looked at where the liquid is used up by itself: under the lever rule always.
  std::optional<double> largest_fraction;
};

/// A base metal with elements that do not feel each other.
struct DiluteAlloy {
  std::string base;
  double melting_point = 0;  ///< of the base metal [K]
  std::vector<DiluteElement> elements;
  LastLiquid end;
};

/// How far solute evens out in the solid. The liquid is uniform in all.
enum class Mixing {
  lever,   ///< every element, wholly
  scheil,  ///< no element (E. Scheil, Z. Metallkunde 34 (1942) 70)
  /// The fast elements wholly, the others not at all (after Q. Chen, B. Sundman, Mater. Trans. 43 (2002) 551).
  /// Approximation made here: a fast element has one content k C throughout the solid, not one chemical potential, so
  /// the segregation of the others does not move it.
  partial
};

/// Compositions of all elements, in the order they were given [mass %].
struct Compositions {
  std::vector<double> liquid;
  std::vector<double> solid;  ///< of the solid that forms
};

/// Freezing of a dilute alloy: temperature and compositions against fraction solid, evaluated to rounding.
class DiluteFreezing {
 public:
  /// For the functions that make one; see freeze_dilute and freeze_steel.
  explicit DiluteFreezing(std::shared_ptr<const FreezingStages> stages);

  double liquidus() const;         ///< [K]
  double end_of_freezing() const;  ///< [K]
  /// Share of the alloy that freezes at the end of freezing as the last liquid; 0 where the rule uses it up.
  double last_liquid_fraction() const;
  /// Fraction solid just above T [K]; 0 above the liquidus, 1 below the end of freezing.
  double fraction_solid(double T) const;
  /// Compositions at T [K]. Throws InputError outside the freezing range.
  Compositions compositions(double T) const;
  Compositions first_solid() const;  ///< compositions at the liquidus
  Compositions last_liquid() const;  ///< compositions as the end of freezing is reached
  /// The path knows a solute only where there is one element.
  SolidificationPath path() const;

 private:
  std::shared_ptr<const FreezingStages> stages_;
};

/// Temperature at which the first solid forms, melting point + sum of slope * composition [K].
/// Throws InputError where the melting point or an element is no physical one.
double dilute_liquidus(const DiluteAlloy& alloy);

/// Freezing of a dilute alloy by the lever rule, Scheil's rule or partial equilibrium.
///
/// With fraction liquid f, an element that evens out in the solid has C = C0 / (k + (1 - k) f) in the liquid, one that
/// does not C = C0 f^(k - 1). Source: mass balance, any textbook of solidification; Scheil 1942.
/// Throws InputError where the lines make no freezing alloy: an element out of range, a temperature that does not fall
/// strictly with fraction solid, liquid beyond 100 mass % of solute, no end where the rule needs one, or an end at or
/// above the liquidus.
DiluteFreezing freeze_dilute(const DiluteAlloy& alloy, Mixing mixing);

}  // namespace palier::alloy
