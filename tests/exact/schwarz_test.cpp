// palier against Schwarz's solution: superheated metal and mold, both without end.
#include "exact/solutions/schwarz.hpp"

#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::exact;

TEST_CASE("Schwarz: end of freezing at default accuracy", "[exact][schwarz]") { check_times(schwarz_cases()); }

TEST_CASE("Schwarz: interface, front and heat flux on steel", "[exact][schwarz]") {
  const double until = 10;
  const Schwarz solution(aluminum_like(), 720, steel_mold(), 200);
  const ExactCase exact = schwarz_half_spaces("Schwarz", aluminum_like(), 720, steel_mold(), 200, until);
  ExactCase with_surface = exact;
  with_surface.section.probes = {0.0};
  const freeze::Result result = freeze::run(with_surface.section);
  CHECK(result.history.probe_temperature.back() == Approx(kelvin(solution.interface())).epsilon(1e-3));
  CHECK(result.history.solidus_depth.back() == Approx(solution.front(until)).epsilon(1e-3));
  CHECK(result.history.surface_flux.back() == Approx(solution.wall_flux(until)).epsilon(1e-3));
}

// The regime in which the sand cannot take the superheat: the face stays above the melting point for good.
TEST_CASE("Schwarz: in sand a strong superheat is never gone", "[exact][schwarz]") {
  const Schwarz solution(aluminum_like(), 720, sand_for_aluminum(), 20);
  ExactCase exact = schwarz_half_spaces("Schwarz", aluminum_like(), 720, sand_for_aluminum(), 20, 600);
  exact.section.probes = {0.0};
  const freeze::Result result = freeze::run(exact.section);
  CHECK(std::isnan(result.solidification_time));
  CHECK(std::isnan(result.probes[0].value.end));
  CHECK(result.history.solidus_depth.back() == 0.0);
  CHECK(result.history.probe_temperature.back() == Approx(kelvin(solution.interface())).epsilon(1e-3));
  CHECK(result.history.surface_flux.back() == Approx(solution.wall_flux(600)).epsilon(1e-3));
  for (const double fraction : result.history.fraction_solid) REQUIRE(fraction == 0.0);
}

TEST_CASE("Schwarz: second order in the cell width", "[exact][schwarz][order]") {
  const double until = 10;
  const Schwarz solution(aluminum_like(), 720, steel_mold(), 200);
  ExactCase exact = schwarz_half_spaces("Schwarz", aluminum_like(), 720, steel_mold(), 200, until);
  const double front = solution.front(until);
  exact.section.accuracy = 1e-5;
  std::vector<double> errors;
  for (const int cells : {200, 400, 800}) {
    exact.section.cells = cells;
    exact.section.outside.layers.front().cells = cells / 4;
    errors.push_back(end_error(
        freeze::run(exact.section), [&](double depth) { return until * std::pow(depth / front, 2); }, 0.4 * front,
        0.95 * front));
  }
  check_order(errors, 1.5, 2.5);
}
