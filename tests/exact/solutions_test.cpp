// The exact solutions of freezing against numbers computed independently of them, so that a comparison of palier with
// them means something. All numbers below: computed from the formulas of the cited sources with 25- to 40-digit
// arithmetic by a separate program. Conduction, lumped and shape solutions: see solutions_without_range_test.cpp.
#include <catch2/catch.hpp>
#include <cmath>
#include <vector>

#include "exact/solutions/data_sets.hpp"
#include "exact/solutions/schwarz.hpp"

using namespace palier::exact;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace {

// The constants are roots found to the last digits of a double; what is computed from them loses two or three digits.
constexpr double digits = 1e-12;

/// Temperature at a place and time.
struct Point {
  double x, t, T;
};

template <class Solution>
void check_temperatures(const Solution& solution, const std::vector<Point>& points) {
  for (const Point& p : points) {
    CAPTURE(p.x, p.t);
    CHECK_THAT(solution.temperature(p.x, p.t), WithinAbs(p.T, 2e-11 * (1 + std::abs(p.T))));
  }
}

}  // namespace

// Source: J. Stefan 1891, in Carslaw & Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, ch. XI:
//   lambda exp(lambda^2) erf(lambda) = Ste / sqrt(pi)
TEST_CASE("Stefan's constant of a melt without superheat", "[solution][stefan]") {
  struct Row {
    double stefan, lambda;
  };
  const auto row = GENERATE(values<Row>({{0.001, 0.02235695442293821},
                                         {0.01, 0.07059327656042931},
                                         {0.1, 0.2200162727429379},
                                         {0.5, 0.4647859206462444},
                                         {1, 0.6200626333135955},
                                         {2, 0.8006013628056083},
                                         {5, 1.059687014281902}}));
  const Phase phase{1, 1, 1};
  CAPTURE(row.stefan);
  const StefanNeumann solution({phase, phase, 1.0, 0.0}, -row.stefan, 0.0);
  CHECK_THAT(solution.lambda(), WithinRel(row.lambda, digits));
}

// Source: F. Neumann c. 1860, in Carslaw & Jaeger 1959, ch. XI.
TEST_CASE("Neumann's constant, front and wall heat", "[solution][stefan]") {
  struct Row {
    PureMetal metal;
    double wall, start, lambda, t, front, flux, heat;
  };
  const auto row = GENERATE(values<Row>(
      {{ice_like(), -10, 0, 0.171343785500401, 3600, 0.0215648253974146, 1030.1731699724, 7417246.82380128},
       {ice_like(), -10, 5, 0.161867910699396, 3600, 0.0203722196371611, 1089.3416716817, 7843260.03610822},
       {aluminum_like(), 200, 720, 0.630523511006294, 10, 0.0348477370734003, 3143288.59236479, 62865771.8472958},
       {voller_cross(), -10, 2, 0.322390632922301, 864000, 0.536061077861484, 38.6060025231647, 66711172.3600285}}));
  const StefanNeumann solution(row.metal, row.wall, row.start);
  CHECK_THAT(solution.lambda(), WithinRel(row.lambda, digits));
  CHECK_THAT(solution.front(row.t), WithinRel(row.front, digits));
  CHECK_THAT(solution.arrival(row.front), WithinRel(row.t, digits));
  CHECK_THAT(solution.wall_flux(row.t), WithinRel(row.flux, digits));
  CHECK_THAT(solution.heat_through_wall(row.t), WithinRel(row.heat, digits));
}

TEST_CASE("Neumann's temperatures", "[solution][stefan]") {
  check_temperatures(StefanNeumann(aluminum_like(), 200, 720), {{0.0, 10, 200},
                                                                {0.005, 10, 274.636527787112},
                                                                {0.02, 10, 486.791233568555},
                                                                {0.04, 10, 678.218471708394},
                                                                {0.1, 10, 719.94810008889}});
  check_temperatures(
      StefanNeumann(voller_cross(), -10, 2),
      {{0.5, 864000, -0.631679161964042}, {0.7, 864000, 0.298683900998823}, {2.0, 864000, 1.72569126163865}});
}

