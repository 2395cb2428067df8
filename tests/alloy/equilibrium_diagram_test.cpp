// A calculated binary as a phase diagram: its lines, and the lever and Scheil paths that follow from it.
#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <functional>
#include <memory>
#include <string>
#include <vector>

#include "alloy/assessments.hpp"
#include "palier/alloy/binary_equilibrium.hpp"
#include "palier/alloy/enthalpy_curve.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::BaseElement;
using alloy::BinarySystem;
using alloy::PhaseDiagram;
using alloy::SolidificationPath;
using alloy::SolutionPhase;
using alloy::TieLine;

namespace {

using Diagram = std::shared_ptr<const PhaseDiagram>;

Diagram diagram(const BinarySystem& system, double low, double high, BaseElement base = BaseElement::first) {
  return alloy::diagram_from(system, alloy::binary_equilibrium(system, low, high), base);
}
Diagram al_si() { return diagram(samples::al_si_energies(), 500, 1750); }
Diagram al_cu() { return diagram(samples::al_cu_energies(), 700, 1400); }
Diagram al_zn() { return diagram(samples::al_zn_energies(), 500, 1000); }
Diagram pb_sn() { return diagram(samples::pb_sn_energies(), 350, 650); }
Diagram ni_cu() { return diagram(samples::cu_ni_energies(), 1000, 1800, BaseElement::second); }

double bisect(double low, double high, const std::function<double(double)>& f) {  // f(low) < 0 < f(high)
  for (int i = 0; i < 90; ++i) {
    const double mid = 0.5 * (low + high);
    (f(mid) < 0 ? low : high) = mid;
  }
  return 0.5 * (low + high);
}

/// The tie line between the first solid and the liquid of a system, straight from the Gibbs energies: bisection for the
/// liquid with the solid's potential of the first element, and for the solid with which the other potential agrees.
/// @param most_solid mole fraction above which the solid is not looked for
TieLine tie_line_by_bisection(const BinarySystem& system, double T, double most_solid) {
  const auto liquid = system.liquid.at(T), solid = std::get<SolutionPhase>(system.solids[0]).at(T);
  const auto first = [](const alloy::IsothermalEnergy& G, double x) {
    const auto g = G.at(x);
    return g.value - x * g.slope;
  };
  const auto second = [](const alloy::IsothermalEnergy& G, double x) {
    const auto g = G.at(x);
    return g.value + (1 - x) * g.slope;
  };
  const auto liquid_of = [&](double xs) {
    const double mu = first(solid, xs);
    return bisect(xs, 0.9, [&](double xl) { return mu - first(liquid, xl); });
  };
  const double xs = bisect(1e-9, most_solid, [&](double x) { return second(solid, x) - second(liquid, liquid_of(x)); });
  return {system.mass_percent(liquid_of(xs)), system.mass_percent(xs)};
}

struct Sample {
  std::string name;
  BinarySystem system;
  Diagram diagram;
  double most_solid;
};

std::vector<Sample> sample_diagrams() {
  return {{"Al-Si", samples::al_si_energies(), al_si(), 0.03},
          {"Al-Cu", samples::al_cu_energies(), al_cu(), 0.05},
          {"Pb-Sn", samples::pb_sn_energies(), pb_sn(), 0.3}};
}

double eutectic_share(const SolidificationPath& path) {
  return path.arrests().empty() ? 0.0 : path.arrests().back().fraction;
}

}  // namespace

