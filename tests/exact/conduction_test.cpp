// palier without freezing, against series and half-space solutions of the heat equation.
#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::exact;

namespace {

const Phase body{2500, 200, 1000};
constexpr double radius = 0.02, hot = 500, cold = 100;

/// Body at `hot`, cooled through a film to `cold`, up to a Fourier number.
freeze::Section cooled(heat::Shape shape, double biot, double fourier) {
  freeze::Section s = section_without_freezing(body);
  s.shape = shape;
  s.thickness = 2 * radius;
  s.pouring_temperature = kelvin(hot);
  s.outside.outer = std::isinf(biot) ? held_at(cold) : film_to(biot * body.conductivity / radius, cold);
  s.stop.after = fourier * radius * radius / body.diffusivity();
  return s;
}

/// Errors of theta, root mean square over the cells, on grids of 20, 40 and 80 cells.
std::vector<double> theta_errors(heat::Shape shape, double biot, double fourier) {
  const CoolingSeries series(static_cast<CoolingSeries::Body>(shape), biot);
  freeze::Section s = cooled(shape, biot, fourier);
  s.accuracy = 1e-5;
  std::vector<double> errors;
  for (const int cells : {20, 40, 80}) {
    s.cells = cells;
    const auto known = [&](double r) { return kelvin(cold + (hot - cold) * series.theta(r / radius, fourier)); };
    errors.push_back(temperature_error(freeze::run(s), known) / (hot - cold));
  }
  return errors;
}

}  // namespace

// Central differences on an even grid: second order. A cell mean differs from the temperature at its center by the same
// order, so that it does not matter which of the two is compared.
TEST_CASE("Conduction: plate, cylinder and sphere are second order in the cell width", "[exact][conduction][order]") {
  const auto shape = GENERATE(heat::Shape::plate, heat::Shape::cylinder, heat::Shape::sphere);
  const double biot = GENERATE(0.1, 1.0, 10.0, std::numeric_limits<double>::infinity());
  CAPTURE(static_cast<int>(shape), biot);
  const std::vector<double> errors = theta_errors(shape, biot, 0.2);
  check_order(errors, 1.8, 2.2);
  CHECK(errors.back() < 1e-4);
}

TEST_CASE("Conduction: heat flux through the surface", "[exact][conduction]") {
  const auto shape = GENERATE(heat::Shape::plate, heat::Shape::cylinder, heat::Shape::sphere);
  const double biot = GENERATE(0.1, 1.0, 10.0);
  CAPTURE(static_cast<int>(shape), biot);
  const CoolingSeries series(static_cast<CoolingSeries::Body>(shape), biot);
  freeze::Section s = cooled(shape, biot, 0.2);
  s.cells = 100;
  const double known = body.conductivity * (hot - cold) / radius * series.surface_flux(0.2);
  CHECK(freeze::run(s).history.surface_flux.back() == Approx(known).epsilon(1e-3));
}

TEST_CASE("Conduction: two half spaces in contact", "[exact][conduction]") {
  const HalfSpaceContact solution{steel_mold(), aluminum_like().solid, 20, 500};
  const double until = 10;
  freeze::Section s = section_without_freezing(solution.right);
  s.thickness = 2 * reach(solution.right, until);
  s.pouring_temperature = kelvin(solution.right_start);
  s.outside = mold_wall(solution.left, reach(solution.left, until), solution.left_start);
  s.stop.after = until;
  s.probes = {0.0};
  s.cells = 400;
  s.outside.layers.front().cells = 200;
  const freeze::Result result = freeze::run(s);
  const double surface = s.depth();
  CHECK(result.history.probe_temperature.back() == Approx(kelvin(solution.interface())).margin(0.1));
  CHECK(result.history.surface_flux.back() == Approx(solution.flux(until)).epsilon(1e-3));
  CHECK(largest_temperature_error(result, [&](double r) { return kelvin(solution.temperature(surface - r, until)); }) <
        0.1);
}

TEST_CASE("Conduction: half spaces behind a film and under a flux", "[exact][conduction]") {
  const double until = 600;
  const Phase sand = sand_for_aluminum();
  freeze::Section s = section_without_freezing(sand);
  s.thickness = 2 * reach(sand, until);
  s.pouring_temperature = kelvin(20);
  s.stop.after = until;
  s.cells = 400;
  s.probes = {0.0};
  const double surface = s.depth();
  SECTION("film") {
    const HalfSpaceFilm solution{sand, 20, 600, 100};
    s.outside.outer = film_to(100, 600);
    const freeze::Result result = freeze::run(s);
    CHECK(largest_temperature_error(result,
                                    [&](double r) { return kelvin(solution.temperature(surface - r, until)); }) < 0.1);
    CHECK(result.history.probe_temperature.back() == Approx(kelvin(solution.temperature(0, until))).margin(0.1));
  }
  SECTION("flux") {
    const HalfSpaceFlux solution{sand, 20, 20000};
    s.outside.outer.kind = heat::Boundary::Kind::heat_flux;
    s.outside.outer.heat_flux = base::Table(-20000.0);  // positive leaves
    const freeze::Result result = freeze::run(s);
    CHECK(largest_temperature_error(result,
                                    [&](double r) { return kelvin(solution.temperature(surface - r, until)); }) < 0.1);
    CHECK(result.history.probe_temperature.back() == Approx(kelvin(solution.temperature(0, until))).margin(0.1));
  }
}
