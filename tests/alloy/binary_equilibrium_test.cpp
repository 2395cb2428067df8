// Binary phase diagrams from Gibbs energies: invariants, lines at given temperatures, closed forms.
#include "palier/alloy/binary_equilibrium.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <chrono>
#include <cmath>
#include <functional>
#include <stdexcept>
#include <string>
#include <vector>

#include "alloy/assessments.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::BinaryEquilibrium;
using alloy::BinaryInvariant;
using alloy::BinarySystem;
using alloy::Branch;
using alloy::BranchEnd;
using alloy::CompoundPhase;
using alloy::EnergyTerms;
using alloy::kGasConstant;
using alloy::SolutionPhase;
using alloy::TwoPhases;

namespace {

constexpr double kZero = 273.15;  // degC in K

struct NamedSystem {
  std::string name;
  BinarySystem system;
  double low, high;  ///< [K]
};

std::vector<NamedSystem> published() {
  return {{"Al-Si", samples::al_si_energies(), 500, 1750}, {"Al-Cu", samples::al_cu_energies(), 700, 1400},
          {"Al-Zn", samples::al_zn_energies(), 500, 1000}, {"Cu-Ni", samples::cu_ni_energies(), 1000, 1800},
          {"Ag-Cu", samples::ag_cu_energies(), 800, 1400}, {"Pb-Sn", samples::pb_sn_energies(), 350, 650}};
}

NamedSystem named(const std::string& name) {
  for (const NamedSystem& s : published())
    if (s.name == name) return s;
  throw std::logic_error(name);
}

BinaryEquilibrium equilibrium(const NamedSystem& s) { return alloy::binary_equilibrium(s.system, s.low, s.high); }

/// The coldest invariant with liquid.
BinaryInvariant last_invariant(const std::string& name) { return equilibrium(named(name)).invariants.back(); }

/// An invented binary of elements A and B of atomic weight 10 and 40 with ideal liquid, melting at 1000 and 800 K with
/// entropies of fusion 10 and 8 J/mol/K, that do not dissolve each other when solid.
constexpr double kTa = 1000, kTb = 800, kSa = 10, kSb = 8;
BinarySystem insoluble(std::vector<EnergyTerms> interaction = {}) {
  return {"A",
          "B",
          10,
          40,
          SolutionPhase("liquid", EnergyTerms{}, EnergyTerms{}, std::move(interaction)),
          {CompoundPhase("solid A", 0, EnergyTerms{-kSa * kTa, kSa}),
           CompoundPhase("solid B", 1, EnergyTerms{-kSb * kTb, kSb})}};
}

/// Mole fraction of B in an ideal liquid in equilibrium with solid A: I. Schroeder, Z. Phys. Chem. 11 (1893) 449.
double schroeder_a(double T) { return 1 - std::exp(-kSa * (kTa - T) / (kGasConstant * T)); }
double schroeder_b(double T) { return std::exp(-kSb * (kTb - T) / (kGasConstant * T)); }

double bisect(double low, double high, const std::function<double(double)>& f) {  // f(low) < 0 < f(high)
  for (int i = 0; i < 200; ++i) {
    const double mid = 0.5 * (low + high);
    (f(mid) < 0 ? low : high) = mid;
  }
  return 0.5 * (low + high);
}

}  // namespace