// Source: C. Schwarz, Arch. Eisenhuettenwes. 5 (1931) (citation from memory).
TEST_CASE("Schwarz: superheated melt against a mold", "[solution][schwarz]") {
  struct Row {
    PureMetal metal;
    double start;
    Phase mold;
    double mold_start, lambda, interface, t, front, flux, heat;
  };
  const auto row =
      GENERATE(values<Row>({{aluminum_like(), 680, sand_for_aluminum(), 20, 0.0211451049494297, 659.347781206445, 600,
                             0.00905229641410978, 15132.7744786066, 18159329.3743279},
                            {aluminum_like(), 720, steel_mold(), 200, 0.201500649177743, 617.206402854429, 10,
                             0.0111365262676071, 817889.099873004, 16357781.9974601},
                            {aluminum_like(), 720, copper_mold(), 20, 0.516302215357666, 373.964485820134, 10,
                             0.028534961087309, 2293527.01047972, 45870540.2095945},
                            {iron_like(), 1600, sand_for_steel(), 20, 0.117265866351856, 1517.35951126070, 600,
                             0.0140159518362121, 44381.8795334305, 53258255.4401166},
                            {copper_like(), 1200, graphite_mold(), 20, 0.321123343504733, 938.234421203570, 10,
                             0.0188275248902724, 2654258.92495747, 53085178.4991493}}));
  const Schwarz solution(row.metal, row.start, row.mold, row.mold_start);
  REQUIRE(solution.freezes());
  CHECK_THAT(solution.lambda(), WithinRel(row.lambda, 1e-11));
  CHECK_THAT(solution.interface(), WithinRel(row.interface, digits));
  CHECK_THAT(solution.front(row.t), WithinRel(row.front, 1e-11));
  CHECK_THAT(solution.wall_flux(row.t), WithinRel(row.flux, digits));
  CHECK_THAT(solution.heat_through_wall(row.t), WithinRel(row.heat, digits));
}

TEST_CASE("Schwarz: temperatures in mold, skin and melt", "[solution][schwarz]") {
  check_temperatures(Schwarz(aluminum_like(), 720, steel_mold(), 200), {{-0.02, 10, 233.067998969011},
                                                                        {-0.005, 10, 475.70834127516},
                                                                        {0.0, 10, 617.206402854429},
                                                                        {0.005, 10, 636.626955799433},
                                                                        {0.02, 10, 679.898744378285},
                                                                        {0.1, 10, 719.985462667817}});
}

TEST_CASE("Schwarz: in sand a strong superheat never freezes", "[solution][schwarz]") {
  const double limit = 41.0646616;  // e_M (T_m - T_0) / e_l
  CHECK(Schwarz(aluminum_like(), 660 + limit - 1e-3, sand_for_aluminum(), 20).freezes());
  CHECK_FALSE(Schwarz(aluminum_like(), 660 + limit + 1e-3, sand_for_aluminum(), 20).freezes());
  const Schwarz hot(aluminum_like(), 720, sand_for_aluminum(), 20);
  REQUIRE_FALSE(hot.freezes());
  CHECK_THAT(hot.interface(), WithinRel(677.793635840858, digits));
  CHECK(hot.front(1e6) == 0.0);
  CHECK(hot.temperature(0.0, 1e6) == hot.interface());
}

