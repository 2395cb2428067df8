// Dilute multicomponent alloys: the binary limit, liquidus numbers, balances of solute, and what is refused.
#include "palier/alloy/dilute.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <random>
#include <string>
#include <vector>

#include "alloy/dilute_balance.hpp"
#include "alloy/sample_alloys.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::DiluteAlloy;
using alloy::DiluteElement;
using alloy::DiluteFreezing;
using alloy::freeze_dilute;
using alloy::Mixing;

namespace {

constexpr Mixing kAll[] = {Mixing::lever, Mixing::scheil, Mixing::partial};

/// Invented round numbers of the size met in aluminum alloys; titanium lifts the liquidus and gathers in the solid.
DiluteAlloy aluminum() {
  return {"Al",
          933.473,
          {{"Si", 7, -6.6, 0.13, {}, false}, {"Mg", 0.35, -6, 0.5, {}, false}, {"Ti", 0.12, 33, 8, {}, false}},
          {850.15, {}}};
}

/// Delta ferrite: Y.-M. Won, B.G. Thomas, Metall. Mater. Trans. A 32 (2001) 1757, 1536 degC and P from memory.
DiluteAlloy delta_steel() {
  return {"Fe",
          1536 + 273.15,
          {{"C", 0.25, -78, 0.19, {}, true},
           {"Si", 0.4, -7.6, 0.77, {}, false},
           {"Mn", 0.7, -4.9, 0.76, {}, false},
           {"P", 0.02, -34.4, 0.23, {}, false},
           {"S", 0.02, -38, 0.05, {}, false}},
          {{}, 0.97}};
}

class RandomDilute {
 public:
  explicit RandomDilute(unsigned seed) : bits_(seed) {}
  DiluteAlloy alloy() {
    DiluteAlloy a{"base", between(500, 2000), {}, {}};
    const int n = 1 + static_cast<int>(between(0, 6));
    for (int i = 0; i < n; ++i) {
      const bool lowers = i == 0 || between(0, 1) < 0.8;
      a.elements.push_back({"X" + std::to_string(i),
                            4 * std::pow(10, between(-3, 0)),
                            lowers ? between(-20, -0.5) : between(0.5, 20),
                            lowers ? between(0.02, 0.98) : between(1.02, 9),
                            {},
                            between(0, 1) < 0.4});
    }
    const double liquidus = dilute_liquidus(a);
    a.end.temperature = liquidus - between(0.5, 20);
    a.end.largest_fraction = 1 - std::pow(10, between(-10, -0.2));
    return a;
  }

 private:
  double between(double low, double high) { return std::uniform_real_distribution<double>(low, high)(bits_); }
  std::mt19937_64 bits_;
};

}  // namespace

TEST_CASE("with one element a dilute alloy is the binary", "[alloy][dilute][lever][scheil]") {
  struct Row {
    std::string name;
    double melting, eutectic_T, eutectic, k, composition;  ///< degC, mass %
  };
  // The lines are those of the sample alloys.
  for (const Row& row : {Row{"Al-4.5Cu", 660, 548, 33, 0.17, 4.5}, Row{"Al-7Si", 660.323, 577, 12.6, 0.131, 7},
                         Row{"Al-1Si", 660.323, 577, 12.6, 0.131, 1}, Row{"Pb-10Sn", 327.5, 183, 61.9, 0.2956, 10}}) {
    INFO(row.name);
    const auto diagram = samples::straight(row.melting, row.eutectic_T, row.eutectic, row.k);
    const DiluteAlloy dilute{"base",
                             row.melting + 273.15,
                             {{"X", row.composition, (row.eutectic_T - row.melting) / row.eutectic, row.k, {}, false}},
                             {row.eutectic_T + 273.15, {}}};
    for (const Mixing mixing : {Mixing::lever, Mixing::scheil}) {
      const auto binary =
          mixing == Mixing::lever ? lever_path(diagram, row.composition) : scheil_path(diagram, row.composition);
      const auto path = freeze_dilute(dilute, mixing).path();
      CHECK(path.rule() == binary.rule());
      CHECK(path.liquidus() == Approx(binary.liquidus()).margin(1e-10).epsilon(0));
      CHECK(path.end_of_freezing() == Approx(binary.end_of_freezing()).margin(1e-10).epsilon(0));
      REQUIRE(path.arrests().size() == binary.arrests().size());
      for (std::size_t i = 0; i < path.arrests().size(); ++i)
        CHECK(path.arrests()[i].fraction == Approx(binary.arrests()[i].fraction).margin(1e-10).epsilon(0));
      for (int i = 0; i < 200; ++i) {
        const double T = path.liquidus() - path.freezing_range() * (i + 0.5) / 200;
        const double off = path.fraction_above(T) - binary.fraction_above(T);
        if (!(std::abs(off) < 1e-10)) FAIL("off by " << off << " at " << T << " K");
        const auto here = path.solute(T), there = binary.solute(T);
        REQUIRE((here && there));
        if (!(std::abs(here->liquid - there->liquid) < 1e-10 && std::abs(here->solid - there->solid) < 1e-10))
          FAIL("compositions differ at " << T << " K");
      }
    }
  }
}