TEST_CASE("eutectics computed from published Gibbs energies", "[alloy][equilibrium]") {
  // The equations of equal potentials solved independently with 30-digit arithmetic.
  struct Row {
    std::string name;
    double T;                            ///< [degC]
    double first, liquid, second;        ///< mole fractions
    double first_w, liquid_w, second_w;  ///< mass %
  };
  for (const Row& row :
       {Row{"Al-Si", 576.99964, 0.01488556867, 0.1207014428, 0.9999991035, 1.548492625, 12.50206938, 99.99991387},
        Row{"Al-Cu", 547.589507, 0.0253891009, 0.1748502276, 0.3175490079, 5.780569324, 33.29126017, 52.28679152},
        Row{"Al-Zn", 380.846396, 0.6731016961, 0.8835091575, 0.9691018152, 83.30353168, 94.83941631, 98.70127989},
        Row{"Ag-Cu", 779.864016, 0.131438514, 0.4029000018, 0.9550036002, 8.185218371, 28.44405515, 92.59437414},
        Row{"Pb-Sn", 182.986676, 0.268873033, 0.7403987152, 0.9797808147, 17.40274021, 62.03516217, 96.52328368}}) {
    INFO(row.name);
    const BinaryInvariant i = last_invariant(row.name);
    CHECK(i.reaction == "eutectic");
    CHECK(i.temperature - kZero == Approx(row.T).margin(1e-6));  // given to 1e-6 or 1e-5 K
    REQUIRE(i.phases.size() == 3);
    CHECK(i.phases[1].phase == "liquid");
    const double x[3] = {row.first, row.liquid, row.second}, w[3] = {row.first_w, row.liquid_w, row.second_w};
    for (std::size_t p = 0; p < 3; ++p) {
      CHECK(i.phases[p].mole_fraction == Approx(x[p]).margin(1e-10));
      CHECK(i.phases[p].mass_percent == Approx(w[p]).margin(1e-8));
    }
  }
}

TEST_CASE("eutectics of published diagrams", "[alloy][equilibrium]") {
  // Compiled diagrams, in degC and mass % of the second element. Al-Si: J.L. Murray, A.J. McAlister, Bull. Alloy Phase
  // Diagrams 5 (1984) 74; Al-Cu: J.L. Murray, Int. Met. Rev. 30 (1985) 211; Al-Zn: J.L. Murray, Bull. Alloy Phase
  // Diagrams 4 (1983) 55; Ag-Cu: P.R. Subramanian, J.H. Perepezko, J. Phase Equilib. 14 (1993) 62; Pb-Sn: I. Karakaya,
  // W.T. Thompson, J. Phase Equilib. 9 (1988) 144. Compositions but that of the Al-Si liquid from memory.
  struct Row {
    std::string name;
    double T, first, liquid, second;
    double within_T, within;  ///< what the assessments allow themselves: [K], [mass %]
  };
  for (const Row& row : {Row{"Al-Si", 577, 1.65, 12.6, 100, 1, 0.2}, Row{"Al-Cu", 548.2, 5.65, 33.2, 52.5, 1, 0.3},
                         Row{"Al-Zn", 381, 83.1, 95.0, 98.8, 1, 0.3}, Row{"Ag-Cu", 779.1, 8.8, 28.1, 92.0, 1, 0.7},
                         Row{"Pb-Sn", 183, 18.3, 61.9, 97.8, 0.1, 1.4}}) {
    INFO(row.name);
    const BinaryInvariant i = last_invariant(row.name);
    CHECK(i.temperature - kZero == Approx(row.T).margin(row.within_T));
    CHECK(i.phases[0].mass_percent == Approx(row.first).margin(row.within));
    CHECK(i.phases[1].mass_percent == Approx(row.liquid).margin(row.within));
    CHECK(i.phases[2].mass_percent == Approx(row.second).margin(row.within));
  }
}

