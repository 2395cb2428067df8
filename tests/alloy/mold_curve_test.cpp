// Enthalpy curves of mold materials: straight, over temperature, and with moisture that boils off.
#include <boost/math/quadrature/gauss.hpp>
#include <catch2/catch.hpp>
#include <limits>

#include "palier/alloy/enthalpy_curve.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::EnthalpyCurve;
using alloy::MoldProperties;

namespace {

/// Silica sand, round numbers; common practice, no published source.
MoldProperties sand() { return {1500, {base::Table(1000), base::Table(0.6)}, 0}; }

double theta(const EnthalpyCurve& curve, double H) {
  double value = 0, slope = 0;
  curve.potential(H, value, slope);
  return value;
}

}  // namespace

TEST_CASE("a mold of constant properties is straight", "[alloy][curve][mold]") {
  const EnthalpyCurve curve(sand(), 293, 1000);
  CHECK(curve.is_straight());
  CHECK(curve.arrests().empty());
  CHECK(curve.kinks().empty());
  CHECK(curve.liquidus_enthalpy() == -std::numeric_limits<double>::infinity());
  CHECK(curve.end_of_freezing_enthalpy() == -std::numeric_limits<double>::infinity());
  for (const double T : {200.0, 293.0, 400.0, 999.0, 1000.0, 1300.0}) {
    const double H = 1500.0 * 1000 * (T - 293);
    CHECK(curve.temperature(H) == Approx(T).epsilon(1e-13));
    CHECK(theta(curve, H) == Approx(0.6 * (T - 293)).margin(1e-10));
    CHECK(curve.enthalpy(T) == Approx(H).margin(1e-3));
    CHECK(curve.temperature_slope(H) == Approx(1 / 1.5e6).epsilon(1e-13));
    CHECK(curve.conductivity(H) == 0.6);
    CHECK(curve.fraction_solid(H) == 1);
    CHECK(curve.fraction_slope(H) == 0);
  }
}

TEST_CASE("a mold of properties over temperature", "[alloy][curve][mold]") {
  MoldProperties mold = sand();
  mold.body = {base::Table({293, 1000}, {750, 1150}), base::Table({293, 1000}, {1.0, 0.5})};
  const EnthalpyCurve curve(mold, 293, 1000);
  CHECK_FALSE(curve.is_straight());
  using Gauss = boost::math::quadrature::gauss<double, 10>;
  for (const double T : {300.0, 373.15, 500.0, 777.0, 999.0}) {
    const double H = 1500 * Gauss::integrate([&](double t) { return mold.body.heat_capacity(t); }, 293.0, T);
    CHECK(curve.temperature(H) == Approx(T).margin(1e-6));
    CHECK(theta(curve, H) ==
          Approx(Gauss::integrate([&](double t) { return mold.body.conductivity(t); }, 293.0, T)).margin(1e-6));
    CHECK(curve.conductivity(H) == Approx(mold.body.conductivity(T)).epsilon(1e-5));
  }
}

TEST_CASE("moisture boils off in an arrest at 100 degC", "[alloy][curve][mold]") {
  MoldProperties mold = sand();
  mold.moisture = 0.04;
  const EnthalpyCurve curve(mold, 293, 1000);
  CHECK_FALSE(curve.is_straight());
  REQUIRE(curve.arrests().size() == 1);
  const alloy::FlatPiece& flat = curve.arrests()[0];
  CHECK(flat.temperature == 373.15);
  CHECK(flat.cold_end == Approx(1.5e6 * 80.15).epsilon(1e-13));
  // Heat of boiling of water at 100 degC, 2257 kJ/kg: CRC Handbook of Chemistry and Physics, from memory.
  CHECK(flat.hot_end - flat.cold_end == Approx(1500 * 0.04 * 2.257e6).epsilon(1e-13));
  for (int i = 0; i <= 20; ++i) {
    const double H = i == 20 ? flat.hot_end : flat.cold_end + (flat.hot_end - flat.cold_end) * i / 20;
    CHECK(curve.temperature(H) == 373.15);
    CHECK(theta(curve, H) == theta(curve, flat.cold_end));
    CHECK(curve.fraction_solid(H) == 1);
  }
  CHECK(curve.temperature(flat.cold_end - 1.5e6) == Approx(372.15).epsilon(1e-13));
  CHECK(curve.temperature(flat.hot_end + 1.5e6) == Approx(374.15).epsilon(1e-13));
  CHECK(curve.potential_at(1000) == Approx(0.6 * 707).epsilon(1e-12));
}

TEST_CASE("a mold that never passes 100 degC has no arrest", "[alloy][curve][mold]") {
  MoldProperties mold = sand();
  mold.moisture = 0.04;
  CHECK(EnthalpyCurve(mold, 400, 1000).arrests().empty());
  CHECK(EnthalpyCurve(mold, 293, 370).arrests().empty());
}

TEST_CASE("a range of temperature that does not rise is refused", "[alloy][curve][mold][errors]") {
  CHECK_THROWS_AS(EnthalpyCurve(sand(), 500, 400), base::InputError);
  CHECK_THROWS_AS(EnthalpyCurve(sand(), 500, 500), base::InputError);
}
