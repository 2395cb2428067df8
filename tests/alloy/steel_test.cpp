// Low-alloy steel: delta ferrite, peritectic and austenite against mass balances by hand.
#include "palier/alloy/steel.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <random>
#include <string>
#include <vector>

#include "alloy/dilute_balance.hpp"
#include "alloy/sample_alloys.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::freeze_steel;
using alloy::Mixing;
using alloy::Steel;
using alloy::steel_element;

namespace {

constexpr Mixing kAll[] = {Mixing::lever, Mixing::scheil, Mixing::partial};
constexpr double kPeritectic = 1495 + 273.15;

Steel iron_carbon(double carbon) { return {carbon, {}, {{}, 0.98}, {}}; }

Steel cast_steel(double carbon) {
  return {carbon,
          {steel_element("Si", 0.4), steel_element("Mn", 0.7), steel_element("P", 0.02), steel_element("S", 0.02)},
          {{}, 0.97},
          {}};
}

}  // namespace

TEST_CASE("Fe-0.25C by the lever rule", "[alloy][steel][lever][peritectic]") {
  // Straight lines from 1538 degC to delta 0.09, gamma 0.17, liquid 0.53 % C at 1495 degC; mass balances by hand.
  const auto steel = freeze_steel(iron_carbon(0.25), Mixing::lever);
  const auto path = steel.path();
  CHECK(steel.liquidus() - 273.15 == Approx(1517.7169811).margin(1e-7).epsilon(0));
  REQUIRE(path.arrests().size() == 1);
  CHECK(path.arrests()[0].reaction == "peritectic");
  CHECK(path.arrests()[0].temperature == Approx(kPeritectic).margin(1e-9).epsilon(0));
  const double T = path.arrests()[0].temperature;
  CHECK(path.fraction_above(T) == Approx(0.28 / 0.44).epsilon(1e-12));      // 0.6363636
  CHECK(1 - path.fraction_below(T) == Approx(0.08 / 0.36).epsilon(1e-12));  // 0.2222222
  CHECK(steel.fraction_solid(T - 1e-9) == Approx(0.28 / 0.36).epsilon(1e-9));
  CHECK(steel.first_solid().solid[0] == Approx(0.25 * 0.09 / 0.53).epsilon(1e-12));
  CHECK(steel.compositions(T - 1e-9).solid[0] == Approx(0.17).epsilon(1e-9));
  // The solidus of austenite: 0.17 to 2.14 % C over 348 K, so 0.08 % take 14.131980 K.
  CHECK(steel.end_of_freezing() == Approx(kPeritectic - 0.08 * 348 / 1.97).margin(1e-9).epsilon(0));
  CHECK(steel.last_liquid().solid[0] == Approx(0.25).epsilon(1e-12));
}

TEST_CASE("by the lever rule carbon decides what freezes", "[alloy][steel][lever][peritectic]") {
  SECTION("below 0.09 % C delta ferrite alone") {
    const auto steel = freeze_steel(iron_carbon(0.05), Mixing::lever);
    CHECK(steel.path().arrests().empty());
    CHECK(steel.end_of_freezing() == Approx(1811.15 - 43 * 0.05 / 0.09).margin(1e-9).epsilon(0));
  }
  SECTION("between 0.09 and 0.17 % C the peritectic takes the last liquid") {
    const auto path = freeze_steel(iron_carbon(0.12), Mixing::lever).path();
    REQUIRE(path.arrests().size() == 1);
    CHECK(path.arrests()[0].reaction == "peritectic");
    CHECK(path.arrests()[0].fraction == Approx(0.03 / 0.44).epsilon(1e-12));
    CHECK(path.end_of_freezing() == path.arrests()[0].temperature);
  }
  SECTION("above 0.53 % C austenite alone") {
    const auto steel = freeze_steel(iron_carbon(0.8), Mixing::lever);
    CHECK(steel.path().arrests().empty());
    CHECK(steel.liquidus() == Approx(kPeritectic - 0.27 * 348 / 3.77).margin(1e-9).epsilon(0));
    CHECK(steel.end_of_freezing() == Approx(kPeritectic - 0.63 * 348 / 1.97).margin(1e-9).epsilon(0));
  }
}

