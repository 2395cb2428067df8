// The rules that turn a phase diagram and a composition into a solidification path.
#include <algorithm>
#include <boost/math/tools/roots.hpp>
#include <cmath>
#include <functional>
#include <memory>
#include <utility>

#include "palier/alloy/diagram.hpp"
#include "palier/base/error.hpp"
#include "scheil_integral.hpp"

namespace palier::alloy {
namespace {

using Diagram = std::shared_ptr<const PhaseDiagram>;

double lever_fraction(const TieLine& tie, double composition) {
  return std::clamp((tie.liquid - composition) / (tie.liquid - tie.solid), 0.0, 1.0);
}

/// Temperature at which the last liquid is gone because the solidus passes the composition.
double lever_solidus(const PhaseDiagram& diagram, double composition, double low, double liquidus) {
  const auto solid_excess = [&](double T) { return diagram.tie_line(T).solid - composition; };
  if (!(solid_excess(low) >= 0)) throw base::InputError("lever rule: the solidus does not reach the composition");
  std::uintmax_t iterations = 200;
  const auto bracket = boost::math::tools::toms748_solve(solid_excess, low, liquidus,
                                                         boost::math::tools::eps_tolerance<double>(52), iterations);
  return 0.5 * (bracket.first + bracket.second);
}

/// Fraction liquid over temperature by Scheil's rule: d ln(fraction) = -d ln(C) / (1 - k).
std::function<double(double)> liquid_left_by_scheil(const Diagram& diagram, double composition, const Invariant& last) {
  if (const std::optional<double> k = diagram->constant_partition())
    return [diagram, composition, power = -1 / (1 - *k)](double T) {
      return std::pow(std::max(diagram->tie_line(T).liquid / composition, 1.0), power);
    };
  return [integral = ScheilIntegral(diagram, composition, last)](double T) { return integral.liquid_left(T); };
}

}  // namespace

SolidificationPath lever_path(const Diagram& diagram, double composition) {
  SolidificationPath::Parts p;
  p.rule = "lever";
  p.liquidus = diagram->liquidus(composition);
  const std::optional<Invariant> last = diagram->invariant();
  if (last && diagram->tie_line(last->temperature).solid <= composition) {
    p.end_of_freezing = last->temperature;
    // Nothing is left for the eutectic at the largest solubility itself.
    const double share = 1 - lever_fraction(diagram->tie_line(last->temperature), composition);
    if (share > 0) p.arrests = {{last->temperature, share, last->reaction}};
  } else {
    // No further than the lines are drawn.
    const double lowest = last ? last->temperature : diagram->liquidus(diagram->largest_composition());
    p.end_of_freezing = lever_solidus(*diagram, composition, lowest, p.liquidus);
  }
  const double solidus = p.arrests.empty() ? p.end_of_freezing : 0.0;
  p.fraction_above = [=](double T) { return T <= solidus ? 1.0 : lever_fraction(diagram->tie_line(T), composition); };
  p.solute = [=](double T) {
    const TieLine tie = diagram->tie_line(T);
    return SoluteState{tie.liquid, tie.solid};
  };
  return SolidificationPath(std::move(p));
}

SolidificationPath scheil_path(const Diagram& diagram, double composition) {
  const std::optional<Invariant> last = diagram->invariant();
  if (!last)
    throw base::InputError(
        "Scheil's rule never ends without an invariant: give a eutectic temperature, or take the lever rule");
  SolidificationPath::Parts p;
  p.rule = "scheil";
  p.liquidus = diagram->liquidus(composition);
  p.end_of_freezing = last->temperature;
  const auto left = liquid_left_by_scheil(diagram, composition, *last);
  // With k close to 1 the share left for the eutectic can be too small for a number.
  if (const double share = left(last->temperature); share > 0) p.arrests = {{last->temperature, share, last->reaction}};
  p.fraction_above = [left](double T) { return 1 - left(T); };
  p.solute = [diagram](double T) {
    const TieLine tie = diagram->tie_line(T);
    return SoluteState{tie.liquid, tie.solid};
  };
  return SolidificationPath(std::move(p));
}

}  // namespace palier::alloy