TEST_CASE("lines of a calculated diagram between its points", "[alloy][equilibrium]") {
  for (const Sample& s : sample_diagrams()) {
    INFO(s.name);
    const double low = s.diagram->invariant()->temperature, high = s.diagram->melting_point();
    for (int i = 1; i < 200; ++i) {
      const double T = low + (high - low) * (i + 0.37) / 201, step = 1e-3;
      const TieLine exact = tie_line_by_bisection(s.system, T, s.most_solid), line = s.diagram->tie_line(T);
      const double slope = (s.diagram->tie_line(T + step).liquid - s.diagram->tie_line(T - step).liquid) / (2 * step);
      // [K] At 505.08 K the pieces of tin's energies, liquid less solid, miss each other by 5e-4 J/mol: a step of about
      // 1e-5 K in its liquidus, which a smooth line cannot follow.
      CHECK(std::abs((line.liquid - exact.liquid) / slope) < 1e-5);
      CHECK(line.solid == Approx(exact.solid).margin(1e-6));
      CHECK(s.diagram->liquidus(line.liquid) == Approx(T).margin(1e-9));
    }
  }
}

TEST_CASE("ends of a calculated diagram", "[alloy][equilibrium]") {
  for (const Diagram& d : {al_si(), al_cu(), al_zn(), pb_sn()}) {
    const auto last = d->invariant().value();
    CHECK(last.reaction == "eutectic");
    CHECK(d->tie_line(last.temperature).liquid == last.liquid);
    CHECK(d->largest_composition() == last.liquid);
    CHECK(d->liquidus(last.liquid) == last.temperature);
    CHECK(d->tie_line(d->melting_point()).liquid == 0);
    CHECK(d->tie_line(d->melting_point()).solid == 0);
    CHECK_FALSE(d->constant_partition().has_value());
    CHECK_THROWS_AS(d->tie_line(last.temperature - 0.01), base::InputError);
    CHECK_THROWS_AS(d->tie_line(d->melting_point() + 0.01), base::InputError);
    CHECK_THROWS_AS(d->liquidus(0), base::InputError);
    CHECK_THROWS_AS(d->liquidus(last.liquid + 0.01), base::InputError);
  }
}

TEST_CASE("liquidus and partition of aluminum alloys", "[alloy][equilibrium]") {
  // Equations of equal potentials solved independently with 30-digit arithmetic.
  struct Row {
    Diagram diagram;
    double composition, liquidus, k;  ///< [mass %], [degC], by mass
  };
  for (const Row& row : {Row{al_si(), 5, 629.69481, 0.108501}, Row{al_si(), 7, 616.51389, 0.112029},
                         Row{al_si(), 9, 602.72338, 0.115964}, Row{al_cu(), 4.5, 648.47694, 0.099066}}) {
    const double T = row.diagram->liquidus(row.composition);
    CHECK(T - 273.15 == Approx(row.liquidus).margin(6e-6));
    CHECK(row.diagram->tie_line(T).solid / row.composition == Approx(row.k).margin(6e-7));
  }
}

TEST_CASE("copper and nickel mix in any proportion", "[alloy][equilibrium][lever]") {
  struct Row {
    double nickel, liquidus, solidus;  ///< [mass %], [degC]; computed independently with 30-digit arithmetic
  };
  const Diagram d = ni_cu();
  CHECK(d->largest_composition() == 100);
  CHECK(d->invariant()->reaction == "melting point");
  for (const Row& row : {Row{30, 1246.706, 1199.494}, Row{50, 1318.155, 1268.833}, Row{70, 1374.181, 1344.226}}) {
    const auto path = alloy::lever_path(d, 100 - row.nickel);
    CHECK(path.liquidus() - 273.15 == Approx(row.liquidus).margin(6e-4));
    CHECK(path.end_of_freezing() - 273.15 == Approx(row.solidus).margin(6e-4));
    CHECK(path.arrests().empty());
  }
  CHECK(100 - d->tie_line(d->liquidus(70)).solid == Approx(43.7206).margin(6e-5));
  CHECK_THROWS_WITH(diagram(samples::cu_ni_energies(), 1000, 1800, BaseElement::first), Catch::Contains("Cu"));
}

