// The solidification path: fraction solid against temperature, with isothermal arrests kept exact.
#pragma once

#include <functional>
#include <optional>
#include <string>
#include <vector>

namespace palier::alloy {

/// A share of the alloy that freezes at one temperature.
struct Arrest {
  double temperature;    ///< [K]
  double fraction;       ///< share of the whole alloy that freezes in the arrest, 0..1
  std::string reaction;  ///< e.g. "melting point", "eutectic"
};

/// Solute in the two phases at a temperature of the path [mass %].
struct SoluteState {
  double liquid;
  double solid;  ///< of the solid that forms at this temperature
};

/// Fraction solid against falling temperature.
///
/// Between liquidus and end of freezing fraction_solid is continuous and falls strictly with temperature but for the
/// arrests, where it jumps. Above the liquidus it is 0, below the end of freezing 1.
class SolidificationPath {
 public:
  struct Parts {
    std::string rule;             ///< "pure", "lever", "scheil", "measured", ...
    double liquidus = 0;          ///< [K]
    double end_of_freezing = 0;   ///< [K], <= liquidus
    std::vector<Arrest> arrests;  ///< by falling temperature
    /// fraction solid just above T, end_of_freezing <= T <= liquidus (that is, before an arrest at T has begun)
    std::function<double(double)> fraction_above;
    /// solute at T within the range; empty where the path knows no composition
    std::function<SoluteState(double)> solute;
  };
  /// Throws InputError where the parts contradict each other (fractions outside 0..1, rising with T, not summing to 1).
  explicit SolidificationPath(Parts parts);

  const std::string& rule() const { return parts_.rule; }
  double liquidus() const { return parts_.liquidus; }
  double end_of_freezing() const { return parts_.end_of_freezing; }
  double freezing_range() const { return parts_.liquidus - parts_.end_of_freezing; }
  const std::vector<Arrest>& arrests() const { return parts_.arrests; }
  /// Fraction solid just above T (an arrest at T not begun); 0 above the liquidus, 1 below the end of freezing.
  double fraction_above(double T) const;
  /// Fraction solid at T with an arrest at T completed.
  double fraction_below(double T) const;
  /// Solute at T; nothing outside the range or where the path knows no composition.
  std::optional<SoluteState> solute(double T) const;

 private:
  Parts parts_;
};

/// A metal that freezes at one temperature [K].
SolidificationPath pure_path(double melting_point);

/// Fraction solid read from points, as from a thermal-analysis record.
/// @param temperature    [K], strictly falling, at least two
/// @param fraction_solid rising from 0 to at most 1; two points at one temperature are not allowed
/// What is left at the last point freezes there as an arrest.
/// Throws InputError naming the offending point.
SolidificationPath measured_path(std::vector<double> temperature, std::vector<double> fraction_solid);

}  // namespace palier::alloy