TEST_CASE("liquidus of steels and light alloys", "[alloy][dilute][liquidus]") {
  CHECK(dilute_liquidus(delta_steel()) - 273.15 == Approx(1508.582).margin(1e-9).epsilon(0));  // by hand
  // 660.323 - 46.2 - 2.1 + 3.96 by hand.
  CHECK(dilute_liquidus(aluminum()) - 273.15 == Approx(615.983).margin(1e-9).epsilon(0));
  for (const Mixing mixing : kAll)
    CHECK(freeze_dilute(delta_steel(), mixing).liquidus() == Approx(dilute_liquidus(delta_steel())).epsilon(1e-15));
}

TEST_CASE("fraction solid of a steel of five elements", "[alloy][dilute][lever][scheil][partial]") {
  // Temperatures at half solid, computed from the closed forms with 30-digit arithmetic [degC].
  const DiluteAlloy steel = delta_steel();
  CHECK(freeze_dilute(steel, Mixing::lever).fraction_solid(1493.327817000377 + 273.15) == Approx(0.5).margin(1e-10));
  CHECK(freeze_dilute(steel, Mixing::scheil).fraction_solid(1491.554704963268 + 273.15) == Approx(0.5).margin(1e-10));
  CHECK(freeze_dilute(steel, Mixing::partial).fraction_solid(1492.969218850896 + 273.15) == Approx(0.5).margin(1e-10));
}

TEST_CASE("no solute is lost or made, whatever the rule", "[alloy][dilute][balance]") {
  for (const DiluteAlloy& alloy : {aluminum(), delta_steel()})
    for (const Mixing mixing : kAll) {
      const DiluteFreezing freezing = freeze_dilute(alloy, mixing);
      const double least = std::max(freezing.last_liquid_fraction(), 1e-3);
      for (const double f : {0.9 + 0.1 * least, 0.5 + 0.5 * least, least}) {
        const auto c = freezing.compositions(samples::temperature_at(freezing, f));
        for (std::size_t i = 0; i < alloy.elements.size(); ++i) {
          const DiluteElement& e = alloy.elements[i];
          INFO(alloy.base << " rule " << static_cast<int>(mixing) << " " << e.name << " at fraction liquid " << f);
          const bool even = mixing == Mixing::lever || (mixing == Mixing::partial && e.fast);
          const double solid = even ? (1 - f) * c.solid[i] : samples::frozen_between(freezing, i, 1, f);
          CHECK(f * c.liquid[i] + solid == Approx(e.composition).margin(1e-10).epsilon(0));
        }
      }
    }
}

