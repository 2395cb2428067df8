#include "palier/base/table.hpp"

#include <catch2/catch.hpp>
#include <limits>
#include <stdexcept>
#include <vector>

using palier::base::Table;

TEST_CASE("a constant table has one value, no slope and a straight integral", "[base][table]") {
  const Table t(3.5);
  CHECK(t.is_constant());
  CHECK(t(-1e9) == 3.5);
  CHECK(t(1e9) == 3.5);
  CHECK(t.slope(0) == 0);
  CHECK(t.slope(7) == 0);
  CHECK(t.integral(-2, 4) == Approx(21).epsilon(1e-15));
  CHECK(t.smallest() == 3.5);
  CHECK(t.largest() == 3.5);
  CHECK(Table()(12) == 0);
}

TEST_CASE("a table of one point is that constant", "[base][table]") {
  const Table t({300}, {2});
  CHECK(t.is_constant());
  CHECK(t(0) == 2);
  CHECK(t(300) == 2);
  CHECK(t.integral(290, 310) == Approx(40).epsilon(1e-15));
}

TEST_CASE("a table is straight between its points and constant beyond them", "[base][table]") {
  const Table t({0, 2, 6}, {1, 5, 3});
  CHECK_FALSE(t.is_constant());
  CHECK(t(-10) == 1);
  CHECK(t(0) == 1);
  CHECK(t(0.5) == Approx(2).epsilon(1e-15));
  CHECK(t(2) == 5);
  CHECK(t(5) == Approx(3.5).epsilon(1e-15));
  CHECK(t(6) == 3);
  CHECK(t(60) == 3);
  CHECK(t.smallest() == 1);
  CHECK(t.largest() == 5);
}

TEST_CASE("the slope of a table is that right of a point, and 0 outside", "[base][table]") {
  const Table t({0, 2, 6}, {1, 5, 3});
  CHECK(t.slope(-1) == 0);
  CHECK(t.slope(0) == 2);
  CHECK(t.slope(1.9) == 2);
  CHECK(t.slope(2) == -0.5);
  CHECK(t.slope(5.9) == -0.5);
  CHECK(t.slope(6) == 0);
  CHECK(t.slope(7) == 0);
}

TEST_CASE("the integral of a table is the area of its trapezoids", "[base][table]") {
  const Table t({0, 2, 6}, {1, 5, 3});
  CHECK(t.integral(0, 2) == Approx(6).epsilon(1e-15));
  CHECK(t.integral(0, 6) == Approx(22).epsilon(1e-15));
  CHECK(t.integral(1, 4) == Approx(4 + 9).epsilon(1e-15));
  CHECK(t.integral(-3, 0) == Approx(3).epsilon(1e-15));
  CHECK(t.integral(6, 8) == Approx(6).epsilon(1e-15));
  CHECK(t.integral(-1, 7) == Approx(1 + 22 + 3).epsilon(1e-15));
  CHECK(t.integral(4, 1) == Approx(-13).epsilon(1e-15));
  CHECK(t.integral(3, 3) == 0);
}

TEST_CASE("the derivative of a table's integral is the table", "[base][table]") {
  const Table t({300, 466.7, 933.47}, {901.5, 985.6, 1257.8});
  for (const double x : {250.0, 350.0, 600.0, 900.0, 1000.0})
    CHECK(t.integral(x - 0.01, x + 0.01) / 0.02 == Approx(t(x)).epsilon(1e-9));
}

TEST_CASE("points that make no table are refused", "[base][table][errors]") {
  const double infinite = std::numeric_limits<double>::infinity(), nan = std::numeric_limits<double>::quiet_NaN();
  const auto make = [](const std::vector<double>& x, const std::vector<double>& y) { return Table(x, y); };
  CHECK_THROWS_AS(make({}, {}), std::invalid_argument);
  CHECK_THROWS_WITH(make({}, {}), "a table needs as many values as points");
  CHECK_THROWS_WITH(make({1, 2}, {1}), "a table needs as many values as points");
  CHECK_THROWS_WITH(make({1, 1}, {1, 2}), "the points of a table must rise");
  CHECK_THROWS_WITH(make({2, 1}, {1, 2}), "the points of a table must rise");
  CHECK_THROWS_WITH(make({1, nan}, {1, 2}), "a table needs finite points");
  CHECK_THROWS_WITH(make({1, infinite}, {1, 2}), "a table needs finite points");
  CHECK_THROWS_WITH(make({1, 2}, {1, nan}), "a table needs finite points");
  CHECK_THROWS_WITH(Table(nan), "a table needs finite values");
  CHECK_THROWS_AS(Table(infinite), std::invalid_argument);
}
