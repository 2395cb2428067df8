// Low-alloy steel: delta ferrite, the peritectic and austenite, on straight lines.
#pragma once

#include <string>
#include <vector>

#include "palier/alloy/dilute.hpp"

namespace palier::alloy {

/// Straight lines of the iron-carbon diagram. Defaults: textbook diagram of Fe-Fe3C, from memory.
struct IronCarbon {
  double melting_point = 1811.15;           ///< [K], 1538 degC
  double peritectic_temperature = 1768.15;  ///< [K], 1495 degC
  double peritectic_liquid = 0.53;          ///< [mass % C]
  double peritectic_delta = 0.09;           ///< [mass % C]
  double peritectic_gamma = 0.17;           ///< [mass % C]
  double eutectic_temperature = 1420.15;    ///< [K], 1147 degC; here only the far end of the lines of austenite
  double eutectic_liquid = 4.30;            ///< [mass % C]
  double eutectic_gamma = 2.14;             ///< [mass % C]
};

/// An element of steel other than carbon. One slope serves both liquidus surfaces, so that it moves the temperature of
/// the peritectic but not its compositions of carbon.
struct SteelElement {
  std::string name;
  double composition = 0;     ///< of the steel [mass %]
  double liquidus_slope = 0;  ///< [K per mass % in the liquid]
  double k_delta = 1;         ///< partition coefficient of delta ferrite, > 0
  double k_gamma = 1;         ///< partition coefficient of austenite, > 0
  bool fast = false;          ///< evens out in the solid under partial equilibrium, as carbon always does
};

/// Si, Mn, P or S with slope and partition coefficients of Y.-M. Won, B.G. Thomas, Metall. Mater. Trans. A 32 (2001)
/// 1757; those of P from memory. Throws InputError for another name. @param composition [mass %]
SteelElement steel_element(const std::string& name, double composition);

/// Iron, carbon and elements that do not feel each other.
struct Steel {
  double carbon = 0;  ///< [mass %]
  std::vector<SteelElement> elements;
  LastLiquid end;
  IronCarbon lines;
};

/// Freezing of a steel; carbon is the first of its compositions.
///
/// Delta ferrite freezes until the liquid holds the carbon of the peritectic. Under the lever rule and partial
/// equilibrium the peritectic then takes up liquid and delta ferrite, in the amounts of the balance of carbon, until
/// one of them is gone: at one temperature in Fe-C, an arrest; over a short range where other elements part. Under
/// partial equilibrium the other elements stay where they froze when delta ferrite turns into austenite. Under Scheil's
/// rule the peritectic is passed by. Austenite freezes the liquid left; its carbon follows straight lines from the
/// peritectic to the eutectic, C_solid = C_p,gamma + K (C_liquid - C_p,liquid).
/// Throws InputError as freeze_dilute does, and for carbon outside 0 .. the largest solubility in austenite.
DiluteFreezing freeze_steel(const Steel& steel, Mixing mixing);

}  // namespace palier::alloy
