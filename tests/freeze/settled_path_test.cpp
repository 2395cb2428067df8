// Path and time of freezing settled together, as back-diffusion wants it.
#include "palier/freeze/settled_path.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <string>

#include "freeze/sections.hpp"
#include "palier/base/error.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::freeze;

namespace {

/// A path that freezes over a range which narrows as freezing takes longer (invented; half as wide after forever).
alloy::SolidificationPath narrowing(double time) {
  const double liquidus = 888, range = 40 * (0.5 + 0.5 / (1 + time / 1000));
  return alloy::measured_path({liquidus, liquidus - range}, {0.0, 0.6});
}

}  // namespace

TEST_CASE("A path that follows the time of freezing settles with it", "[freeze][settled-path]") {
  Section s = range_in_sand();
  s.path_after = narrowing;
  s.path = narrowing(1);
  const SettledPath settled = settle_path(s);
  CHECK(settled.rounds > 1);
  CHECK(settled.rounds < 10);

  const Result result = run(s);
  REQUIRE(result.path.has_value());
  CHECK(result.path->end_of_freezing() == settled.path.end_of_freezing());
  s.probes = {s.depth() / 2};
  const double time = run(s).probes.front().value.local_solidification_time;
  // Half a percent from the last round, and as much between the companion's grid and the run's.
  CHECK(time == Approx(settled.time).epsilon(0.01));
  // The path is the one after that time: the width of its range goes back to it.
  CHECK(settled.path.freezing_range() == Approx(narrowing(settled.time).freezing_range()).epsilon(0.005));
  const std::string last = result.remarks.back();
  CHECK(last.find("rounds") != std::string::npos);
}

TEST_CASE("A path that does not follow the time gives what the path alone gives", "[freeze][settled-path]") {
  Section plain = range_in_sand();
  Section timed = plain;
  timed.path_after = [&](double) { return *plain.path; };
  const Result a = run(plain), b = run(timed);
  CHECK(a.solidification_time == b.solidification_time);
  CHECK(a.history.temperature == b.history.temperature);
}

TEST_CASE("A run that stops before half depth is solid cannot settle its path", "[freeze][settled-path]") {
  Section s = range_in_sand();
  s.path_after = narrowing;
  s.stop.after = 1.0;
  CHECK_THROWS_AS(run(s), base::InputError);
}
