// Shapes against each other: what must agree, what must scale.
#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>

#include "freeze/sections.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::freeze;

namespace {

/// A section with the same wall on both sides.
Section two_sided(Section s) {
  s.inside = s.outside;
  return s;
}

/// A hollow cylinder whose wall is as thick as the section's plate, with thin layers of sand on both sides.
Section hollow(Section plate, double bore) {
  plate.shape = heat::Shape::cylinder;
  plate.bore = bore;
  plate.thickness = bore + 2 * plate.thickness;
  return plate;
}

/// All lengths twice as long.
Section doubled(Section s) {
  s.thickness *= 2;
  s.bore *= 2;
  for (WallLayer& layer : s.outside.layers) layer.thickness *= 2;
  for (double& depth : s.probes) depth *= 2;
  return s;
}

}  // namespace

TEST_CASE("Symmetric plate equals the plate with two equal sides", "[freeze][geometry]") {
  const Section whole = GENERATE(pure_in_sand(), range_in_sand(), steady_range());
  Section symmetric = whole;
  symmetric.probes = {0, 0.0025, 0.005, 0.0075};
  const Result a = run(symmetric), b = run(two_sided(symmetric));
  CAPTURE(whole.path->rule(), whole.path->end_of_freezing());
  CHECK(std::abs(a.solidification_time - b.solidification_time) <=
        2 * std::max(a.solidification_time_error, b.solidification_time_error));
  for (std::size_t k = 0; k < a.probes.size(); ++k) {
    const ProbeReading &p = a.probes[k], &q = b.probes[k];
    CAPTURE(k, p.value.start, q.value.start, p.value.end, q.value.end);
    CHECK(std::abs(p.value.end - q.value.end) <= 2 * std::max(p.error.end, q.error.end));
    CHECK(std::abs(p.value.start - q.value.start) <= 2 * std::max(p.error.start, q.error.start));
  }
  CHECK(a.last_to_freeze == Approx(0.010).epsilon(1e-9));
}

TEST_CASE("Plate with two equal sides: both faces freeze alike, the middle last", "[freeze][geometry]") {
  Section s = two_sided(GENERATE(pure_in_sand(), range_in_sand(), steady_range()));
  s.probes = {0, 0.005, 0.010, 0.015, 0.020};
  const Result r = run(s);
  const auto alike = [&](std::size_t a, std::size_t b) {
    CAPTURE(a, r.probes[a].value.end, r.probes[b].value.end);
    CHECK(std::abs(r.probes[a].value.end - r.probes[b].value.end) <= r.probes[a].error.end + r.probes[b].error.end);
  };
  alike(0, 4);
  alike(1, 3);
  CHECK(r.probes[2].value.end == Approx(r.solidification_time).epsilon(1e-4));
  CHECK(r.last_to_freeze == Approx(0.010).margin(0.0008));  // a cell
}

TEST_CASE("Thin hollow cylinder tends to the plate with two sides as the bore grows", "[freeze][geometry]") {
  Section plate = GENERATE(pure_in_sand(), range_in_sand());
  plate.outside.layers[0].thickness = 0.04;
  plate = two_sided(plate);
  plate.accuracy = 2e-4;
  plate.probes = {0.005, 0.015};
  const Result flat = run(plate);
  std::vector<double> whole, between_sides;
  for (const double bore : {0.2, 2.0, 20.0}) {
    const Result round = run(hollow(plate, bore));
    whole.push_back(std::abs(round.solidification_time / flat.solidification_time - 1));
    between_sides.push_back((round.probes[1].value.end - round.probes[0].value.end) / flat.probes[0].value.end);
  }
  CAPTURE(whole, between_sides);
  // Ten times the bore, a tenth of the curvature: so goes what sets the two sides apart. What one side gains the other
  // loses, so that the last to freeze is off by the square of the curvature, down to the accuracy asked for.
  CHECK(between_sides[0] / between_sides[1] == Approx(10).epsilon(0.15));
  CHECK(between_sides[1] / between_sides[2] == Approx(10).epsilon(0.15));
  CHECK(whole[1] <= whole[0] / 10);
  CHECK(whole[2] <= plate.accuracy);
}

TEST_CASE("All lengths doubled: all times quadruple", "[freeze][geometry]") {
  Section s = GENERATE(pure_in_sand(), range_in_sand());
  s.shape = GENERATE(heat::Shape::plate, heat::Shape::cylinder, heat::Shape::sphere);
  const bool sand = GENERATE(false, true);
  s.outside = {{}, held_at(sand ? 300 : 600)};
  if (sand) s.outside.layers = {sand_layer(0.05, {})};  // perfect contact
  s.probes = {0.0025, 0.005, 0.010};
  CAPTURE(static_cast<int>(s.shape), sand, s.path->liquidus(), s.path->end_of_freezing());
  const Result small = run(s), large = run(doubled(s));
  CAPTURE(small.solidification_time, large.solidification_time);
  CHECK(std::abs(large.solidification_time - 4 * small.solidification_time) <=
        large.solidification_time_error + 4 * small.solidification_time_error);
  for (std::size_t k = 0; k < small.probes.size(); ++k) {
    const ProbeReading &a = small.probes[k], &b = large.probes[k];
    CAPTURE(k, a.value.end, b.value.end);
    CHECK(std::abs(b.value.end - 4 * a.value.end) <= b.error.end + 4 * a.error.end);
    CHECK(std::abs(b.value.start - 4 * a.value.start) <= b.error.start + 4 * a.error.start);
  }
}

TEST_CASE("Cylinder and sphere freeze faster than the plate of their thickness", "[freeze][geometry]") {
  Section s = GENERATE(pure_in_sand(), range_in_sand(), steady_range());
  const auto time = [&s](heat::Shape shape) {
    s.shape = shape;
    return run(s).solidification_time;
  };
  const double plate = time(heat::Shape::plate), cylinder = time(heat::Shape::cylinder),
               sphere = time(heat::Shape::sphere);
  // Chvorinov's rule, the square of the modulus, makes it 1/4 and 1/9; curved walls soak up more than that.
  CHECK(cylinder < plate / 4);
  CHECK(sphere < plate / 9);
}

TEST_CASE("Behind a weak film the time goes with the modulus", "[freeze][geometry]") {
  // Without an arrest: a sharp front that closes on the center leaves the metal anything but level.
  Section s = steady_range();
  s.outside = {{}, film(5, 300)};  // Biot number 5e-4
  const double plate = run(s).solidification_time;
  s.shape = heat::Shape::cylinder;
  CHECK(run(s).solidification_time == Approx(plate / 2).epsilon(2e-4));
  s.shape = heat::Shape::sphere;
  CHECK(run(s).solidification_time == Approx(plate / 3).epsilon(2e-4));
}
