#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <random>
#include <string>

#include "alloy/sample_alloys.hpp"
#include "palier/alloy/diagram.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::BinaryLines;

namespace {

/// Lines that are accepted, for a test to spoil one of them.
BinaryLines bent_lines() {
  BinaryLines lines;
  lines.melting_point = 933;
  lines.liquidus = base::Table({0, 5, 15, 33}, {933, 918, 885, 821});
  lines.partition_coefficient = 0.17;
  lines.eutectic_temperature = 821;
  return lines;
}

std::string refusal(const BinaryLines& lines) {
  try {
    alloy::make_diagram(lines);
  } catch (const base::InputError& error) {
    return error.what();
  }
  return "accepted";
}

}  // namespace

TEST_CASE("a straight liquidus runs from the melting point to the eutectic", "[alloy][diagram]") {
  const auto diagram = samples::al_cu();
  CHECK(diagram->melting_point() == 933.15);
  CHECK(diagram->largest_composition() == Approx(33).epsilon(1e-14));
  CHECK(diagram->constant_partition().value() == 0.17);
  const alloy::Invariant last = diagram->invariant().value();
  CHECK(last.reaction == "eutectic");
  CHECK(last.temperature == 821.15);
  CHECK(last.liquid == Approx(33).epsilon(1e-14));
  // 660 - 4.5 * 112 / 33 degC by hand.
  CHECK(diagram->liquidus(4.5) == Approx(644.727272727 + 273.15).margin(1e-9));
  CHECK(diagram->liquidus(33) == Approx(821.15).margin(1e-9));
}

TEST_CASE("tie lines of Al-Cu", "[alloy][diagram]") {
  // Scheil 1942; temperature over fraction solid of Al-4.5Cu, numbers computed from the closed form with 30-digit
  // arithmetic: 660 degC to 548 degC at 33 % Cu, k = 0.17.
  struct Row {
    double celsius, liquid, solid;
  };
  for (const Row& row : {Row{644.727272727, 4.5, 0.765}, Row{640.608306064, 5.713624106, 0.971316098},
                         Row{632.849896284, 7.99958413, 1.359929302}, Row{611.735658039, 14.22074361, 2.417526414},
                         Row{556.743691031, 30.42373389, 5.172034762}, Row{548.0, 33.0, 5.61}}) {
    const alloy::TieLine tie = samples::al_cu()->tie_line(row.celsius + 273.15);
    CHECK(tie.liquid == Approx(row.liquid).margin(2e-8));
    CHECK(tie.solid == Approx(row.solid).margin(2e-8));
  }
}

TEST_CASE("a liquidus of points is straight between them and ends at the eutectic", "[alloy][diagram]") {
  BinaryLines lines = bent_lines();
  const auto diagram = alloy::make_diagram(lines);
  CHECK(diagram->liquidus(5) == 918);
  CHECK(diagram->liquidus(10) == Approx(901.5).epsilon(1e-15));
  CHECK(diagram->tie_line(901.5).liquid == Approx(10).epsilon(1e-13));
  CHECK(diagram->tie_line(901.5).solid == Approx(1.7).epsilon(1e-13));
  lines.eutectic_temperature = 850;  // within the last piece: 15 + 35 * 18 / 64
  CHECK(alloy::make_diagram(lines)->largest_composition() == Approx(15 + 35 * 18.0 / 64).epsilon(1e-14));
  lines.eutectic_temperature.reset();
  CHECK(alloy::make_diagram(lines)->largest_composition() == 33);
  CHECK_FALSE(alloy::make_diagram(lines)->invariant().has_value());
}

TEST_CASE("liquidus and tie line are inverse to each other", "[alloy][diagram]") {
  for (const auto& diagram : {samples::al_cu(), samples::al_si(), samples::sn_pb(), alloy::make_diagram(bent_lines())})
    for (int i = 1; i <= 50; ++i) {
      const double c = diagram->largest_composition() * i / 50;
      CHECK(diagram->tie_line(diagram->liquidus(c)).liquid == Approx(c).epsilon(1e-10));
    }
}

