// The base metal's side of a calculated binary, behind the interface of phase diagrams.
#include <algorithm>
#include <boost/math/interpolators/cubic_hermite.hpp>
#include <boost/math/tools/roots.hpp>
#include <cmath>
#include <functional>
#include <optional>
#include <utility>

#include "palier/alloy/binary_equilibrium.hpp"
#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

using Line = boost::math::interpolators::cubic_hermite<std::vector<double>>;

/// Compositions over rising temperature, in mass % of solute.
struct Lines {
  std::vector<double> temperature, liquid, liquid_slope, solid, solid_slope;
};

class EquilibriumDiagram final : public PhaseDiagram {
 public:
  EquilibriumDiagram(const Lines& lines, std::optional<Invariant> last)
      : temperature_(lines.temperature),
        composition_(lines.liquid),
        liquid_(vector_copy(lines.temperature), vector_copy(lines.liquid), vector_copy(lines.liquid_slope)),
        solid_(vector_copy(lines.temperature), vector_copy(lines.solid), vector_copy(lines.solid_slope)),
        invariant_(std::move(last)) {}

  double liquidus(double composition) const override {
    const double largest = composition_.front();
    if (!(composition > 0 && composition <= largest * (1 + 1e-12)))
      throw base::InputError("composition " + std::to_string(composition) +
                             " mass % is outside the diagram; expected 0 to " + std::to_string(largest) + " mass %");
    // The points by falling composition: the first that is not above it.
    const auto at = std::lower_bound(composition_.begin(), composition_.end(), composition, std::greater<>());
    const auto i = static_cast<std::size_t>(at - composition_.begin());
    if (i == 0 || composition_[i] == composition) return temperature_[i];
    const auto excess = [&](double T) { return liquid_(T) - composition; };
    std::uintmax_t iterations = 100;
    const auto root = boost::math::tools::toms748_solve(
        excess, temperature_[i - 1], temperature_[i], composition_[i - 1] - composition, composition_[i] - composition,
        boost::math::tools::eps_tolerance<double>(52), iterations);
    return 0.5 * (root.first + root.second);
  }

  TieLine tie_line(double T) const override {
    const double low = temperature_.front(), high = temperature_.back();
    const double rounding = 1e-12 * high;
    if (!(T >= low - rounding && T <= high + rounding))
      throw base::InputError("no tie line at " + std::to_string(T) + " K; expected " + std::to_string(low) + " to " +
                             std::to_string(high) + " K");
    const double inside = std::clamp(T, low, high);  // of rounding only
    return {liquid_(inside), solid_(inside)};
  }

  double melting_point() const override { return temperature_.back(); }
  std::optional<Invariant> invariant() const override { return invariant_; }
  double largest_composition() const override { return composition_.front(); }

 private:
  /// The interpolator takes its points over.
  static std::vector<double> vector_copy(const std::vector<double>& v) { return v; }

  std::vector<double> temperature_;  ///< rising
  std::vector<double> composition_;  ///< of the liquid, falling
  Line liquid_, solid_;
  std::optional<Invariant> invariant_;
};

Lines lines_of(const BinarySystem& system, const Branch& branch, BaseElement base) {
  Lines lines;
  const double sign = base == BaseElement::first ? 1 : -1;
  const auto solute = [&](double percent) { return base == BaseElement::first ? percent : 100 - percent; };
  for (auto p = branch.points.rbegin(); p != branch.points.rend(); ++p) {
    lines.temperature.push_back(p->temperature);
    lines.liquid.push_back(solute(p->liquid_percent));
    lines.solid.push_back(solute(p->solid_percent));
    lines.liquid_slope.push_back(sign * system.mass_percent_slope(p->liquid) * p->liquid_slope);
    lines.solid_slope.push_back(sign * system.mass_percent_slope(p->solid) * p->solid_slope);
    if (lines.liquid.size() > 1 && !(lines.liquid.back() < lines.liquid[lines.liquid.size() - 2]))
      throw base::InputError("the liquidus of " + branch.solid + " does not fall steadily near " +
                             std::to_string(p->temperature) + " K");
  }
  return lines;
}

/// The reaction that ends the branch, where the last liquid freezes in it.
std::optional<Invariant> last_reaction(const BinaryEquilibrium& equilibrium, const Branch& branch, BaseElement base,
                                       double largest) {
  const double T = branch.points.back().temperature;
  const BranchEnd other = base == BaseElement::first ? BranchEnd::second_melts : BranchEnd::first_melts;
  if (branch.cold_end == other) return Invariant{"melting point", T, largest};
  if (branch.cold_end == BranchEnd::invariant)
    for (const BinaryInvariant& i : equilibrium.invariants)
      if (i.temperature == T && i.reaction == "eutectic") return Invariant{i.reaction, T, largest};
  return std::nullopt;
}

}  // namespace

std::shared_ptr<const PhaseDiagram> diagram_from(const BinarySystem& system, const BinaryEquilibrium& equilibrium,
                                                 BaseElement base) {
  const bool first = base == BaseElement::first;
  const std::string& name = first ? system.first : system.second;
  const BranchEnd melts = first ? BranchEnd::first_melts : BranchEnd::second_melts;
  const auto& all = equilibrium.branches;
  const auto branch = std::find_if(all.begin(), all.end(), [&](const Branch& b) { return b.hot_end == melts; });
  if (branch == all.end())
    throw base::InputError("the liquidus does not fall from the melting point of " + name +
                           ": take the other element for the base metal");
  if (branch->cold_end == BranchEnd::congruent)
    throw base::InputError("the liquidus of " + name + " ends in a congruent point, where no path can end");
  const Lines lines = lines_of(system, *branch, base);
  return std::make_shared<EquilibriumDiagram>(lines, last_reaction(equilibrium, *branch, base, lines.liquid.front()));
}

}  // namespace palier::alloy
