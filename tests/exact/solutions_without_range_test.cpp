// The exact solutions of conduction, lumped castings, sand-limited and inward freezing against numbers computed
// independently of them (see solutions_test.cpp).
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>

#include "exact/solutions/conduction.hpp"
#include "exact/solutions/data_sets.hpp"
#include "exact/solutions/inward_freezing.hpp"
#include "exact/solutions/inward_freezing_times.hpp"
#include "exact/solutions/lumped.hpp"

using namespace palier::exact;
using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace {

using Body = CoolingSeries::Body;
constexpr double infinite = std::numeric_limits<double>::infinity();

}  // namespace

// Source: Cengel, Heat and Mass Transfer, Table 4-2 (four decimals; read there).
TEST_CASE("Conduction: one-term coefficients of the printed table", "[solution][conduction]") {
  struct Row {
    Body body;
    double biot, root, coefficient;
  };
  const auto row = GENERATE(values<Row>({{Body::plate, 0.1, 0.3111, 1.0161},
                                         {Body::plate, 1, 0.8603, 1.1191},
                                         {Body::plate, 10, 1.4289, 1.2620},
                                         {Body::cylinder, 0.1, 0.4417, 1.0246},
                                         {Body::cylinder, 1, 1.2558, 1.2071},
                                         {Body::cylinder, 10, 2.1795, 1.5677},
                                         {Body::sphere, 0.1, 0.5423, 1.0298},
                                         {Body::sphere, 1, 1.5708, 1.2732},
                                         {Body::sphere, 10, 2.8363, 1.9249}}));
  const CoolingSeries series(row.body, row.biot, 1);
  CHECK_THAT(series.roots()[0], WithinAbs(row.root, 5.1e-5));
  CHECK_THAT(series.coefficients()[0], WithinAbs(row.coefficient, 5.1e-5));
}

// Computed from the equations of Carslaw & Jaeger 1959, ch. III, VII, IX, in 30-digit arithmetic.
TEST_CASE("Conduction: roots and coefficients", "[solution][conduction]") {
  struct Row {
    Body body;
    double biot;
    int n;
    double root, coefficient;
  };
  const auto row = GENERATE(values<Row>({{Body::plate, 0.01, 1, 0.09983363855112635, 1.001660844125521},
                                         {Body::plate, 0.01, 6, 15.70859986183621, -8.104707648210316e-5},
                                         {Body::plate, 100, 6, 17.10930725972694, -0.1141125075464057},
                                         {Body::plate, infinite, 2, 4.71238898038469, -0.4244131815783876},
                                         {Body::cylinder, 0.1, 1, 0.4416817828748414, 1.024579358854594},
                                         {Body::cylinder, 1, 6, 16.53115893260503, -0.03718314911651496},
                                         {Body::cylinder, 100, 2, 5.465207002239944, -1.06322321519818},
                                         {Body::cylinder, infinite, 1, 2.404825557695773, 1.601974696928047},
                                         {Body::sphere, 0.1, 2, 4.515660437913873, -0.04536162749976885},
                                         {Body::sphere, 1, 1, 1.570796326794897, 1.273239544735163},
                                         {Body::sphere, 100, 6, 18.66322528001445, -1.966055961070107},
                                         {Body::sphere, infinite, 2, 6.283185307179586, -2.0}}));
  const CoolingSeries series(row.body, row.biot, row.n);
  CHECK_THAT(series.roots().back(), WithinRel(row.root, 1e-13));
  CHECK_THAT(series.coefficients().back(), WithinRel(row.coefficient, 1e-10));
}

