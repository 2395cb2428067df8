// The numerical dendrite arm against the exact solution for parabolic growth, its order, its balance, its limits; and
// how far the closed forms of back-diffusion are from it.
#include "palier/alloy/arm_model.hpp"

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <cstdio>
#include <functional>
#include <string>
#include <vector>

#include "alloy/sample_alloys.hpp"
#include "palier/alloy/back_diffusion.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::ArmGrowth;
using alloy::BackDiffusion;
using alloy::freeze_arm;

namespace {

/// Kummer's function M(p, q, z) by its series; all terms are positive here.
double kummer(double p, double q, double z) {
  double term = 1, sum = 1;
  for (int i = 0; term > 1e-18 * sum; ++i) {
    term *= (p + i) / (q + i) * z / (i + 1);
    sum += term;
  }
  return sum;
}

/// Liquid over alloy composition under parabolic growth, exact. The equation of the arm does not change when fs is
/// stretched, so each power of fs in the liquid, fs^n, brings its own profile in the solid; its mean over that at the
/// front is M((n+3)/2, 3/2, z) / M((n+1)/2, 1/2, z), z = 1/(4 a), and the solute balance ties each power to the next.
/// Derived for this test; a solution of this kind was first given by S. Kobayashi, J. Cryst. Growth 88 (1988) 87
/// (from memory).
double exact_liquid(double k, double diffusion_number, double fs) {
  const double z = 0.25 / diffusion_number;
  double coefficient = 1, power = 1, sum = 0;
  for (int n = 0; coefficient * power > 1e-17 * sum; ++n) {
    sum += coefficient * power;
    coefficient *= 1 - k * kummer(0.5 * (n + 3), 1.5, z) / kummer(0.5 * (n + 1), 0.5, z);
    power *= fs;
  }
  return sum;
}

double lever(double k, double fs) { return 1 / (1 - (1 - k) * fs); }
double scheil(double k, double fs) { return std::pow(1 - fs, k - 1); }

double liquid_at(const alloy::FrozenArm& arm, double fs) {
  const auto i = static_cast<std::size_t>(std::lround(fs * static_cast<double>(arm.liquid().size() - 1)));
  REQUIRE(arm.fraction_solid()[i] == Approx(fs).margin(1e-12));
  return arm.liquid()[i];
}

/// Lines long enough for liquid a thousand times as rich as an alloy of 0.1 %.
samples::Diagram long_lines(double k) {
  return alloy::make_diagram(alloy::BinaryLines::straight(1000, -1, k, std::nullopt));
}

/// Largest difference in fraction solid, at one composition of the liquid, between a rule and an arm, fs 0.01 to 0.99.
double deviation(BackDiffusion rule, double k, double a, const alloy::FrozenArm& arm) {
  const auto path = alloy::back_diffusion_path(long_lines(k), 0.1, rule, a);
  double largest = 0;
  for (int i = 1; i < 100; ++i) {
    const double off = path.fraction_above(1000 - 0.1 * liquid_at(arm, 0.01 * i)) - 0.01 * i;
    if (std::abs(off) > std::abs(largest)) largest = off;
  }
  return largest;
}

constexpr double kAlCu = 0.17;                  // partition coefficient of the lines of Al-Cu
constexpr double kEutecticOfAl45Cu = 33 / 4.5;  // eutectic liquid over alloy

struct Compared {
  double parabolic, linear;  ///< largest difference in fraction solid
  double share;              ///< eutectic share of Al-4.5Cu under the rule
};

Compared compare(BackDiffusion rule, double a, const alloy::FrozenArm& parabolic, const alloy::FrozenArm& linear) {
  const auto path = alloy::back_diffusion_path(samples::al_cu(), 4.5, rule, a);
  return {deviation(rule, kAlCu, a, parabolic), deviation(rule, kAlCu, a, linear),
          path.arrests().empty() ? 0.0 : path.arrests().back().fraction};
}

}  // namespace

