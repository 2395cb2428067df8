// palier against the solutions for an alloy whose fraction solid is linear in temperature.
#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::exact;

TEST_CASE("Freezing range: start and end of freezing at default accuracy", "[exact][freezing-range]") {
  check_times(freezing_range_cases());
}

TEST_CASE("Freezing range: both fronts and the mushy zone between them", "[exact][freezing-range]") {
  const LinearAlloy alloy = uniform_linear_alloy(0.1);
  const double until = 10;
  const auto solution = LinearFreezing::fixed_wall(alloy, 100, 700);
  ExactCase exact = linear_half_space("plane", alloy, 100, 700, until);
  const freeze::Result result = freeze::run(exact.section);
  const freeze::History& h = result.history;
  const double end = solution.end_front(until), start = solution.start_front(until);
  CHECK(h.solidus_depth.back() == Approx(end).epsilon(1e-3));
  CHECK(h.liquidus_depth.back() == Approx(start).epsilon(1e-3));
  CHECK(h.mushy_width.back() == Approx(start - end).epsilon(5e-3));
  CHECK(h.surface_flux.back() == Approx(solution.wall_flux(until)).epsilon(1e-3));
}

TEST_CASE("Freezing range: order in the cell width at a wall", "[exact][freezing-range][order]") {
  const double eutectic = GENERATE(0.0, 0.1, 0.3);
  const LinearAlloy alloy = uniform_linear_alloy(eutectic);
  const auto solution = LinearFreezing::fixed_wall(alloy, 100, 700);
  ExactCase exact = linear_half_space("plane", alloy, 100, 700, 10);
  const double front = solution.end_front(10);
  exact.section.accuracy = 1e-5;
  std::vector<double> ends, starts;
  for (const int cells : {50, 100, 200, 400}) {
    exact.section.cells = cells;
    const freeze::Result result = freeze::run(exact.section);
    ends.push_back(end_error(
        result, [&](double depth) { return solution.end_arrival(depth); }, 0.4 * front, 0.95 * front));
    starts.push_back(start_error(
        result, [&](double depth) { return solution.start_arrival(depth); }, 0.4 * front, 0.95 * front));
  }
  CAPTURE(eutectic);
  // At the liquidus, and at a solidus without arrest, the slope of T(H) jumps within a cell that is not looked into:
  // first order at least, with an error that swings with where the cells lie. At a held face the start-up of the first
  // cell adds an error that falls faster than the second order.
  check_order(ends, 0.9, 3.2);
  check_order(starts, 0.9, 3.2);
}

TEST_CASE("Freezing range: temperatures around line and point sinks", "[exact][freezing-range]") {
  const LinearAlloy alloy = uniform_linear_alloy(0.1);
  const auto line = LinearFreezing::line_sink(alloy, 2e5, 700), point = LinearFreezing::point_sink(alloy, 6000, 700);
  const auto check = [](const ExactCase& exact, const LinearFreezing& solution, double end) {
    const freeze::Result result = freeze::run(exact.section);
    CHECK(largest_temperature_error(result, [&](double r) { return kelvin(solution.temperature(r, end)); }) < 1.0);
  };
  check(shell_around_sink("line", alloy, line, heat::Shape::cylinder, 0.005, 5, 60), line, 60);
  check(shell_around_sink("point", alloy, point, heat::Shape::sphere, 0.025, 25, 120), point, 120);
}
