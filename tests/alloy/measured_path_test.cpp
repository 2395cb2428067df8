// Paths that come from no diagram: a pure metal, points of a record, and parts put together by hand.
#include <catch2/catch.hpp>
#include <limits>
#include <string>
#include <vector>

#include "palier/alloy/path.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::measured_path;
using alloy::SolidificationPath;

namespace {

std::string refusal(const std::vector<double>& T, const std::vector<double>& f) {
  try {
    measured_path(T, f);
  } catch (const base::InputError& error) {
    return error.what();
  }
  return "accepted";
}

/// Two straight stretches with an arrest of 0.4 between them at 880 K; invented for the test.
SolidificationPath::Parts stepped() {
  SolidificationPath::Parts p;
  p.rule = "test";
  p.liquidus = 900;
  p.end_of_freezing = 850;
  p.arrests = {{880, 0.4, "peritectic"}, {850, 0.1, "eutectic"}};
  p.fraction_above = [](double T) { return T >= 880 ? (900 - T) / 100 : 0.6 + (880 - T) / 100; };
  return p;
}

std::string refusal(const SolidificationPath::Parts& parts) {
  try {
    const SolidificationPath path(parts);
  } catch (const base::InputError& error) {
    return error.what();
  }
  return "accepted";
}

}  // namespace

TEST_CASE("a pure metal freezes in one arrest at its melting point", "[alloy][path]") {
  // Aluminum 660.323 degC: H. Preston-Thomas, Metrologia 27 (1990) 3 (ITS-90).
  const SolidificationPath path = alloy::pure_path(933.473);
  CHECK(path.rule() == "pure");
  CHECK(path.liquidus() == 933.473);
  CHECK(path.end_of_freezing() == 933.473);
  CHECK(path.freezing_range() == 0);
  REQUIRE(path.arrests().size() == 1);
  CHECK(path.arrests()[0].fraction == 1);
  CHECK(path.arrests()[0].reaction == "melting point");
  CHECK(path.fraction_above(933.473) == 0);
  CHECK(path.fraction_below(933.473) == 1);
  CHECK(path.fraction_above(933.4) == 1);
  CHECK(path.fraction_below(933.5) == 0);
  CHECK_FALSE(path.solute(933.473).has_value());
  CHECK_THROWS_AS(alloy::pure_path(0), base::InputError);
  CHECK_THROWS_AS(alloy::pure_path(std::numeric_limits<double>::quiet_NaN()), base::InputError);
}

TEST_CASE("a measured path goes through its points, and the rest freezes at the last", "[alloy][path]") {
  const SolidificationPath path = measured_path({889, 873, 850}, {0, 0.3, 0.55});
  CHECK(path.rule() == "measured");
  CHECK(path.liquidus() == 889);
  CHECK(path.end_of_freezing() == 850);
  CHECK(path.fraction_above(889) == 0);
  CHECK(path.fraction_above(873) == 0.3);
  CHECK(path.fraction_above(881) == Approx(0.15).epsilon(1e-14));
  CHECK(path.fraction_above(850) == 0.55);
  CHECK(path.fraction_below(850) == Approx(1).epsilon(1e-15));
  CHECK(path.fraction_above(849) == 1);
  REQUIRE(path.arrests().size() == 1);
  CHECK(path.arrests()[0].temperature == 850);
  CHECK(path.arrests()[0].fraction == Approx(0.45).epsilon(1e-15));
  CHECK(path.arrests()[0].reaction == "last point of the record");
  CHECK(measured_path({889, 873, 850}, {0, 0.3, 1}).arrests().empty());
}

TEST_CASE("measured points that make no path are refused, the offending one by its number", "[alloy][path][errors]") {
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK(refusal({889}, {0}) == "measured points: found 1; expected at least two");
  CHECK(refusal({}, {}) == "measured points: found 0; expected at least two");
  CHECK(refusal({889, 873, 850}, {0, 0.3}) ==
        "measured points: found 3 temperatures and 2 fractions solid; expected as many of both");
  CHECK(refusal({889, 873}, {0.1, 0.3}) == "measured points: the first must have fraction solid 0");
  CHECK(refusal({889, nan}, {0, 0.3}) == "measured point 2: not a finite number");
  CHECK(refusal({889, 873, 850}, {0, 0.3, nan}) == "measured point 3: not a finite number");
  CHECK(refusal({889, 873}, {0, 1.2}) == "measured point 2: fraction solid not in 0..1");
  CHECK(refusal({889, 873}, {0, -0.1}) == "measured point 2: fraction solid not in 0..1");
  CHECK(refusal({889, 873, 873}, {0, 0.3, 0.5}) == "measured point 3: temperature must fall");
  CHECK(refusal({889, 890}, {0, 0.3}) == "measured point 2: temperature must fall");
  CHECK(refusal({889, 873, 850}, {0, 0.3, 0.3}) == "measured point 3: fraction solid must rise");
}

TEST_CASE("an arrest within the freezing range is before it above and after it below", "[alloy][path]") {
  const SolidificationPath path(stepped());
  CHECK(path.fraction_above(880) == Approx(0.2).epsilon(1e-14));
  CHECK(path.fraction_below(880) == Approx(0.6).epsilon(1e-14));
  CHECK(path.fraction_above(870) == path.fraction_below(870));
  CHECK(path.fraction_below(850) == Approx(1).epsilon(1e-14));
}

TEST_CASE("parts of a path that contradict each other are refused", "[alloy][path][errors]") {
  REQUIRE(refusal(stepped()) == "accepted");
  auto parts = stepped();
  parts.end_of_freezing = 901;
  CHECK(refusal(parts) == "a solidification path needs 0 K < end of freezing <= liquidus");
  parts = stepped();
  parts.end_of_freezing = -1;
  CHECK(refusal(parts) == "a solidification path needs 0 K < end of freezing <= liquidus");
  const std::string outside = "an arrest must lie within the freezing range and hold a fraction of 0 to 1";
  parts = stepped();
  parts.arrests[1].temperature = 849;
  CHECK(refusal(parts) == outside);
  parts = stepped();
  parts.arrests[0].fraction = 0;
  CHECK(refusal(parts) == outside);
  parts = stepped();
  parts.arrests[0].temperature = 850;
  CHECK(refusal(parts) == "arrests must be given by falling temperature");
  parts = stepped();
  parts.arrests[1].fraction = 0.2;
  CHECK(refusal(parts) == "the fractions of a path do not add up to 1 at the end of freezing");
  parts = stepped();
  parts.fraction_above = [](double T) { return (T - 850) / 100; };
  CHECK(refusal(parts) == "the fraction solid of a path must rise from 0 to 1 as the temperature falls");
}