TEST_CASE("arm model: liquid of parabolic growth", "[alloy][arm]") {
  // Exact series summed with 30-digit arithmetic, k = 0.17: liquid at fs 0.5 and 0.9, and the share left for a eutectic
  // of 33 % in an alloy of 4.5 %.
  struct Row {
    double diffusion_number, half, nine_tenths, left;
  };
  for (const Row& row : {Row{0.01, 1.776182020489309, 6.65068470755919, 0.08861748597754},
                         Row{0.1, 1.764766876027255, 6.086737147947443, 0.07693092008268},
                         Row{0.5, 1.7403934172832, 5.163573216916146, 0.05129116034646},
                         Row{1, 1.729535955419927, 4.753948611062172, 0.03467440221556},
                         Row{2, 1.721300321311885, 4.432021341849475, 0.01613346392335},
                         Row{10, 1.71220386926581, 4.065557677477523, 0}}) {
    INFO("diffusion number " << row.diffusion_number);
    CHECK(exact_liquid(kAlCu, row.diffusion_number, 0.5) == Approx(row.half).epsilon(1e-13));
    CHECK(exact_liquid(kAlCu, row.diffusion_number, 0.9) == Approx(row.nine_tenths).epsilon(1e-13));
    const auto arm = freeze_arm({kAlCu, row.diffusion_number}, {800, 8000});
    CHECK(liquid_at(arm, 0.5) == Approx(row.half).epsilon(2e-7));
    CHECK(liquid_at(arm, 0.9) == Approx(row.nine_tenths).epsilon(1e-6));
    CHECK(arm.fraction_left(kEutecticOfAl45Cu) == Approx(row.left).margin(2e-6));
    CHECK((arm.fraction_left(kEutecticOfAl45Cu) == 0) == (row.left == 0));
  }
}

TEST_CASE("arm model: second order in cells from above, in steps from below", "[alloy][arm]") {
  for (const double a : {0.01, 0.1, 1.0}) {
    const double exact = exact_liquid(kAlCu, a, 0.75);
    const auto error = [&](int cells, int steps) {
      return liquid_at(freeze_arm({kAlCu, a}, {cells, steps}), 0.75) - exact;
    };
    INFO("diffusion number " << a);
    for (const int n : {1, 2}) {
      const double wide = error(25 * n, 12800), narrow = error(50 * n, 12800);
      CHECK(narrow > 0);
      CHECK(std::log2(wide / narrow) == Approx(2).margin(0.05));
      const double coarse = error(3200, 100 * n), fine = error(3200, 200 * n);
      CHECK(fine < 0);
      CHECK(std::log2(coarse / fine) == Approx(2).margin(0.05));
    }
  }
}

TEST_CASE("arm model: linear growth converges with second order", "[alloy][arm]") {
  for (const double a : {0.02, 0.1, 1.0}) {
    std::vector<double> left;
    for (const int n : {1, 2, 4, 8})
      left.push_back(freeze_arm({kAlCu, a, ArmGrowth::linear}, {50 * n, 400 * n}).fraction_left(5));
    INFO("diffusion number " << a);
    CHECK(std::log2((left[0] - left[1]) / (left[1] - left[2])) == Approx(2).margin(0.25));
    CHECK(std::log2((left[1] - left[2]) / (left[2] - left[3])) == Approx(2).margin(0.1));
  }
}

TEST_CASE("arm model: no solute is lost", "[alloy][arm]") {
  for (const auto growth : {ArmGrowth::parabolic, ArmGrowth::linear})
    for (const double k : {0.02, 0.17, 0.5, 0.9})
      for (const double a : {0.01, 0.1, 1.0, 10.0, 1000.0}) {
        INFO("k " << k << ", diffusion number " << a);
        const auto arm = freeze_arm({k, a, growth});
        CHECK(arm.imbalance() < 1e-10);
        CHECK(arm.fraction_solid().front() == 0);
        CHECK(arm.fraction_solid().back() == 1);
        CHECK(std::is_sorted(arm.liquid().begin(), arm.liquid().end(), std::less_equal<>()));
        // Between the lever rule and Scheil's, but for the error of the steps.
        bool between = true;
        for (std::size_t i = 0; i < arm.liquid().size(); ++i) {
          const double fs = arm.fraction_solid()[i], c = arm.liquid()[i];
          between = between && c > lever(k, fs) * (1 - 1e-4) && c < scheil(k, fs) * (1 + 1e-4);
        }
        CHECK(between);
      }
}