// Sources: Tien & Geiger, J. Heat Transfer 89 (1967) 230; Ozisik & Uzzell, J. Heat Transfer 101 (1979) 331 (citations
// from memory); the case numbers were computed from the heat balances at the two fronts.
TEST_CASE("Freezing range: plane wall", "[solution][freezing-range]") {
  struct Row {
    double eutectic, lambda, mu, end_front, start_front, flux;
  };
  const auto row = GENERATE(values<Row>(
      {{0.0, 0.534244649999685, 1.93040173045580, 0.0274362724242222, 0.038150609717689, 3221073.67831621},
       {0.1, 0.534754053532519, 1.87362539867959, 0.0274624329746381, 0.0385738665596144, 3218546.22370233},
       {0.3, 0.535915451757746, 1.74991700423086, 0.0275220768814144, 0.039554692958964, 3212803.76409833}}));
  CAPTURE(row.eutectic);
  const auto solution = LinearFreezing::fixed_wall(linear_alloy(row.eutectic), 100, 700);
  CHECK_THAT(solution.lambda(), WithinRel(row.lambda, digits));
  CHECK_THAT(solution.mu(), WithinRel(row.mu, digits));
  CHECK_THAT(solution.end_front(10), WithinRel(row.end_front, digits));
  CHECK_THAT(solution.start_front(10), WithinRel(row.start_front, digits));
  CHECK_THAT(solution.start_arrival(row.start_front), WithinRel(10.0, digits));
  CHECK_THAT(solution.end_arrival(row.end_front), WithinRel(10.0, digits));
  CHECK_THAT(solution.wall_flux(10), WithinRel(row.flux, digits));
  CHECK_THAT(solution.heat_through_wall(10), WithinRel(20 * row.flux, digits));
}

TEST_CASE("Freezing range: line and point sinks", "[solution][freezing-range]") {
  struct Row {
    LinearFreezing solution;
    double lambda, mu, t, end_front, start_front;
  };
  const auto row = GENERATE(values<Row>({
      {LinearFreezing::line_sink(linear_alloy(0.0), 2e5, 700), 0.252972090400757, 1.21637306264176, 20,
       0.0183726808928783, 0.0339966071412558},
      {LinearFreezing::line_sink(linear_alloy(0.1), 2e5, 700), 0.254475084140125, 1.18464824545602, 20,
       0.0184818392759776, 0.0344917176367716},
      {LinearFreezing::line_sink(linear_alloy(0.3), 2e5, 700), 0.257756044036513, 1.11369781920885, 20,
       0.0187201265475228, 0.0356010603650416},
      {LinearFreezing::point_sink(linear_alloy(0.0), 6000, 700), 0.393020115442043, 1.43521679505396, 60,
       0.049439643305351, 0.0694779375654823},
      {LinearFreezing::point_sink(linear_alloy(0.1), 6000, 700), 0.393712878690095, 1.38952717666792, 60,
       0.0495267888903556, 0.0700733820822567},
      {LinearFreezing::point_sink(linear_alloy(0.3), 6000, 700), 0.395236668020696, 1.28957391289130, 60,
       0.0497184727203109, 0.0714006936115698},
  }));
  CHECK_THAT(row.solution.lambda(), WithinRel(row.lambda, digits));
  CHECK_THAT(row.solution.mu(), WithinRel(row.mu, digits));
  CHECK_THAT(row.solution.end_front(row.t), WithinRel(row.end_front, digits));
  CHECK_THAT(row.solution.start_front(row.t), WithinRel(row.start_front, digits));
}

TEST_CASE("Freezing range: temperatures", "[solution][freezing-range]") {
  check_temperatures(LinearFreezing::fixed_wall(linear_alloy(0.1), 100, 700),
                     {{0.01, 10, 276.573663930675}, {0.03, 10, 585.73297411258}, {0.05, 10, 680.277736785548}});
  check_temperatures(LinearFreezing::line_sink(linear_alloy(0.1), 2e5, 700),
                     {{0.005, 20, 322.025512933396}, {0.025, 20, 606.181645608576}, {0.05, 20, 680.033997572245}});
  check_temperatures(LinearFreezing::point_sink(linear_alloy(0.3), 6000, 700),
                     {{0.03, 60, 300.708123168795}, {0.06, 60, 612.355559068243}, {0.1, 60, 686.366822067893}});
}