TEST_CASE("by Scheil's rule the peritectic is passed by", "[alloy][steel][scheil][peritectic]") {
  const auto steel = freeze_steel(iron_carbon(0.25), Mixing::scheil);
  REQUIRE(steel.path().arrests().size() == 1);
  CHECK(steel.path().arrests()[0].reaction == "last liquid");
  CHECK(steel.last_liquid_fraction() == Approx(0.02).epsilon(1e-12));
  // Delta ferrite until the liquid holds 0.53 % C, then austenite.
  const double left = std::pow(0.25 / 0.53, 0.53 / 0.44);
  CHECK(1 - steel.fraction_solid(kPeritectic) == Approx(left).epsilon(1e-10));
  CHECK(steel.compositions(kPeritectic + 0.01).solid[0] == Approx(0.09).epsilon(1e-3));
  CHECK(steel.compositions(kPeritectic - 0.01).solid[0] == Approx(0.17).epsilon(1e-3));
  CHECK(steel.end_of_freezing() < freeze_steel(iron_carbon(0.25), Mixing::lever).end_of_freezing());
}

TEST_CASE("in Fe-C partial equilibrium is the lever rule", "[alloy][steel][partial]") {
  for (const double carbon : {0.05, 0.12, 0.25, 0.6}) {
    const auto lever = freeze_steel(iron_carbon(carbon), Mixing::lever).path(),
               partial = freeze_steel(iron_carbon(carbon), Mixing::partial).path();
    CHECK(partial.end_of_freezing() == Approx(lever.end_of_freezing()).epsilon(1e-14));
    const double T = 0.3 * lever.liquidus() + 0.7 * lever.end_of_freezing();
    CHECK(partial.fraction_above(T) == Approx(lever.fraction_above(T)).epsilon(1e-12));
  }
}

TEST_CASE("other elements lower the peritectic and stretch it", "[alloy][steel][lever][peritectic]") {
  // 0.25C-0.4Si-0.7Mn-0.02P-0.02S; Won & Thomas 2001. Balances by hand with 0.3636364 and 0.2222222 liquid.
  const auto steel = freeze_steel(cast_steel(0.25), Mixing::lever);
  CHECK(steel.path().arrests().empty());
  const auto depression = [](double f, bool delta) {
    double sum = 0;
    for (const auto& e : cast_steel(0.25).elements) {
      const double k = delta ? e.k_delta : e.k_gamma;
      sum += e.liquidus_slope * e.composition / (f + k * (1 - f));
    }
    return sum;
  };
  const double begin = kPeritectic + depression(0.16 / 0.44, true), end = kPeritectic + depression(0.08 / 0.36, false);
  CHECK(begin - end > 1);
  CHECK(begin - end < 6);
  CHECK(steel.fraction_solid(end) == Approx(0.28 / 0.36).epsilon(1e-10));
  CHECK(steel.compositions(0.5 * (begin + end)).liquid[0] == Approx(0.53).epsilon(1e-14));
}

