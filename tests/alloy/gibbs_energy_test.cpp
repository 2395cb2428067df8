// Gibbs energies: what they say of the pure elements, and that their derivatives are derivatives of their values.
#include "palier/alloy/gibbs_energy.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <string>

#include "alloy/assessments.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::CompoundPhase;
using alloy::EnergyTerms;
using alloy::IsothermalEnergy;
using alloy::kGasConstant;
using alloy::MolarEnergy;
using alloy::SolutionPhase;
using alloy::UnaryEnergy;

namespace {

/// Temperature at which both are equal, by bisection; the liquid is the more stable at high.
double crossing(const UnaryEnergy& solid, const UnaryEnergy& liquid, double low, double high) {
  for (int i = 0; i < 100; ++i) {
    const double mid = 0.5 * (low + high);
    (liquid.value(mid) < solid.value(mid) ? high : low) = mid;
  }
  return 0.5 * (low + high);
}

/// Terms of every kind, each of some weight at 900 K; invented.
constexpr EnergyTerms kAllTerms{-8000, 120, -24, -2e-3, 8e-7, 5e4, 3e-20, -1e28};

}  // namespace

TEST_CASE("melting points and heats of fusion of the elements", "[alloy][gibbs]") {
  struct Row {
    std::string name;
    UnaryEnergy solid, liquid;
    double melting_point;  ///< [K] ITS-90 and, of Si, Ni and Pb, A.T. Dinsdale, Calphad 15 (1991) 317
    double within;         ///< [K] nickel is without its magnetic part
    double heat;           ///< [J/mol] computed from the same functions with 30-digit arithmetic
  };
  for (const Row& row : {Row{"Al", samples::al_fcc(), samples::al_liquid(), 933.473, 0.005, 10711.5},
                         Row{"Si", samples::si_diamond(), samples::si_liquid(), 1687, 0.005, 50208.4},
                         Row{"Cu", samples::cu_fcc(), samples::cu_liquid(), 1357.77, 0.005, 13263.0},
                         Row{"Ni", samples::ni_fcc(), samples::ni_liquid(), 1728, 0.1, 17469.5},
                         Row{"Zn", samples::zn_hcp(), samples::zn_liquid(), 692.677, 0.005, 7321.7},
                         Row{"Pb", samples::pb_fcc(), samples::pb_liquid(), 600.61, 0.005, 4773.7},
                         Row{"Sn", samples::sn_bct(), samples::sn_liquid(), 505.078, 0.005, 7029.3},
                         Row{"Ag", samples::ag_fcc(), samples::ag_liquid(), 1234.93, 0.005, 11296.5}}) {
    INFO(row.name);
    const double T = crossing(row.solid, row.liquid, row.melting_point - 50, row.melting_point + 50);
    CHECK(std::abs(T - row.melting_point) < row.within);
    // The pieces meet at about T, and their heats differ by up to 1 J/mol there (nickel).
    CHECK(row.liquid.enthalpy(T) - row.solid.enthalpy(T) == Approx(row.heat).epsilon(1e-4));
  }
}

TEST_CASE("heats of fusion are those of calorimetry", "[alloy][gibbs]") {
  // M.W. Chase, NIST-JANAF Thermochemical Tables, 4th ed. (1998): Cu 13.138, Ni 17.155, Pb 4.774 kJ/mol. Assessments
  // differ by 1 or 2 %.
  const auto heat = [](const UnaryEnergy& solid, const UnaryEnergy& liquid, double T) {
    return liquid.enthalpy(T) - solid.enthalpy(T);
  };
  CHECK(heat(samples::cu_fcc(), samples::cu_liquid(), 1357.77) == Approx(13138).epsilon(0.02));
  CHECK(heat(samples::ni_fcc(), samples::ni_liquid(), 1728) == Approx(17155).epsilon(0.02));
  CHECK(heat(samples::pb_fcc(), samples::pb_liquid(), 600.61) == Approx(4774).epsilon(0.02));
}