TEST_CASE("carbon follows the lever rule and manganese does not", "[alloy][dilute][partial]") {
  // Common practice for steel, no published source: interstitials are back-diffused wholly, substitutionals hardly.
  const auto lever = freeze_dilute(delta_steel(), Mixing::lever),
             partial = freeze_dilute(delta_steel(), Mixing::partial),
             scheil = freeze_dilute(delta_steel(), Mixing::scheil);
  const double f = 0.1;
  const auto at = [&](const DiluteFreezing& freezing) {
    return freezing.compositions(samples::temperature_at(freezing, f)).liquid;
  };
  CHECK(at(partial)[0] == Approx(at(lever)[0]).epsilon(1e-10));
  CHECK(at(partial)[0] < 0.7 * at(scheil)[0]);
  for (const std::size_t i : {1U, 2U, 3U, 4U}) {
    CHECK(at(partial)[i] == Approx(at(scheil)[i]).epsilon(1e-10));
    CHECK(at(partial)[i] > 1.1 * at(lever)[i]);
  }
}

TEST_CASE("first solid and last liquid", "[alloy][dilute]") {
  const auto lever = freeze_dilute(delta_steel(), Mixing::lever), scheil = freeze_dilute(delta_steel(), Mixing::scheil);
  CHECK(lever.first_solid().solid[0] == Approx(0.19 * 0.25).epsilon(1e-14));
  CHECK(scheil.first_solid().solid[4] == Approx(0.05 * 0.02).epsilon(1e-14));
  CHECK(lever.last_liquid().liquid[2] == Approx(0.7 / 0.76).epsilon(1e-14));
  CHECK(lever.last_liquid().solid[2] == Approx(0.7).epsilon(1e-14));
  CHECK(lever.last_liquid_fraction() == 0);
  CHECK(scheil.last_liquid().liquid[2] == Approx(0.7 * std::pow(0.03, -0.24)).epsilon(1e-12));
  CHECK(scheil.last_liquid_fraction() == Approx(0.03).epsilon(1e-14));
  CHECK(scheil.path().arrests().back().reaction == "last liquid");
  CHECK_FALSE(scheil.path().solute(scheil.liquidus() - 1));  // five solutes are not one
  const auto aluminum_end = freeze_dilute(aluminum(), Mixing::scheil);
  CHECK(aluminum_end.end_of_freezing() == 850.15);
  const auto last = aluminum_end.last_liquid().liquid;
  CHECK(933.473 - 6.6 * last[0] - 6 * last[1] + 33 * last[2] == Approx(850.15).margin(1e-9).epsilon(0));
}

TEST_CASE("any dilute alloy freezes strictly from 0 to 1 as it cools", "[alloy][dilute][random]") {
  for (unsigned seed = 1; seed <= 300; ++seed)
    for (const Mixing mixing : kAll) {
      INFO("seed " << seed << " rule " << static_cast<int>(mixing));
      const DiluteAlloy alloy = RandomDilute(seed).alloy();
      const auto freezing = freeze_dilute(alloy, mixing);
      const auto path = freezing.path();
      double last = -1;
      for (int i = 0; i <= 400; ++i) {
        const double T = i == 400 ? path.end_of_freezing() : path.liquidus() - path.freezing_range() * i / 400;
        const double f = path.fraction_above(T);
        // With all k close to 1 hardly any liquid may be left, and 1 - f runs out of digits.
        const bool rises = f > last || (f >= last && 1 - last < 1e-14);
        if (!(rises && f >= 0 && f <= 1)) FAIL("fraction solid " << f << " after " << last << " at " << T << " K");
        last = f;
        // Back from the compositions of the liquid to the temperature.
        const auto liquid = freezing.compositions(T).liquid;
        double back = alloy.melting_point;
        for (std::size_t e = 0; e < liquid.size(); ++e) back += alloy.elements[e].liquidus_slope * liquid[e];
        if (!(std::abs(back - T) < 1e-9)) FAIL("the liquid at " << T << " K has its liquidus at " << back << " K");
      }
      CHECK(path.fraction_below(path.end_of_freezing()) == Approx(1).margin(1e-12));
    }
}