TEST_CASE("liquid and solid at given temperatures", "[alloy][equilibrium]") {
  // The equations of equal potentials solved independently with 30-digit arithmetic.
  struct Row {
    std::string name;
    double T, liquid, solid;  ///< [degC], mole fractions
  };
  const std::vector<Row> rows{
      {"Al-Si", 580, 0.1168760162, 0.01430459357},     {"Al-Si", 600, 0.09049001772, 0.0105318096},
      {"Al-Si", 620, 0.0624097089, 0.006916303088},    {"Al-Si", 640, 0.03244865479, 0.003433118137},
      {"Al-Si", 655, 0.008687623851, 0.0008904262669}, {"Al-Cu", 550, 0.1717597021, 0.02442092642},
      {"Al-Cu", 565, 0.1518029138, 0.01928884792},     {"Al-Cu", 580, 0.1305123288, 0.01518803717},
      {"Al-Cu", 595, 0.1078574622, 0.01171760799},     {"Al-Zn", 400, 0.8485926766, 0.6140231297},
      {"Al-Zn", 460, 0.6980480016, 0.3242248765},      {"Al-Zn", 520, 0.4787822228, 0.1821103233},
      {"Al-Zn", 580, 0.240510012, 0.09528927806},      {"Al-Zn", 640, 0.05336703076, 0.02198056156},
      {"Al-Zn", 385, 0.8975899288, 0.9721582053},      {"Al-Zn", 400, 0.944815183, 0.9838148181},
      {"Al-Zn", 415, 0.9877077302, 0.9961736833},      {"Ag-Cu", 780, 0.4024577995, 0.131382266},
      {"Ag-Cu", 840, 0.2399861381, 0.09793692252},     {"Ag-Cu", 900, 0.1144727338, 0.05312992671},
      {"Ag-Cu", 960, 0.003199247657, 0.001609895221},  {"Ag-Cu", 780, 0.4032311036, 0.9549928316},
      {"Ag-Cu", 860, 0.6148724561, 0.9530108783},      {"Ag-Cu", 940, 0.7894937153, 0.9617687564},
      {"Ag-Cu", 1000, 0.8877957782, 0.9747641326},     {"Ag-Cu", 1080, 0.9944173706, 0.9984493211},
      {"Pb-Sn", 185, 0.734600775, 0.2681503616},       {"Pb-Sn", 220, 0.6013805193, 0.2460169623},
      {"Pb-Sn", 260, 0.3709607106, 0.1906643802},      {"Pb-Sn", 300, 0.1439798617, 0.09107873915},
      {"Pb-Sn", 325, 0.01271902291, 0.008739788251},   {"Pb-Sn", 185, 0.7556959394, 0.9800820275},
      {"Pb-Sn", 205, 0.8783651906, 0.9854872673},      {"Pb-Sn", 230, 0.9922148028, 0.9986787337},
      {"Cu-Ni", 1090, 0.008736308383, 0.01341059382},  {"Cu-Ni", 1180, 0.1711475219, 0.2592674891},
      {"Cu-Ni", 1270, 0.3763925031, 0.5230997788},     {"Cu-Ni", 1360, 0.6651168124, 0.7558202017},
      {"Cu-Ni", 1450, 0.9835124412, 0.9870444459},
  };
  for (const Row& row : rows) {
    INFO(row.name << " at " << row.T << " degC");
    double nearest = 1;
    for (const TwoPhases& pair : alloy::equilibria_at(named(row.name).system, row.T + kZero)) {
      const std::size_t l = pair[0].phase == "liquid" ? 0 : 1;
      if (pair[l].phase == "liquid")
        nearest = std::min(nearest, std::max(std::abs(pair[l].mole_fraction - row.liquid),
                                             std::abs(pair[1 - l].mole_fraction - row.solid)));
    }
    CHECK(nearest < 1e-10);
  }
}

TEST_CASE("a millikelvin above a eutectic there is liquid, a millikelvin below there is none", "[alloy][equilibrium]") {
  for (const NamedSystem& s : published()) {
    if (s.name == "Cu-Ni") continue;
    INFO(s.name);
    const BinaryInvariant eutectic = last_invariant(s.name);
    const auto above = alloy::equilibria_at(s.system, eutectic.temperature + 1e-3);
    const auto below = alloy::equilibria_at(s.system, eutectic.temperature - 1e-3);
    const auto with_liquid = [](const TwoPhases& p) { return p[0].phase == "liquid" || p[1].phase == "liquid"; };
    CHECK(std::count_if(above.begin(), above.end(), with_liquid) >= 2);
    const auto cold = std::find_if(below.begin(), below.end(), [&](const TwoPhases& p) {
      return std::abs(p[0].mole_fraction - eutectic.phases[0].mole_fraction) < 1e-4 &&
             std::abs(p[1].mole_fraction - eutectic.phases[2].mole_fraction) < 1e-4;
    });
    CHECK(cold != below.end());
  }
}