TEST_CASE("Conduction: cooling of plate, cylinder and sphere", "[solution][conduction]") {
  struct Row {
    Body body;
    double biot, fourier, center, middle, surface, lost;
  };
  const auto row = GENERATE(values<Row>({
      {Body::plate, 1, 0.05, 0.99975095505826, 0.98630019558154, 0.79037676364923, 0.042690015873333},
      {Body::plate, 1, 1, 0.53385940140857, 0.48522406036858, 0.34817685166167, 0.52960275113459},
      {Body::plate, 10, 0.1, 0.96842421384933, 0.81017008668128, 0.17057381149995, 0.27388227884096},
      {Body::cylinder, 1, 0.05, 0.99889780054194, 0.97908773883759, 0.76964074100893, 0.084306826270885},
      {Body::cylinder, 1, 1, 0.24937971354618, 0.22539940730427, 0.16033841249973, 0.79665295433416},
      {Body::cylinder, 10, 0.05, 0.99367230159927, 0.89955763262302, 0.20092999726849, 0.32889838636965},
      {Body::sphere, 1, 0.05, 0.99686919548399, 0.96926864339139, 0.74768674782225, 0.12476867477995},
      {Body::sphere, 1, 0.5, 0.37077742979952, 0.33382080668351, 0.23604966925615, 0.71299948348155},
      {Body::sphere, 10, 0.1, 0.79575908207374, 0.59347643131077, 0.097521308832139, 0.65398816486198},
  }));
  const CoolingSeries series(row.body, row.biot);
  CHECK_THAT(series.theta(0, row.fourier), WithinAbs(row.center, 1e-13));
  CHECK_THAT(series.theta(0.5, row.fourier), WithinAbs(row.middle, 1e-13));
  CHECK_THAT(series.theta(1, row.fourier), WithinAbs(row.surface, 1e-13));
  CHECK_THAT(series.heat_lost(row.fourier), WithinAbs(row.lost, 1e-13));
  // Newton's law of cooling at the surface.
  CHECK_THAT(series.surface_flux(row.fourier), WithinRel(row.biot * row.surface, 1e-12));
  CHECK_THAT(series.time_of(0.5, row.middle, 0.01, 3), WithinRel(row.fourier, 1e-10));
}

// Carslaw & Jaeger 1959, ch. II.
TEST_CASE("Conduction: half spaces", "[solution][conduction]") {
  const HalfSpaceContact contact{steel_mold(), aluminum_like().solid, 20, 500};
  CHECK_THAT(contact.interface(), WithinRel(349.390238174259, 1e-13));
  CHECK_THAT(contact.flux(4), WithinRel(2041992.67408 / 2, 1e-11));
  CHECK_THAT(contact.temperature(-0.02, 10), WithinRel(46.107643559222, 1e-13));
  CHECK_THAT(contact.temperature(0.05, 60), WithinRel(409.41605583339, 1e-13));

  const HalfSpaceFilm film{sand_for_aluminum(), 20, 600, 100};
  CHECK_THAT(film.temperature(0, 60), WithinRel(306.78064815203, 1e-13));
  CHECK_THAT(film.temperature(0.01, 600), WithinRel(280.24078329938, 1e-13));
  CHECK_THAT(film.temperature(0.05, 3600), WithinRel(171.79154031447, 1e-13));

  const HalfSpaceFlux flux{sand_for_aluminum(), 20, 20000};
  CHECK_THAT(flux.temperature(0, 600), WithinRel(557.93366115484, 1e-13));
  CHECK_THAT(flux.temperature(0.02, 3600), WithinRel(776.92682510314, 1e-13));
}

// Abramowitz & Stegun 1964, Table 7.1 gives sqrt(pi) x exp(x^2) erfc(x); here: 30-digit arithmetic.
TEST_CASE("Conduction: exp(x^2) erfc(x) across the change of method", "[solution][conduction]") {
  CHECK_THAT(scaled_erfc(1.0), WithinRel(0.42758357615580702, 1e-14));
  CHECK_THAT(scaled_erfc(10 - 1e-9), WithinRel(0.056140992743822586, 1e-9));
  CHECK_THAT(scaled_erfc(10.0), WithinRel(0.056140992743822586, 1e-14));
  CHECK_THAT(scaled_erfc(100.0), WithinRel(0.0056416137829894329, 1e-14));
}

