// The enthalpy curve against an independent fine integration.
#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "alloy/curve_reference.hpp"
#include "alloy/sample_alloys.hpp"

using namespace palier;
using alloy::EnthalpyCurve;

namespace {

constexpr double kLow = 300, kHigh = 1100;  // [K]

struct Worst {
  double T = 0, theta = 0, fraction = 0;  ///< [K], [W/m], share
};

Worst worst_error(const alloy::MetalProperties& metal, const alloy::SolidificationPath& path,
                  const std::vector<double>& bends) {
  const EnthalpyCurve curve(metal, path, kLow, kHigh);
  const samples::CurveReference exact(metal, path, kLow, kHigh, bends);
  Worst worst;
  for (std::size_t i = 0; i < exact.size(); ++i) {
    const double H = exact.enthalpy(i);
    double theta = 0, slope = 0;
    curve.potential(H, theta, slope);
    worst.T = std::max(worst.T, std::abs(curve.temperature(H) - exact.T(i)));
    worst.theta = std::max(worst.theta, std::abs(theta - exact.theta(i)));
    worst.fraction = std::max(worst.fraction, std::abs(curve.fraction_solid(H) - exact.fraction(i)));
  }
  return worst;
}

/// The same metal with properties that are straight as far as each phase goes: a table that ends 3 mK below the melting
/// point would be a bend.
alloy::MetalProperties smooth_metal() {
  alloy::MetalProperties metal = samples::table_metal();
  metal.solid.heat_capacity = base::Table({300, 933.473}, {901.54, 1257.8});
  metal.solid.conductivity = base::Table({300, 933.473}, {237, 211});
  metal.liquid.conductivity = base::Table({800, 1200}, {91, 100});
  return metal;
}

}  // namespace

TEST_CASE("temperature and conduction potential of smooth alloys", "[alloy][curve]") {
  struct Row {
    std::string name;
    alloy::SolidificationPath path;
  };
  for (const Row& row : {Row{"Al-4.5Cu lever", alloy::lever_path(samples::al_cu(), 4.5)},
                         Row{"Al-4.5Cu Scheil", alloy::scheil_path(samples::al_cu(), 4.5)},
                         Row{"Al-7Si lever", alloy::lever_path(samples::al_si(), 7)},
                         Row{"Al-7Si Scheil", alloy::scheil_path(samples::al_si(), 7)},
                         Row{"Al-32.9Cu Scheil", alloy::scheil_path(samples::al_cu(), 32.9)},
                         Row{"aluminum", alloy::pure_path(933.473)}})
    for (const auto& metal : {samples::constant_metal(), smooth_metal()}) {
      INFO(row.name);
      const Worst worst = worst_error(metal, row.path, {});
      CHECK(worst.T < 1e-6);
      CHECK(worst.theta < 2e-4);  // the conductivity, at most 240 W/m/K, times the bound on T
      // Straight within a piece: 128 pieces hold the curvature to second order only, about 1 / 128^2.
      CHECK(worst.fraction < 1.0 / (128 * 128));
    }
}

TEST_CASE("a bend of the heat capacity costs no more than a piece of cubic can", "[alloy][curve]") {
  // The slope of cp steps by d = 0.0784 J/kg/K2 at 466.7 K, where cp is 985.6 J/kg/K. A cubic through values and slopes
  // cannot bend within its piece of w = 5 K: it misses by up to w^2 d / (113 cp), and the quadrature across the bend
  // that places the pieces by about as much.
  const double d = (985.6 - 901.54) / 166.7 - (1257.8 - 985.6) / 466.77;
  const double bound = 5.0 * 5.0 * std::abs(d) / (50 * 985.6);
  for (const auto& path : {alloy::lever_path(samples::al_cu(), 4.5), alloy::scheil_path(samples::al_cu(), 4.5)}) {
    const Worst worst = worst_error(samples::table_metal(), path, {466.7, 933.47});
    CHECK(worst.T < bound);
    CHECK(worst.theta < 240 * bound);
  }
}

TEST_CASE("a bend of a measured path costs no more than a piece of cubic can", "[alloy][curve]") {
  // Invented record. A piece holds 1/128 of (0.6 L + 41 kJ/kg), 2180 J/kg, across which T rises by 2180 / (cp + L
  // dfs/dT): 0.256 K above 873 K, 0.363 K below it. A cubic through the values and slopes at both ends of a piece
  // misses a bend within it by at most 1/8 of the difference of the two rises.
  const std::vector<double> T{889, 873, 853, 850}, f{0, 0.3, 0.55, 0.6};
  const auto path = alloy::measured_path(T, f);
  const EnthalpyCurve curve(samples::constant_metal(), path, kLow, kHigh);
  const samples::CurveReference exact(samples::constant_metal(), path, kLow, kHigh, T);
  const double across = 0.363, bound = (0.363 - 0.256) / 8;
  double worst_far = 0;
  for (std::size_t i = 0; i < exact.size(); ++i) {
    const double error = std::abs(curve.temperature(exact.enthalpy(i)) - exact.T(i));
    CHECK(error < bound);
    if (std::abs(exact.T(i) - 873) > across && std::abs(exact.T(i) - 853) > across)
      worst_far = std::max(worst_far, error);
  }
  CHECK(worst_far < 1e-5);  // the step of the integration over a bend
}

TEST_CASE("temperature and enthalpy are inverse to each other", "[alloy][curve]") {
  for (const auto& path : {alloy::lever_path(samples::al_cu(), 4.5), alloy::scheil_path(samples::al_si(), 7),
                           alloy::pure_path(933.473), alloy::measured_path({889, 873, 850}, {0, 0.3, 0.55})}) {
    const EnthalpyCurve curve(samples::table_metal(), path, kLow, kHigh);
    for (int i = 0; i <= 2000; ++i) {
      const double T = 250 + 0.475 * i;  // beyond both ends of the range as well
      CHECK(curve.temperature(curve.enthalpy(T)) == Approx(T).margin(1e-9));
    }
    const double top = curve.enthalpy(1200);
    for (int i = -100; i <= 1000; ++i) {
      const double H = top * i / 1000, T = curve.temperature(H);
      const double cold = curve.enthalpy(T), hot = curve.enthalpy(T, alloy::ArrestEnd::hot);
      CHECK(cold <= H + 1e-9 * top);
      CHECK(hot >= H - 1e-9 * top);
    }
  }
}

TEST_CASE("the enthalpy rises by the latent heat and the heat capacity over freezing", "[alloy][curve]") {
  alloy::MetalProperties metal = samples::constant_metal();
  metal.liquid.heat_capacity = metal.solid.heat_capacity;
  for (const auto& path : {alloy::lever_path(samples::al_cu(), 4.5), alloy::scheil_path(samples::al_cu(), 4.5),
                           alloy::scheil_path(samples::al_si(), 7), alloy::pure_path(933.473),
                           alloy::measured_path({889, 873, 850}, {0, 0.3, 0.55})}) {
    const EnthalpyCurve curve(metal, path, kLow, kHigh);
    const double rise = curve.liquidus_enthalpy() - curve.end_of_freezing_enthalpy();
    CHECK(rise == Approx(2500 * (397010 + 1000 * path.freezing_range())).epsilon(1e-12));
    CHECK(curve.end_of_freezing_enthalpy() == Approx(2500.0 * 1000 * (path.end_of_freezing() - kLow)).epsilon(1e-12));
    CHECK(curve.enthalpy(kHigh) - curve.enthalpy(kLow) ==
          Approx(2500 * (397010 + 1000 * (kHigh - kLow))).epsilon(1e-12));
  }
}