TEST_CASE("arm model: Scheil's rule without diffusion, lever rule with much", "[alloy][arm]") {
  for (const auto growth : {ArmGrowth::parabolic, ArmGrowth::linear}) {
    const auto fast = freeze_arm({kAlCu, 1e6, growth});
    for (const double fs : {0.25, 0.5, 0.75, 0.95}) {
      CHECK(liquid_at(fast, fs) == Approx(lever(kAlCu, fs)).epsilon(2e-5));
      // What diffuses back falls with the diffusion number, in proportion while the layer is thin.
      std::vector<double> off;
      for (const double a : {4e-3, 2e-3, 1e-3})
        off.push_back(1 - liquid_at(freeze_arm({kAlCu, a, growth}, {800, 8000}), fs) / scheil(kAlCu, fs));
      CHECK(off[0] > 0);
      CHECK(off[0] / off[1] == Approx(2).margin(0.25));
      CHECK(off[1] / off[2] == Approx(2).margin(0.15));
    }
  }
}

TEST_CASE("arm model: just short of the lever rule", "[alloy][arm][lever]") {
  // First order in 1/a. The solid is uniform but for a parabola; its mean falls short of the surface w by fs^2 w'/(3 a)
  // where growth is linear and fs w'/(6 a) where it is parabolic, and the liquid is richer, relatively, by fs times
  // that. Derived from the equations in the header; what is left out is of the order of 1/a, relatively.
  constexpr double k = 0.17;
  for (const double a : {100.0, 400.0})
    for (const double fs : {0.25, 0.5, 0.75}) {
      INFO("diffusion number " << a << ", fraction solid " << fs);
      const double rise = (1 - k) * k * lever(k, fs) * lever(k, fs);
      const auto excess = [&](ArmGrowth growth) {
        return liquid_at(freeze_arm({k, a, growth}, {200, 8000}), fs) / lever(k, fs) - 1;
      };
      CHECK(excess(ArmGrowth::linear) == Approx(fs * fs * fs * rise / (3 * a)).epsilon(2 / a + 0.01));
      CHECK(excess(ArmGrowth::parabolic) == Approx(fs * fs * rise / (6 * a)).epsilon(2 / a + 0.01));
    }
}

TEST_CASE("arm model: what cannot be is refused", "[alloy][arm]") {
  CHECK_THROWS_WITH(freeze_arm({1.0, 0.1}), Catch::Contains("partition coefficient"));
  CHECK_THROWS_AS(freeze_arm({0.0, 0.1}), base::InputError);
  CHECK_THROWS_WITH(freeze_arm({0.17, 0.0}), Catch::Contains("Scheil"));
  CHECK_THROWS_WITH(freeze_arm({0.17, 2e6}),
                    "diffusion number of the arm model: found 2e+06; expected a number above 0, where Scheil's rule is "
                    "the limit, and up to 1e+06, where it is the lever rule");
  CHECK_THROWS_AS(freeze_arm({0.17, NAN}), base::InputError);
  CHECK_THROWS_AS(freeze_arm({0.17, 0.1}, {200, 3}), base::InputError);
  CHECK_THROWS_WITH(freeze_arm({0.17, 0.01}, {24, 100}),
                    "cells of the arm model: found 24; expected at least 25 at diffusion number 0.01");
  CHECK_NOTHROW(freeze_arm({0.17, 0.01}, {25, 100}));
  CHECK_THROWS_AS(freeze_arm({0.17, 0.01, ArmGrowth::linear}, {49, 100}), base::InputError);
  CHECK_THROWS_AS(freeze_arm({0.17, 0.1}).fraction_left(0.99), base::InputError);
  CHECK(freeze_arm({0.17, 0.1}).fraction_left(1) == Approx(1).margin(1e-12));
}