TEST_CASE("lever paths by lines and by Gibbs energies are the same", "[alloy][equilibrium][lever]") {
  for (const Sample& s : sample_diagrams())
    for (const double c : {0.7, 4.5, 11.0}) {
      INFO(s.name << " " << c);
      const auto path = alloy::lever_path(s.diagram, c);
      for (int i = 1; i < 50; ++i) {
        const double T = path.liquidus() - path.freezing_range() * i / 50;
        const TieLine tie = tie_line_by_bisection(s.system, T, s.most_solid);
        CHECK(path.fraction_above(T) == Approx((tie.liquid - c) / (tie.liquid - tie.solid)).margin(1e-7));
      }
    }
}

TEST_CASE("shares of eutectic with a varying partition", "[alloy][equilibrium][lever][scheil]") {
  // E. Scheil, Z. Metallkunde 34 (1942) 70, and the lever rule, along calculated lines; integrated independently with
  // 30-digit arithmetic.
  struct Row {
    Diagram diagram;
    double composition, scheil, lever;
  };
  for (const Row& row : {Row{al_si(), 7, 0.518441442, 0.497691987}, Row{al_si(), 5, 0.355210815, 0.315103226},
                         Row{al_cu(), 4.5, 0.104706327, 0}, Row{al_cu(), 2, 0.0426041298, 0}}) {
    CHECK(eutectic_share(alloy::scheil_path(row.diagram, row.composition)) == Approx(row.scheil).margin(6e-10));
    CHECK(eutectic_share(alloy::lever_path(row.diagram, row.composition)) == Approx(row.lever).margin(6e-10));
  }
}

TEST_CASE("Scheil's rule against freezing in small steps, each keeping its solute", "[alloy][equilibrium][scheil]") {
  // A step in temperature freezes solid of the mean composition of its ends: second order in the step, so that two
  // numbers of steps give the limit to fourth order.
  const auto left = [](const Sample& s, double c, double T_end, int steps) {
    const double T0 = s.diagram->liquidus(c);
    TieLine tie = tie_line_by_bisection(s.system, T0, s.most_solid);
    double f = 1;
    for (int i = 1; i <= steps; ++i) {
      const TieLine next = tie_line_by_bisection(s.system, T0 + (T_end - T0) * i / steps, s.most_solid);
      const double solid = 0.5 * (tie.solid + next.solid);
      f *= (tie.liquid - solid) / (next.liquid - solid);
      tie = next;
    }
    return f;
  };
  for (const Sample& s : sample_diagrams())
    for (const double c : {1.0, 7.0}) {
      INFO(s.name << " " << c);
      const auto path = alloy::scheil_path(s.diagram, c);
      for (const double share : {0.2, 0.6, 1.0}) {
        const double T = path.liquidus() - share * path.freezing_range();
        const double exact = (4 * left(s, c, T, 200) - left(s, c, T, 100)) / 3;
        CHECK(1 - path.fraction_above(T) == Approx(exact).margin(1e-7));
      }
    }
}

TEST_CASE("Scheil's rule keeps the solute where the partition varies", "[alloy][equilibrium][scheil]") {
  for (const Diagram& d : {al_si(), al_cu(), al_zn(), pb_sn(), ni_cu()})
    for (const double c : {0.01, 2.0, 0.6 * d->largest_composition(), d->largest_composition() * (1 - 1e-9)}) {
      INFO(c);
      const auto path = alloy::scheil_path(d, c);
      // Solute of the solid that has formed, by the trapezoidal rule over many steps, which are finest below the
      // liquidus, and of the liquid left.
      constexpr int kSteps = 20000;
      double solute = 0, f = 0, solid = path.solute(path.liquidus())->solid;
      for (int i = 1; i <= kSteps; ++i) {
        const double share = std::pow(static_cast<double>(i) / kSteps, 3);
        const double T = std::max(path.liquidus() - path.freezing_range() * share, path.end_of_freezing());
        const double next = path.fraction_above(T), at = path.solute(T)->solid;
        REQUIRE(next >= f - 1e-13);  // rounding, where all but nothing freezes before the eutectic
        solute += (next - f) * 0.5 * (at + solid);
        f = next;
        solid = at;
      }
      solute += (1 - f) * d->invariant()->liquid;
      CHECK(solute == Approx(c).epsilon(2e-6));
    }
}