TEST_CASE("a diagram refuses a composition outside its lines", "[alloy][diagram][errors]") {
  const auto diagram = samples::al_cu();
  CHECK_THROWS_AS(diagram->liquidus(40), base::InputError);
  CHECK_THROWS_WITH(diagram->liquidus(40),
                    "composition 40.000000 mass % is outside the diagram; expected 0 to 33.000000 mass %");
  CHECK_THROWS_WITH(diagram->liquidus(0),
                    "composition 0.000000 mass % is outside the diagram; expected 0 to 33.000000 mass %");
  CHECK_THROWS_AS(diagram->liquidus(-1), base::InputError);
  CHECK_THROWS_AS(diagram->liquidus(std::numeric_limits<double>::quiet_NaN()), base::InputError);
}

TEST_CASE("lines that make no diagram are refused", "[alloy][diagram][errors]") {
  REQUIRE(refusal(bent_lines()) == "accepted");
  BinaryLines lines = bent_lines();
  lines.melting_point = 0;
  CHECK(refusal(lines) == "melting point must be above 0 K");

  for (const double k : {0.0, 1.0, -0.2, 1.3, std::numeric_limits<double>::quiet_NaN()}) {
    lines = bent_lines();
    lines.partition_coefficient = k;
    CHECK(refusal(lines) == "partition coefficient must lie between 0 and 1 for a falling liquidus");
  }
  const std::string no_start = "the liquidus must start at the pure metal's melting point";
  lines = bent_lines();
  lines.melting_point = 934;
  CHECK(refusal(lines) == no_start);
  lines = bent_lines();
  lines.liquidus = base::Table({1, 33}, {933, 821});
  CHECK(refusal(lines) == no_start);
  lines.liquidus = base::Table(933);
  CHECK(refusal(lines) == no_start);
  lines.liquidus = base::Table({0, 10, 33}, {933, 940, 821});
  CHECK(refusal(lines) == "the liquidus must fall with composition");
  lines.liquidus = base::Table({0, 10, 33}, {933, 821, 821});
  CHECK(refusal(lines) == "the liquidus must fall with composition");
  lines = bent_lines();
  lines.eutectic_temperature = 933;
  CHECK(refusal(lines) == "the eutectic temperature must lie below the melting point");
  lines.eutectic_temperature = 815;
  CHECK(refusal(lines) == "the liquidus ends above the eutectic temperature");
}

TEST_CASE("a straight liquidus that does not fall is refused", "[alloy][diagram][errors]") {
  CHECK_THROWS_WITH(BinaryLines::straight(933, 0, 0.17, 821), "the liquidus slope must be negative");
  CHECK_THROWS_WITH(BinaryLines::straight(933, 3.4, 0.17, 821), "the liquidus slope must be negative");
  CHECK_THROWS_WITH(BinaryLines::straight(933, -3.4, 0.17, 933),
                    "the eutectic temperature must lie below the melting point");
}

TEST_CASE("without a eutectic a straight liquidus goes as far as mass % do, or to half the melting point",
          "[alloy][diagram]") {
  CHECK(alloy::make_diagram(BinaryLines::straight(1000, -2, 0.5, {}))->largest_composition() == Approx(100));
  CHECK(alloy::make_diagram(BinaryLines::straight(1000, -10, 0.5, {}))->largest_composition() == Approx(50));
}

TEST_CASE("the eutectic composition itself is accepted, whatever the rounding of the lines", "[alloy][diagram]") {
  std::mt19937_64 bits(1);
  const auto between = [&](double a, double b) { return std::uniform_real_distribution<double>(a, b)(bits); };
  for (int i = 0; i < 3000; ++i) {  // about one in two hundred meets an unlucky last bit
    BinaryLines lines;
    lines.melting_point = between(900, 1000);
    lines.liquidus = base::Table({0, between(7, 8), 40}, {lines.melting_point, 850, 500});
    lines.partition_coefficient = between(0.1, 0.9);
    lines.eutectic_temperature = between(600, 800);
    const auto diagram = alloy::make_diagram(lines);
    CHECK(diagram->liquidus(diagram->largest_composition()) >= *lines.eutectic_temperature);
    CHECK_NOTHROW(alloy::scheil_path(diagram, diagram->largest_composition()));
    CHECK_NOTHROW(alloy::lever_path(diagram, diagram->largest_composition()));
  }
}
