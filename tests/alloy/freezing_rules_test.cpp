// Lever rule and Scheil's rule against their closed forms, and what casting practice expects of them.
#include <boost/math/quadrature/gauss.hpp>
#include <catch2/catch.hpp>
#include <cmath>

#include "alloy/sample_alloys.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::lever_path;
using alloy::scheil_path;
using alloy::SolidificationPath;

namespace {

/// Temperature at which the path has frozen a fraction, by bisection.
double temperature_at(const SolidificationPath& path, double fraction) {
  double low = path.end_of_freezing(), high = path.liquidus();
  for (int i = 0; i < 100; ++i) {
    const double mid = 0.5 * (low + high);
    (path.fraction_above(mid) > fraction ? low : high) = mid;
  }
  return 0.5 * (low + high);
}

double eutectic_share(const SolidificationPath& path) {
  return path.arrests().empty() ? 0.0 : path.arrests().back().fraction;
}

}  // namespace

TEST_CASE("fraction solid of Al-4.5Cu over temperature", "[alloy][lever][scheil]") {
  // Lever rule: mass balance; Scheil 1942. Temperatures computed from the closed forms with 30-digit arithmetic.
  struct Row {
    double fraction, lever, scheil;  ///< temperatures in degC
  };
  const auto lever = lever_path(samples::al_cu(), 4.5), scheil = scheil_path(samples::al_cu(), 4.5);
  for (const Row& row : {Row{0.0, 644.727272727, 644.727272727}, Row{0.1, 643.344899375, 643.331546274},
                         Row{0.25, 640.728419845, 640.608306064}, Row{0.5, 633.892773893, 632.849896284},
                         Row{0.75, 619.542444311, 611.735658039}, Row{0.85, 608.140145084, 586.25019921},
                         Row{0.9, 599.633489041, 556.743691031}}) {
    // The temperatures have 9 decimals, and df/dT is at most 0.04 per kelvin here.
    CHECK(lever.fraction_above(row.lever + 273.15) == Approx(row.fraction).margin(1e-10));
    CHECK(scheil.fraction_above(row.scheil + 273.15) == Approx(row.fraction).margin(1e-10));
  }
  CHECK(lever.fraction_above(587.788523533 + 273.15) == Approx(0.95).margin(1e-10));
}

TEST_CASE("eutectic shares", "[alloy][lever][scheil]") {
  // Scheil 1942 and the mass balance of the lever rule; numbers computed from the closed forms.
  struct Row {
    std::string alloy;
    samples::Diagram diagram;
    double composition, lever, scheil;
  };
  for (const Row& row : {Row{"Al-4.5Cu", samples::al_cu(), 4.5, 0, 0.090670949012774},
                         Row{"Al-4.9Cu", samples::al_cu(), 4.9, 0, 0.10046774968624},
                         Row{"Al-2Cu", samples::al_cu(), 2, 0, 0.0341312248953},
                         Row{"Al-7Si", samples::al_si(), 7, 0.48858447488584, 0.50846583261757},
                         Row{"Al-5Si", samples::al_si(), 5, 0.30593607305936, 0.34523470434788},
                         Row{"Sn-10Pb", samples::sn_pb(), 10, 0.21727019498607, 0.2418105055868},
                         Row{"Pb-10Sn", samples::pb_sn(), 10, 0, 0.075165261878813}}) {
    INFO(row.alloy);
    const auto lever = lever_path(row.diagram, row.composition), scheil = scheil_path(row.diagram, row.composition);
    CHECK(eutectic_share(lever) == Approx(row.lever).margin(1e-12));
    CHECK(eutectic_share(scheil) == Approx(row.scheil).margin(1e-12));
    const double T = row.diagram->invariant()->temperature;
    CHECK(scheil.end_of_freezing() == T);
    CHECK((lever.end_of_freezing() == T) == (row.lever > 0));
    CHECK(scheil.arrests().back().reaction == "eutectic");
    CHECK(scheil.fraction_above(T) == Approx(1 - row.scheil).margin(1e-12));
    CHECK(scheil.fraction_below(T) == Approx(1).margin(1e-15));
  }
}

TEST_CASE("under the lever rule Al-4.5Cu ends on the solidus", "[alloy][lever]") {
  const auto path = lever_path(samples::al_cu(), 4.5);
  // 660 - (112 / 33) * 4.5 / 0.17 degC by hand.
  CHECK(path.end_of_freezing() == Approx(570.160427807 + 273.15).margin(1e-9));
  CHECK(path.fraction_above(path.end_of_freezing()) == 1);
  CHECK(path.freezing_range() == Approx(74.566844920).margin(1e-9));
  CHECK(path.rule() == "lever");
}

TEST_CASE("at the largest solubility the lever rule leaves nothing for the eutectic", "[alloy][lever]") {
  for (const auto& diagram : {samples::al_cu(), samples::al_si(), samples::sn_pb(), samples::pb_sn()}) {
    const double T = diagram->invariant()->temperature, largest = diagram->tie_line(T).solid;
    for (const double c : {std::nextafter(largest, 0.0), largest, std::nextafter(largest, 100.0)}) {
      const auto path = lever_path(diagram, c);
      CHECK(path.end_of_freezing() == Approx(T).epsilon(1e-14));
      CHECK(eutectic_share(path) < 1e-14);
      CHECK(path.fraction_below(path.end_of_freezing()) == Approx(1).margin(1e-14));
    }
  }
}