TEST_CASE("how far Clyne-Kurz and Ohnaka are from the arm", "[alloy][arm][back-diffusion]") {
  // Largest difference in fraction solid at one composition of the liquid, k = 0.17, computed from the exact series for
  // parabolic growth, which both rules assume. Both give too much solid, most in the last tenth: their form lets the
  // whole arm follow the last, steep rise of the liquid.
  struct Row {
    double diffusion_number, clyne_kurz, ohnaka;
  };
  std::string table =
      "fraction solid of the rules less that of the arm, k = 0.17; eutectic share of Al-4.5Cu, parabolic\n"
      "number | parabolic: Clyne-Kurz, Ohnaka | linear: Clyne-Kurz, Ohnaka | share: arm, Clyne-Kurz, Ohnaka\n";
  for (const Row& row : {Row{0.01, 0.001218, 0.001155}, Row{0.02, 0.002998, 0.002752}, Row{0.05, 0.009119, 0.007673},
                         Row{0.1, 0.016478, 0.012417}, Row{0.2, 0.023064, 0.020000}, Row{0.5, 0.028449, 0.028908},
                         Row{1, 0.028634, 0.029871}, Row{2, 0.023080, 0.023732}, Row{5, 0.014127, 0.014288},
                         Row{10, 0.008606, 0.008653}}) {
    const double a = row.diffusion_number;
    INFO("diffusion number " << a);
    const auto parabolic = freeze_arm({kAlCu, a}), linear = freeze_arm({kAlCu, a, ArmGrowth::linear});
    const Compared ck = compare(BackDiffusion::clyne_kurz, a, parabolic, linear),
                   ohnaka = compare(BackDiffusion::ohnaka, a, parabolic, linear);
    char line[120];
    std::snprintf(line, sizeof line, "%6g | %.4f %.4f | %.4f %.4f | %.4f %.4f %.4f\n", a, ck.parabolic,
                  ohnaka.parabolic, ck.linear, ohnaka.linear, parabolic.fraction_left(kEutecticOfAl45Cu), ck.share,
                  ohnaka.share);
    table += line;
    CHECK(ck.parabolic == Approx(row.clyne_kurz).margin(2e-5));
    CHECK(ohnaka.parabolic == Approx(row.ohnaka).margin(2e-5));
    for (const Compared& rule : {ck, ohnaka}) {
      CHECK(rule.parabolic < 0.03);
      // A linear front is faster at the end and leaves less time to diffuse back.
      CHECK(rule.linear > rule.parabolic);
      CHECK(rule.linear < 0.042);
      CHECK(rule.share <= parabolic.fraction_left(kEutecticOfAl45Cu));
    }
  }
  WARN(table);
}

TEST_CASE("Clyne-Kurz and Ohnaka over partition coefficients", "[alloy][arm][back-diffusion]") {
  double worst = 0;
  for (const double k : {0.05, 0.1, 0.3, 0.5, 0.8})
    for (const double a : {0.01, 0.05, 0.1, 0.2, 0.5, 1.0, 2.0, 10.0}) {
      INFO("k " << k << ", diffusion number " << a);
      const auto arm = freeze_arm({k, a}, {100, 1000});
      for (const BackDiffusion rule : {BackDiffusion::clyne_kurz, BackDiffusion::ohnaka}) {
        const double off = std::abs(deviation(rule, k, a, arm));
        CHECK(off < 0.04);
        worst = std::max(worst, off);
      }
    }
  CHECK(worst > 0.035);  // the bound is not a generous one
}

TEST_CASE("Brody-Flemings at 1/2 is the lever rule, the arm is not", "[alloy][arm][back-diffusion]") {
  // The rule conserves solute only with a solid as uniform as its surface; the arm at this number is far from that.
  const auto arm = freeze_arm({kAlCu, 0.5});
  CHECK(std::abs(deviation(BackDiffusion::brody_flemings, kAlCu, 0.5, freeze_arm({kAlCu, 1e6}))) < 1e-5);
  CHECK(deviation(BackDiffusion::brody_flemings, kAlCu, 0.5, arm) > 0.05);
  for (const BackDiffusion rule : {BackDiffusion::clyne_kurz, BackDiffusion::ohnaka})
    CHECK(deviation(BackDiffusion::brody_flemings, kAlCu, 0.5, arm) > 1.5 * deviation(rule, kAlCu, 0.5, arm));
}
