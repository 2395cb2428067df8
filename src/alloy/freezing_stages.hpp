// Freezing in stages, each with one formula for the composition of the liquid: what dilute alloys and steels share.
#pragma once

#include <string>
#include <vector>

#include "palier/alloy/dilute.hpp"

namespace palier::alloy {

/// Content of one element in the liquid against the fraction liquid f, and in the solid that forms from it.
///
/// Liquid: shift + amount / (constant + linear f) where the element evens out in the solid,
///         shift + amount f^power where it does not. Solid: k * liquid + offset.
struct SoluteLine {
  double slope = 0;  ///< of the liquidus [K per mass %]
  double k = 1, offset = 0;
  double shift = 0, amount = 0;
  double constant = 1, linear = 0;
  double power = 0;  ///< 0: the element evens out

  /// An element with C_solid = k C + offset that the alloy holds C0 of and that evens out in the solid.
  static SoluteLine mixed(double slope, double k, double offset, double C0);
  /// An element that stays where it freezes, C in the liquid when the fraction liquid is f.
  static SoluteLine frozen(double slope, double k, double offset, double C, double f);

  struct Point {
    double liquid;    ///< [mass %]
    double gradient;  ///< d liquid / d f
  };
  Point at(double f) const;
  double liquid(double f) const { return at(f).liquid; }
  double solid(double f) const { return k * liquid(f) + offset; }
  bool level() const { return amount == 0 || (power == 0 && linear == 0); }
};

/// A stretch of fraction liquid, from begin down to end.
struct Stage {
  std::string reaction;  ///< name of the arrest it is where its temperature is level; empty where that is an error
  double base = 0;       ///< temperature of the liquidus without solute [K]
  std::vector<SoluteLine> lines;
  double begin = 1, end = 0;  ///< fraction liquid

  struct Point {
    double temperature;  ///< [K]
    double gradient;     ///< d temperature / d f [K], positive where the temperature falls as freezing goes on
  };
  Point at(double f) const;
  double temperature(double f) const { return at(f).temperature; }
  bool level() const;
  /// Some element goes with a power of f: the liquid is never used up, and ln f is the better variable.
  bool endless() const;
};

/// Stages one after the other, cut at the last liquid, with the inverse: fraction liquid at a temperature.
class FreezingStages {
 public:
  /// Throws InputError as freeze_dilute does. @param stages each beginning where the one before ends
  FreezingStages(Mixing mixing, const std::vector<Stage>& stages, const LastLiquid& end);

  const std::string& rule() const { return rule_; }
  double liquidus() const { return liquidus_; }
  double end_of_freezing() const { return pieces_.back().cold; }
  double last_liquid_fraction() const { return last_liquid_; }
  const std::vector<Arrest>& arrests() const { return arrests_; }
  double fraction_liquid(double T) const;     ///< end of freezing <= T <= liquidus
  Compositions compositions(double T) const;  ///< the same
  Compositions last_liquid() const;

 private:
  /// A stage with points on its way, which bracket the inverse.
  struct Piece {
    Stage stage;
    double hot, cold;          ///< temperatures at its two ends [K]
    std::vector<double> f, T;  ///< both falling
  };
  bool cut(Stage& stage, const LastLiquid& end) const;
  bool follow(Piece& piece, const LastLiquid& end) const;
  void add_arrest(double T, double share, const std::string& reaction);
  const Piece& piece_at(double T) const;
  static double solve(const Piece& piece, double T);

  std::string rule_;
  std::vector<Piece> pieces_;
  std::vector<Arrest> arrests_;
  double liquidus_ = 0;
  double last_liquid_ = 0;
};

}  // namespace palier::alloy