TEST_CASE("each term of a Gibbs energy", "[alloy][gibbs]") {
  const double T = 900;
  CHECK(EnergyTerms{7}.value(T) == 7);
  CHECK(EnergyTerms{0, 7}.value(T) == Approx(7 * T));
  CHECK(EnergyTerms{0, 0, 7}.value(T) == Approx(7 * T * std::log(T)));
  CHECK(EnergyTerms{0, 0, 0, 7}.value(T) == Approx(7 * T * T));
  CHECK(EnergyTerms{0, 0, 0, 0, 7}.value(T) == Approx(7 * std::pow(T, 3)));
  CHECK(EnergyTerms{0, 0, 0, 0, 0, 7}.value(T) == Approx(7 / T));
  CHECK(EnergyTerms{0, 0, 0, 0, 0, 0, 7}.value(T) == Approx(7 * std::pow(T, 7)));
  CHECK(EnergyTerms{0, 0, 0, 0, 0, 0, 0, 7e30}.value(T) == Approx(7e30 * std::pow(T, -9)));
  const double h = 1e-2;
  CHECK(kAllTerms.slope(T) == Approx((kAllTerms.value(T + h) - kAllTerms.value(T - h)) / (2 * h)).epsilon(1e-8));
}

TEST_CASE("pieces join smoothly and are asked for nowhere else", "[alloy][gibbs]") {
  const UnaryEnergy al = samples::al_fcc();
  for (const double T : {700.0, 933.47}) {
    const double h = 1e-6;
    CHECK(al.value(T + h) - al.value(T - h) == Approx(2 * h * al.slope(T)).margin(2e-3));  // printed to 1e-3 J/mol
    CHECK(al.slope(T + h) == Approx(al.slope(T - h)).margin(1e-4));
  }
  CHECK_THROWS_AS(al.value(298), base::InputError);
  CHECK_THROWS_WITH(al.value(2901), Catch::Contains("2901") && Catch::Contains("298.15") && Catch::Contains("2900"));
  CHECK_THROWS_AS(UnaryEnergy(300, {}), base::InputError);
  CHECK_THROWS_AS(UnaryEnergy(300, {{900, {}}, {800, {}}}), base::InputError);
  CHECK_THROWS_AS(al.value(std::nan("")), base::InputError);
}

TEST_CASE("sums and multiples of Gibbs energies hold at every temperature of both", "[alloy][gibbs]") {
  const UnaryEnergy al = samples::al_fcc(), cu = samples::cu_fcc(), sn = samples::sn_bct();
  const UnaryEnergy mix = 0.25 * al + 0.75 * cu;
  for (const double T : {300.0, 699.9, 700.0, 700.1, 933.5, 1357.8, 2899.0}) {
    CHECK(mix.value(T) == Approx(0.25 * al.value(T) + 0.75 * cu.value(T)).epsilon(1e-13));
    CHECK(mix.slope(T) == Approx(0.25 * al.slope(T) + 0.75 * cu.slope(T)).epsilon(1e-13));
  }
  CHECK(mix.high() == 2900);
  CHECK((al + sn).low() == 298.15);
  CHECK((al + sn).high() == 800);
  CHECK((al + EnergyTerms{100, -1}).value(500) == Approx(al.value(500) - 400).epsilon(1e-14));
}

TEST_CASE("energy of a solution by its definition", "[alloy][gibbs]") {
  // Invented, with terms up to the third; the sum written out.
  const double T = 800, L[4] = {-10000, 4000, -1500, 700};
  const SolutionPhase phase("test", EnergyTerms{-30000}, EnergyTerms{-40000, 2},
                            {{L[0] - T, 1}, {L[1]}, {L[2]}, {L[3]}});
  const IsothermalEnergy G = phase.at(T);
  for (const double x : {1e-6, 0.1, 0.37, 0.5, 0.8, 0.9999}) {
    const double s = 1 - 2 * x, ideal = kGasConstant * T * (x * std::log(x) + (1 - x) * std::log(1 - x));
    const double excess = x * (1 - x) * (L[0] + s * (L[1] + s * (L[2] + s * L[3])));
    CHECK(G.at(x).value == Approx((1 - x) * -30000 + x * (-40000 + 2 * T) + ideal + excess).epsilon(1e-13));
  }
  CHECK_THROWS_AS(G.at(0), base::InputError);
  CHECK_THROWS_AS(G.at(1.5), base::InputError);
}