TEST_CASE("along straight lines the integral is Scheil's closed form", "[alloy][scheil]") {
  /// Straight lines that do not tell that their partition is constant.
  class Silent final : public PhaseDiagram {
   public:
    double liquidus(double composition) const override { return lines_->liquidus(composition); }
    TieLine tie_line(double T) const override { return lines_->tie_line(T); }
    double melting_point() const override { return lines_->melting_point(); }
    std::optional<alloy::Invariant> invariant() const override { return lines_->invariant(); }
    double largest_composition() const override { return lines_->largest_composition(); }

   private:
    // Al-Cu after M.C. Flemings, Solidification Processing (1974): 660 and 548 degC, 33 % Cu, k = 0.17.
    Diagram lines_ = alloy::make_diagram(alloy::BinaryLines::straight(933.15, -112.0 / 33, 0.17, 821.15));
  };
  const auto path = alloy::scheil_path(std::make_shared<Silent>(), 4.5);
  CHECK(eutectic_share(path) == Approx(std::pow(33 / 4.5, -1 / 0.83)).epsilon(1e-11));
  for (int i = 1; i < 100; ++i) {
    const double T = path.liquidus() - path.freezing_range() * i / 100, C = (933.15 - T) * 33 / 112;
    CHECK(1 - path.fraction_above(T) == Approx(std::pow(C / 4.5, -1 / 0.83)).epsilon(1e-11));
  }
}

TEST_CASE("with full miscibility Scheil's rule ends at the lower melting point with nothing left",
          "[alloy][equilibrium][scheil]") {
  const Diagram d = ni_cu();
  const auto path = alloy::scheil_path(d, 70);
  CHECK(path.arrests().empty());
  CHECK(path.end_of_freezing() == d->invariant()->temperature);
  CHECK(path.fraction_above(path.end_of_freezing()) == 1);
  // Close to copper the liquid vanishes as a power 1 / (k - 1) of its nickel, k of nickel in copper.
  const double near = path.end_of_freezing() + 0.02, nearer = path.end_of_freezing() + 0.01;
  const TieLine tie = d->tie_line(nearer);
  const double k = (100 - tie.solid) / (100 - tie.liquid);
  const double power = std::log((1 - path.fraction_above(near)) / (1 - path.fraction_above(nearer))) /
                       std::log((100 - d->tie_line(near).liquid) / (100 - tie.liquid));
  CHECK(power == Approx(1 / (k - 1)).epsilon(1e-3));
}

TEST_CASE("paths along calculated lines make enthalpy curves", "[alloy][equilibrium][curve]") {
  alloy::MetalProperties metal;  // invented
  metal.density = 2500;
  metal.solid = metal.liquid = {base::Table(1000.0), base::Table(150.0)};
  metal.latent_heat = 4e5;
  for (const Diagram& d : {al_si(), al_cu(), al_zn(), pb_sn(), ni_cu()})
    for (const auto& path : {alloy::lever_path(d, 5), alloy::scheil_path(d, 5)}) {
      const double low = path.end_of_freezing() - 50, high = path.liquidus() + 50;
      const alloy::EnthalpyCurve curve(metal, path, low, high);
      // All of the sensible and latent heat, and the fraction solid back at each temperature.
      CHECK(curve.enthalpy(high) == Approx(2500 * (1000 * (high - low) + 4e5)).epsilon(1e-8));
      for (int i = 1; i < 200; ++i) {
        const double T = path.liquidus() - path.freezing_range() * i / 200;
        const double H = 2500 * (1000 * (T - low) + 4e5 * (1 - path.fraction_above(T)));
        CHECK(curve.temperature(H) == Approx(T).margin(1e-3));
      }
    }
}
