// palier against freezing that is limited by the sand alone (Chvorinov, Adams & Taylor).
#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::exact;

TEST_CASE("Sand-limited: end of freezing at default accuracy", "[exact][sand-limited]") {
  check_times(sand_limited_cases());
}

// Chvorinov: without contact resistance the time goes with the square of the modulus, whatever the shape.
TEST_CASE("Sand-limited: time goes with the square of the modulus", "[exact][sand-limited]") {
  const auto shape = GENERATE(heat::Shape::plate, heat::Shape::cylinder, heat::Shape::sphere);
  const auto time = [&](double modulus) {
    return freeze::run(sand_casting("", steel_in_sand(), shape, modulus, 0).section).solidification_time;
  };
  // The equations scale exactly and so does the grid; what differs is rounding and the choice of steps.
  CHECK(time(0.02) / time(0.01) == Approx(4).epsilon(1e-3));
}