TEST_CASE("derivatives of the energies of phases", "[alloy][gibbs]") {
  struct Row {
    std::string name;
    SolutionPhase phase;
    double T;
  };
  const auto al_cu = samples::al_cu_energies();
  const auto al_zn = samples::al_zn_energies();
  for (const Row& row :
       {Row{"Al-Cu liquid", al_cu.liquid, 900}, Row{"Al-Cu theta", std::get<SolutionPhase>(al_cu.solids[1]), 820},
        Row{"Al-Zn fcc", std::get<SolutionPhase>(al_zn.solids[0]), 650},
        Row{"Al-Zn hcp", std::get<SolutionPhase>(al_zn.solids[1]), 650}}) {
    INFO(row.name);
    const IsothermalEnergy G = row.phase.at(row.T), S = row.phase.slope_at(row.T);
    for (const double y : {0.02, 0.3, 0.5, 0.77, 0.99}) {
      const double x = G.first_x() + y * (G.second_x() - G.first_x()), z = std::log(y / (1 - y)), h = 1e-5;
      const MolarEnergy at = G.at(x), below = G.at(x - h), above = G.at(x + h);
      CHECK(at.slope == Approx((above.value - below.value) / (2 * h)).epsilon(1e-6).margin(1e-3));
      CHECK(at.curvature == Approx((above.slope - below.slope) / (2 * h)).epsilon(1e-5));
      CHECK(G.value(y, y * std::log(y) + (1 - y) * std::log(1 - y)) == Approx(at.value).epsilon(1e-12));
      CHECK(G.x(z) == Approx(x).epsilon(1e-12));
      // The tangent at x, over the end members.
      const auto tangent = G.tangent(z), next = G.tangent(z + h), last = G.tangent(z - h);
      CHECK(tangent.first == Approx(at.value + (G.first_x() - x) * at.slope).epsilon(1e-11));
      CHECK(tangent.second == Approx(at.value + (G.second_x() - x) * at.slope).epsilon(1e-11));
      CHECK(tangent.first_slope == Approx((next.first - last.first) / (2 * h)).epsilon(1e-5).margin(1e-3));
      CHECK(tangent.second_slope == Approx((next.second - last.second) / (2 * h)).epsilon(1e-5).margin(1e-3));
      const double dT = 1e-2;
      const double by_difference = (row.phase.at(row.T + dT).at(x).value - row.phase.at(row.T - dT).at(x).value) / 0.02;
      CHECK(S.at(x).value == Approx(by_difference).epsilon(1e-7));
    }
  }
}

TEST_CASE("a phase of fixed composition", "[alloy][gibbs]") {
  const auto phase =
      CompoundPhase::formed_from("AB3", 0.75, EnergyTerms{-1000, 1}, EnergyTerms{-2000}, EnergyTerms{-500, 0.25});
  CHECK(phase.at(400).fixed_composition());
  CHECK(phase.at(400).at(0.75).value == Approx(0.25 * -600 + 0.75 * -2000 - 500 + 100).epsilon(1e-14));
  CHECK(phase.slope_at(400).first() == Approx(0.25 + 0.25).epsilon(1e-14));
  CHECK_THROWS_AS(phase.at(400).at(0.7), base::InputError);
  CHECK_THROWS_AS(CompoundPhase("bad", 1.2, EnergyTerms{}), base::InputError);
  CHECK_THROWS_AS(SolutionPhase("bad", EnergyTerms{}, EnergyTerms{}, 0.5, 0.5, {}), base::InputError);
}
