// Contacts and boundaries of a run: limits that must agree, and heat that must leave.
#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>

#include "freeze/sections.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::freeze;

namespace {

/// Largest difference of the times of two runs, relative to the time all was solid.
double largest_difference(const Result& a, const Result& b) {
  double worst = std::abs(a.solidification_time - b.solidification_time);
  for (std::size_t k = 0; k < a.probes.size(); ++k) {
    worst = std::max(worst, std::abs(a.probes[k].value.start - b.probes[k].value.start));
    worst = std::max(worst, std::abs(a.probes[k].value.end - b.probes[k].value.end));
  }
  worst /= b.solidification_time;
  return worst;
}

void check_within_errors(const Result& a, const Result& b) {
  CHECK(std::abs(a.solidification_time - b.solidification_time) <=
        a.solidification_time_error + b.solidification_time_error);
  for (std::size_t k = 0; k < a.probes.size(); ++k) {
    const ProbeReading &p = a.probes[k], &q = b.probes[k];
    CAPTURE(k, p.value.start, q.value.start, p.value.end, q.value.end);
    CHECK(std::abs(p.value.start - q.value.start) <= p.error.start + q.error.start);
    CHECK(std::abs(p.value.end - q.value.end) <= p.error.end + q.error.end);
  }
}

Section with_contact(Section s, const heat::Contact& contact) {
  s.outside.layers[0].contact = contact;
  return s;
}

/// Heat of the metal in a row, per m2 of plate, radian and m of cylinder, steradian of sphere; only for a metal with
/// one heat capacity and no arrest, whose fraction and temperature in a cell follow from its enthalpy.
double metal_heat(const Section& s, const History& h, std::size_t row) {
  const int m = static_cast<int>(s.shape);
  double sum = 0;
  for (int i = h.metal_begin; i < h.metal_end; ++i) {
    const auto c = static_cast<std::size_t>(i), k = static_cast<std::size_t>(i - h.metal_begin);
    const double volume = (std::pow(h.face[c + 1], m + 1) - std::pow(h.face[c], m + 1)) / (m + 1);
    const double liquid = 1 - h.fraction_solid[row * static_cast<std::size_t>(h.metal_end - h.metal_begin) + k];
    sum += volume * s.metal.density * (1100 * h.temperature[row * h.radius.size() + c] + s.metal.latent_heat * liquid);
  }
  return sum;
}

}  // namespace

TEST_CASE("Heat flux given at the face: exactly flux x time x area leaves", "[freeze][walls]") {
  Section s = steady_range();
  s.shape = GENERATE(heat::Shape::plate, heat::Shape::cylinder, heat::Shape::sphere);
  const bool ramp = GENERATE(false, true);
  heat::Boundary boundary;
  boundary.kind = heat::Boundary::Kind::heat_flux;
  boundary.heat_flux = ramp ? base::Table({0.0, 100}, {2e5, 6e5}) : base::Table(3e5);
  s.outside = {{}, boundary};
  s.stop.after = 10;
  s.stop.below = 1.0;
  s.record_every = 2;
  const Result r = run(s);
  const double area = std::pow(s.thickness / 2, static_cast<int>(s.shape));
  REQUIRE(r.history.time.size() == 6);
  for (const std::size_t row : {std::size_t{3}, std::size_t{5}}) {
    const double known = boundary.heat_flux.integral(0, r.history.time[row]) * area;
    const double left = metal_heat(s, r.history, 0) - metal_heat(s, r.history, row);
    CAPTURE(static_cast<int>(s.shape), ramp, r.history.time[row]);
    // The end of the run is the end of a step; inside a step the record is interpolated.
    CHECK(left == Approx(known).epsilon(row == 5 ? 1e-7 : 1e-4));
    CHECK(r.history.surface_flux[row] == Approx(boundary.heat_flux(r.history.time[row])).epsilon(1e-9));
  }
}

TEST_CASE("Contact tables that are constant equal the constant contact", "[freeze][walls]") {
  const Section s = GENERATE(pure_in_sand(), range_in_sand());
  const base::Table always_700({0.0, 2000}, {700, 700});
  const Result known = run(with_contact(s, constant_contact(700)));
  CHECK(largest_difference(run(with_contact(s, {heat::Contact::Over::time, always_700})), known) <= 1e-9);
  CHECK(largest_difference(run(with_contact(s, {heat::Contact::Over::surface_temperature, always_700})), known) <=
        1e-5);
  // This one is cut into other cells.
  check_within_errors(run(with_contact(s, {heat::Contact::Over::surface_fraction_solid, always_700})), known);
}

TEST_CASE("A contact that changes lies between its extremes held constant", "[freeze][walls]") {
  const Section s = range_in_sand();
  const double open = run(with_contact(s, constant_contact(100))).solidification_time,
               closed = run(with_contact(s, constant_contact(3000))).solidification_time;
  const std::vector<heat::Contact> changing{
      {heat::Contact::Over::time, base::Table({0.0, 60}, {3000, 100})},
      {heat::Contact::Over::surface_temperature, base::Table({700.0, 920}, {100, 3000})},
      {heat::Contact::Over::surface_fraction_solid, base::Table({0.0, 1}, {3000, 100})}};
  for (const heat::Contact& contact : changing) {
    const double time = run(with_contact(s, contact)).solidification_time;
    CAPTURE(static_cast<int>(contact.over), closed, time, open);
    CHECK(time > closed * 1.001);
    CHECK(time < open * 0.999);
  }
}

TEST_CASE("Perfect contact equals a very large conductance", "[freeze][walls]") {
  const Section s = GENERATE(pure_in_sand(), range_in_sand(), steady_range());
  check_within_errors(run(with_contact(s, constant_contact(1e10))), run(with_contact(s, {})));
}

TEST_CASE("A film so strong that it holds the face equals a face held", "[freeze][walls]") {
  Section held = GENERATE(pure_in_sand(), range_in_sand(), steady_range()), strong = held;
  held.probes = strong.probes = {0.0025, 0.005, 0.010};
  held.outside = {{}, held_at(600)};
  strong.outside = {{}, film(1e9, 600)};
  CAPTURE(held.path->liquidus(), held.path->end_of_freezing());
  check_within_errors(run(held), run(strong));
}
