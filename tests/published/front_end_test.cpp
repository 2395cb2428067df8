// A run in which the last front ends between two steps as nearly as can be.
#include <catch2/catch.hpp>
#include <string>

#include "palier/files/case_file.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;

TEST_CASE("A front that ends just as a step begins is seen to end", "[published][front]") {
  const std::string root = PALIER_SOURCE_DIR;
  freeze::Section s =
      files::read_case(root + "/tests/published/data/front_ending_at_a_step.yaml", root + "/cases").section;
  s.stop.after = 1e5;  // were it missed, the run would go on for ever
  const freeze::Result coarse = freeze::run(s);
  REQUIRE(coarse.solidification_time > 0);
  s.accuracy = 1e-3;
  const freeze::Result fine = freeze::run(s);
  CHECK(coarse.solidification_time == Approx(fine.solidification_time).epsilon(0.01));
}