TEST_CASE("dilute alloys have enthalpy curves", "[alloy][dilute][curve]") {
  const auto metal = samples::constant_metal();
  for (const DiluteAlloy& alloy : {aluminum(), delta_steel()})
    for (const Mixing mixing : kAll) {
      const auto path = freeze_dilute(alloy, mixing).path();
      const alloy::EnthalpyCurve curve(metal, path, 300, 2000);
      CHECK(curve.arrests().size() == path.arrests().size());
      // All of the latent heat, and both heat capacities weighed by the fraction solid, lie in the freezing range.
      const double heat = curve.liquidus_enthalpy() - curve.end_of_freezing_enthalpy();
      CHECK(heat > 2500 * (397010 + 1000 * path.freezing_range()));
      CHECK(heat < 2500 * (397010 + 1100 * path.freezing_range()));
      for (int i = 1; i < 20; ++i) {
        const double T = path.liquidus() - path.freezing_range() * i / 20;
        CHECK(curve.fraction_solid(curve.enthalpy(T)) == Approx(path.fraction_above(T)).margin(1e-3));
      }
    }
}

TEST_CASE("diffusivity of carbon in delta ferrite", "[alloy][dilute]") {
  // Won & Thomas 2001: 0.0127 exp(-19450 / (R T)) cm2/s with R in cal/mol/K; computed with R = 8.314462618 J/mol/K
  // and 4.184 J/cal.
  const alloy::Diffusivity carbon{0.0127e-4, 19450 * 4.184};
  CHECK(carbon.at(1773.15) == Approx(5.0879091e-09).epsilon(1e-6));
  CHECK_THROWS_AS(carbon.at(0), base::InputError);
}

TEST_CASE("dilute alloys that cannot freeze are refused", "[alloy][dilute][errors]") {
  const auto refuses = [](const DiluteAlloy& alloy, Mixing mixing, const std::string& words) {
    REQUIRE_THROWS_WITH(freeze_dilute(alloy, mixing), Catch::Matchers::Contains(words));
  };
  DiluteAlloy a = aluminum();
  a.end = {};
  CHECK(freeze_dilute(a, Mixing::lever).last_liquid_fraction() == 0);
  refuses(a, Mixing::scheil, "the last liquid never freezes");
  refuses(a, Mixing::partial, "the last liquid never freezes");
  a.end.temperature = 900;
  refuses(a, Mixing::lever, "below the liquidus");
  a.end = {{}, 1.0};
  refuses(a, Mixing::scheil, "largest fraction solid");
  a.end = {{}, 0.999};
  refuses(a, Mixing::scheil, "below 0 K");
  refuses({"base", 900, {{"X", 20, -1, 0.1, {}, false}}, {{}, 0.9}}, Mixing::scheil, "mass % of solute");
  a = aluminum();
  a.elements[0].partition_coefficient = 0;
  refuses(a, Mixing::lever, "partition coefficient");
  a = aluminum();
  a.elements[0].composition = -1;
  refuses(a, Mixing::lever, "Si");
  a.elements[0].composition = 99.9;
  refuses(a, Mixing::lever, "add up");
  a = {"Al", 933.473, {}, {800, {}}};
  refuses(a, Mixing::lever, "pure metal");
  // Used up, titanium leaves pure aluminum, which is frozen above the end asked for.
  refuses({"Al", 933.473, {{"Ti", 0.12, 33, 8, {}, false}}, {900, {}}}, Mixing::scheil, "used up before");
  // An element that lifts the liquidus and gathers in the liquid: the temperature would rise as the alloy freezes.
  a.elements = {{"Y", 2, 5, 0.5, {}, false}};
  refuses(a, Mixing::scheil, "does not fall strictly");
  // At first the titanium-like element lowers the temperature as it is used up; then the other lifts it.
  a.elements = {{"X", 0.1, 33, 8, {}, false}, {"Y", 2, 5, 0.5, {}, false}};
  refuses(a, Mixing::scheil, "does not fall strictly");
  a.end = {};
  refuses(a, Mixing::lever, "does not fall strictly");
}
