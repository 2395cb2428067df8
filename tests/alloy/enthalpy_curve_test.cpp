// What an enthalpy curve promises of its shape: rising, flat in arrests, slopes of its own values, straight beyond.
#include "palier/alloy/enthalpy_curve.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <string>
#include <vector>

#include "alloy/sample_alloys.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::ArrestEnd;
using alloy::EnthalpyCurve;
using alloy::FlatPiece;

namespace {

constexpr double kLow = 300, kHigh = 1100;  // [K]

double theta(const EnthalpyCurve& curve, double H) {
  double value = 0, slope = 0;
  curve.potential(H, value, slope);
  return value;
}

double theta_slope(const EnthalpyCurve& curve, double H) {
  double value = 0, slope = 0;
  curve.potential(H, value, slope);
  return slope;
}

std::vector<alloy::SolidificationPath> paths() {
  return {alloy::lever_path(samples::al_cu(), 4.5), alloy::scheil_path(samples::al_cu(), 4.5),
          alloy::lever_path(samples::al_si(), 7), alloy::pure_path(933.473),
          alloy::measured_path({889, 873, 850}, {0, 0.3, 0.55})};
}

/// Invented: an arrest of 0.4 at 880 K within the range of freezing, and one of 0.1 at its end.
alloy::SolidificationPath stepped_path() {
  alloy::SolidificationPath::Parts p;
  p.rule = "test";
  p.liquidus = 900;
  p.end_of_freezing = 850;
  p.arrests = {{880, 0.4, "peritectic"}, {850, 0.1, "eutectic"}};
  p.fraction_above = [](double T) { return T >= 880 ? (900 - T) / 100 : 0.6 + (880 - T) / 100; };
  return alloy::SolidificationPath(p);
}

/// Temperature is the arrest's to the last bit from end to end, and leaves it on both sides.
void check_flat(const EnthalpyCurve& curve, const FlatPiece& flat) {
  for (int i = 0; i <= 100; ++i) {
    const double H = i == 100 ? flat.hot_end : flat.cold_end + (flat.hot_end - flat.cold_end) * i / 100;
    CHECK(curve.temperature(H) == flat.temperature);
    CHECK(theta(curve, H) == theta(curve, flat.cold_end));
    if (i < 100) {
      CHECK(curve.temperature_slope(H) == 0);
      CHECK(theta_slope(curve, H) == 0);
      CHECK(curve.fraction_solid(H) ==
            Approx(flat.fraction_after + (flat.fraction_before - flat.fraction_after) * i / 100).margin(1e-12));
    }
  }
  const double step = 1e-6 * (flat.hot_end - flat.cold_end);
  CHECK(curve.temperature(flat.cold_end - step) < flat.temperature);
  CHECK(curve.temperature(flat.hot_end + step) > flat.temperature);
}

}  // namespace

TEST_CASE("temperature and potential rise strictly outside arrests", "[alloy][curve]") {
  for (const auto& path : paths())
    for (const auto& metal : {samples::constant_metal(), samples::table_metal()}) {
      const EnthalpyCurve curve(metal, path, kLow, kHigh);
      const double top = curve.enthalpy(1200), bottom = curve.enthalpy(200);
      const int n = 20000;
      for (int i = 0; i < n; ++i) {
        const double a = bottom + (top - bottom) * i / n, b = bottom + (top - bottom) * (i + 1) / n;
        bool flat = false;
        for (const FlatPiece& piece : curve.arrests()) flat = flat || (a >= piece.cold_end && b <= piece.hot_end);
        if (flat ? curve.temperature(b) != curve.temperature(a) || theta(curve, b) != theta(curve, a)
                 : !(curve.temperature(b) > curve.temperature(a)) || !(theta(curve, b) > theta(curve, a)))
          FAIL("between " << a << " and " << b << " J/m3, flat: " << flat);
        if (curve.fraction_solid(b) > curve.fraction_solid(a)) FAIL("fraction solid rises at " << a << " J/m3");
      }
    }
}

TEST_CASE("an arrest is flat and exact", "[alloy][curve]") {
  for (const auto& path : paths()) {
    const EnthalpyCurve curve(samples::table_metal(), path, kLow, kHigh);
    REQUIRE(curve.arrests().size() == path.arrests().size());
    for (const FlatPiece& flat : curve.arrests()) {
      check_flat(curve, flat);
      CHECK(flat.temperature == path.arrests()[0].temperature);
      CHECK(flat.hot_end - flat.cold_end == Approx(2500.0 * 397010 * path.arrests()[0].fraction).epsilon(1e-12));
      CHECK(curve.enthalpy(flat.temperature) == Approx(flat.cold_end).epsilon(1e-12));
      CHECK(curve.enthalpy(flat.temperature, ArrestEnd::hot) == Approx(flat.hot_end).epsilon(1e-12));
    }
  }
}

