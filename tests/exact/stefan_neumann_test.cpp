// palier against Stefan's and Neumann's solutions: freezing from a wall held at a temperature.
#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::exact;

TEST_CASE("Stefan and Neumann: end of freezing at default accuracy", "[exact][stefan]") {
  check_times(stefan_neumann_cases());
}

// A front that is followed inside its cell leaves the error of a smooth problem: second order in the cell width. Near
// the wall the first cell freezes without the front being followed; readings from a quarter of the depth on are used,
// where that has faded (its share falls with the square of the depth, like the time).
TEST_CASE("Stefan: second order in the cell width", "[exact][stefan][order]") {
  ExactCase exact = stefan_plate("Stefan", aluminum_like(), 200, 0.02);
  const StefanNeumann solution(aluminum_like(), 200, 660);
  exact.section.accuracy = 1e-5;
  std::vector<double> errors;
  for (const int cells : {20, 40, 80}) {
    exact.section.cells = cells;
    errors.push_back(end_error(
        freeze::run(exact.section), [&](double depth) { return solution.arrival(depth); }, 0.005, 0.02));
  }
  check_order(errors, 1.5, 2.5);
}

TEST_CASE("Neumann: temperatures, front, flux and heat", "[exact][stefan]") {
  const double until = 10;
  const StefanNeumann solution(aluminum_like(), 200, 720);
  ExactCase exact = neumann_half_space("Neumann", aluminum_like(), 200, 720, until);
  exact.section.cells = 400;
  const freeze::Result result = freeze::run(exact.section);
  const double radius = exact.section.depth();
  // 460 K across the skin of 35 mm, 1.1 mm a cell: the profile's bend within a cell is below 0.1 % of it.
  CHECK(largest_temperature_error(result, [&](double r) { return kelvin(solution.temperature(radius - r, until)); }) <
        0.5);
  const freeze::History& h = result.history;
  CHECK(h.solidus_depth.back() == Approx(solution.front(until)).epsilon(1e-3));
  CHECK(h.surface_flux.back() == Approx(solution.wall_flux(until)).epsilon(1e-3));
}
