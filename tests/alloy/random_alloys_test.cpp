// Any valid alloy: random lines, compositions and properties give a rising enthalpy curve and a fraction solid of 0..1.
#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <random>
#include <vector>

#include "palier/alloy/diagram.hpp"
#include "palier/alloy/enthalpy_curve.hpp"

using namespace palier;
using alloy::EnthalpyCurve;

namespace {

class RandomAlloy {
 public:
  explicit RandomAlloy(unsigned seed) : bits_(seed) {}

  alloy::SolidificationPath path() {
    alloy::BinaryLines lines;
    const double melting = between(400, 1900), depth = between(0.02, 0.4) * melting, eutectic = between(1, 60);
    lines.melting_point = melting;
    // A middle point up to a third off the straight line.
    const double x = between(0.3, 0.7), y = x * between(0.7, 1.3);
    lines.liquidus = base::Table({0, x * eutectic, eutectic}, {melting, melting - y * depth, melting - depth});
    lines.partition_coefficient = between(0.01, 0.97);
    lines.eutectic_temperature = melting - depth * between(0.95, 1);
    const auto diagram = alloy::make_diagram(lines);
    const double composition = diagram->largest_composition() * std::pow(10, between(-3, 0));
    return between(0, 1) < 0.5 ? alloy::lever_path(diagram, composition) : alloy::scheil_path(diagram, composition);
  }

  alloy::MetalProperties metal() {
    alloy::MetalProperties m;
    m.density = between(1500, 20000);
    m.latent_heat = between(2e4, 2e6);
    m.solid = phase();
    m.liquid = phase();
    return m;
  }

 private:
  double between(double low, double high) { return std::uniform_real_distribution<double>(low, high)(bits_); }
  alloy::PhaseProperties phase() {
    if (between(0, 1) < 0.3) return {base::Table(between(100, 2000)), base::Table(between(5, 400))};
    const std::vector<double> T{300, 700, 1500};
    return {base::Table(T, {between(100, 2000), between(100, 2000), between(100, 2000)}),
            base::Table(T, {between(5, 400), between(5, 400), between(5, 400)})};
  }
  std::mt19937_64 bits_;
};

/// Enthalpies to look at: evenly over the range and the last bits around the kinks.
std::vector<double> enthalpies(const EnthalpyCurve& curve, double bottom, double top) {
  std::vector<double> H;
  for (int i = 0; i <= 3000; ++i) H.push_back(bottom + (top - bottom) * i / 3000);
  for (const double kink : curve.kinks()) {
    const double infinite = std::numeric_limits<double>::infinity();
    H.insert(H.end(), {std::nextafter(kink, -infinite), kink, std::nextafter(kink, infinite)});
  }
  std::sort(H.begin(), H.end());
  return H;
}

}  // namespace

TEST_CASE("any valid alloy has a rising enthalpy curve and a fraction solid of 0 to 1", "[alloy][curve][random]") {
  for (unsigned seed = 1; seed <= 300; ++seed) {
    INFO("seed " << seed);
    RandomAlloy random(seed);
    const auto path = random.path();
    const EnthalpyCurve curve(random.metal(), path, 300, 2000);
    const double bottom = curve.enthalpy(std::min(290.0, path.end_of_freezing() - 20)), top = curve.enthalpy(2100);
    const double last_bits = 1e-9 * (top - bottom);  // closer neighbours may share a temperature by rounding
    double before = -std::numeric_limits<double>::infinity(), T_before = before, theta_before = before, f_before = 1;
    for (const double H : enthalpies(curve, bottom, top)) {
      double theta = 0, slope = 0;
      curve.potential(H, theta, slope);
      const double T = curve.temperature(H), f = curve.fraction_solid(H);
      bool flat = false;
      for (const alloy::FlatPiece& piece : curve.arrests())
        flat = flat || (H <= piece.hot_end && before >= piece.cold_end);
      const bool rises = T > T_before && theta > theta_before;
      if (flat ? T != T_before : !rises && H - before > last_bits)
        FAIL("between " << before << " and " << H << " J/m3: " << T_before << " and " << T << " K");
      if (!(f >= 0 && f <= 1 && f <= f_before + 1e-12)) FAIL("fraction solid " << f << " at " << H << " J/m3");
      if (!(slope >= 0 && curve.temperature_slope(H) >= 0)) FAIL("a falling slope at " << H << " J/m3");
      before = H;
      T_before = T;
      theta_before = theta;
      f_before = f;
    }
  }
}

TEST_CASE("any valid alloy freezes from 0 to 1 as it cools", "[alloy][lever][scheil][random]") {
  for (unsigned seed = 1; seed <= 300; ++seed) {
    INFO("seed " << seed);
    const auto path = RandomAlloy(seed).path();
    double last = 0;
    for (int i = 0; i <= 500; ++i) {
      const double T = std::max(path.liquidus() - path.freezing_range() * i / 500, path.end_of_freezing());
      const double f = path.fraction_above(T);
      if (!(f >= last && f <= 1)) FAIL("fraction solid " << f << " after " << last << " at " << T << " K");
      last = f;
    }
    CHECK(path.fraction_below(path.end_of_freezing()) == Approx(1).margin(1e-12));
  }
}
