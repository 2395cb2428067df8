// palier against the similarity solution of a binary alloy that freezes by the lever rule or Scheil's rule.
#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::exact;

TEST_CASE("Alloy similarity: start and end of freezing at default accuracy", "[exact][alloy]") {
  check_times(alloy_similarity_cases());
}

TEST_CASE("Alloy similarity: fronts and flux against copper", "[exact][alloy]") {
  const auto rule = GENERATE(BinaryAlloy::Rule::lever, BinaryAlloy::Rule::scheil);
  const auto alloy = al_cu_like(rule, true, BinaryAlloy::LatentHeat::constant);
  const HalfSpaceWall wall{copper_mold(), 20};
  const AlloySimilarity solution(alloy, wall, 700);
  const freeze::Result result = freeze::run(alloy_half_space("copper", alloy, wall, 700, 10).section);
  CHECK(result.history.solidus_depth.back() == Approx(solution.end_front(10)).epsilon(1e-3));
  CHECK(result.history.liquidus_depth.back() == Approx(solution.start_front(10)).epsilon(1e-3));
  CHECK(result.history.surface_flux.back() == Approx(solution.wall_flux(10)).epsilon(1e-3));
}

// In a half space of sand no skin ever forms: the casting's face stays at one temperature within the freezing range.
TEST_CASE("Alloy similarity: against sand the face stays at a fixed fraction solid", "[exact][alloy]") {
  const auto rule = GENERATE(BinaryAlloy::Rule::lever, BinaryAlloy::Rule::scheil);
  const auto alloy = al_cu_like(rule, true, BinaryAlloy::LatentHeat::constant);
  const HalfSpaceWall wall{sand_for_aluminum(), 20};
  const AlloySimilarity solution(alloy, wall, 660);
  REQUIRE_FALSE(solution.has_skin());
  ExactCase exact = alloy_half_space("sand", alloy, wall, 660, 100);
  exact.section.probes = {0.0};
  const freeze::Result result = freeze::run(exact.section);
  const freeze::History& h = result.history;
  const double T = kelvin(solution.wall_temperature()), fraction = solution.fraction_solid(0, 1);
  for (std::size_t row = h.time.size() / 4; row < h.time.size(); ++row) {
    CAPTURE(h.time[row]);
    CHECK(h.probe_temperature[row] == Approx(T).margin(0.2));
    // 0.07 of the alloy freezes per kelvin here.
    CHECK(h.probe_fraction[row] == Approx(fraction).margin(0.02));
    CHECK(h.solidus_depth[row] == 0.0);
  }
  CHECK(h.surface_flux.back() == Approx(solution.wall_flux(100)).epsilon(1e-3));
  CHECK(std::isnan(result.probes[0].value.end));
}

TEST_CASE("Alloy similarity: order in the cell width", "[exact][alloy][order]") {
  const auto rule = GENERATE(BinaryAlloy::Rule::lever, BinaryAlloy::Rule::scheil);
  const auto alloy = al_cu_like(rule, true, BinaryAlloy::LatentHeat::constant);
  const HalfSpaceWall wall{std::nullopt, 100};
  const AlloySimilarity solution(alloy, wall, 700);
  ExactCase exact = alloy_half_space("wall held", alloy, wall, 700, 10);
  const double front = solution.end_front(10);
  exact.section.accuracy = 1e-5;
  std::vector<double> ends, starts;
  for (const int cells : {100, 200, 400}) {
    exact.section.cells = cells;
    const freeze::Result result = freeze::run(exact.section);
    ends.push_back(end_error(
        result, [&](double depth) { return solution.end_arrival(depth); }, 0.4 * front, 0.95 * front));
    starts.push_back(start_error(
        result, [&](double depth) { return solution.start_arrival(depth); }, 0.4 * front, 0.95 * front));
  }
  // At the liquidus, and at a solidus without arrest, the slope of T(H) jumps within a cell that is not looked into:
  // first order at least, with an error that swings with where the cells lie. At a held face the start-up of the first
  // cell adds an error that falls faster than the second order.
  check_order(ends, 0.9, 3.2);
  check_order(starts, 0.9, 3.2);
}
