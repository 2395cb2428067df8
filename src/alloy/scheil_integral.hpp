// Scheil's rule where the partition coefficient varies: the liquid left as an integral along the liquidus.
#pragma once

#include <boost/math/interpolators/cubic_hermite.hpp>
#include <limits>
#include <memory>
#include <vector>

#include "palier/alloy/diagram.hpp"

namespace palier::alloy {

/// Fraction liquid f by Scheil's rule, d ln f = -dC / (C - C_s), integrated once from the composition of the alloy.
///
/// The variable of the integral is v = ln C, or ln [C / (1 - C / C_end)] where liquid and solid meet at C_end: in both
/// the integrand stays smooth and finite to the end.
class ScheilIntegral {
 public:
  /// @param last the invariant that ends freezing
  ScheilIntegral(std::shared_ptr<const PhaseDiagram> diagram, double composition, const Invariant& last);
  /// Fraction liquid at T between the invariant, not begun, and the liquidus.
  double liquid_left(double T) const;

 private:
  using Line = boost::math::interpolators::cubic_hermite<std::vector<double>>;
  double variable(double C) const;
  /// -d ln f / dv
  double integrand(double v) const;

  std::shared_ptr<const PhaseDiagram> diagram_;
  double meeting_ = std::numeric_limits<double>::infinity();  ///< C_end, where both phases have one composition
  double first_, last_;                                       ///< v of the alloy and of the end
  double last_log_ = 0, last_slope_ = 0;                      ///< ln f and its slope at the end
  std::shared_ptr<const Line> log_fraction_;                  ///< ln f over v; none where nothing is left to integrate
};

}  // namespace palier::alloy