TEST_CASE("an alloy of eutectic composition freezes in one arrest", "[alloy][lever][scheil]") {
  const auto diagram = samples::al_si();
  for (const auto& path : {lever_path(diagram, 12.6), scheil_path(diagram, 12.6)}) {
    CHECK(path.freezing_range() == Approx(0).margin(1e-9));
    CHECK(eutectic_share(path) == Approx(1).margin(1e-12));
  }
}

TEST_CASE("the lever rule keeps the solute at every temperature", "[alloy][lever]") {
  for (const auto& diagram : {samples::al_cu(), samples::al_si(), samples::sn_pb(), samples::pb_sn()})
    for (const double c : {0.5, 4.5, 10.0}) {
      const auto path = lever_path(diagram, c);
      for (int i = 0; i <= 500; ++i) {
        const double T = std::max(path.liquidus() - path.freezing_range() * i / 500, path.end_of_freezing());
        const alloy::SoluteState s = path.solute(T).value();
        const double f = path.fraction_above(T);
        CHECK(f * s.solid + (1 - f) * s.liquid == Approx(c).epsilon(1e-10));
      }
    }
}

TEST_CASE("Scheil's rule keeps the solute: the solid formed and the eutectic hold what the alloy held",
          "[alloy][scheil]") {
  for (const auto& diagram : {samples::al_cu(), samples::al_si(), samples::sn_pb(), samples::pb_sn()})
    for (const double c : {2.0, 4.5, 10.0}) {
      const auto path = scheil_path(diagram, c);
      const double share = eutectic_share(path);
      const auto solid = [&](double f) { return path.solute(temperature_at(path, f)).value().solid; };
      double held = share * diagram->invariant()->liquid;
      const int pieces = 40;  // graded towards the end, where the solid formed changes fastest
      double at = 0;
      for (int i = 1; i <= pieces; ++i) {
        const double next = 1 - std::pow(share, static_cast<double>(i) / pieces);
        held += boost::math::quadrature::gauss<double, 10>::integrate(solid, at, next);
        at = next;
      }
      CHECK(held == Approx(c).epsilon(1e-10));
    }
}

TEST_CASE("solute is told within the freezing range only", "[alloy][scheil]") {
  const auto path = scheil_path(samples::al_cu(), 4.5);
  CHECK_FALSE(path.solute(path.liquidus() + 1e-6).has_value());
  CHECK_FALSE(path.solute(path.end_of_freezing() - 1e-6).has_value());
  CHECK(path.solute(path.end_of_freezing()).value().liquid == Approx(33).epsilon(1e-13));
  CHECK(path.fraction_above(path.liquidus() + 1) == 0);
  CHECK(path.fraction_below(path.liquidus() + 1) == 0);
  CHECK(path.fraction_above(path.end_of_freezing() - 1) == 1);
}

TEST_CASE("a rule that cannot end is refused", "[alloy][lever][scheil][errors]") {
  const auto open = alloy::make_diagram(alloy::BinaryLines::straight(1811, -44, 0.18, {}));
  CHECK_THROWS_AS(scheil_path(open, 0.25), base::InputError);
  CHECK_THROWS_WITH(
      scheil_path(open, 0.25),
      "Scheil's rule never ends without an invariant: give a eutectic temperature, or take the lever rule");
  CHECK_NOTHROW(lever_path(open, 0.25));
  // The last liquid would be of 5 / 0.1 = 50 %, where the liquidus is not drawn any more.
  alloy::BinaryLines lines;
  lines.melting_point = 933;
  lines.liquidus = base::Table({0, 10}, {933, 900});
  lines.partition_coefficient = 0.1;
  const auto shorter = alloy::make_diagram(lines);
  CHECK_THROWS_WITH(lever_path(shorter, 5), "lever rule: the solidus does not reach the composition");
  CHECK(lever_path(shorter, 0.9).end_of_freezing() == Approx(933 - 3.3 * 9).epsilon(1e-13));
  CHECK_THROWS_AS(lever_path(samples::al_cu(), 40), base::InputError);
  CHECK_THROWS_AS(scheil_path(samples::al_cu(), 40), base::InputError);
}

TEST_CASE("a share of eutectic too small for a number is none", "[alloy][scheil]") {
  const auto path = scheil_path(samples::straight(660, 548, 33, 0.999), 4.5);
  CHECK(path.arrests().empty());
  CHECK(path.fraction_above(path.end_of_freezing()) == 1);
}

TEST_CASE("what casting practice expects of a freezing alloy", "[alloy][lever][scheil]") {
  // Common practice, no published source.
  for (const auto& diagram : {samples::al_cu(), samples::al_si(), samples::sn_pb(), samples::pb_sn()})
    for (const double c : {1.0, 4.5}) {
      const auto lever = lever_path(diagram, c), scheil = scheil_path(diagram, c);
      for (const auto& path : {lever, scheil}) {
        CHECK(path.liquidus() < diagram->melting_point());
        CHECK(path.solute(path.liquidus()).value().liquid == Approx(c).epsilon(1e-10));
        CHECK(path.solute(path.liquidus()).value().solid < c);              // the first solid is poorer than the alloy
        CHECK(path.solute(path.end_of_freezing()).value().liquid > 2 * c);  // the last liquid is far richer
      }
      // Without diffusion in the solid freezing ends later, and with more eutectic.
      CHECK(scheil.end_of_freezing() <= lever.end_of_freezing());
      CHECK(eutectic_share(scheil) > eutectic_share(lever));
    }
  // Without a eutectic share, the last solid of the lever rule has the composition of the alloy.
  for (const double c : {1.0, 2.0, 4.5}) {
    const auto path = lever_path(samples::al_cu(), c);
    CHECK(path.solute(path.end_of_freezing()).value().solid == Approx(c).epsilon(1e-10));
  }
}