TEST_CASE("a pure metal: solid, one arrest, liquid", "[alloy][curve]") {
  const EnthalpyCurve curve(samples::constant_metal(), alloy::pure_path(933.473), kLow, kHigh);
  const double solid = 2500 * 1000 * (933.473 - kLow), latent = 2500.0 * 397010;
  CHECK(curve.end_of_freezing_enthalpy() == Approx(solid).epsilon(1e-13));
  CHECK(curve.liquidus_enthalpy() == Approx(solid + latent).epsilon(1e-13));
  REQUIRE(curve.kinks().size() == 2);
  CHECK(curve.kinks()[0] == curve.end_of_freezing_enthalpy());
  CHECK(curve.kinks()[1] == curve.liquidus_enthalpy());
  CHECK(curve.temperature(solid / 2) == Approx(kLow + 0.5 * (933.473 - kLow)).epsilon(1e-13));
  CHECK(curve.temperature(solid + latent + 2500 * 1100 * 50) == Approx(983.473).epsilon(1e-13));
  CHECK(curve.fraction_solid(solid - 1) == 1);
  CHECK(curve.fraction_solid(solid + latent / 4) == Approx(0.75).epsilon(1e-13));
  CHECK(curve.fraction_solid(solid + latent + 1) == 0);
  CHECK(theta(curve, solid + 1) == Approx(200 * (933.473 - kLow)).epsilon(1e-13));
  CHECK(curve.potential_at(983.473) == Approx(200 * (933.473 - kLow) + 90 * 50).epsilon(1e-12));
  CHECK_FALSE(curve.is_straight());
}

TEST_CASE("an arrest in the middle of freezing", "[alloy][curve]") {
  const EnthalpyCurve curve(samples::constant_metal(), stepped_path(), kLow, kHigh);
  REQUIRE(curve.arrests().size() == 2);
  const FlatPiece &last = curve.arrests()[0], &middle = curve.arrests()[1];
  CHECK(last.temperature == 850);
  CHECK(middle.temperature == 880);
  CHECK(last.fraction_before == Approx(0.9).epsilon(1e-14));
  CHECK(last.fraction_after == Approx(1).epsilon(1e-14));
  CHECK(middle.fraction_before == Approx(0.2).epsilon(1e-14));
  CHECK(middle.fraction_after == Approx(0.6).epsilon(1e-14));
  check_flat(curve, last);
  check_flat(curve, middle);
  // From 850 to 880 K the fraction solid falls from 0.9 to 0.6, from 880 to 900 K from 0.2 to 0, straight:
  // latent heat and the mean of the heat capacities, by hand.
  const double L = 397010, rho = 2500;
  CHECK(middle.cold_end - last.hot_end == Approx(rho * (0.3 * L + 30 * (1000 * 0.75 + 1100 * 0.25))).epsilon(1e-12));
  CHECK(curve.liquidus_enthalpy() - middle.hot_end ==
        Approx(rho * (0.2 * L + 20 * (1000 * 0.1 + 1100 * 0.9))).epsilon(1e-12));
  REQUIRE(curve.kinks().size() == 5);
  CHECK(curve.kinks()[2] == middle.cold_end);
  CHECK(curve.kinks()[4] == curve.liquidus_enthalpy());
}

TEST_CASE("what is left of a measured path freezes at its last point", "[alloy][curve]") {
  const EnthalpyCurve curve(samples::constant_metal(), alloy::measured_path({889, 873, 850}, {0, 0.3, 0.55}), kLow,
                            kHigh);
  REQUIRE(curve.arrests().size() == 1);
  const FlatPiece& flat = curve.arrests()[0];
  check_flat(curve, flat);
  CHECK(flat.temperature == 850);
  CHECK(flat.cold_end == curve.end_of_freezing_enthalpy());
  CHECK(flat.hot_end - flat.cold_end == Approx(0.45 * 2500 * 397010).epsilon(1e-12));
  CHECK(curve.fraction_solid(curve.enthalpy(873)) == Approx(0.3).margin(1e-3));
}

