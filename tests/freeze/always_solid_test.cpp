// Every section that is cooled gets solid, on coarse grids too, whatever the front's last cell holds when it ends.
#include <catch2/catch.hpp>
#include <cmath>

#include "freeze/sections.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::freeze;

TEST_CASE("A pure metal in sand gets solid at any accuracy, thickness and superheat", "[freeze][stop]") {
  for (const double accuracy : {0.05, 0.02, 0.01, 0.005})
    for (const double thickness : {0.008, 0.015, 0.02, 0.03, 0.05})
      for (const double superheat : {0.0, 20.0, 40.0, 60.0}) {
        Section s = pure_in_sand();
        s.accuracy = accuracy;
        s.thickness = thickness;
        s.pouring_temperature = s.path->liquidus() + superheat;
        s.stop.after = 1e5;  // or a section that is never seen to be solid would be marched for long
        const Result result = run(s);
        CAPTURE(accuracy, thickness, superheat, result.end_time);
        CHECK(std::isfinite(result.solidification_time));
        CHECK(result.last_to_freeze == Approx(thickness / 2));
        CHECK(result.end_time == result.solidification_time);
      }
}
