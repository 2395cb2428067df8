#include "palier/base/lanes.hpp"

#include <catch2/catch.hpp>

using namespace palier::base;

TEST_CASE("a double is one lane, an array as many as it is wide", "[base][lanes]") {
  CHECK(lane_count<double> == 1);
  CHECK(lane_count<Lanes<4>> == 4);
}

TEST_CASE("all lanes hold the same value, and each can be set alone", "[base][lanes]") {
  Lanes<4> x = all_lanes<Lanes<4>>(2.5);
  for (int l = 0; l < 4; ++l) CHECK(lane(x, l) == 2.5);
  lane(x, 2) = -1;
  const Lanes<4>& seen = x;
  CHECK(lane(seen, 1) == 2.5);
  CHECK(lane(seen, 2) == -1);
  double y = all_lanes<double>(7);
  CHECK(lane(static_cast<const double&>(y), 0) == 7);
  lane(y, 0) = 8;
  CHECK(y == 8);
}