TEST_CASE("no solute of a steel is lost or made", "[alloy][steel][balance]") {
  for (const double carbon : {0.05, 0.12, 0.25, 0.6})
    for (const Mixing mixing : kAll) {
      const Steel steel = cast_steel(carbon);
      const auto freezing = freeze_steel(steel, mixing);
      const double last = std::max(freezing.last_liquid_fraction(), 1e-3);
      // Where the solid changes: the quadrature goes stage by stage.
      double ends_delta = (carbon - 0.09) / 0.44, ends_peritectic = (carbon - 0.17) / 0.36;
      if (mixing == Mixing::scheil) ends_delta = ends_peritectic = std::pow(carbon / 0.53, 0.53 / 0.44);
      std::vector<double> knots{1};
      for (const double f : {ends_delta, ends_peritectic})
        if (f < knots.back() && f > last) knots.push_back(f);
      knots.push_back(last);
      const auto c = freezing.compositions(samples::temperature_at(freezing, last));
      for (std::size_t i = 0; i <= steel.elements.size(); ++i) {
        INFO(carbon << " % C, rule " << static_cast<int>(mixing) << ", element " << i);
        const double content = i == 0 ? carbon : steel.elements[i - 1].composition;
        double solid = 0;
        if (mixing == Mixing::scheil || (mixing == Mixing::partial && i > 0)) {
          for (std::size_t j = 1; j < knots.size(); ++j)
            solid += samples::frozen_between(freezing, i, knots[j - 1], knots[j]);
        } else if (last > ends_delta || last < ends_peritectic || carbon >= 0.53) {
          solid = (1 - last) * c.solid[i];
        } else {  // delta ferrite and austenite share what is not liquid, by carbon
          const double delta = (0.17 * (1 - last) + 0.53 * last - carbon) / 0.08, gamma = 1 - last - delta;
          const double k_delta = i == 0 ? 0.09 / 0.53 : steel.elements[i - 1].k_delta;
          solid = delta * k_delta * c.liquid[i] + gamma * c.solid[i];
        }
        CHECK(last * c.liquid[i] + solid == Approx(content).margin(1e-10).epsilon(0));
      }
    }
}

TEST_CASE("any steel freezes strictly from 0 to 1 and has an enthalpy curve", "[alloy][steel][random]") {
  std::mt19937_64 bits(20);
  const auto between = [&bits](double low, double high) {
    return std::uniform_real_distribution<double>(low, high)(bits);
  };
  for (int sample = 0; sample < 150; ++sample) {
    const Steel steel{between(0, 1.2),
                      {steel_element("Si", between(0, 1)), steel_element("Mn", between(0, 1.8)),
                       steel_element("P", between(0, 0.04)), steel_element("S", between(0, 0.04))},
                      {{}, between(0.5, 0.97)},
                      {}};
    for (const Mixing mixing : kAll) {
      INFO("sample " << sample << ", " << steel.carbon << " % C, rule " << static_cast<int>(mixing));
      const auto path = freeze_steel(steel, mixing).path();
      double last = -1;
      for (int i = 0; i <= 400; ++i) {
        const double T = i == 400 ? path.end_of_freezing() : path.liquidus() - path.freezing_range() * i / 400;
        const double f = path.fraction_above(T);
        if (!(f > last && f >= 0 && f <= 1)) FAIL("fraction solid " << f << " after " << last << " at " << T << " K");
        last = f;
      }
      CHECK(path.fraction_below(path.end_of_freezing()) == Approx(1).margin(1e-12));
      if (sample % 15 == 0) {
        const alloy::EnthalpyCurve curve(samples::constant_metal(), path, 300, 2000);
        CHECK(curve.arrests().size() == path.arrests().size());
        const double T = 0.5 * (path.liquidus() + path.end_of_freezing());
        CHECK(curve.fraction_solid(curve.enthalpy(T)) == Approx(path.fraction_above(T)).margin(2e-3));
      }
    }
  }
}

TEST_CASE("steels that the lines do not reach are refused", "[alloy][steel][errors]") {
  CHECK_THROWS_WITH(freeze_steel(iron_carbon(2.5), Mixing::lever), Catch::Matchers::Contains("carbon: found"));
  CHECK_THROWS_WITH(freeze_steel(iron_carbon(-0.1), Mixing::lever), Catch::Matchers::Contains("carbon: found"));
  CHECK_THROWS_WITH(freeze_steel(iron_carbon(0), Mixing::lever), Catch::Matchers::Contains("pure metal"));
  CHECK_THROWS_WITH(freeze_steel({0.25, {}, {}, {}}, Mixing::scheil), Catch::Matchers::Contains("never freezes"));
  CHECK_THROWS_WITH(steel_element("Xx", 1), Catch::Matchers::Contains("Si, Mn, P or S"));
  Steel wrong = iron_carbon(0.25);
  wrong.lines.peritectic_gamma = 0.6;
  CHECK_THROWS_WITH(freeze_steel(wrong, Mixing::lever), Catch::Matchers::Contains("peritectic"));
}