// What the sinks are meant for: heat flowing in through a radius is conductivity times area times gradient.
TEST_CASE("Freezing range: heat through a radius belongs to the temperatures", "[solution][freezing-range]") {
  const double r = 0.01, step = 1e-5, pi = std::acos(-1.0);
  const auto line = LinearFreezing::line_sink(linear_alloy(0.1), 2e5, 700);
  const auto point = LinearFreezing::point_sink(linear_alloy(0.1), 6000, 700);
  const auto gradient = [&](const LinearFreezing& s, double at, double t) {
    return (s.temperature(at + step, t) - s.temperature(at - step, t)) / (2 * step);
  };
  // Central difference: error step^2 / 6 times the third derivative, about (step / r)^2.
  CHECK_THAT(line.heat_rate(r, 20), WithinRel(180 * 2 * pi * r * gradient(line, r, 20), 2e-6));
  CHECK_THAT(point.heat_rate(3 * r, 60), WithinRel(180 * 36 * pi * r * r * gradient(point, 3 * r, 60), 2e-6));
  CHECK_THAT(line.wall_flux(20), WithinRel(2e5, digits));
  CHECK_THAT(line.heat_through_wall(20), WithinRel(20 * 2e5, digits));
  CHECK_THAT(point.wall_flux(64), WithinRel(6000 * 8.0, digits));
  CHECK_THAT(point.heat_through_wall(64), WithinRel(6000 * 512 * 2 / 3.0, digits));
}

TEST_CASE("Freezing range: a pure metal around a line sink", "[solution][freezing-range]") {
  const auto solution = LinearFreezing::line_sink(pure_linear_alloy(), 3e5, 720);
  CHECK_THAT(solution.lambda(), WithinRel(0.433928150179465, digits));
  CHECK_THAT(solution.end_front(20), WithinRel(0.0339161165439104, digits));
  CHECK(solution.start_front(20) == solution.end_front(20));
  CHECK(std::isnan(solution.mu()));
  check_temperatures(solution,
                     {{0.01, 20, 400.904328557891}, {0.03, 20, 636.392087004074}, {0.06, 20, 707.796733529898}});
}

TEST_CASE("Freezing range: without a range the plane wall is Neumann's", "[solution][freezing-range]") {
  const auto solution = LinearFreezing::fixed_wall(pure_linear_alloy(), 200, 720);
  CHECK_THAT(solution.lambda(), WithinRel(StefanNeumann(aluminum_like(), 200, 720).lambda(), digits));
}

// Idea of the solution: V.R. Voller, Int. J. Heat Mass Transfer 40 (1997) 2869 (citation from memory); the numbers: the
// same boundary-value problem, marched with a Taylor method in 40 digits (Scheil against a wall: good to 14 digits).
TEST_CASE("Alloy similarity: fronts and wall", "[solution][alloy]") {
  using Rule = BinaryAlloy::Rule;
  struct Row {
    Rule rule;
    bool phases_differ;
    HalfSpaceWall wall;
    double start, wall_temperature, end, liquidus, flux;
  };
  const HalfSpaceWall fixed{std::nullopt, 100}, copper{copper_mold(), 20}, sand{sand_for_aluminum(), 20};
  const auto row = GENERATE_COPY(values<Row>({
      {Rule::lever, false, fixed, 700, 100, 0.0072286956419462, 0.0092502114619911, 8621968.8691937},
      {Rule::lever, true, fixed, 700, 100, 0.0089757849952705, 0.011084830466392, 10396876.162919},
      {Rule::scheil, false, fixed, 700, 100, 0.00682644396288, 0.0093681361209612, 8609917.7813721},
      {Rule::scheil, true, fixed, 700, 100, 0.0085025644978777, 0.011159571488771, 10357575.661887},
      {Rule::lever, true, copper, 700, 351.831488212767, 0.0060483076226856, 0.0087101375196514, 6799261.7990812},
      {Rule::scheil, true, copper, 700, 350.088676798724, 0.0054667115276569, 0.0088151694564842, 6763551.4114554},
      {Rule::lever, true, sand, 660, 639.052562643515, 0, 0.0020288652664749, 358909.16500927},
      {Rule::scheil, true, sand, 660, 638.982292853291, 0, 0.0020455281271825, 358868.42457259},
  }));
  CAPTURE(row.rule, row.phases_differ, row.wall_temperature);
  const AlloySimilarity solution(al_cu_like(row.rule, row.phases_differ), row.wall, row.start);
  CHECK_THAT(solution.end_constant(), WithinRel(row.end, 1e-11));
  CHECK_THAT(solution.start_constant(), WithinRel(row.liquidus, 1e-11));
  CHECK_THAT(solution.wall_temperature(), WithinRel(row.wall_temperature, 1e-11));
  CHECK_THAT(solution.wall_flux(1), WithinRel(row.flux, 1e-11));
  CHECK(solution.has_skin() == (row.end > 0));
}