// Invented casting: modulus 5 mm, film 100 W/m2/K, surroundings 25 degC, poured at 700 degC, 1100 J/kg/K in all phases.
TEST_CASE("Lumped casting: linear alloy, lever rule, Scheil", "[solution][lumped]") {
  const LumpedCasting casting{2600, 0.005, 100, 25};
  CHECK_THAT(casting.cooling_time(1100, 700, 645), WithinRel(12.154029435175, 1e-12));
  const double shares[] = {0.0, 0.1, 0.3};
  const double ends[] = {125.41157273754, 126.21286466487, 127.81544851955};
  for (int i = 0; i < 3; ++i) {
    const double effective = 1100 + 390e3 * (1 - shares[i]) / (645 - 548);
    CHECK_THAT(casting.cooling_time(1100, 700, 645) + casting.cooling_time(effective, 645, 548) +
                   casting.arrest_time(390e3 * shares[i], 548),
               WithinRel(ends[i], 1e-12));
  }
  const auto freezing = [&](BinaryAlloy::Rule rule) {
    BinaryAlloy alloy = al_cu_like(rule, false);
    return casting.cooling_time(1100, 700, alloy.liquidus()) +
           casting.cooling_time([&](double T) { return alloy.enthalpy_slope(T); }, alloy.liquidus(),
                                alloy.end_of_freezing()) +
           casting.arrest_time(alloy.arrest_heat(), alloy.end_of_freezing());
  };
  CHECK_THAT(freezing(BinaryAlloy::Rule::lever), WithinRel(114.78828827165, 1e-11));
  CHECK_THAT(freezing(BinaryAlloy::Rule::scheil), WithinRel(121.96231459315, 1e-11));
}

TEST_CASE("Lumped casting: pure metal", "[solution][lumped]") {
  const LumpedCasting casting{2500, 0.005, 100, 25};
  CHECK_THAT(casting.cooling_time(1080, 700, 660), WithinRel(8.2468384172782, 1e-12));
  CHECK_THAT(casting.arrest_time(397e3, 660), WithinRel(78.149606299213, 1e-12));
}

// Sources: Chvorinov, Giesserei 27 (1940) 177; Adams & Taylor, Trans. AFS 65 (1957) 170 (citations from memory). The
// exact cylinder: Laplace inversion of K1/K0 (a route other than the integral used in the solution), eight digits.
TEST_CASE("Sand-limited: plate, cylinder and sphere", "[solution][sand-limited]") {
  const SandLimited steel = steel_in_sand(), aluminum = aluminum_in_sand();
  CHECK_THAT(steel.chvorinov_constant() * 1e-6, WithinRel(1.10006839911, 1e-11));
  CHECK_THAT(aluminum.chvorinov_constant() * 1e-6, WithinRel(2.23387365511, 1e-11));
  CHECK_THAT(steel.plate_time(0.01), WithinRel(110.006839911, 1e-11));
  CHECK_THAT(steel.sphere_time(0.01), WithinRel(78.5851167838, 1e-11));
  CHECK_THAT(aluminum.sphere_time(0.05), WithinRel(3798.09686127, 1e-11));
  CHECK_THAT(steel.adams_taylor_cylinder_time(0.01), WithinRel(84.309517116, 1e-10));
  CHECK_THAT(aluminum.adams_taylor_cylinder_time(0.01), WithinRel(164.353660737, 1e-10));
  CHECK_THAT(steel.cylinder_time(0.01), WithinRel(85.267564, 1e-8));
  CHECK_THAT(steel.cylinder_time(0.05), WithinRel(2131.6891, 1e-7));
  CHECK_THAT(aluminum.cylinder_time(0.01), WithinRel(166.7518308, 1e-8));
}