TEST_CASE("every line is an equilibrium: equal potentials, continuous, falling", "[alloy][equilibrium]") {
  for (const NamedSystem& s : published()) {
    INFO(s.name);
    for (const Branch& b : equilibrium(s).branches) {
      const auto solid = std::find_if(s.system.solids.begin(), s.system.solids.end(), [&](const auto& phase) {
        return std::visit([](const auto& p) { return p.name(); }, phase) == b.solid;
      });
      REQUIRE(solid != s.system.solids.end());
      for (std::size_t i = 1; i + 1 < b.points.size(); ++i) {
        const auto& p = b.points[i];
        REQUIRE(p.temperature < b.points[i - 1].temperature);
        const auto l = s.system.liquid.at(p.temperature).at(p.liquid);
        const auto g = std::get<SolutionPhase>(*solid).at(p.temperature).at(p.solid);
        // Potentials of both elements. Rounding: of energies of 1e5 J/mol, and of the rarer element's share, which is
        // taken from a mole fraction close to 1.
        const double rarer = std::min({p.liquid, p.solid, 1 - p.liquid, 1 - p.solid});
        const double rounding = 1e-9 + kGasConstant * p.temperature * 1e-15 / rarer;
        if (std::abs((l.value - p.liquid * l.slope) - (g.value - p.solid * g.slope)) > rounding ||
            std::abs((l.value + (1 - p.liquid) * l.slope) - (g.value + (1 - p.solid) * g.slope)) > rounding)
          FAIL("potentials differ at " << p.temperature << " K");
        const auto &hot = b.points[i - 1], &cold = b.points[i + 1];
        if (std::isinf(hot.liquid_slope)) continue;
        // The pieces of nickel's energies miss each other by 0.08 J/mol at 1728 K, a step of 0.008 K in its liquidus.
        if (hot.temperature > 1728 && cold.temperature < 1728) continue;
        // A slope by differences may be off by as much as the slopes at both neighbors differ, and at an inflection by
        // the next order.
        const double slope = (hot.liquid - cold.liquid) / (hot.temperature - cold.temperature);
        const double spread = std::abs(hot.liquid_slope - cold.liquid_slope) + 1e-4 * std::abs(slope);
        if (std::abs(slope - p.liquid_slope) > spread) FAIL("slope of the liquidus at " << p.temperature << " K");
      }
    }
  }
}

TEST_CASE("branches begin and end where they should", "[alloy][equilibrium]") {
  const BinaryEquilibrium al_si = equilibrium(named("Al-Si"));
  CHECK(al_si.first_melting_point == Approx(660.3208 + kZero).margin(1e-4));
  CHECK(al_si.second_melting_point == Approx(1687).margin(1e-4));
  REQUIRE(al_si.branches.size() == 2);
  CHECK(al_si.branches[0].solid == "diamond");
  CHECK(al_si.branches[0].hot_end == BranchEnd::second_melts);
  CHECK(al_si.branches[1].solid == "fcc");
  CHECK(al_si.branches[1].hot_end == BranchEnd::first_melts);
  for (const Branch& b : al_si.branches) {
    CHECK(b.cold_end == BranchEnd::invariant);
    CHECK(b.points.back().temperature == al_si.invariants[0].temperature);
    CHECK(b.points.back().liquid == Approx(al_si.invariants[0].phases[1].mole_fraction).margin(1e-11));
  }
  // One line across the whole diagram, and no invariant.
  const BinaryEquilibrium cu_ni = equilibrium(named("Cu-Ni"));
  CHECK(cu_ni.invariants.empty());
  REQUIRE(cu_ni.branches.size() == 1);
  CHECK(cu_ni.branches[0].hot_end == BranchEnd::second_melts);
  CHECK(cu_ni.branches[0].cold_end == BranchEnd::first_melts);
  CHECK(cu_ni.branches[0].points.front().liquid == 1);
  CHECK(cu_ni.branches[0].points.back().liquid == 0);
}