TEST_CASE("Alloy similarity: path of the binary", "[solution][alloy]") {
  const auto lever = al_cu_like(BinaryAlloy::Rule::lever, true), scheil = al_cu_like(BinaryAlloy::Rule::scheil, true);
  CHECK_THAT(lever.liquidus(), WithinRel(644.7272727272727, digits));
  CHECK_THAT(lever.end_of_freezing(), WithinRel(570.160427807487, digits));
  CHECK(lever.last_fraction() == 0.0);
  CHECK_THAT(scheil.last_fraction(), WithinRel(0.0906709490127745, digits));
  CHECK_THAT(scheil.fraction_solid(620), WithinRel(0.686517878363, 1e-11));
}

TEST_CASE("Alloy similarity: temperatures and fraction solid", "[solution][alloy]") {
  const AlloySimilarity fixed(al_cu_like(BinaryAlloy::Rule::scheil, true), {std::nullopt, 100}, 700);
  check_temperatures(fixed, {{0.0068780339770852, 1, 473.333333333333},
                             {0.009017360983962, 1, 570},
                             {0.010289986703453, 1, 620},
                             {0.01100501582619, 1, 642},
                             {0.016830341240281, 1, 688.945454545455}});
  CHECK_THAT(fixed.fraction_solid(0.020579973406906, 4), WithinRel(0.686517878363, 1e-11));
  const AlloySimilarity sand(al_cu_like(BinaryAlloy::Rule::scheil, true), {sand_for_aluminum(), 20}, 660);
  check_temperatures(sand, {{0.00033267394141875, 1, 640}, {0.0077667105649048, 1, 653.890909090909}});
  CHECK_THAT(sand.fraction_solid(0.0, 100), WithinRel(0.319341567777, 1e-11));
}

// Heat taken from the metal is heat that went through the wall: integral of h(start) - h over the half space.
TEST_CASE("Alloy similarity: the heat adds up", "[solution][alloy]") {
  const auto alloy = al_cu_like(BinaryAlloy::Rule::scheil, true);
  const AlloySimilarity solution(alloy, {copper_mold(), 20}, 700);
  const double length = 0.1;  // 18 diffusion lengths of the melt at 1 s
  const int points = 200000;
  const auto enthalpy = [&](double T) {  // 0: solid at the eutectic
    const double fs = alloy.fraction_solid(T), above = T - alloy.eutectic;
    return fs * alloy.solid.heat_capacity * above + (1 - fs) * (alloy.liquid.heat_capacity * above + alloy.latent_heat);
  };
  double missing = 0;
  for (int i = 0; i < points; ++i) {
    const double x = (i + 0.5) * length / points;
    missing += (enthalpy(700) - enthalpy(solution.temperature(x, 1))) * 2600 * length / points;
  }
  // Midpoint rule: the jump of enthalpy at the eutectic front costs up to half a cell of it.
  const double tolerance = 2600 * alloy.arrest_heat() * length / points / 2 + 1e-8 * missing;
  CHECK_THAT(missing, WithinAbs(solution.heat_through_wall(1), tolerance));
}