TEST_CASE("Sand-limited: contact between metal and sand", "[solution][sand-limited]") {
  struct Row {
    double conductance, aluminum_12_5, aluminum_10, steel_10;
  };
  const auto row = GENERATE(values<Row>({{100, 669.902280864, 477.150080921, 325.163511011},
                                         {200, 513.829696046, 354.267860413, 222.181569111},
                                         {500, 416.204319997, 276.942549819, 156.496025924},
                                         {1000, 382.845630158, 250.384863620, 133.579430577},
                                         {5000, 355.839448460, 228.822905380, 114.777226596}}));
  CAPTURE(row.conductance);
  CHECK_THAT(aluminum_in_sand().plate_time(0.0125, row.conductance), WithinRel(row.aluminum_12_5, 1e-11));
  CHECK_THAT(aluminum_in_sand().plate_time(0.01, row.conductance), WithinRel(row.aluminum_10, 1e-11));
  CHECK_THAT(steel_in_sand().plate_time(0.01, row.conductance), WithinRel(row.steel_10, 1e-11));
}

// Plank 1913, 1941 (citations from memory): quasi-steady freezing.
TEST_CASE("Inward freezing: Plank's times", "[solution][inward]") {
  const double times[] = {54.925, 27.4625, 18.30833333333333};
  for (int shape = 0; shape < 3; ++shape) {
    const InwardFreezing casting{shape, {2600, 150, 1000}, 390e3, 0.025, 1000, 500};
    CHECK_THAT(casting.plank_time(), WithinRel(times[shape], 1e-13));
  }
}

TEST_CASE("Inward freezing: numerical times lie between the bounds", "[solution][inward]") {
  for (const InwardFreezingTime& row : inward_freezing_times()) {
    CAPTURE(row.shape, row.stefan, row.biot);
    const InwardFreezing casting = row.casting();
    CHECK(row.fourier > casting.plank_time());
    CHECK(row.fourier < casting.latest_time());
    CHECK_THAT(row.fourier / casting.plank_time(), WithinRel(row.ratio, 1e-6));  // seven digits are given
    CHECK_THAT(casting.stefan(), WithinRel(row.stefan, 1e-14));
    CHECK(((std::isinf(row.biot) && std::isinf(casting.biot())) || std::abs(casting.biot() / row.biot - 1) < 1e-14));
  }
}

// A plate with its surface held is Stefan's problem: R = 2 lambda sqrt(alpha t).
TEST_CASE("Inward freezing: a plate with its surface held is Stefan's", "[solution][inward]") {
  for (const InwardFreezingTime& row : inward_freezing_times()) {
    if (row.shape != 0 || std::isfinite(row.biot)) continue;
    const Phase phase{1, 1, 1};
    const StefanNeumann stefan({phase, phase, 1 / row.stefan, 0.0}, -1.0, 0.0);
    CHECK_THAT(row.ratio, WithinRel(stefan.arrival(1) * 2 * row.stefan, 1e-6));
  }
}

TEST_CASE("Inward freezing: first order in the Stefan number", "[solution][inward]") {
  struct Row {
    double biot, coefficient;
  };
  const auto row = GENERATE(values<Row>({{10, 0.328283}, {1, 0.222222}, {0.1, 0.0447330}}));
  InwardFreezing casting{0, {1, 1, 1}, 1e6, 1, row.biot, 1};
  CHECK_THAT((casting.plate_time_first_order(1) / casting.plank_time() - 1) / casting.stefan(),
             WithinAbs(row.coefficient, 1e-6));
  casting.latent_heat = 10;  // Ste 0.1: what is left is of order Ste^2 / 10 (Stefan's series: Ste^2 / 45 and so on)
  for (const InwardFreezingTime& time : inward_freezing_times())
    if (time.shape == 0 && time.biot == row.biot && time.stefan == 0.1)
      CHECK_THAT(casting.plate_time_first_order(1) / casting.plank_time(), WithinAbs(time.ratio, 1e-3));
}