TEST_CASE("slopes are those of the values", "[alloy][curve]") {
  for (const auto& path : paths()) {
    const EnthalpyCurve curve(samples::table_metal(), path, kLow, kHigh);
    const double top = curve.enthalpy(1200), bottom = curve.enthalpy(200), d = 1e-7 * top;
    for (int i = 0; i <= 3000; ++i) {
      const double H = bottom + (top - bottom) * (i + 0.37) / 3000;
      bool near_kink = false;
      for (const double kink : curve.kinks()) near_kink = near_kink || std::abs(H - kink) < 2 * d;
      if (near_kink) continue;
      const auto difference = [&](auto f) { return (f(H + d) - f(H - d)) / (2 * d); };
      const double dT = difference([&](double h) { return curve.temperature(h); });
      const double dtheta = difference([&](double h) { return theta(curve, h); });
      // Rounding of T over the width, 1e-13 * 1e3 / (2 d), is 1e-6 of a slope or less; a bend between two pieces adds.
      CHECK(curve.temperature_slope(H) == Approx(dT).epsilon(1e-3).margin(1e-13));
      CHECK(theta_slope(curve, H) == Approx(dtheta).epsilon(1e-3).margin(1e-11));
      CHECK(theta_slope(curve, H) == Approx(curve.conductivity(H) * curve.temperature_slope(H)).epsilon(2e-3));
    }
  }
}

TEST_CASE("slopes of fraction solid and conductivity are those of their values", "[alloy][curve]") {
  const EnthalpyCurve curve(samples::constant_metal(), alloy::lever_path(samples::al_si(), 7), kLow, kHigh);
  const double begin = curve.end_of_freezing_enthalpy(), end = curve.liquidus_enthalpy(), d = (end - begin) * 1e-6;
  for (int i = 0; i < 100; ++i) {
    const double H = begin + (end - begin) * (i + 0.31) / 100;
    const double df = (curve.fraction_solid(H + d) - curve.fraction_solid(H - d)) / (2 * d);
    const double dk = (curve.conductivity(H + d) - curve.conductivity(H - d)) / (2 * d);
    CHECK(curve.fraction_slope(H) == Approx(df).epsilon(1e-6));
    CHECK(curve.conductivity_slope(H) == Approx(dk).epsilon(1e-6));
    // Of a mixture of constant conductivities: k = 90 + 110 fs.
    CHECK(curve.conductivity(H) == Approx(90 + 110 * curve.fraction_solid(H)).epsilon(1e-13));
    CHECK(curve.fraction_slope(H) < 0);
  }
}

TEST_CASE("beyond its range the curve goes on straight with the properties of the end", "[alloy][curve]") {
  const EnthalpyCurve curve(samples::table_metal(), alloy::scheil_path(samples::al_cu(), 4.5), 350, 1000);
  const auto metal = samples::table_metal();
  const double low_cp = metal.solid.heat_capacity(350), low_k = metal.solid.conductivity(350);
  const double high_cp = metal.liquid.heat_capacity(1000), high_k = metal.liquid.conductivity(1000);
  const double top = curve.enthalpy(1000);
  CHECK(curve.temperature(0) == 350);
  for (const double dT : {0.5, 10.0, 200.0}) {
    const double below = -2500 * low_cp * dT, above = top + 2500 * high_cp * dT;
    CHECK(curve.temperature(below) == Approx(350 - dT).margin(1e-9));
    CHECK(curve.temperature(above) == Approx(1000 + dT).margin(1e-9));
    CHECK(curve.conductivity(below) == low_k);
    CHECK(curve.conductivity(above) == high_k);
    CHECK(theta(curve, below) == Approx(-low_k * dT).epsilon(1e-10));
    CHECK(theta(curve, above) - theta(curve, top) == Approx(high_k * dT).epsilon(1e-9));
    CHECK(curve.temperature_slope(below) == Approx(1 / (2500 * low_cp)).epsilon(1e-12));
    CHECK(curve.temperature_slope(above) == Approx(1 / (2500 * high_cp)).epsilon(1e-12));
    CHECK(curve.fraction_solid(below) == 1);
    CHECK(curve.fraction_solid(above) == 0);
  }
}

TEST_CASE("the range reaches past both ends of freezing, however narrow it was asked for", "[alloy][curve]") {
  const auto path = alloy::scheil_path(samples::al_cu(), 4.5);
  const EnthalpyCurve curve(samples::table_metal(), path, 850, 851);
  CHECK(curve.temperature(0) == path.end_of_freezing() - 10);
  CHECK(curve.fraction_solid(curve.enthalpy(path.end_of_freezing() - 1)) == 1);
  CHECK(curve.fraction_solid(curve.enthalpy(path.liquidus() + 1)) == 0);
}

TEST_CASE("a latent heat and path that disagree are refused", "[alloy][curve][errors]") {
  alloy::MetalProperties metal = samples::constant_metal();
  metal.latent_heat = -397010;
  CHECK_THROWS_WITH(EnthalpyCurve(metal, alloy::scheil_path(samples::al_cu(), 4.5), kLow, kHigh),
                    "the enthalpy does not rise with temperature: heat capacity, latent heat and path disagree");
}