TEST_CASE("a miscibility gap is one phase twice", "[alloy][equilibrium]") {
  // Both solids of Ag-Cu are fcc.
  const auto ag_cu = alloy::equilibria_at(samples::ag_cu_energies(), 1000);
  REQUIRE(ag_cu.size() == 1);
  CHECK(ag_cu[0][0].phase == "fcc");
  CHECK(ag_cu[0][1].phase == "fcc");
  // Regular solution: ln(x / (1 - x)) = (2 x - 1) L0 / (R T) at the edges of the gap.
  const double L0 = 20000;
  const BinarySystem system = insoluble({{L0}});
  for (const double T : {1010.0, 1100.0, 1200.0}) {
    const double x =
        bisect(1e-6, 0.499, [&](double v) { return std::log(v / (1 - v)) - (2 * v - 1) * L0 / (kGasConstant * T); });
    const auto gap = alloy::equilibria_at(system, T);
    REQUIRE(gap.size() == 1);
    CHECK(gap[0][0].phase == "liquid");
    CHECK(gap[0][1].phase == "liquid");
    CHECK(gap[0][0].mole_fraction == Approx(x).margin(1e-10));
    CHECK(gap[0][1].mole_fraction == Approx(1 - x).margin(1e-10));
  }
  CHECK(alloy::equilibria_at(system, 1210).empty());  // above L0 / (2 R)
  // On cooling the gap meets solid A: L1 -> solid A + L2.
  const BinaryEquilibrium all = alloy::binary_equilibrium(system, 400, 1300);
  REQUIRE(all.invariants.size() == 2);
  CHECK(all.invariants[0].reaction == "monotectic");
  CHECK(all.invariants[1].reaction == "eutectic");
  const auto diagram = alloy::diagram_from(system, all, alloy::BaseElement::first);
  CHECK_FALSE(diagram->invariant().has_value());  // the second liquid freezes later
  CHECK_THROWS_AS(alloy::scheil_path(diagram, 1), base::InputError);
}

TEST_CASE("ideal liquid over insoluble solids", "[alloy][equilibrium]") {
  const BinaryEquilibrium e = alloy::binary_equilibrium(insoluble(), 400, 1100);
  CHECK(e.first_melting_point == Approx(kTa).epsilon(1e-14));
  const double T = bisect(400, 800, [](double t) { return schroeder_b(t) - schroeder_a(t); });
  REQUIRE(e.invariants.size() == 1);
  CHECK(e.invariants[0].temperature == Approx(T).margin(1e-9));
  CHECK(e.invariants[0].phases[1].mole_fraction == Approx(schroeder_a(T)).margin(1e-11));
  REQUIRE(e.branches.size() == 2);
  for (const Branch& b : e.branches)
    for (const auto& p : b.points) {
      const double x = b.solid == "solid A" ? schroeder_a(p.temperature) : schroeder_b(p.temperature);
      CHECK(p.liquid == Approx(x).margin(1e-11));
      CHECK(p.liquid_percent == Approx(100 * 40 * x / (40 * x + 10 * (1 - x))).margin(1e-9));
      CHECK(p.solid == (b.solid == "solid A" ? 0 : 1));
    }
}

TEST_CASE("two ideal solutions", "[alloy][equilibrium]") {
  // x_s / x_l = exp(dG_B / RT) and (1 - x_s) / (1 - x_l) = exp(dG_A / RT), dG = S (T_m - T): closed form of the lens.
  const BinarySystem system{"A",
                            "B",
                            10,
                            40,
                            SolutionPhase("liquid", EnergyTerms{}, EnergyTerms{}, {}),
                            {SolutionPhase("solid", EnergyTerms{-kSa * kTa, kSa}, EnergyTerms{-kSb * kTb, kSb}, {})}};
  const BinaryEquilibrium e = alloy::binary_equilibrium(system, 700, 1100);
  CHECK(e.invariants.empty());
  REQUIRE(e.branches.size() == 1);
  for (const auto& p : e.branches[0].points) {
    const double T = p.temperature, a = std::exp(kSa * (kTa - T) / (kGasConstant * T)),
                 b = std::exp(kSb * (kTb - T) / (kGasConstant * T));
    CHECK(p.liquid == Approx((a - 1) / (a - b)).margin(1e-11));
    CHECK(p.solid == Approx(b * (a - 1) / (a - b)).margin(1e-11));
  }
  // The slopes at the pure ends against the first differences of the closed form, which is curved.
  const auto &end = e.branches[0].points.front(), &next = e.branches[0].points[1];
  const double T_step = next.temperature - end.temperature;
  CHECK(end.liquid_slope == Approx((next.liquid - end.liquid) / T_step).epsilon(0.01));
  CHECK(end.solid_slope == Approx((next.solid - end.solid) / T_step).epsilon(0.01));
}

