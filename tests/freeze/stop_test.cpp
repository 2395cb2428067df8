// When a run stops, and what is refused.
#include <catch2/catch.hpp>
#include <cmath>

#include "freeze/sections.hpp"
#include "palier/base/error.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::freeze;

namespace {

/// Refused with a message that holds the words.
void check_refused(const Section& section, const std::string& words) {
  CHECK_THROWS_AS(run(section), base::InputError);
  CHECK_THROWS_WITH(run(section), Catch::Contains(words));
}

}  // namespace

TEST_CASE("Stop after a time, before all is solid", "[freeze][stop]") {
  Section s = range_in_sand();
  s.stop.after = 12.5;
  s.record_every = 5;
  const Result r = run(s);
  CHECK(r.end_time == 12.5);
  CHECK(std::isnan(r.solidification_time));
  CHECK(std::isnan(r.probes.back().value.end));
  REQUIRE(r.history.time.size() == 4);
  CHECK(r.history.time == std::vector<double>{0, 5, 10, 12.5});
}

TEST_CASE("Stop after a time beyond the end of freezing: it ends with that", "[freeze][stop]") {
  Section s = range_in_sand();
  const double solid = run(s).solidification_time;
  s.stop.after = 10 * solid;
  const Result r = run(s);
  CHECK(r.end_time == r.solidification_time);
  CHECK(r.solidification_time == Approx(solid).epsilon(2e-3));
}

TEST_CASE("Stop below a temperature: the hottest point is at it", "[freeze][stop]") {
  Section s = GENERATE(pure_in_sand(), range_in_sand(), steady_range());
  const double below = s.path->end_of_freezing() - GENERATE(1.0, 80.0);
  const double solid = run(s).solidification_time;
  s.stop.below = below;
  const Result r = run(s);
  CAPTURE(below, r.end_time);
  CHECK(r.solidification_time == solid);
  CHECK(r.end_time > solid);
  CHECK(r.history.time.back() == r.end_time);
  CHECK(hottest_at_end(r) == Approx(below).margin(1e-6));
}

TEST_CASE("Stop below or after, whichever comes first", "[freeze][stop]") {
  Section s = range_in_sand();
  s.stop.below = 700;
  const double below_time = run(s).end_time;
  s.stop.after = 0.8 * below_time;
  CHECK(run(s).end_time == Approx(0.8 * below_time).epsilon(1e-12));
  s.stop.after = 1.2 * below_time;
  CHECK(run(s).end_time == Approx(below_time).epsilon(1e-4));
}

TEST_CASE("Sections that contradict themselves are refused", "[freeze][errors]") {
  SECTION("no path") {
    Section s = pure_in_sand();
    s.path.reset();
    check_refused(s, "path");
  }
  SECTION("no thickness") {
    Section s = pure_in_sand();
    s.thickness = 0;
    check_refused(s, "thickness");
  }
  SECTION("poured below the end of freezing") {
    Section s = range_in_sand();
    s.pouring_temperature = 820;
    check_refused(s, "pouring temperature");
  }
  SECTION("bore wider than the cylinder") {
    Section s = pure_in_sand();
    s.shape = heat::Shape::cylinder;
    s.bore = 0.021;
    check_refused(s, "thickness");
  }
  SECTION("layers in the bore thicker than its radius") {
    Section s = pure_in_sand();
    s.shape = heat::Shape::cylinder;
    s.thickness = 0.100;
    s.bore = 0.060;
    s.inside = Wall{{sand_layer(0.031, {})}, {}};
    check_refused(s, "bore");
    s.inside = Wall{{sand_layer(0.030, {})}, {}};
    CHECK_NOTHROW(run(s));
  }
  SECTION("a contact over the surface fraction solid between layers of the wall") {
    Section s = pure_in_sand();
    s.outside.layers.push_back(
        sand_layer(0.05, {heat::Contact::Over::surface_fraction_solid, base::Table({0.0, 1}, {2000, 500})}));
    check_refused(s, "fraction solid");
  }
}