TEST_CASE("compounds that melt congruently and that do not", "[alloy][equilibrium]") {
  // A compound AB, h below the liquid of its composition at 0 K: ideal liquid loses R T ln 2 there, so that it melts at
  // h / (s + R ln 2).
  BinarySystem system = insoluble();
  const double s = 12, T = 900, h = T * (s + kGasConstant * std::log(2.0));
  system.solids.emplace_back(CompoundPhase("AB", 0.5, EnergyTerms{-h, s}));
  const BinaryEquilibrium e = alloy::binary_equilibrium(system, 400, 1100);
  REQUIRE(e.invariants.size() == 3);
  CHECK(e.invariants[0].reaction == "congruent");
  CHECK(e.invariants[0].temperature == Approx(T).margin(1e-9));
  CHECK(e.invariants[0].phases[0].mole_fraction == Approx(0.5).margin(1e-12));
  CHECK(e.invariants[1].reaction == "eutectic");
  CHECK(e.invariants[2].reaction == "eutectic");
  CHECK(e.branches.size() == 4);

  // Less stable, at A3B, it forms from solid A and liquid where their tangent meets its energy.
  const double x = 0.25, T_p = 780, xl = schroeder_a(T_p);
  const double a = -kSa * (kTa - T_p), b = kGasConstant * T_p * std::log(xl);  // potentials on the tangent
  const double G = (1 - x) * a + x * b;
  BinarySystem other = insoluble();
  other.solids.emplace_back(CompoundPhase("A3B", x, EnergyTerms{G - 14 * T_p, 14}));
  const BinaryEquilibrium f = alloy::binary_equilibrium(other, 400, 1100);
  REQUIRE(xl > x);
  REQUIRE(f.invariants.size() == 2);
  CHECK(f.invariants[0].reaction == "peritectic");
  CHECK(f.invariants[0].temperature == Approx(T_p).margin(1e-9));
  CHECK(f.invariants[0].phases[1].phase == "A3B");
  CHECK(f.invariants[0].phases[2].mole_fraction == Approx(xl).margin(1e-11));
  CHECK(f.invariants[1].reaction == "eutectic");
  CHECK_FALSE(alloy::diagram_from(other, f, alloy::BaseElement::first)->invariant().has_value());
  CHECK(alloy::diagram_from(other, f, alloy::BaseElement::second)->invariant()->reaction == "eutectic");
}

TEST_CASE("ranges that cannot be worked with are refused", "[alloy][equilibrium]") {
  CHECK_THROWS_WITH(alloy::binary_equilibrium(samples::al_si_energies(), 500, 1500),
                    Catch::Contains("second element has no melting point"));
  CHECK_THROWS_WITH(alloy::binary_equilibrium(samples::al_si_energies(), 200, 1750), Catch::Contains("298.15"));
  CHECK_THROWS_AS(alloy::binary_equilibrium(samples::al_si_energies(), 900, 800), base::InputError);
  BinarySystem weightless = samples::al_si_energies();
  weightless.first_weight = 0;
  CHECK_THROWS_AS(alloy::binary_equilibrium(weightless, 500, 1750), base::InputError);
}

TEST_CASE("time to compute a diagram", "[.][speed]") {
  for (const NamedSystem& s : published()) {
    const auto start = std::chrono::steady_clock::now();
    const BinaryEquilibrium e = equilibrium(s);
    const std::chrono::duration<double, std::milli> taken = std::chrono::steady_clock::now() - start;
    WARN(s.name << ": " << taken.count() << " ms, " << e.branches.size() << " branches");
  }
}
